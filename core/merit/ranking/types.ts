import type { OptionKey } from './ranking.ts'

/** What one criterion gives an option. */
export interface CriterionScore {
  readonly figure: string
  /** The option's figure; null where it has none. */
  readonly value: number | null
  /** 0 at the stated worst, 1 at the stated best, straight between, held outside; null without a value. */
  readonly u: number | null
  /** Weight over the sum of weights. */
  readonly share: number
}
export interface OptionScore {
  readonly ref: OptionKey
  /** Every must need passes; null: met, but the smaller k is not worked out for one of them. */
  readonly passes: boolean | null
  /** Σw·u over Σw, 0…1; null where a criterion has no value. */
  readonly score: number | null
  /** 1 = first; options of the same score share a rank. */
  readonly rank: number
  readonly criteria: readonly CriterionScore[]
}
/** What becomes of the ranks when one weight is another. */
export interface WeightEffect {
  readonly figure: string
  /** The weight is multiplied by this: 0.8 or 1.2. */
  readonly factor: number
  /** Options whose rank changes, best of the stated ranking first; empty: the ranking holds. */
  readonly changes: readonly { readonly ref: OptionKey; readonly from: number; readonly to: number }[]
}
export interface Ranking {
  /** Best first. */
  readonly options: readonly OptionScore[]
  readonly effects: readonly WeightEffect[]
}
