import type { OptionKey, WeightEffect } from '../../core/index.ts'
import { figureWords, needKey } from './figureWords.ts'
import { formatMast, formatNumber, type Quantity, textOf } from './format.ts'
import { DB, DEG, type FaceUnit, METRES, PLAIN } from './steps.ts'
import { fromFace, type UnitKind, type UnitSystem, unitOf } from './units.ts'

/** Words of ranking and rejecting, in Compare and memo. */
export const RANKING_WORDS = {
  title: 'Ranking',
  none: 'No ranking stated: add the figures that count, each with the values that are worst and best for you',
  rule: 'Score: weighted mean of each figure between its stated worst (0) and best (100). An option that fails a must need ranks below all that pass.',
  effects: 'Does the ranking hold when one weight is 20\u202f% less or more?',
  holds: 'no rank changes',
  rejected: 'Rejected candidates',
  plotBest: 'filled: no other option gives as much for as little',
} as const

/** A figure that options are ranked by, in words: `Usable, share of the need, Ferry approach`. */
export function criterionWords(figure: string, needs: readonly { readonly id: string; readonly name?: string }[]): string {
  const words = figureWords(figure)
  const need = needKey(figure)
  const name = need && (needs.find((n) => n.id === need.needId)?.name ?? need.needId)
  return [words?.label ?? figure, name].filter(Boolean).join(', ')
}
const byKind = (kind: UnitKind, system: UnitSystem): FaceUnit => ({ unit: unitOf(kind, system), size: fromFace(kind, 1, system) })
/** Unit in which a figure's worst and best are stated at the face. */
export function criterionFace(figure: string, system: UnitSystem): FaceUnit {
  if (figure === 'mast_height_m') return METRES
  const tail = /_(pct|db|deg|km2|km|m|s)$/.exec(figure)?.[1]
  switch (tail) {
    case 'pct':
      return { unit: '%', size: 1 }
    case 'db':
      return DB
    case 'deg':
      return DEG
    case 'km2':
      return byKind('area', system)
    case 'km':
      return { unit: unitOf('range', system), size: fromFace('range', 1, system) / 1000 }
    case 'm':
      return byKind(/length|gap|cone|evaluated/.test(figure) ? 'range' : 'height', system)
    case 's':
      return { unit: 's', size: 1 }
    default:
      return PLAIN
  }
}
/** A stated worst or best at the face, with as many places as it needs, up to two. */
export function formatCriterion(value: number, figure: string, system: UnitSystem): Quantity {
  const face = criterionFace(figure, system)
  const shown = value / face.size
  const places = [0, 1].find((d) => Math.abs(shown - Number(shown.toFixed(d))) < 1e-9) ?? 2
  return { value: formatNumber(shown, places), unit: face.unit }
}
/** 0…1 as points of a hundred, one place: `63.5`. */
export const formatScore = (score: number | null): string => (score === null ? 'a figure is missing' : formatNumber(100 * score, 1))
/** Which ranks change: `B at 20 m 2 to 1, A at 20 m 1 to 2`. */
export const effectWords = (effect: WeightEffect, withTilt: boolean): string =>
  effect.changes.length === 0
    ? RANKING_WORDS.holds
    : effect.changes.map((c) => `${optionWords(c.ref, withTilt)} ${c.from} to ${c.to}`).join(', ')
/** `B at 20 m`, with the tilt where options differ in it. */
export const optionWords = (o: OptionKey, withTilt: boolean): string =>
  `${o.candidate} at ${textOf(formatMast(o.heightM))}${withTilt ? `, tilt ${o.tiltDeg}°` : ''}`
/** Rank in words: a rank shared by several says so. */
export const rankWords = (rank: number, ranks: readonly number[]): string =>
  ranks.filter((r) => r === rank).length > 1 ? `${rank} =` : `${rank}`
