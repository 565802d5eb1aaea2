import {
  coverageOf,
  nonDominated,
  type OptionResult,
  type Ranking,
  type RejectedCandidate,
  rankOptions,
  type SettledStudy,
} from '../../../core/index.ts'

/** What summary.json says of the options together; keys the study gives no ground for are left out. */
export interface Together {
  /** By the study's own worst, best and weights. */
  readonly ranking?: Ranking
  readonly rejected?: readonly RejectedCandidate[]
  /** Options that no other beats in usable share and area short of suppression, over all needs of an area. */
  readonly nonDominated?: readonly OptionResult['ref'][]
}
export function optionsTogether(study: SettledStudy, results: readonly OptionResult[]): Together {
  const both = results.flatMap((r) => {
    const axes = coverageOf(r.figures, null)
    return axes ? [{ ref: r.ref, gain: axes.usablePct, cost: axes.shortKm2 }] : []
  })
  const best = nonDominated(both)
  return {
    ...(both.length > 0 ? { nonDominated: both.filter((_b, i) => best[i]).map((b) => b.ref) } : {}),
    ...(study.ranking ? { ranking: rankOptions(results, study.ranking) } : {}),
    ...(study.rejected.length > 0 ? { rejected: study.rejected } : {}),
  }
}
