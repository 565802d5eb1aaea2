import type { ClutterLevel, ClutterLevels } from '../../../core/index.ts'
import { CHART_WORDS, formatDbUp, formatNumber, textOf, toFace, type UnitSystem, unitOf } from '../../words/index.ts'
import { niceTicks, ticksWithin, xAxis, yAxis } from '../axes.ts'
import { type Box, type Drawing, type Item, lineOf, round3, type Scale, scaleOf } from '../drawing.ts'

export interface LevelsInput {
  readonly levels: ClutterLevels
  readonly width: number
  readonly height: number
  readonly system: UnitSystem
  readonly size: number
}
/** A ring or an octant of the chart. */
export interface LevelPart {
  readonly words: string
  readonly level: ClutterLevel
  readonly left: number
  readonly right: number
  /** Middle of a ring, m, or of an octant, degrees. */
  readonly rangeM: number | null
  readonly azimuthDeg: number | null
}
export interface LevelsGeometry {
  readonly drawing: Drawing
  readonly boxes: readonly [rings: Box, octants: Box]
  /** Rings outward, then octants from north. */
  readonly parts: readonly LevelPart[]
}
export const OCTANTS = ['N', 'NE', 'E', 'SE', 'S', 'SW', 'W', 'NW'] as const

/** C/N by ring and by octant over one scale: mean, and the levels that 90 and 99 % of the known ground stays under. */
export function levelsChart({ levels, width, height, system, size }: LevelsInput): LevelsGeometry {
  const gap = 3.4 * size
  const left = 3 * size
  const half = (width - left - gap - 0.8 * size) / 2
  const rings: Box = { left, right: left + half * 1.1, top: 3.2 * size, bottom: height - 3 * size }
  const octants: Box = { ...rings, left: rings.right + gap, right: width - 0.8 * size }
  const all = [...levels.rings, ...levels.octants].flatMap((l) => [l.meanDb, l.p90Db, l.p99Db]).filter((v): v is number => v !== null)
  const db = niceTicks(Math.min(0, ...all), Math.max(10, ...all), 5)
  const up = scaleOf(db.from, db.to, rings.bottom, rings.top)
  const farM = levels.rings.length > 0 ? levels.rings[levels.rings.length - 1].toM : 1
  const range = scaleOf(0, farM, rings.left, rings.right)
  const perFace = toFace('range', 1, system)
  const edge = (m: number): string => formatNumber(m * perFace, Math.abs(m * perFace - Math.round(m * perFace)) < 0.01 ? 0 : 1)
  const step = (octants.right - octants.left) / 8
  const parts: LevelPart[] = [
    ...levels.rings.map((r) => ({
      words: `${edge(r.fromM)}–${edge(r.toM)}\u202f${unitOf('range', system)}`,
      level: r,
      left: range.at(r.fromM),
      right: range.at(r.toM),
      rangeM: (r.fromM + r.toM) / 2,
      azimuthDeg: null,
    })),
    ...levels.octants.map((o, n) => ({
      words: OCTANTS[n],
      level: o,
      left: octants.left + n * step,
      right: octants.left + (n + 1) * step,
      rangeM: null,
      azimuthDeg: o.azimuthDeg,
    })),
  ]
  const marks = ticksWithin(0, farM * perFace, 6).map((t) => ({ at: t.at / perFace, label: t.label }))
  const compass = OCTANTS.map((label, n) => ({ at: n + 0.5, label }))
  const items: Item[] = [
    { kind: 'text', x: 0, y: size, text: CHART_WORDS.cnrTitle, size, ink: 'ink-2' },
    ...yAxis(rings, up, db.ticks, '', size),
    ...yAxis(octants, up, db.ticks, '', size),
    ...xAxis(rings, range, marks, `Ground range, ${unitOf('range', system)}`, size),
    ...xAxis(octants, scaleOf(0, 8, octants.left, octants.right), compass, CHART_WORDS.octant, size),
    ...parts.flatMap((p) => partItems(p, up)),
    ...key(rings, size),
  ]
  return { drawing: { width, height, title: levelsFinding(levels, system), items }, boxes: [rings, octants], parts }
}

function partItems({ level, left, right }: LevelPart, up: Scale): Item[] {
  const mid = round3((left + right) / 2)
  const arm = Math.min(7, (right - left) * 0.32)
  const known = [level.meanDb, level.p90Db, level.p99Db].filter((v): v is number => v !== null)
  if (known.length === 0) return []
  const items: Item[] = [
    { kind: 'path', d: lineOf(mid, up.at(Math.min(...known)), mid, up.at(Math.max(...known))), stroke: 'warm-5', width: 0.8 },
  ]
  if (level.p90Db !== null)
    items.push({ kind: 'path', d: lineOf(mid - arm, up.at(level.p90Db), mid + arm, up.at(level.p90Db)), stroke: 'warm-5', width: 1.4 })
  if (level.p99Db !== null)
    items.push({ kind: 'path', d: lineOf(mid - arm, up.at(level.p99Db), mid + arm, up.at(level.p99Db)), stroke: 'warm-7', width: 2.4 })
  if (level.meanDb !== null) items.push({ kind: 'circle', x: mid, y: up.at(level.meanDb), r: 3, fill: 'warm-6' })
  return items
}

/** What the three marks are. */
function key(box: Box, size: number): Item[] {
  const y = 2.4 * size
  const items: Item[] = []
  let x = box.left
  const word = (text: string): void => {
    items.push({ kind: 'text', x: x + 1.6 * size, y, text, size, ink: 'ink-2' })
    x += 1.6 * size + 0.62 * size * text.length + size
  }
  const middle = y - 0.32 * size
  items.push({ kind: 'circle', x: x + 0.7 * size, y: middle, r: 3, fill: 'warm-6' })
  word(CHART_WORDS.mean)
  items.push({ kind: 'path', d: lineOf(x, middle, x + 1.3 * size, middle), stroke: 'warm-5', width: 1.4 })
  word('90\u202f%')
  items.push({ kind: 'path', d: lineOf(x, middle, x + 1.3 * size, middle), stroke: 'warm-7', width: 2.4 })
  word('99\u202f%')
  return items
}

/** Where clutter is strongest, for a caption. */
export function levelsFinding(levels: ClutterLevels, system: UnitSystem): string {
  const most = <T extends ClutterLevel>(parts: readonly T[]): T | null =>
    parts.reduce<T | null>((best, p) => (p.meanDb !== null && (best?.meanDb == null || p.meanDb > best.meanDb) ? p : best), null)
  const ring = most(levels.rings)
  const octant = most(levels.octants)
  if (!ring || !octant) return CHART_WORDS.noClutter
  const perFace = toFace('range', 1, system)
  const edge = (m: number): string =>
    formatNumber(Math.round(m * perFace * 10) / 10, Math.abs(m * perFace - Math.round(m * perFace)) < 0.05 ? 0 : 1)
  const db = (v: number | null): string => textOf(formatDbUp(v))
  return `Clutter is strongest from ${edge(ring.fromM)} to ${edge(ring.toM)}\u202f${unitOf('range', system)}: mean C/N ${db(ring.meanDb)}, 99\u202f% under ${db(ring.p99Db)}; by octant toward ${OCTANTS[Math.round(octant.azimuthDeg / 45) % 8]}: ${db(octant.meanDb)}`
}
