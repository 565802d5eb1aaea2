import type { NeedFigure, OptionResult } from '../../../core/index.ts'

/** Needs that must be met and are assessed. */
export const mustNeeds = (r: OptionResult): readonly NeedFigure[] => r.figures.needs.filter((n) => n.must && n.notAssessed === null)
/** Is the share asked usable, at k = 1 too where that has been worked out? Passing needs both (`passes`). */
export const reaches = (n: NeedFigure): boolean => n.passes ?? n.met
/** Usable share at the less favourable of the two k, %. */
export const usableAtWorstPct = (n: NeedFigure): number => Math.min(n.usablePct, n.atLowK?.usablePct ?? n.usablePct)
/** Percentage points missing over all must needs. */
export const shortfallPct = (r: OptionResult): number =>
  mustNeeds(r).reduce((sum, n) => sum + Math.max(0, n.requiredPct - usableAtWorstPct(n)), 0)
/** Area of all needs where more suppression is needed than there is, km². */
export const shortKm2 = (r: OptionResult): number =>
  r.figures.needs.reduce((sum, n) => sum + (n.notAssessed === null ? n.suppression.shortKm2 : 0), 0)

/**
 * Options in the order of the memo: least missing of the must needs' usable shares, then least area short of suppression, then the lower mast. An
 * order of reading, not a score.
 */
export function inOrder(results: readonly OptionResult[]): OptionResult[] {
  return [...results].sort(
    (a, b) =>
      shortfallPct(a) - shortfallPct(b) ||
      shortKm2(a) - shortKm2(b) ||
      a.ref.heightM - b.ref.heightM ||
      (a.ref.candidate < b.ref.candidate ? -1 : 1),
  )
}
export const ORDER_SENTENCE =
  'Order of reading: least missing of the usable shares asked by the must needs at the less favourable k, then least area short of suppression, then the lower mast. It is not a score.'
