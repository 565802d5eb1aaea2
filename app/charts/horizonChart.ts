import type { HorizonLine, HorizonRow } from '../../core/index.ts'
import { formatPlaceRange, formatScreening, textOf, type UnitSystem } from '../words/index.ts'
import { azimuthTicks, niceTicks, ticksWithin, xAxis, yAxis } from './axes.ts'
import { type Box, type Drawing, type Item, lineOf, type Point, pathOf, type Scale, scaleOf } from './drawing.ts'
import { keyItems, otherLines } from './horizonLines.ts'
import { placeInRows } from './labels.ts'

export interface HorizonInput {
  /** One row per azimuth, ascending from 0. */
  readonly rows: readonly HorizonRow[]
  readonly width: number
  readonly height: number
  readonly system: UnitSystem
  /** Text size, in the drawing's unit. */
  readonly size: number
  /** `strip`: winds only, no axis titles, for the edge of the map. */
  readonly style: 'strip' | 'chart'
  /** Most labels to try; default 4 in a strip, 8 in a chart. */
  readonly labels?: number
  /** Other horizons of the same antenna: bare ground, smaller k. */
  readonly lines?: readonly HorizonLine[]
  /** Surveyed elevations from this antenna, rising azimuth, with the widest gap that is joined, deg. */
  readonly measured?: {
    readonly points: readonly { readonly azimuthDeg: number; readonly elevationDeg: number }[]
    readonly gapDeg: number
  }
  /** How much of the height the scale shows: 1 all of it, 4 its lowest quarter. */
  readonly stretch?: number
}
/** Drawing plus what a pointer needs. */
export interface HorizonGeometry {
  readonly drawing: Drawing
  readonly box: Box
  readonly azimuth: Scale
  readonly elevation: Scale
  /** Row nearest an azimuth, deg. */
  rowAt(azimuthDeg: number): HorizonRow | null
}
const AT_LEAST = 'at least'
/** Does the ground beyond stay unknown, so that the angle is a lower bound? */
export const isAtLeast = (row: HorizonRow): boolean => row.obstacle.startsWith(AT_LEAST)
/** Why: `edge of terrain`, `void in terrain`. */
export const whyAtLeast = (row: HorizonRow): string => row.obstacle.slice(AT_LEAST.length).replace(/^: */, '')
/** Peaks within this many degrees of a named one are the same feature to the reader. */
const APART_DEG = 14
/** A further peak is named when it rises over the median by this share of what the highest one does. */
const LEAST_RISE = 0.2

/** Horizon profile: elevation of the horizon against azimuth from true north, controlling points named over it. */
export function horizonChart(input: HorizonInput): HorizonGeometry {
  const { width, height, size, style } = input
  const rows = input.rows.filter((r) => Number.isFinite(r.elevationDeg))
  const strip = style === 'strip'
  const named = peaksOf(rows, input.labels ?? (strip ? 4 : 8))
  const keyed = (input.lines?.length ?? 0) > 0 || (input.measured?.points.length ?? 0) > 0
  const rowCount = strip && !keyed ? 1 : 2
  const box: Box = {
    left: strip ? 2.9 * size : 3.4 * size,
    right: width - (strip ? 0.8 : 1.4) * size,
    top: (strip ? 0.25 + 1.25 * rowCount : 1.6 + 1.25 * rowCount) * size,
    bottom: height - ((strip ? 1.6 : 3) + (keyed ? 1.5 : 0)) * size,
  }
  const drawn = [
    ...rows.map((r) => r.elevationDeg),
    ...(input.lines ?? []).flatMap((l) => [...l.elevationDeg]),
    ...(input.measured?.points ?? []).map((p) => p.elevationDeg),
  ].filter((v) => Number.isFinite(v))
  const low = Math.min(0, ...drawn)
  const high = low + (Math.max(0.1, ...drawn) - low) / (input.stretch ?? 1)
  const pad = 0.06 * (high - low)
  const { from, to, ticks } = strip
    ? { from: low - pad, to: high + pad, ticks: ticksWithin(low - pad, high + pad, 2) }
    : niceTicks(low, high, 4)
  const azimuth = scaleOf(0, 360, box.left, box.right)
  const elevation = scaleOf(from, to, box.bottom, box.top)
  const points = closed(rows).map((r): Point => [azimuth.at(r.azimuthDeg), Math.max(box.top, elevation.at(r.elevationDeg))])
  const degrees = ticks.map((t) => ({ at: t.at, label: `${t.label}°` }))
  const items: Item[] = [...yAxis(box, elevation, degrees, strip ? '' : 'Elevation of the horizon, deg', size)]
  if (points.length > 1) {
    const area: Point[] = [[box.left, box.bottom], ...points, [box.right, box.bottom]]
    items.push({ kind: 'path', d: pathOf(area, true), fill: 'ink', opacity: 0.14 })
    items.push(...otherLines(input, azimuth, elevation, box))
    items.push({ kind: 'path', d: edgePath(rows, azimuth, elevation, false), stroke: 'ink', width: 1 })
    items.push({ kind: 'path', d: edgePath(rows, azimuth, elevation, true), stroke: 'ink', width: 1, dash: [3, 2] })
  }
  const titleX = strip ? '' : 'Azimuth from true north'
  items.push(...xAxis(box, azimuth, azimuthTicks(strip ? 'winds' : 'degrees'), titleX, size))
  items.push(...labelItems(named, input, box, azimuth, elevation, rowCount))
  if (keyed) items.push(...keyItems(input, box, height - 0.35 * size))
  const top = named[0]
  const title = top
    ? `Horizon profile: highest ${textOf(formatScreening(top.elevationDeg))} at azimuth ${Math.round(top.azimuthDeg)}°, ${nameOf(top)}`
    : 'Horizon profile: no azimuth evaluated'
  return {
    drawing: { width, height, title, items },
    box,
    azimuth,
    elevation,
    rowAt: (azimuthDeg) => nearestRow(rows, azimuthDeg),
  }
}

function labelItems(
  named: readonly HorizonRow[],
  input: HorizonInput,
  box: Box,
  azimuth: Scale,
  elevation: Scale,
  rowCount: number,
): Item[] {
  const wants = named.map((r) => ({ x: azimuth.at(r.azimuthDeg), text: labelOf(r, input.system), row: r }))
  const placed = placeInRows(wants, box.left, input.width, input.size, rowCount)
  return placed.flatMap((p): Item[] => {
    const row = named[wants.findIndex((w) => w.x === p.x && w.text === p.text)]
    const base = box.top - (0.45 + 1.25 * p.row) * input.size
    const d = lineOf(p.x, base + 0.2 * input.size, p.x, Math.max(box.top, elevation.at(row.elevationDeg)))
    return [
      { kind: 'path', d, stroke: 'ink-3', width: 0.5 },
      { kind: 'text', x: p.left, y: base, text: p.text, size: input.size, ink: 'ink', halo: true },
    ]
  })
}

/** Rows worth a name, most important first: the highest of all, each named obstacle's highest, then further peaks. */
export function peaksOf(rows: readonly HorizonRow[], most: number): HorizonRow[] {
  const plain = new Set(['terrain', 'cover'])
  const byHeight = [...rows].sort((a, b) => b.elevationDeg - a.elevationDeg || a.azimuthDeg - b.azimuthDeg)
  const chosen: HorizonRow[] = []
  const take = (row: HorizonRow, apartDeg: number): void => {
    if (chosen.length < most && chosen.every((c) => turn(c.azimuthDeg, row.azimuthDeg) >= apartDeg)) chosen.push(row)
  }
  if (byHeight.length > 0) take(byHeight[0], 0)
  const seen = new Set(chosen.map((c) => c.obstacle))
  for (const row of byHeight) {
    if (plain.has(row.obstacle) || isAtLeast(row) || seen.has(row.obstacle)) continue
    seen.add(row.obstacle)
    take(row, 1)
  }
  if (byHeight.length === 0) return chosen
  // The end of the terrain is always said, in the last place.
  const edge = seen.has(byHeight.find(isAtLeast)?.obstacle ?? '') ? undefined : byHeight.find(isAtLeast)
  const room = edge ? most - 1 : most
  const median = byHeight[byHeight.length >> 1].elevationDeg
  const least = median + LEAST_RISE * (byHeight[0].elevationDeg - median)
  const isPeak = (row: HorizonRow): boolean =>
    rows.every((r) => turn(r.azimuthDeg, row.azimuthDeg) > APART_DEG / 2 || r.elevationDeg <= row.elevationDeg)
  for (const row of byHeight) {
    if (chosen.length >= room || row.elevationDeg < least) break
    if (!isAtLeast(row) && chosen.every((c) => turn(c.azimuthDeg, row.azimuthDeg) >= APART_DEG) && isPeak(row)) take(row, APART_DEG)
  }
  if (edge) take(edge, 1)
  return chosen
}
const turn = (a: number, b: number): number => {
  const d = Math.abs(a - b) % 360
  return d > 180 ? 360 - d : d
}
const nameOf = (row: HorizonRow): string => (isAtLeast(row) ? `at least, ${whyAtLeast(row)}` : row.obstacle)

/** `Harl Edge 6.3 NM, 0.62°`; where the ground beyond is unknown `at least 0.12°, edge of terrain`. */
export function labelOf(row: HorizonRow, system: UnitSystem): string {
  const angle = textOf(formatScreening(row.elevationDeg))
  if (isAtLeast(row)) return `at least ${angle}, ${whyAtLeast(row)}`
  return `${row.obstacle} ${textOf(formatPlaceRange(row.rangeM, system))}, ${angle}`
}

/** The first row again at 360°, so that the profile closes. */
function closed(rows: readonly HorizonRow[]): HorizonRow[] {
  if (rows.length === 0) return []
  const last = rows[rows.length - 1]
  return last.azimuthDeg >= 360 ? [...rows] : [...rows, { ...rows[0], azimuthDeg: 360 }]
}
/** Line of the known (or, `edge`, the "at least") part of the horizon. */
function edgePath(rows: readonly HorizonRow[], azimuth: Scale, elevation: Scale, edge: boolean): string {
  const all = closed(rows)
  return pathOf(
    all.map((r, i): Point => {
      const shown = isAtLeast(r) === edge || (edge && i > 0 && isAtLeast(all[i - 1]))
      return shown && r.elevationDeg <= elevation.to ? [azimuth.at(r.azimuthDeg), elevation.at(r.elevationDeg)] : [Number.NaN, 0]
    }),
  )
}
function nearestRow(rows: readonly HorizonRow[], azimuthDeg: number): HorizonRow | null {
  let best: HorizonRow | null = null
  for (const r of rows) if (!best || turn(r.azimuthDeg, azimuthDeg) < turn(best.azimuthDeg, azimuthDeg)) best = r
  return best
}
