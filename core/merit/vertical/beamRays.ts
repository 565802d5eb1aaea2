import { elevationGain } from '../../antenna/index.ts'
import { heightOnRayM } from '../../geodesy/index.ts'
import { type AntennaInput, rangeSegments } from '../../radar/index.ts'
import type { OptionCells } from '../optionCells.ts'
import { antennaM } from '../optionCells.ts'
import type { BeamRay } from './types.ts'

const STEP_DEG = 0.01
const HALF_POWER = 0.5
/** Elevations over this are not drawn as lines. */
const HIGHEST_DEG = 88

/** Lines of the transmitting beams of an option: peak, half power below and above it (nearest to it), upper end of a cosecant-squared pattern or a table. Ranges m, radius of the effective earth m. */
export function beamRays(o: OptionCells, rangeM: Float64Array, effectiveRadiusM: number): BeamRay[] {
  const beams = new Map<string, AntennaInput>()
  for (const s of rangeSegments(o.radar)) {
    const name = s.beams.split(', ')[0]
    if (!beams.has(name)) beams.set(name, s.radar.antenna)
  }
  const mast = antennaM(o)
  return [...beams].flatMap(([beam, antenna]) =>
    anglesOf(antenna, o.tiltDeg).map(
      ({ is, elevationDeg }): BeamRay => ({
        is,
        beam,
        elevationDeg,
        heightM: rangeM.map((r) => heightOnRayM(mast, elevationDeg, r, effectiveRadiusM)),
      }),
    ),
  )
}

function anglesOf(a: AntennaInput, tiltDeg: number): { is: BeamRay['is']; elevationDeg: number }[] {
  const peak = tiltDeg + (a.offsetDeg ?? 0)
  const out: { is: BeamRay['is']; elevationDeg: number }[] = [{ is: 'peak', elevationDeg: peak }]
  const edge = (step: number, limit: number): number | null => {
    for (let n = 1; n * Math.abs(step) <= limit; n++)
      if (elevationGain(a, peak + n * step, tiltDeg) < HALF_POWER - 1e-9) return peak + n * step
    return null
  }
  const lower = edge(-STEP_DEG, 30)
  const upper = edge(STEP_DEG, 60)
  if (lower !== null) out.push({ is: 'lower', elevationDeg: lower })
  if (upper !== null) out.push({ is: 'upper', elevationDeg: upper })
  const end =
    a.elevationPattern === 'cosecant-squared'
      ? peak + a.cosecantLimitDeg - a.elevationBeamwidthDeg / 2
      : a.elevationPattern === 'table'
        ? peak + (a.elevationTable[a.elevationTable.length - 1]?.[0] ?? 90)
        : 90
  if (end < HIGHEST_DEG) out.push({ is: 'end', elevationDeg: end })
  return out.filter((r) => r.elevationDeg < HIGHEST_DEG)
}
