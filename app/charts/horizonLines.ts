import type { HorizonLine } from '../../core/index.ts'
import { CHART_WORDS, formatNumber } from '../words/index.ts'
import type { Box, Item, Point, Scale } from './drawing.ts'
import { lineOf, pathOf } from './drawing.ts'
import type { HorizonInput } from './horizonChart.ts'
import { textWidth } from './labels.ts'

type Style = Pick<Extract<Item, { kind: 'path' }>, 'stroke' | 'width' | 'dash'>
/** Dashed at the smaller k, lighter for the bare ground. */
const styleOf = (line: HorizonLine, smallest: boolean): Style => ({
  stroke: line.cover ? 'ink' : 'ink-3',
  width: line.cover ? 0.9 : 1,
  ...(smallest ? { dash: [4, 3] } : {}),
})
const MEASURED: Style = { stroke: 'cool-7', width: 1.6 }
const smallestK = (lines: readonly HorizonLine[]): number | null => {
  const ks = new Set(lines.map((l) => l.k))
  return ks.size > 1 ? Math.min(...ks) : null
}
const kWords = (k: number): string => `k = ${Math.abs(k - 4 / 3) < 0.005 ? '4/3' : formatNumber(k, Number.isInteger(k) ? 0 : 2)}`

/** Horizons beside the option's own, and what was measured. What stands over the scale is left out. */
export function otherLines(input: HorizonInput, azimuth: Scale, elevation: Scale, box: Box): Item[] {
  const at = (azimuthDeg: number, deg: number): Point =>
    deg <= elevation.to ? [azimuth.at(azimuthDeg), elevation.at(deg)] : [Number.NaN, 0]
  const lines = input.lines ?? []
  const small = smallestK(lines)
  const items = lines.map((l): Item => {
    const points = l.azimuthsDeg.map((a, i) => at(a, l.elevationDeg[i]))
    points.push(at(360, l.elevationDeg[0]))
    return { kind: 'path', d: pathOf(points), ...styleOf(l, l.k === small) }
  })
  if (input.measured) {
    const { points, gapDeg } = input.measured
    const joined: Point[] = []
    points.forEach((p, i) => {
      if (i > 0 && p.azimuthDeg - points[i - 1].azimuthDeg > gapDeg) joined.push([Number.NaN, 0])
      joined.push(at(p.azimuthDeg, p.elevationDeg))
    })
    items.push({ kind: 'path', d: pathOf(joined), ...MEASURED })
    for (const [x, y] of joined)
      if (Number.isFinite(x) && y >= box.top) items.push({ kind: 'circle', x, y, r: 1.8, fill: 'sheet', stroke: 'cool-7', width: 1 })
  }
  return items
}

/** What each line is, in one row under the axis. */
export function keyItems(input: HorizonInput, box: Box, y: number): Item[] {
  const { size } = input
  const lines = input.lines ?? []
  const small = smallestK(lines)
  const main = lines.find((l) => l.k !== small)?.k
  const entries: { words: string; style: Style }[] = [
    { words: `${CHART_WORDS.withCover}${main === undefined ? '' : `, ${kWords(main)}`}`, style: { stroke: 'ink', width: 1 } },
    ...lines.map((l) => ({
      words: `${l.cover ? CHART_WORDS.withCover : CHART_WORDS.bareGround}, ${kWords(l.k)}`,
      style: styleOf(l, l.k === small),
    })),
    ...(input.measured ? [{ words: CHART_WORDS.measured, style: MEASURED }] : []),
  ]
  const items: Item[] = []
  let x = box.left
  for (const { words, style } of entries) {
    const w = 1.6 * size + 4 + textWidth(words, size)
    if (x + w > box.right) break
    items.push({ kind: 'path', d: lineOf(x, y - 0.3 * size, x + 1.6 * size, y - 0.3 * size), ...style })
    items.push({ kind: 'text', x: x + 1.6 * size + 4, y, text: words, size, ink: 'ink-2' })
    x += w + size
  }
  return items
}
