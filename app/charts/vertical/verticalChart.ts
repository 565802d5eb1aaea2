import type { BeamRay, VerticalCut } from '../../../core/index.ts'
import {
  CHART_WORDS,
  formatAngle,
  formatAzimuth,
  formatFloor,
  formatNumber,
  formatPd,
  formatRange,
  formatRangeUp,
  formatSetting,
  textOf,
  toFace,
  type UnitSystem,
  unitOf,
} from '../../words/index.ts'
import { ticksWithin, xAxis } from '../axes.ts'
import { type Drawing, type Ink, type Item, lineOf, type Point, pathOf } from '../drawing.ts'
import { textWidth } from '../labels.ts'
import { contourOf } from './contours.ts'
import { type Frame, frameOf, type VerticalInput } from './frame.ts'
import { hiddenItems } from './hidden.ts'

export interface VerticalGeometry {
  readonly drawing: Drawing
  readonly frame: Frame
  /** Column and row of the sample nearest a place of the drawing; null outside the plot. */
  sampleAt(x: number, y: number): { readonly column: number; readonly row: number } | null
}
const FILLS: readonly { readonly fill: Ink; readonly opacity: number }[] = [
  { fill: 'cool-2', opacity: 0.8 },
  { fill: 'cool-4', opacity: 0.65 },
  { fill: 'cool-4', opacity: 1 },
  { fill: 'cool-6', opacity: 0.8 },
]

/** Range-height diagram of one azimuth: Pd contours over a curved earth with pattern, screening, cone of silence and levels of the need. */
export function verticalChart(input: VerticalInput): VerticalGeometry {
  const { cut, width, height, system, size } = input
  const f = frameOf(input)
  const { under, ground } = hiddenItems(cut, f)
  const { fills, lines, diffracted } = contourItems(cut, f)
  const labels = new Labels(f, size)
  const items: Item[] = [
    ...heightLines(f, system, size),
    ...fills,
    ...under,
    ...diffracted,
    ...lines,
    ...ground,
    ...rayItems(cut, f, labels),
    ...limitItems(cut, f, labels, system),
    { kind: 'path', d: pathOf(floorLine(cut, f)), stroke: 'ink', width: 1.4 },
    ...levelItems(cut, f, labels, system),
    ...xAxis(f.box, f.range, rangeTicks(f, system), `Ground range, ${unitOf('range', system)}`, size),
  ]
  contourLabels(cut, f, labels)
  floorLabels(cut, f, labels)
  items.push(...labels.items)
  return {
    drawing: { width, height, title: verticalTitle(cut, system), items },
    frame: f,
    sampleAt: (x, y) => sampleAt(cut, f, x, y),
  }
}

/** What the diagram shows, for those who do not see it and as a caption. */
export function verticalTitle(cut: VerticalCut, system: UnitSystem): string {
  const reach = cut.rangeM.reduce((far, r, i) => (usableIn(cut, i) ? r : far), 0)
  const how =
    reach > 0 ? `${CHART_WORDS.usableTo} ${textOf(formatRange(reach, system))} ${CHART_WORDS.atSomeHeight}` : CHART_WORDS.usableNowhere
  return `${cut.needName}, ${targetWords(cut)}, azimuth ${textOf(formatAzimuth(cut.azimuthDeg))}: ${how}`
}
export const targetWords = (cut: Pick<VerticalCut, 'rcsM2' | 'swerling'>): string =>
  `${textOf(formatSetting(cut.rcsM2, 'm²', 2))}, Swerling ${cut.swerling}`
function usableIn(cut: VerticalCut, column: number): boolean {
  const rows = cut.heightM.length
  for (let k = 0; k < rows; k++) {
    const n = column * rows + k
    if (cut.cause[n] === 0 && cut.pdAt[n] > 0) return true
  }
  return false
}

function sampleAt(cut: VerticalCut, f: Frame, x: number, y: number) {
  const { box } = f
  if (x < box.left || x > box.right || y < box.top || y > box.bottom) return null
  const rangeM = f.range.invert(x)
  const heightM = f.heightAt(rangeM, y)
  const nearest = (values: Float64Array, v: number): number => {
    const step = values.length > 1 ? values[1] - values[0] : 1
    return Math.round((v - values[0]) / step)
  }
  const row = nearest(cut.heightM, heightM)
  if (row < 0 || row >= cut.heightM.length) return null
  return { column: Math.min(cut.rangeM.length - 1, Math.max(0, nearest(cut.rangeM, rangeM))), row }
}

/** Lines of equal height, bent with the earth, named at the left. */
function heightLines(f: Frame, system: UnitSystem, size: number): Item[] {
  const { box } = f
  const items: Item[] = [
    { kind: 'text', x: 0, y: size, text: `${CHART_WORDS.height}, ${unitOf('height', system)} MSL`, size, ink: 'ink-2' },
  ]
  const face = (m: number): number => toFace('height', m, system)
  for (const t of ticksWithin(face(f.bottomM), face(f.topM), 5)) {
    const heightM = (t.at / face(1)) as number
    const points: Point[] = []
    for (let n = 0; n <= 40; n++) {
      const p = f.place(f.fromM + ((f.toM - f.fromM) * n) / 40, heightM)
      points.push(p[1] > box.bottom ? [Number.NaN, 0] : p)
    }
    items.push({ kind: 'path', d: pathOf(points), stroke: 'line', width: 0.6 })
    items.push({ kind: 'text', x: box.left - 0.45 * size, y: points[0][1] + 0.34 * size, text: t.label, size, ink: 'ink-3', anchor: 'end' })
  }
  return items
}

/** Filled bands, and lines: whole over the floor; under it, where only diffraction reaches, dashed for the need's own Pd. */
function contourItems(cut: VerticalCut, f: Frame): { fills: Item[]; lines: Item[]; diffracted: Item[] } {
  const field = { columns: cut.rangeM.length, rows: cut.heightM.length, values: cut.marginDb }
  const step = cut.rangeM.length > 1 ? cut.rangeM[1] - cut.rangeM[0] : 0
  const up = cut.heightM.length > 1 ? cut.heightM[1] - cut.heightM[0] : 0
  const fills: Item[] = []
  const lines: Item[] = []
  const diffracted: Item[] = []
  cut.contours.forEach((c, n) => {
    const { rings, lines: outline } = contourOf(field, c.marginDb)
    const place = ([i, k]: Point): Point => f.place(cut.rangeM[0] + i * step, cut.heightM[0] + k * up)
    // the outermost samples stand half a cell inside the plot
    const edge = ([i, k]: Point): Point =>
      f.place(i <= 0 ? f.fromM : i >= field.columns - 1 ? f.toM : cut.rangeM[0] + i * step, cut.heightM[0] + k * up)
    const style = FILLS[Math.min(FILLS.length - 1, n)]
    fills.push({ kind: 'path', d: rings.map((r) => pathOf(r.map(edge), true)).join(''), ...style })
    const over: Point[][] = []
    const below: Point[][] = []
    for (const line of outline) for (const run of splitAtFloor(cut, line, step, up)) (run.hidden ? below : over).push(run.points.map(place))
    const d = over.map((l) => pathOf(l)).join('')
    if (d !== '') lines.push({ kind: 'path', d, stroke: 'cool-7', width: c.ofNeed ? 1.6 : 0.8 })
    const dashed = below.map((l) => pathOf(l)).join('')
    if (c.ofNeed && dashed !== '') diffracted.push({ kind: 'path', d: dashed, stroke: 'cool-7', width: 1, dash: [3, 3] })
  })
  return { fills, lines, diffracted }
}

/** Cuts a contour where it crosses the coverage floor. */
function splitAtFloor(cut: VerticalCut, line: readonly Point[], step: number, up: number): { hidden: boolean; points: Point[] }[] {
  const out: { hidden: boolean; points: Point[] }[] = []
  const last = cut.rangeM.length - 1
  const isHidden = ([i, k]: Point): boolean => {
    const a = Math.min(last, Math.max(0, Math.floor(i)))
    const b = Math.min(last, a + 1)
    const floor = cut.floorM[a] + (i - a) * (cut.floorM[b] - cut.floorM[a])
    return cut.heightM[0] + k * up < floor - up
  }
  let open: { hidden: boolean; points: Point[] } | null = null
  for (const point of line) {
    const hidden = isHidden(point)
    if (open && open.hidden === hidden) open.points.push(point)
    else {
      if (open) open.points.push(point)
      open = { hidden, points: [point] }
      out.push(open)
    }
  }
  return step > 0 ? out : []
}

/** The floor where it stands over the ground. */
function floorLine(cut: VerticalCut, f: Frame): Point[] {
  return Array.from(cut.rangeM, (r, i): Point => {
    const h = cut.floorM[i]
    return h > f.topM || h < f.bottomM || !(h > cut.groundM[i] + 0.5) ? [Number.NaN, 0] : f.place(r, h)
  })
}

const RAY_STYLE: Readonly<Record<BeamRay['is'], { readonly dash?: readonly number[]; readonly width: number }>> = {
  peak: { width: 0.9 },
  lower: { width: 0.7, dash: [6, 3] },
  upper: { width: 0.7, dash: [6, 3] },
  end: { width: 0.8, dash: [1.5, 3] },
}
function rayItems(cut: VerticalCut, f: Frame, labels: Labels): Item[] {
  const more = new Set(cut.rays.map((r) => r.beam)).size > 1
  return cut.rays.map((ray): Item => {
    const points = Array.from(cut.rangeM, (r, i): Point => {
      const h = ray.heightM[i]
      return h > f.topM || h < Math.max(f.bottomM, cut.groundM[i] || f.bottomM) ? [Number.NaN, 0] : f.place(r, h)
    })
    const shown = points.filter(([x]) => Number.isFinite(x))
    const end = shown[shown.length - 1]
    if (end && shown.length > 8) {
      const words = `${more && ray.beam !== '' ? `${ray.beam} ` : ''}${CHART_WORDS.rays[ray.is]} ${textOf(formatAngle(ray.elevationDeg, 0.1))}`
      labels.try(words, end[0], end[1] < f.box.top + 20 ? f.box.top + 12 : end[1] - 4, 'ink-2', 'end')
    }
    return { kind: 'path', d: pathOf(points), stroke: 'ink-3', ...RAY_STYLE[ray.is] }
  })
}

/** Where short-range sensitivity ends and the receiver stops to listen; near end of the pulse is the left edge of the fills. */
function limitItems(cut: VerticalCut, f: Frame, labels: Labels, system: UnitSystem): Item[] {
  const items: Item[] = []
  const upright = (rangeM: number, words: string): void => {
    if (rangeM <= f.fromM || rangeM >= f.toM) return
    const x = f.range.at(rangeM)
    items.push({ kind: 'path', d: lineOf(x, f.box.top, x, f.box.bottom), stroke: 'ink-3', width: 0.7, dash: [2, 2] })
    labels.try(words, x + 4, f.box.bottom - 6, 'ink-2', 'start')
  }
  if (cut.stcToM !== null) upright(cut.stcToM, CHART_WORDS.stcTo(textOf(formatSetting(cut.stcMaxDb, 'dB'))))
  upright(cut.instrumentedM, `${CHART_WORDS.instrumented} ${textOf(formatRange(cut.instrumentedM, system))}`)
  return items
}

function levelItems(cut: VerticalCut, f: Frame, labels: Labels, system: UnitSystem): Item[] {
  return cut.levels.flatMap((level, n): Item[] => {
    const points = Array.from(cut.rangeM, (r, i): Point => {
      const h = level.heightM[i]
      return !(h >= f.bottomM && h <= f.topM) ? [Number.NaN, 0] : f.place(r, h)
    })
    const shown = points.filter(([x]) => Number.isFinite(x))
    if (shown.length === 0) return []
    const [x, y] = shown[shown.length - 1]
    const words = `${textOf(formatFloor(level.levelM, system))} ${level.aboveSea ? 'MSL' : CHART_WORDS.aboveGround}`
    labels.try(words, x, y - 5, 'ink', 'end', true)
    const items: Item[] = [{ kind: 'path', d: pathOf(points), stroke: 'ink', width: 1, dash: [8, 2, 1.5, 2] }]
    const cone = cut.cones[n]?.radiusM ?? null
    if (cone !== null && cone > f.fromM && cone < f.toM) {
      const h = level.aboveSea ? level.levelM : (cut.groundM.find((g) => !Number.isNaN(g)) ?? 0) + level.levelM
      if (h < f.topM && h > f.bottomM) {
        const [cx, cy] = f.place(cone, h)
        items.push({ kind: 'circle', x: cx, y: cy, r: 3.2, fill: 'sheet', stroke: 'ink', width: 1.2 })
        labels.try(`${CHART_WORDS.cone} ${textOf(formatRangeUp(cone, system))}`, cx + 7, cy + 14, 'ink', 'start')
      }
    }
    return items
  })
}

/** Names each contour where its line is farthest out. */
function contourLabels(cut: VerticalCut, f: Frame, labels: Labels): void {
  const rows = cut.heightM.length
  for (const c of cut.contours) {
    let best: { i: number; k: number } | null = null
    for (let i = cut.rangeM.length - 1; i >= 0 && !best; i--)
      for (let k = Math.floor(rows * 0.9); k > 0; k--)
        if (cut.heightM[k] > cut.floorM[i] && cut.marginDb[i * rows + k] >= c.marginDb) {
          best = { i, k }
          break
        }
    if (!best) continue
    const [x, y] = f.place(cut.rangeM[best.i], cut.heightM[best.k])
    const words = `Pd ${textOf(formatPd(c.pd + 1e-9))}${c.ofNeed ? `, ${CHART_WORDS.asked}` : ''}`
    labels.try(words, x - 4, y, 'cool-7', 'end', c.ofNeed)
  }
}

function floorLabels(cut: VerticalCut, f: Frame, labels: Labels): void {
  const last = cut.rangeM.length - 1
  for (let i = last; i > 0; i--) {
    const h = cut.floorM[i]
    if (!(h > cut.groundM[i] + 5) || h > f.topM) continue
    const [x, y] = f.place(cut.rangeM[i], h)
    labels.try(CHART_WORDS.floorOf(cut.obstacle[i]), x, y - 5, 'ink', 'end')
    break
  }
  for (let i = last; i > 0; i--) {
    if (cut.heightM.length === 0 || !(cut.floorM[i] - cut.groundM[i] > 0.12 * (f.topM - f.bottomM))) continue
    const [x, y] = f.place(cut.rangeM[i], (cut.floorM[i] + cut.groundM[i]) / 2)
    labels.try(CHART_WORDS.masked, x - 6, y, 'ink', 'end')
    break
  }
  const unknown = cut.floorM.findIndex((h) => !Number.isFinite(h))
  if (unknown >= 0) labels.try(CHART_WORDS.unknown, f.range.at(cut.rangeM[unknown]) + 6, (f.box.top + f.box.bottom) / 2, 'warn', 'start')
}

function rangeTicks(f: Frame, system: UnitSystem) {
  const perFace = toFace('range', 1, system)
  return ticksWithin(f.fromM * perFace, f.toM * perFace, 7).map((t) => ({
    at: t.at / perFace,
    label: formatNumber(t.at, t.label.split('.')[1]?.length ?? 0),
  }))
}

/** Direct labels: the first to come takes its place, one that would lie on another moves up or down a little, or is left out. */
class Labels {
  readonly items: Item[] = []
  private readonly taken: { left: number; right: number; top: number; bottom: number }[] = []
  constructor(
    private readonly f: Frame,
    private readonly size: number,
  ) {}
  try(text: string, x: number, y: number, ink: Ink, anchor: 'start' | 'end', strong = false): void {
    const { box } = this.f
    const { size } = this
    const w = textWidth(text, size) * (strong ? 1.05 : 1)
    const left = Math.min(box.right - w - 2, Math.max(box.left + 3, anchor === 'end' ? x - w : x))
    for (const shift of [0, -1.25, 1.25, -2.5, 2.5, -3.75, 3.75]) {
      const base = Math.min(box.bottom - 3, Math.max(box.top + size, y + shift * size))
      const area = { left: left - 3, right: left + w + 3, top: base - 0.85 * size, bottom: base + 0.3 * size }
      if (this.taken.some((t) => t.left < area.right && t.right > area.left && t.top < area.bottom && t.bottom > area.top)) continue
      this.taken.push(area)
      this.items.push({ kind: 'text', x: left, y: base, text, size, ink, halo: true, strong })
      return
    }
  }
}
