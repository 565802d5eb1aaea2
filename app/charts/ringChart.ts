import type { RingFigure } from '../../core/index.ts'
import { formatAreaUp, formatDbUp, textOf, toFace, type UnitSystem, unitOf } from '../words/index.ts'
import { niceTicks, ticksWithin, xAxis, yAxis } from './axes.ts'
import { type Box, boxPath, type Drawing, type Item, lineOf, round3, scaleOf } from './drawing.ts'

export interface RingInput {
  readonly rings: readonly RingFigure[]
  readonly width: number
  readonly height: number
  readonly system: UnitSystem
  readonly size: number
}

/** Two charts over one range axis: ground by ring with the part in sight, and its C/N (mean and highest). */
export function ringChart(input: RingInput): Drawing {
  const { rings, width, height, system, size } = input
  const left = 3.8 * size
  const right = width - 1.2 * size
  const gap = 2.6 * size
  const usable = height - 2 * gap - 3 * size
  const upper: Box = { left, right, top: 1.9 * size, bottom: 1.9 * size + usable / 2 }
  const lower: Box = { left, right, top: upper.bottom + gap, bottom: height - 3 * size }
  const farM = rings.length > 0 ? rings[rings.length - 1].toM : 1
  const range = scaleOf(0, farM, left, right)
  const area = niceTicks(0, Math.max(0.1, ...rings.map((r) => toFace('area', r.groundKm2, system))), 3)
  const areaY = scaleOf(0, area.to, upper.bottom, upper.top)
  const levels = rings.flatMap((r) => [r.cnrMeanDb, r.cnrMaxDb]).filter((v): v is number => v !== null)
  const db = niceTicks(Math.min(0, ...levels), Math.max(10, ...levels), 3)
  const dbY = scaleOf(db.from, db.to, lower.bottom, lower.top)
  const items: Item[] = [
    ...yAxis(upper, areaY, area.ticks, `Ground by ring, ${unitOf('area', system)}: in sight, masked, unknown`, size),
    ...yAxis(lower, dbY, db.ticks, '', size),
    { kind: 'text', x: 0, y: lower.top - 0.7 * size, text: 'C/N of the ground in sight, dB: mean and highest cell', size, ink: 'ink-2' },
  ]
  for (const r of rings) {
    const x1 = range.at(r.fromM) + 1
    const x2 = range.at(r.toM) - 1
    const y = (km2: number): number => areaY.at(toFace('area', km2, system))
    items.push({ kind: 'path', d: boxPath(x1, y(r.groundKm2), x2, upper.bottom), fill: 'ink', opacity: 0.12 })
    items.push({ kind: 'path', d: boxPath(x1, y(r.inSightKm2), x2, upper.bottom), fill: 'cool-4' })
    if (r.unknownKm2 > 0)
      items.push({
        kind: 'path',
        d: boxPath(x1, y(r.groundKm2), x2, y(r.groundKm2 - r.unknownKm2)),
        stroke: 'warn',
        width: 0.8,
        dash: [2, 2],
      })
    if (r.cnrMeanDb === null) continue
    const mid = (x1 + x2) / 2
    if (r.cnrMaxDb !== null) {
      const top = dbY.at(r.cnrMaxDb)
      items.push({ kind: 'path', d: lineOf(mid, dbY.at(r.cnrMeanDb), mid, top), stroke: 'warm-5', width: 1 })
      items.push({ kind: 'path', d: lineOf(mid - 3, top, mid + 3, top), stroke: 'warm-5', width: 1.4 })
    }
    items.push({ kind: 'circle', x: round3(mid), y: dbY.at(r.cnrMeanDb), r: 3, fill: 'warm-6' })
  }
  const faceFar = toFace('range', farM, system)
  const marks = ticksWithin(0, faceFar, 6).map((t) => ({ at: (t.at * farM) / faceFar, label: t.label }))
  items.push(...xAxis(upper, range, [], '', size))
  items.push(...xAxis(lower, range, marks, `Ground range, ${unitOf('range', system)}`, size))
  return { width, height, title: ringFinding(rings, system), items }
}

/** What the rings say, for a caption. */
export function ringFinding(rings: readonly RingFigure[], system: UnitSystem): string {
  const worst = rings.reduce<RingFigure | null>(
    (w, r) => (r.cnrMeanDb !== null && (w === null || r.cnrMeanDb > (w.cnrMeanDb ?? Number.NEGATIVE_INFINITY)) ? r : w),
    null,
  )
  if (!worst) return 'No ring holds ground in sight with clutter over it'
  const edge = (m: number): string => String(Math.round(toFace('range', m, system) * 10) / 10)
  return `Clutter is strongest from ${edge(worst.fromM)} to ${edge(worst.toM)} ${unitOf('range', system)}: mean C/N ${textOf(formatDbUp(worst.cnrMeanDb))} over ${textOf(formatAreaUp(worst.inSightKm2, system))} in sight`
}
