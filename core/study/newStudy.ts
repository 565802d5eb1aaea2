import type { StudyDoc } from './types.ts'

/** Name of the radar a new study starts with; says what it is. */
export const STARTING_RADAR_NAME = 'Starting values, not a radar'

/** A new study: no files, needs or candidates yet, and a round-number radar so that it runs from the first place on. */
export function newStudy(name: string): StudyDoc {
  return {
    format: 'sightfell-study',
    version: 1,
    name,
    terrain: [],
    radar: {
      name: STARTING_RADAR_NAME,
      frequencyHz: 3e9,
      peakPowerW: 10_000,
      pulseWidthS: 1e-6,
      prfHz: [1000],
      antenna: { gainDbi: 32, azimuthBeamwidthDeg: 1.5, elevationBeamwidthDeg: 5 },
      instrumentedRangeM: 60_000,
    },
    needs: [],
    candidates: [],
  }
}
