import type { RadarInput } from '../../radar/index.ts'
import { SPEED_OF_LIGHT_MS } from '../../units/index.ts'

/** Slant range that one pulse repetition interval covers, m: c/2f. Mathematics. */
export const unambiguousRangeM = (prfHz: number): number => SPEED_OF_LIGHT_MS / (2 * prfHz)

/** Slant range at which an echo from a true slant range appears, m: the rest after whole repetition intervals. Mathematics. */
export const apparentRangeM = (trueRangeM: number, prfHz: number): number => trueRangeM % unambiguousRangeM(prfHz)

/** True slant ranges up to `toM` that appear at a slant range, m: R, R + c/2f, R + 2c/2f …; the first is R itself. Mathematics. */
export function trueRangesM(apparentM: number, prfHz: number, toM: number): number[] {
  const step = unambiguousRangeM(prfHz)
  const out: number[] = []
  for (let r = apparentM; r <= toM; r += step) out.push(r)
  return out
}

/** How far clutter that folds is looked for where a study does not say, m: c/2f of the lowest PRF and the instrumented range. */
export const defaultFoldRangeM = (r: Pick<RadarInput, 'prfHz' | 'instrumentedRangeM'>): number =>
  unambiguousRangeM(Math.min(...r.prfHz)) + r.instrumentedRangeM
