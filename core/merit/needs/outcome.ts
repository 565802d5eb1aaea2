import type { SettledNeed } from '../../study/index.ts'
import { isLowK, type OptionCells } from '../optionCells.ts'
import { LOSS_CAUSES, type LossFigure, type NeedFigure, type NestedPct } from './needTypes.ts'

/** The three shares at both k, and whether the need is met and passes: a study whose own k is no larger than the smaller one needs no other. */
export function outcome(
  o: OptionCells,
  need: SettledNeed,
  shares: NestedPct,
  lowShares: NestedPct,
): NestedPct & Pick<NeedFigure, 'atLowK' | 'met' | 'passes'> {
  const met = reaches(shares.usablePct, need)
  const atLowK = o.lowK ? { k: o.lowK.k, ...lowShares } : null
  const passesLow = atLowK ? reaches(atLowK.usablePct, need) : isLowK(o.earth.effectiveEarthFactor) || null
  return { ...shares, atLowK, met, passes: met ? passesLow : false }
}
/** Sums of areas come out a hair under 100 % where all of it passes. */
const reaches = (pct: number, need: SettledNeed): boolean => pct >= need.requiredPct - 1e-9

/** Largest first; those that take nothing are left out. `lost` by code of LOSS_CAUSES. */
export function lossesOf(lost: ArrayLike<number>, total: number, perUnit: number): LossFigure[] {
  return LOSS_CAUSES.map((cause, n) => ({ cause, pct: total > 0 ? (100 * lost[n + 1]) / total : 0, amount: lost[n + 1] / perUnit }))
    .filter((l) => l.amount > 0)
    .sort((a, b) => b.amount - a.amount)
}
