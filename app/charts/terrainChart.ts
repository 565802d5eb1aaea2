import type { Profile } from '../../core/index.ts'
import { formatAzimuth, formatHeight, formatPlaceRange, textOf, toFace, type UnitSystem, unitOf } from '../words/index.ts'
import { niceTicks, ticksWithin, xAxis, yAxis } from './axes.ts'
import { type Box, type Drawing, type Ink, type Item, type Point, pathOf, type Scale, scaleOf } from './drawing.ts'
import { textWidth } from './labels.ts'
import { fresnelLabel, rayItems } from './terrainRay.ts'

export interface TerrainInput {
  readonly profile: Profile
  readonly width: number
  readonly height: number
  readonly system: UnitSystem
  readonly size: number
  /** Ranges shown, m; the whole profile where absent. */
  readonly window?: readonly [fromM: number, toM: number]
}
export interface TerrainGeometry {
  readonly drawing: Drawing
  readonly box: Box
  /** Ground range, m, to x. */
  readonly range: Scale
  /** Place of a height (m MSL) at a range (m) in the drawing: the earth's bulge is added. */
  place(rangeM: number, heightM: number): Point
  /** Ground range and height (m MSL) of a place of the drawing. */
  placeAt(x: number, y: number): { rangeM: number; heightM: number }
  /** Index of the profile's sample nearest a range, m; -1 for an empty profile. */
  indexAt(rangeM: number): number
}

/**
 * Terrain profile along one azimuth. The effective earth is drawn as a bulge under the ground, so that heights are true
 * at both ends and sight lines are straight.
 */
export function terrainChart(input: TerrainInput): TerrainGeometry {
  const { profile: whole, width, height, system, size } = input
  const p = input.window ? partOf(whole, input.window) : whole
  const count = p.distM.length
  const nearM = input.window?.[0] ?? 0
  const farM = input.window?.[1] ?? (count > 0 ? p.distM[count - 1] : 1)
  const bulge = (rangeM: number): number =>
    Number.isFinite(p.effectiveRadiusM) ? ((rangeM - nearM) * (farM - rangeM)) / (2 * p.effectiveRadiusM) : 0
  const box: Box = { left: 4.2 * size, right: width - 1.2 * size, top: 2.4 * size, bottom: height - 3 * size }
  const range = scaleOf(nearM, farM, box.left, box.right)
  const limits = heightLimits(p, bulge, nearM === 0)
  const nice = niceTicks(toFace('height', limits.low, system), toFace('height', limits.high, system), 5)
  const vertical = scaleOf(nice.from, nice.to, box.bottom, box.top)
  const place = (rangeM: number, heightM: number): Point => [
    range.at(rangeM),
    vertical.at(toFace('height', heightM + bulge(rangeM), system)),
  ]
  const line = (values: Float64Array, from = 0, to = count): Point[] => {
    const points: Point[] = []
    for (let i = from; i < to; i++) points.push(Number.isNaN(values[i]) ? [Number.NaN, 0] : place(p.distM[i], values[i]))
    return points
  }
  const items: Item[] = [...yAxis(box, vertical, nice.ticks, `Height, ${unitOf('height', system)} MSL`, size)]
  const perFace = toFace('range', 1, system)
  const rangeTicks = ticksWithin(nearM * perFace, farM * perFace, 6).map((t) => ({ at: t.at / perFace, label: t.label }))
  items.push(...floorBand(p, place, box))
  items.push(...groundItems(p, place, bulge, range, vertical, box, [nearM, farM], system, size))
  items.push({ kind: 'path', d: pathOf(line(p.surfaceM)), stroke: 'ink-3', width: 0.6 })
  items.push(...sightRuns(p, line))
  items.push({ kind: 'path', d: pathOf(cut(line(p.floorM), box.top)), stroke: 'cool-6', width: 1.2 })
  const control = controllingIndex(whole)
  const shownControl = control < 0 ? -1 : p.distM.findIndex((r) => r >= whole.distM[control])
  items.push(
    ...rayItems(p, place, box, shownControl < 0 ? (control < 0 ? -1 : count - 1) : shownControl),
    ...controlItems(whole, control, place, box),
  )
  items.push(...xAxis(box, range, rangeTicks, `Ground range, ${unitOf('range', system)}`, size))
  items.push(...directLabels(p, whole, control, place, box, system, size))
  const title = `Terrain along azimuth ${textOf(formatAzimuth(p.azimuthDeg))} from an electrical centre at ${textOf(formatHeight(p.antennaM, system))} MSL`
  return {
    drawing: { width, height, title, items },
    box,
    range,
    place,
    placeAt: (x, y) => {
      const rangeM = range.invert(x)
      return { rangeM, heightM: vertical.invert(y) / toFace('height', 1, system) - bulge(rangeM) }
    },
    indexAt: (rangeM) => nearestIndex(whole.distM, rangeM),
  }
}

/** Heights to show, m: the ground whole, the floor up to three times the ground's own spread. */
function heightLimits(p: Profile, bulge: (rangeM: number) => number, fromMast: boolean): { low: number; high: number } {
  let low = fromMast ? Math.min(0, p.antennaM) : Number.POSITIVE_INFINITY
  let high = fromMast ? p.antennaM : Number.NEGATIVE_INFINITY
  let floor = Number.NEGATIVE_INFINITY
  for (let i = 0; i < p.distM.length; i++) {
    const b = bulge(p.distM[i])
    if (!Number.isNaN(p.groundM[i])) low = Math.min(low, p.groundM[i] + b)
    if (!Number.isNaN(p.surfaceM[i])) high = Math.max(high, p.surfaceM[i] + b)
    if (!Number.isNaN(p.floorM[i])) floor = Math.max(floor, p.floorM[i] + p.floorBandM[i] + b)
  }
  if (!(high >= low)) [low, high] = [0, Math.max(1, p.antennaM)]
  const spread = Math.max(50, high - low)
  return { low, high: Math.max(high + 0.1 * spread, Math.min(floor, high + 2 * spread)) }
}

function groundItems(
  p: Profile,
  place: (r: number, h: number) => Point,
  bulge: (r: number) => number,
  range: Scale,
  vertical: Scale,
  box: Box,
  [nearM, farM]: readonly [number, number],
  system: UnitSystem,
  size: number,
): Item[] {
  const ground: Point[] = []
  for (let i = 0; i < p.distM.length; i++) if (!Number.isNaN(p.groundM[i])) ground.push(place(p.distM[i], p.groundM[i]))
  const sea: Point[] = []
  for (let n = 0; n <= 48; n++) {
    const r = nearM + ((farM - nearM) * n) / 48
    sea.push([range.at(r), vertical.at(toFace('height', bulge(r), system))])
  }
  const items: Item[] = []
  if (ground.length > 1) {
    const shape: Point[] = [[ground[0][0], box.bottom], ...ground, [ground[ground.length - 1][0], box.bottom]]
    items.push({ kind: 'path', d: pathOf(shape, true), fill: 'ink', opacity: 0.14 })
  }
  items.push({ kind: 'path', d: pathOf(sea), stroke: 'ink-3', width: 0.6, dash: [1.5, 2.5] })
  const mid = sea[24]
  const label = 'sea level on the effective earth'
  if (box.bottom - mid[1] > 1.4 * size)
    items.push({ kind: 'text', x: mid[0] - textWidth(label, size) / 2, y: mid[1] + 1.1 * size, text: label, size, ink: 'ink-2' })
  return items
}

/** The surface again in the manner of its sight: cool where seen, dashed ink where unknown. */
function sightRuns(p: Profile, line: (v: Float64Array, from: number, to: number) => Point[]): Item[] {
  const seen: Point[] = []
  const unknown: Point[] = []
  const gap: Point = [Number.NaN, 0]
  for (let i = 0; i < p.distM.length; ) {
    let end = i + 1
    while (end < p.distM.length && p.inSight[end] === p.inSight[i]) end++
    const run = line(p.surfaceM, i, Math.min(end + 1, p.distM.length))
    if (p.inSight[i] === 1) seen.push(...run, gap)
    if (p.inSight[i] === 2) unknown.push(...run, gap)
    i = end
  }
  return [
    { kind: 'path', d: pathOf(seen), stroke: 'cool-6', width: 2 },
    { kind: 'path', d: pathOf(unknown), stroke: 'warn', width: 1, dash: [2, 2] },
  ]
}

function floorBand(p: Profile, place: (r: number, h: number) => Point, box: Box): Item[] {
  const items: Item[] = []
  let upper: Point[] = []
  let lower: Point[] = []
  const flush = (): void => {
    if (upper.length > 1) items.push({ kind: 'path', d: pathOf([...upper, ...lower.reverse()], true), fill: 'cool-4', opacity: 0.3 })
    upper = []
    lower = []
  }
  for (let i = 0; i < p.distM.length; i++) {
    const low = place(p.distM[i], p.floorM[i] - p.floorBandM[i])
    if (Number.isNaN(low[1]) || low[1] < box.top) {
      flush()
      continue
    }
    const high = place(p.distM[i], p.floorM[i] + p.floorBandM[i])
    upper.push([high[0], Math.max(box.top, high[1])])
    lower.push([low[0], Math.min(box.bottom, low[1])])
  }
  flush()
  return items
}

/** Index of the sample that stands highest as seen from the antenna in the drawing: the controlling point. */
export function controllingIndex(p: Profile): number {
  let best = -1
  let steepest = Number.NEGATIVE_INFINITY
  for (let i = 0; i < p.distM.length; i++) {
    const r = p.distM[i]
    if (r <= 0 || Number.isNaN(p.surfaceM[i])) continue
    const drop = Number.isFinite(p.effectiveRadiusM) ? (r * r) / (2 * p.effectiveRadiusM) : 0
    const slope = (p.surfaceM[i] - p.antennaM - drop) / r
    if (slope > steepest) {
      steepest = slope
      best = i
    }
  }
  return best
}

function controlItems(p: Profile, i: number, place: (r: number, h: number) => Point, box: Box): Item[] {
  if (i < 0) return []
  const [x, y] = place(p.distM[i], p.surfaceM[i])
  if (x < box.left || x > box.right) return []
  return [{ kind: 'circle', x, y, r: 2.6, fill: 'sheet', stroke: 'ink', width: 1 }]
}

/** The samples inside a window of range. */
function partOf(p: Profile, [fromM, toM]: readonly [number, number]): Profile {
  const first = Math.max(
    0,
    p.distM.findIndex((r) => r >= fromM),
  )
  let end = p.distM.length
  while (end > first && p.distM[end - 1] > toM) end--
  const cut = (values: Float64Array): Float64Array => values.subarray(first, end)
  return {
    ...p,
    distM: cut(p.distM),
    groundM: cut(p.groundM),
    surfaceM: cut(p.surfaceM),
    floorM: cut(p.floorM),
    floorBandM: cut(p.floorBandM),
    inSight: p.inSight.subarray(first, end),
    ray: p.ray && { ...p.ray, heightM: cut(p.ray.heightM), fresnelM: cut(p.ray.fresnelM) },
  }
}

function directLabels(
  p: Profile,
  whole: Profile,
  control: number,
  place: (r: number, h: number) => Point,
  box: Box,
  system: UnitSystem,
  size: number,
): Item[] {
  const items: Item[] = []
  const say = (text: string, x: number, y: number, ink: Ink, anchor: 'start' | 'middle' | 'end'): void => {
    const w = textWidth(text, size)
    const from = anchor === 'end' ? x - w : anchor === 'middle' ? x - w / 2 : x
    const left = Math.min(box.right - w, Math.max(box.left + 0.3 * size, from))
    items.push({ kind: 'text', x: left, y, text, size, ink, halo: true })
  }
  const controlM = control < 0 ? 0 : whole.distM[control]
  if (control >= 0) {
    const [x, y] = place(controlM, whole.surfaceM[control])
    if (x >= box.left && x <= box.right)
      say(`controls, ${textOf(formatPlaceRange(controlM, system))}`, x + size, y - 0.8 * size, 'ink', 'end')
  }
  const zone = fresnelLabel(p, place, box)
  if (zone) say(zone.text, zone.x, zone.y, 'ink-2', 'middle')
  for (let i = p.distM.length - 1; i >= 0 && p.distM[i] > controlM; i--) {
    if (Number.isNaN(p.floorM[i])) continue
    const [x, y] = place(p.distM[i], p.floorM[i] + p.floorBandM[i])
    if (y < box.top + 1.2 * size) continue
    say('coverage floor, band ± 90 %', x, y - 0.5 * size, 'cool-7', 'end')
    break
  }
  const lost = p.inSight.indexOf(2)
  if (lost > 0) {
    const i = Number.isNaN(p.surfaceM[lost]) ? lost - 1 : lost
    const [x, y] = place(p.distM[i], p.surfaceM[i])
    say('unknown', x, y - 0.6 * size, 'warn', 'start')
  }
  return items
}

/** Breaks a line where it leaves the plot at the top. */
const cut = (points: readonly Point[], top: number): Point[] => points.map((q) => (q[1] < top ? [Number.NaN, 0] : q))

function nearestIndex(distM: Float64Array, rangeM: number): number {
  if (distM.length === 0) return -1
  let low = 0
  let high = distM.length - 1
  while (high - low > 1) {
    const mid = (low + high) >> 1
    if (distM[mid] > rangeM) high = mid
    else low = mid
  }
  return rangeM - distM[low] <= distM[high] - rangeM ? low : high
}
