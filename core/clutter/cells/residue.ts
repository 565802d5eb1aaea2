import type { GroundCode } from '../../landcover/index.ts'
import { fromDb } from '../../units/index.ts'
import type { ImprovementDb } from '../types.ts'

/** What suppression leaves of each kind of clutter, 1/I, ratio. */
export interface Left {
  readonly byCode: Float64Array
  readonly rain: number
  readonly discrete: number
  readonly folded: number
  /** The one value all kinds share, or null where they differ. */
  readonly same: number | null
}

/** Turns improvement factors into what is left by ground code (water takes the value of the sea) and kind; absent: all of it. */
export function leftOf(codes: readonly GroundCode[], improvement?: ImprovementDb): Left {
  const left = (db: number | undefined): number => fromDb(-(db ?? 0))
  const byCode = Float64Array.from(codes, (c, k) => left(c.terrain === 'water' ? improvement?.sea : improvement?.byCode[k]))
  const rain = left(improvement?.rain)
  const discrete = left(improvement?.discrete)
  const folded = left(improvement?.folded)
  const all = [...byCode, rain, discrete, folded]
  return { byCode, rain, discrete, folded, same: all.every((v) => v === all[0]) ? all[0] : null }
}
