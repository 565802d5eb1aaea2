import type { RankingDoc } from '../../study/index.ts'
import type { Figures } from '../types.ts'
import type { CriterionScore, OptionScore, Ranking, WeightEffect } from './types.ts'

/** Candidate, mast height and tilt of an option. */
export interface OptionKey {
  readonly candidate: string
  readonly heightM: number
  readonly tiltDeg: number
}
/** What of an option's figures a ranking looks at. */
export interface Rated {
  readonly ref: OptionKey
  readonly figures: Pick<Figures, 'needs' | 'flat'>
}

/** A criterion that is no figure of merit: the mast height itself, m, what it costs to build. */
export const MAST_FIGURE = 'mast_height_m'
/** By how much each weight is changed to see whether the ranking holds. */
export const WEIGHT_FACTORS: readonly number[] = [0.8, 1.2]
/** Scores nearer than this are the same. */
const SAME = 1e-9

/** Do all must needs that are assessed pass? null: all are met, but one is not worked out at the smaller k. True where there is none. */
export function mustNeedsPass(figures: Pick<Figures, 'needs'>): boolean | null {
  const must = figures.needs.filter((n) => n.must && n.notAssessed === null)
  if (must.some((n) => n.passes === false || !n.met)) return false
  return must.some((n) => n.passes === null) ? null : true
}

/** Straight from 0 at `worst` to 1 at `best`, held outside; `worst` may be the larger of the two. */
export const utility = (value: number, worst: number, best: number): number => Math.min(1, Math.max(0, (value - worst) / (best - worst)))

/**
 * Options by additive weighted score: u is straight between the stated worst and best of each figure, the score is Σw·u/Σw. An option that fails a
 * must need ranks below all that pass, one whose smaller k is not worked out between them; within these groups one without a score comes last. The
 * effect of each weight times 0.8 and times 1.2 is worked out by ranking again. Additive value model with stated ranges: R. L. Keeney, H. Raiffa,
 * Decisions with Multiple Objectives, 1976 (from memory).
 * @param ranking at least one criterion, best unlike worst, weights over 0 (as the study's checks have it)
 */
export function rankOptions(options: readonly Rated[], ranking: RankingDoc): Ranking {
  const weights = ranking.criteria.map((c) => c.weight)
  const stated = ranked(options, ranking, weights)
  const effects = ranking.criteria.flatMap((c, i) =>
    WEIGHT_FACTORS.map((factor): WeightEffect => {
      const other = ranked(
        options,
        ranking,
        weights.map((w, k) => (k === i ? w * factor : w)),
      )
      const changes = stated.flatMap(({ ref, rank }) => {
        const to = other.find((o) => o.ref === ref)?.rank ?? rank
        return to === rank ? [] : [{ ref, from: rank, to }]
      })
      return { figure: c.figure, factor, changes }
    }),
  )
  return { options: stated, effects }
}

function ranked(options: readonly Rated[], ranking: RankingDoc, weights: readonly number[]): OptionScore[] {
  const sum = weights.reduce((a, b) => a + b, 0)
  const scored = options.map(({ ref, figures }) => {
    const criteria = ranking.criteria.map((c, i): CriterionScore => {
      const value = figures.flat[c.figure] ?? (c.figure === MAST_FIGURE ? ref.heightM : null)
      return { figure: c.figure, value, u: value === null ? null : utility(value, c.worst, c.best), share: weights[i] / sum }
    })
    const score = criteria.some((c) => c.u === null) ? null : criteria.reduce((s, c) => s + c.share * (c.u as number), 0)
    return { ref, passes: mustNeedsPass(figures), score, criteria }
  })
  const sorted = scored.map((s, at) => ({ ...s, at })).sort((a, b) => compare(a, b) || a.at - b.at)
  let rank = 1
  return sorted.map(({ at: _at, ...s }, i) => {
    if (i > 0 && compare(sorted[i - 1], s) !== 0) rank = i + 1
    return { ...s, rank }
  })
}
type Placed = Pick<OptionScore, 'passes' | 'score'>
const tier = (s: Placed): number => (s.passes === true ? 0 : s.passes === null ? 1 : 2)
function compare(a: Placed, b: Placed): number {
  const tiers = tier(a) - tier(b)
  if (tiers !== 0) return tiers
  if (a.score === null || b.score === null) return Number(a.score === null) - Number(b.score === null)
  const off = b.score - a.score
  return Math.abs(off) < SAME ? 0 : off
}
