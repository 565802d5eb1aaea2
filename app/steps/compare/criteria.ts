import { type CriterionDoc, MAST_FIGURE, type NeedDoc, type OptionResult } from '../../../core/index.ts'
import { criterionFace, figureWords, type UnitSystem } from '../../words/index.ts'

/** Figures of a need that are worth ranking by, and whether more is better. */
const OF_NEED: readonly (readonly [tail: string, more: boolean])[] = [
  ['usable_pct', true],
  ['detectable_pct', true],
  ['in_sight_pct', true],
  ['tenth_margin_m', true],
  ['worst_margin_m', true],
  ['tenth_signal_margin_db', true],
  ['worst_signal_margin_db', true],
  ['suppression_needed_90_db', false],
  ['suppression_short_km2', false],
  ['longest_gap_m', false],
]
const OF_OPTION: readonly (readonly [figure: RegExp, more: boolean])[] = [
  [/^clutter_over_(20|40|60)_km2$/, false],
  [/^clutter_to_noise_(90|99)_db$/, false],
  [/^second_time_around_km2$/, false],
  [/^roads_seen_km$/, false],
  [/^floor_\d+nm_(median|worst)_m$/, false],
  [/^horizon_p90_deg$/, false],
  [/^ground_in_sight_km2$/, true],
]

/** Figures the options have, needs first in the study's order, the mast height last. */
export function figuresToRankBy(results: readonly OptionResult[], needs: readonly NeedDoc[]): string[] {
  const there = new Set(results.flatMap((r) => Object.keys(r.figures.flat).filter((k) => r.figures.flat[k] !== null)))
  const ofNeeds = needs.flatMap((n) => OF_NEED.map(([tail]) => `need_${n.id}_${tail}`))
  const others = OF_OPTION.flatMap(([pattern]) => [...there].filter((k) => pattern.test(k) && figureWords(k)))
  return results.length === 0 ? [] : [...ofNeeds.filter((k) => there.has(k)), ...others, MAST_FIGURE]
}
const moreIsBetter = (figure: string): boolean =>
  OF_NEED.find(([tail]) => figure.startsWith('need_') && figure.endsWith(`_${tail}`))?.[1] ??
  OF_OPTION.find(([p]) => p.test(figure))?.[1] ??
  false

/**
 * A criterion to start from, in round numbers of the face: 0 and 100 for shares, else the span of the options there are. The user states what is worst and
 * best; weight 1.
 */
export function startingCriterion(figure: string, results: readonly OptionResult[], system: UnitSystem): CriterionDoc {
  const [low, high] = figure.endsWith('_pct') ? [0, 100] : spanOf(figure, results, system)
  return moreIsBetter(figure) ? { figure, worst: low, best: high, weight: 1 } : { figure, worst: high, best: low, weight: 1 }
}
function spanOf(figure: string, results: readonly OptionResult[], system: UnitSystem): [number, number] {
  const { size } = criterionFace(figure, system)
  const values = results.flatMap((r) => (figure === MAST_FIGURE ? r.ref.heightM : (r.figures.flat[figure] ?? []))).map((v) => v / size)
  const low = Math.min(...values)
  const high = Math.max(...values)
  const step = 10 ** Math.floor(Math.log10(Math.max(high - low, Math.abs(high), 1)))
  const from = Math.floor(low / step) * step
  const to = Math.ceil(high / step) * step
  return [from * size, (to > from ? to : from + step) * size]
}
