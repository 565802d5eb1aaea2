import { type NeedFigure, type OptionResult, type RankingDoc, rankOptions } from '../../../core/index.ts'

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
 * Options in the order of the memo: by the study's own ranking where it states one, else least missing of the must needs' usable shares, then least
 * area short of suppression, then the lower mast: an order of reading, not a score.
 */
export function inOrder(results: readonly OptionResult[], ranking: RankingDoc | null = null): OptionResult[] {
  const byReading = [...results].sort(
    (a, b) =>
      shortfallPct(a) - shortfallPct(b) ||
      shortKm2(a) - shortKm2(b) ||
      a.ref.heightM - b.ref.heightM ||
      (a.ref.candidate < b.ref.candidate ? -1 : 1),
  )
  if (!ranking) return byReading
  return rankOptions(byReading, ranking).options.flatMap((o) => byReading.find((r) => r.ref === o.ref) ?? [])
}
const READING_SENTENCE =
  'Order of reading: least missing of the usable shares asked by the must needs at the less favourable k, then least area short of suppression, then the lower mast. It is not a score.'
const RANKING_SENTENCE =
  "Order: by the study's ranking, worst, best and weights as stated in the comparison; an option that fails a must need ranks below all that pass."
export const orderSentence = (ranking: RankingDoc | null): string => (ranking ? RANKING_SENTENCE : READING_SENTENCE)
