import type { OptionRef, OptionResult } from '../../core/index.ts'
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
  readonly points: readonly { readonly ref: OptionRef; readonly x: number; readonly y: number; readonly label: string }[]
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

/** Both axes of one option: usable share and area short of suppression, of one need or of all needs of an area, each by its area. */
export function coverageOf(result: OptionResult, needId: string | null): { usablePct: number; shortKm2: number } | null {
  const areas = result.figures.needs.filter((n) => n.notAssessed === null && n.measure === 'area')
  const chosen = areas.filter((n) => n.needId === needId)
  const needs = chosen.length > 0 ? chosen : areas
  const areaKm2 = needs.reduce((sum, n) => sum + n.areaKm2, 0)
  if (areaKm2 === 0) return null
  return {
    usablePct: needs.reduce((sum, n) => sum + n.usablePct * n.areaKm2, 0) / areaKm2,
    shortKm2: needs.reduce((sum, n) => sum + n.suppression.shortKm2, 0),
  }
}

/** Coverage against clutter: every option as a named point, mast heights of one candidate joined. */
export function optionsChart(input: OptionsInput): OptionsGeometry {
  const { results, width, height, system, size } = input
  const box: Box = { left: 3.8 * size, right: width - 1.6 * size, top: 2.2 * size, bottom: height - 3 * size }
  const tilts = new Set(results.map((r) => r.ref.tiltDeg)).size > 1
  const asked = results.every((r) => coverageOf(r, input.needId) !== null)
  const known = results.flatMap((r) => {
    const both = asked ? coverageOf(r, input.needId) : null
    const pct = both?.usablePct ?? inSightPctOf(r, input.needId)
    const km2 = both?.shortKm2 ?? r.figures.clutterOverKm2.over40
    return pct === null ? [] : [{ ref: r.ref, pct, area: toFace('area', km2, system) }]
  })
  const pcts = known.map((k) => k.pct)
  const low = Math.min(100, ...pcts)
  const high = Math.max(0, ...pcts)
  const y = niceTicks(Math.max(0, low - 0.1 * (high - low)), high > 0 ? Math.min(100, high + 0.1 * (high - low)) : 100, 4)
  const x = niceTicks(0, 1.12 * Math.max(0.1, ...known.map((k) => k.area)), 5)
  const across = scaleOf(0, x.to, box.left, box.right)
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
  const points = known.map((k) => ({
    ref: k.ref,
    x: round3(across.at(k.area)),
    y: round3(up.at(k.pct)),
    label: labelOfOption(k.ref, tilts),
  }))
  const lines = joined(points)
  for (const line of lines) items.push({ kind: 'path', d: pathOf(line), stroke: 'ink-3', width: 0.8 })
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
      fill: chosen ? 'accent' : 'sheet',
      stroke: chosen ? 'accent' : 'ink',
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
