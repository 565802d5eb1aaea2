import { coverageOf, nonDominated, type OptionRef, type OptionResult } from '../../core/index.ts'
import { formatMast, textOf, toFace, type UnitSystem, unitOf } from '../words/index.ts'
import { niceTicks, xAxis, yAxis } from './axes.ts'
import { type Box, type Drawing, type Item, type Point, pathOf, round3, scaleOf } from './drawing.ts'
import { placeAroundPoints } from './labels.ts'

export interface OptionsInput {
  readonly results: readonly OptionResult[]
  /** Need that both axes are about; null: all needs of an area together. Where none is assessed: ground in sight against C/N over 40 dB. */
  readonly needId: string | null
  readonly selected: OptionRef | null
  readonly width: number
  readonly height: number
  readonly system: UnitSystem
  readonly size: number
}
export interface OptionsGeometry {
  readonly drawing: Drawing
  readonly box: Box
  /** One per result that has both figures, in the order given. */
  readonly points: readonly {
    readonly ref: OptionRef
    readonly x: number
    readonly y: number
    readonly label: string
    /** No other option gives at least as much for less, or more for as little; drawn filled, and their points are joined by a dashed line. */
    readonly best: boolean
  }[]
}
/** Share of the need in sight, %; of known and unknown ground where no layer need is evaluated. */
export function inSightPctOf(result: OptionResult, needId: string | null): number | null {
  const { needs, groundInSightKm2, maskedKm2, unknownKm2 } = result.figures
  const assessed = needs.filter((n) => n.notAssessed === null)
  const need = assessed.find((n) => n.needId === needId) ?? assessed[0]
  if (need) return need.inSightPct
  const all = groundInSightKm2 + maskedKm2 + unknownKm2
  return all > 0 ? (100 * groundInSightKm2) / all : null
}

/** Coverage against clutter: every option as a named point, mast heights of one candidate joined. */
export function optionsChart(input: OptionsInput): OptionsGeometry {
  const { results, width, height, system, size } = input
  const box: Box = { left: 3.8 * size, right: width - 1.6 * size, top: 2.2 * size, bottom: height - 3 * size }
  const tilts = new Set(results.map((r) => r.ref.tiltDeg)).size > 1
  const asked = results.every((r) => coverageOf(r.figures, input.needId) !== null)
  const known = results.flatMap((r) => {
    const both = asked ? coverageOf(r.figures, input.needId) : null
    const pct = both?.usablePct ?? inSightPctOf(r, input.needId)
    const km2 = both?.shortKm2 ?? r.figures.clutterOverKm2.over40
    return pct === null ? [] : [{ ref: r.ref, pct, area: toFace('area', km2, system) }]
  })
  const pcts = known.map((k) => k.pct)
  const low = Math.min(100, ...pcts)
  const high = Math.max(0, ...pcts)
  const y = niceTicks(Math.max(0, low - 0.1 * (high - low)), high > 0 ? Math.min(100, high + 0.1 * (high - low)) : 100, 4)
  const x = niceTicks(0, 1.12 * Math.max(0.1, ...known.map((k) => k.area)), 5)
  // a mark at nothing short keeps clear of the labels of the other axis
  const across = scaleOf(0, x.to, box.left + 0.9 * size, box.right)
  const up = scaleOf(y.from, Math.min(100, y.to), box.bottom, box.top)
  const names = (results[0]?.figures.needs ?? []).filter((n) => n.notAssessed === null && n.measure === 'area')
  const own = names.find((n) => n.needId === input.needId) ?? (names.length === 1 ? names[0] : undefined)
  const upWords = asked ? `Usable, % of the area of ${own?.name ?? 'all needs'}` : 'Ground in sight, %'
  const acrossWords = asked ? 'Area short of suppression' : 'Ground with C/N over 40 dB'
  const items: Item[] = [
    ...yAxis(
      box,
      up,
      y.ticks.filter((t) => t.at <= 100),
      upWords,
      size,
    ),
    ...xAxis(box, across, x.ticks, `${acrossWords}, ${unitOf('area', system)}`, size),
  ]
  // ground in sight is no gain by itself: without a need nothing is marked
  const best = asked ? nonDominated(known.map((k) => ({ gain: k.pct, cost: k.area }))) : []
  const points = known.map((k, i) => ({
    ref: k.ref,
    best: best[i] ?? false,
    x: round3(across.at(k.area)),
    y: round3(up.at(k.pct)),
    label: labelOfOption(k.ref, tilts),
  }))
  const lines = joined(points)
  for (const line of lines) items.push({ kind: 'path', d: pathOf(line), stroke: 'ink-3', width: 0.8 })
  const edge = points.filter((p) => p.best).sort((a, b) => a.x - b.x || b.y - a.y)
  if (edge.length > 1) items.push({ kind: 'path', d: pathOf(edge.map((p): Point => [p.x, p.y])), stroke: 'ink', width: 1, dash: [2, 3] })
  const isSelected = (ref: OptionRef): boolean =>
    input.selected !== null &&
    ref.candidate === input.selected.candidate &&
    ref.heightM === input.selected.heightM &&
    ref.tiltDeg === input.selected.tiltDeg
  const labels = placeAroundPoints(
    points.map((p) => ({ at: [p.x, p.y] as Point, text: p.label })),
    { ...box, right: width, top: 1.2 * size },
    size,
    lines,
  )
  for (const p of points) {
    const chosen = isSelected(p.ref)
    items.push({
      kind: 'circle',
      x: p.x,
      y: p.y,
      r: chosen ? 4.5 : 3.2,
      fill: chosen ? 'accent' : p.best ? 'ink' : 'sheet',
      stroke: chosen ? 'accent' : p.best || !asked ? 'ink' : 'ink-3',
      width: 1.2,
    })
  }
  for (const l of labels) items.push({ kind: 'text', x: l.x, y: l.y, text: l.text, size, ink: 'ink', anchor: l.anchor, halo: true })
  return { drawing: { width, height, title: 'Coverage against clutter, by option', items }, box, points }
}

/** `B 24 m`, with the tilt where the study compares tilts. */
export function labelOfOption(ref: OptionRef, withTilt: boolean): string {
  return `${ref.candidate} ${textOf(formatMast(ref.heightM))}${withTilt ? `, ${ref.tiltDeg}°` : ''}`
}

function joined(points: OptionsGeometry['points']): Point[][] {
  const lines = new Map<string, OptionsGeometry['points'][number][]>()
  for (const p of points) {
    const key = `${p.ref.candidate}|${p.ref.tiltDeg}`
    lines.set(key, [...(lines.get(key) ?? []), p])
  }
  return [...lines.values()].map((line) => [...line].sort((a, b) => a.ref.heightM - b.ref.heightM).map((p): Point => [p.x, p.y]))
}
