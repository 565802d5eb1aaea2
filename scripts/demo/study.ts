/** The demo's siting study: an invented radar, two needs, three places. */
import type { LonLat, StudyDoc } from '../../core/index.ts'
import { CANDIDATES } from './places.ts'

/** Height of the layer that must be covered low over the western approach, m above sea. */
export const APPROACH_HEIGHT_M = 90

/** `placeOf` gives the position of a candidate from kilometres east and north. */
export function demoStudy(placeOf: (at: readonly [number, number]) => LonLat): StudyDoc {
  return {
    format: 'sightfell-study',
    version: 1,
    name: 'Ommerel: low cover of the western approach (invented island)',
    terrain: [{ file: 'terrain.tif', heights: 'orthometric', verticalErrorM: 1.5, crs: null, unit: null }],
    landCover: { file: 'cover.tif', legend: 'worldcover' },
    obstacles: { file: 'obstacles.geojson' },
    roads: { file: 'roads.geojson' },
    atmosphere: { effectiveEarthFactor: 1.3333333, earthRadiusM: null, gas: 'none', rainRateMmH: 0, windMs: 9, seaState: 4 },
    radar: {
      name: 'Wenlow 324 (invented)',
      frequencyHz: 3.24e9,
      peakPowerW: 35_000,
      pulseWidthS: 4.8e-6,
      compressedPulseWidthS: 0.6e-6,
      noiseBandwidthHz: 1.6e6,
      prfHz: [1600],
      prfMode: 'single',
      coherentTransmitter: true,
      polarisation: 'H',
      rotationRpm: 15,
      noiseFigureDb: 3.2,
      systemLossDb: 5.5,
      pfa: 1e-6,
      antenna: {
        gainDbi: 31,
        azimuthBeamwidthDeg: 1.7,
        elevationBeamwidthDeg: 5.2,
        elevationPattern: 'cosecant-squared',
        cosecantLimitDeg: 28,
        sidelobeDb: -27,
        elevationSidelobeDb: -26,
        tiltDeg: 1.5,
        apertureWidthM: 3.8,
        apertureHeightM: 1.25,
      },
      suppression: { kind: 'stated', statedDb: 32 },
      stc: { kind: 'none' },
      instrumentedRangeM: 33_000,
    },
    needs: [
      {
        id: 'approach',
        name: 'Low over the western approach',
        must: true,
        rcsM2: 1,
        swerling: 1,
        pd: 0.8,
        requiredRatioDb: null,
        kind: 'layer',
        heightM: APPROACH_HEIGHT_M,
        heightAbove: 'sea',
        fromRangeM: 3_000,
        toRangeM: 30_000,
        sectorDeg: [215, 325],
      },
      {
        id: 'island',
        name: 'Over the whole island',
        must: false,
        rcsM2: 1,
        swerling: 1,
        pd: 0.8,
        requiredRatioDb: null,
        kind: 'layer',
        heightM: 800,
        heightAbove: 'sea',
        fromRangeM: 2_000,
        toRangeM: 25_000,
        sectorDeg: [0, 360],
      },
    ],
    candidates: CANDIDATES.map(({ id, name, at, mastHeightsM, clearingRadiusM, notes }) => ({
      id,
      name,
      ...placeOf(at),
      groundHeightM: null,
      mastHeightsM: [...mastHeightsM],
      tiltsDeg: null,
      clearingRadiusM,
      notes,
    })),
    run: { maxRangeM: 33_000, rangeStepM: 60, azimuthStepDeg: 0.25 },
  }
}
