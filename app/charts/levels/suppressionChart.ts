import type { Figures, NeedFigure } from '../../../core/index.ts'
import { CHART_WORDS, clutterKindWords, formatAreaUp, formatDbDown, formatDbUp, textOf, type UnitSystem } from '../../words/index.ts'
import { niceTicks, xAxis } from '../axes.ts'
import { csvOf } from '../csv.ts'
import { type Box, boxPath, type Drawing, type Item, lineOf, round3, scaleOf } from '../drawing.ts'
import { textWidth } from '../labels.ts'

export interface SuppressionInput {
  readonly figures: Pick<Figures, 'needs' | 'suppressionBy'>
  readonly width: number
  readonly height: number
  readonly system: UnitSystem
  readonly size: number
}
export interface SuppressionRow {
  readonly name: string
  readonly top: number
  readonly bottom: number
  /** What the row says, for the read-out. */
  readonly words: string
}
export interface SuppressionGeometry {
  readonly drawing: Drawing
  readonly box: Box
  readonly rows: readonly SuppressionRow[]
}
const assessed = (needs: readonly NeedFigure[]): NeedFigure[] => needs.filter((n) => n.notAssessed === null && n.measure === 'area')

/** What there is by kind of clutter; one row where all kinds share it. */
const kindsOf = ({
  suppressionBy: { rows, uniformDb },
}: SuppressionInput['figures']): readonly { about: string; improvementDb: number }[] =>
  uniformDb === null ? rows : [{ about: 'every', improvementDb: uniformDb }]
/** Rows the chart has: needs of an area, and kinds of clutter. */
export const suppressionRows = (figures: SuppressionInput['figures']): { needs: number; kinds: number } => ({
  needs: assessed(figures.needs).length,
  kinds: kindsOf(figures).length,
})

/** Suppression that each need asks for over its places (50, 90, 99 %) against what there is; under it what there is for each kind of clutter. */
export function suppressionChart({ figures, width, height, system, size }: SuppressionInput): SuppressionGeometry {
  const needs = assessed(figures.needs)
  const kinds = kindsOf(figures)
  const names = [...needs.map((n) => n.name), ...kinds.map((k) => clutterKindWords(k.about))]
  const left = Math.min(width * 0.36, Math.max(8 * size, ...names.map((n) => textWidth(n, size) + size)))
  const box: Box = { left, right: width - 1.4 * size, top: 2.6 * size, bottom: height - 3 * size }
  const values = [
    ...needs.flatMap((n) => [n.suppression.p50Db, n.suppression.p90Db, n.suppression.p99Db, n.suppression.availableDb]),
    ...kinds.map((k) => k.improvementDb),
  ].filter((v): v is number => v !== null && Number.isFinite(v))
  const db = niceTicks(0, Math.max(10, ...values), 6)
  const across = scaleOf(0, db.to, box.left, box.right)
  const items: Item[] = []
  const rows: SuppressionRow[] = []
  const slots = needs.length * 1.6 + kinds.length
  const slot = Math.min(2.6 * size, (box.bottom - box.top) / Math.max(1, slots))
  let y = box.top
  for (const t of db.ticks)
    items.push({ kind: 'path', d: lineOf(across.at(t.at), box.top - 4, across.at(t.at), box.bottom), stroke: 'line', width: 0.6 })
  const name = (text: string, at: number): void => {
    items.push({
      kind: 'text',
      x: box.left - 0.7 * size,
      y: at + 0.34 * size,
      text: fitted(text, left - size, size),
      size,
      ink: 'ink',
      anchor: 'end',
    })
  }
  for (const n of needs) {
    const mid = y + slot * 0.8
    items.push(...needItems(n, mid, Math.min(0.7 * size, slot * 0.42), across.at, size, box))
    name(n.name, mid)
    rows.push({ name: n.name, top: y, bottom: y + 1.6 * slot, words: needWords(n, system) })
    y += 1.6 * slot
  }
  for (const k of kinds) {
    const mid = y + slot / 2
    const thick = Math.min(0.55 * size, slot * 0.3)
    items.push({ kind: 'path', d: boxPath(box.left, mid - thick, across.at(k.improvementDb), mid + thick), fill: 'cool-4' })
    const kind = clutterKindWords(k.about)
    name(kind, mid)
    const words = `${kind}: ${CHART_WORDS.available} ${textOf(formatDbDown(k.improvementDb))}`
    rows.push({ name: kind, top: y, bottom: y + slot, words })
    y += slot
  }
  items.push({ kind: 'text', x: 0, y: size, text: CHART_WORDS.suppressionTitle, size, ink: 'ink-2' })
  items.push(...xAxis(box, across, db.ticks, CHART_WORDS.suppressionAxis, size))
  return { drawing: { width, height, title: suppressionFinding(figures, system), items }, box, rows }
}

function needItems(n: NeedFigure, mid: number, half: number, at: (db: number) => number, size: number, box: Box): Item[] {
  const { p50Db, p90Db, p99Db, availableDb } = n.suppression
  const items: Item[] = []
  const known = [p50Db, p90Db, p99Db].filter((v): v is number => v !== null)
  if (known.length > 0) {
    const most = Math.max(...known)
    items.push({ kind: 'path', d: lineOf(at(Math.min(...known)), mid, at(most), mid), stroke: 'warm-5', width: 1.2 })
    if (most > availableDb)
      items.push({ kind: 'path', d: lineOf(at(Math.max(availableDb, Math.min(...known))), mid, at(most), mid), stroke: 'warm-7', width: 3 })
    if (p50Db !== null) items.push({ kind: 'circle', x: round3(at(p50Db)), y: mid, r: 3, fill: 'warm-6' })
    if (p90Db !== null) items.push({ kind: 'path', d: lineOf(at(p90Db), mid - half, at(p90Db), mid + half), stroke: 'warm-5', width: 1.4 })
    if (p99Db !== null) {
      items.push({ kind: 'path', d: lineOf(at(p99Db), mid - half, at(p99Db), mid + half), stroke: 'warm-7', width: 2.4 })
      const words = '99\u202f%'
      const w = textWidth(words, size)
      const x = Math.min(box.right - w, at(p99Db) + 4)
      if (Math.abs(at(availableDb) - x) > w + 8)
        items.push({ kind: 'text', x, y: mid - half - 1, text: words, size: size - 1, ink: 'ink-3' })
    }
  }
  const x = at(availableDb)
  items.push({ kind: 'path', d: lineOf(x, mid - 1.5 * half, x, mid + 1.5 * half), stroke: 'cool-7', width: 2 })
  return items
}

/** A text cut to a width with an ellipsis. */
function fitted(text: string, width: number, size: number): string {
  if (textWidth(text, size) <= width) return text
  let cut = text
  while (cut.length > 1 && textWidth(`${cut}…`, size) > width) cut = cut.slice(0, -1)
  return `${cut.trimEnd()}…`
}
function needWords(n: NeedFigure, system: UnitSystem): string {
  const { p50Db, p90Db, p99Db, availableDb, shortKm2 } = n.suppression
  const db = (v: number | null): string => textOf(formatDbUp(v))
  if (p50Db === null) return `${n.name}: ${CHART_WORDS.noPlaces}`
  return `${n.name}: ${CHART_WORDS.needed} ${db(p50Db)} · ${db(p90Db)} · ${db(p99Db)} (50, 90, 99\u202f%), ${CHART_WORDS.available} ${textOf(formatDbDown(availableDb))}, ${CHART_WORDS.shortOver} ${textOf(formatAreaUp(shortKm2, system))}`
}

/** Which need is shortest of suppression, for a caption. */
export function suppressionFinding(figures: SuppressionInput['figures'], system: UnitSystem): string {
  const needs = assessed(figures.needs)
  const worst = needs.reduce<NeedFigure | null>((w, n) => (w === null || n.suppression.shortKm2 > w.suppression.shortKm2 ? n : w), null)
  if (!worst) return CHART_WORDS.noAreaNeed
  if (worst.suppression.shortKm2 === 0) return CHART_WORDS.enoughEverywhere
  return `${needWords(worst, system)}`
}

/** Needs and kinds of clutter as a table. */
export function suppressionCsv(figures: SuppressionInput['figures']): string {
  const needs = assessed(figures.needs)
  const kinds = figures.suppressionBy.rows
  const blank = kinds.map(() => null)
  return csvOf([
    { head: 'about', values: [...needs.map((n) => n.name), ...kinds.map((k) => clutterKindWords(k.about))] },
    { head: 'needed_50_db', values: [...needs.map((n) => n.suppression.p50Db), ...blank], decimals: 2 },
    { head: 'needed_90_db', values: [...needs.map((n) => n.suppression.p90Db), ...blank], decimals: 2 },
    { head: 'needed_99_db', values: [...needs.map((n) => n.suppression.p99Db), ...blank], decimals: 2 },
    { head: 'available_db', values: [...needs.map((n) => n.suppression.availableDb), ...kinds.map((k) => k.improvementDb)], decimals: 2 },
    { head: 'short_km2', values: [...needs.map((n) => n.suppression.shortKm2), ...blank], decimals: 3 },
  ])
}
