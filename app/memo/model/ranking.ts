import type { NeedFigure, OptionResult } from '../../../core/index.ts'

/** Needs that must be met and are assessed in this version. */
export const mustNeeds = (r: OptionResult): readonly NeedFigure[] => r.figures.needs.filter((n) => n.must && n.notAssessed === null)
/** Is the share asked in sight? (Line of sight only: never called met or pass.) */
export const reaches = (n: NeedFigure): boolean => n.inSightPct >= n.requiredPct
/** Percentage points missing over all must needs. */
export const shortfallPct = (r: OptionResult): number => mustNeeds(r).reduce((sum, n) => sum + Math.max(0, n.requiredPct - n.inSightPct), 0)

/**
 * Options in the order of the memo: least missing of the must needs' shares in sight, then least ground over 40 dB, then
 * the lower mast. An order of reading, not a score.
 */
export function inOrder(results: readonly OptionResult[]): OptionResult[] {
  return [...results].sort(
    (a, b) =>
      shortfallPct(a) - shortfallPct(b) ||
      a.figures.clutterOverKm2.over40 - b.figures.clutterOverKm2.over40 ||
      a.ref.heightM - b.ref.heightM ||
      (a.ref.candidate < b.ref.candidate ? -1 : 1),
  )
}
export const ORDER_SENTENCE =
  'Order of reading: least missing of the shares asked in sight by the must needs, then least ground with C/N over 40 dB, then the lower mast. It is not a score.'
