import { SPEED_OF_LIGHT_MS } from '../units/index.ts'
import { quantity } from './limits.ts'
import { STARTING_RADAR_NAME } from './newStudy.ts'
import type { SettledStudy, StudyDoc } from './types.ts'

/** Largest area of a beam's solid angle against gain: 4π sr in square degrees. */
const SPHERE_DEG2 = 41_253

/**
 * Remarks on a sound study: what it asks for that is not assessed yet, and numbers that do not fit each other.
 * @returns sentences without a full stop; empty = nothing to say
 */
export function checkStudy(study: SettledStudy, doc?: StudyDoc): string[] {
  const out: string[] = []
  const { radar: r, atmosphere: air, run } = study
  study.needs.forEach((n, i) => {
    if (n.kind === 'layer' && n.toRangeM > run.maxRangeM)
      out.push(`needs[${i}] "${n.name}" reaches ${quantity(n.toRangeM, 'm')}, beyond the grid of ${quantity(run.maxRangeM, 'm')}`)
    if (n.kind === 'layer' && n.toRangeM > r.instrumentedRangeM)
      out.push(`needs[${i}] "${n.name}" reaches beyond the instrumented range of ${quantity(r.instrumentedRangeM, 'm')}`)
    if (n.fromRangeM >= n.toRangeM) out.push(`needs[${i}] "${n.name}" lies wholly beyond the grid of ${quantity(run.maxRangeM, 'm')}`)
  })
  study.confirmations.forEach((c, i) => {
    const candidate = study.candidates.find((x) => x.id === c.candidate)
    if (!candidate?.mastHeightsM.includes(c.heightM))
      out.push(`confirmations[${i}] is of ${c.candidate} at ${quantity(c.heightM, 'm')}, which is no option of the study`)
    if (c.need !== null && !study.needs.some((n) => n.id === c.need))
      out.push(`confirmations[${i}] is of the need "${c.need}", which is not in the study`)
  })
  if (doc?.facades) out.push('facades: kept, not assessed yet')
  const unambiguous = SPEED_OF_LIGHT_MS / (2 * Math.max(...r.prfHz))
  if (r.instrumentedRangeM > unambiguous * 1.001)
    out.push(
      `radar.instrumentedRangeM is beyond the unambiguous range of ${quantity(Math.round(unambiguous), 'm')}: targets farther out appear at a nearer range`,
    )
  const a = r.antenna
  const most = 10 * Math.log10(SPHERE_DEG2 / (a.azimuthBeamwidthDeg * a.elevationBeamwidthDeg))
  if (a.elevationPattern !== 'table' && a.gainDbi > most)
    out.push(
      `radar.antenna.gainDbi ${a.gainDbi} dBi is more than beams of ${a.azimuthBeamwidthDeg} by ${a.elevationBeamwidthDeg} deg can give, ${most.toFixed(1)} dBi`,
    )
  if (r.name === STARTING_RADAR_NAME) out.push('radar: starting values of a new study, not a real radar')
  const k = air.effectiveEarthFactor
  if (k <= 0 || k > 10) out.push('atmosphere.effectiveEarthFactor: flat-earth sweep, a ducting sensitivity and not a prediction')
  return out
}
