import type { Box, Point } from './drawing.ts'

/** Advance widths of Source Sans 3 regular, em, for the characters charts use; the rest count as a wide letter. */
const NARROW = new Map<string, number>()
const WIDTHS: readonly (readonly [number, string])[] = [
  [0.2, ' '],
  [0.12, '\u202f'],
  [0.25, "',.:;iIjl|·′"],
  [0.32, '()[]-frt°!'],
  [0.36, '/²³'],
  [0.43, 'csz?″*"'],
  [0.5, '#$+0123456789<=>^~aeghkvxyJFLY−–≥≤'],
  [0.56, 'bdnopquABCEKPRSTVXZ'],
  [0.66, 'DGHNOQU&'],
  [0.84, 'mwMW%@'],
]
for (const [em, chars] of WIDTHS) for (const c of chars) NARROW.set(c, em)

/** Width of a text set in Source Sans 3, in the unit of `size`; a few per cent generous, never short. */
export function textWidth(text: string, size: number): number {
  let em = 0
  for (const c of text) em += NARROW.get(c) ?? 0.66
  return em * size * 1.03
}

/** Something to be named in a row of labels above a profile. */
export interface Want {
  readonly x: number
  readonly text: string
}
export interface Placed extends Want {
  /** Left end of the text and its row, 0 nearest the plot. */
  readonly left: number
  readonly row: number
}
/**
 * Places labels in rows over their x, first come first served: most important first. A label is centred over its
 * point, else to the right or left of it, pushed inside [left, right]; it takes the lowest row where it touches nothing
 * and no leader of a higher label runs through it. What finds no room is left out.
 */
export function placeInRows(wants: readonly Want[], left: number, right: number, size: number, rows: number): Placed[] {
  const placed: Placed[] = []
  const gap = 0.7 * size
  const clashes = (want: Want, start: number, end: number, row: number): boolean =>
    placed.some((p) => {
      const far = p.left + textWidth(p.text, size)
      if (p.row === row) return start < far + gap && p.left < end + gap
      // A leader goes down from the label's row to the profile: it must not cross a label of a lower row.
      return p.row > row ? p.x > start - 3 && p.x < end + 3 : want.x > p.left - 3 && want.x < far + 3
    })
  for (const want of wants) {
    const width = textWidth(want.text, size)
    if (width > right - left) continue
    const starts = [want.x - width / 2, want.x - 0.3 * size, want.x - width + 0.3 * size].map((x) =>
      Math.min(right - width, Math.max(left, x)),
    )
    const tries = Array.from({ length: rows }, (_, row) => starts.map((start) => ({ row, start }))).flat()
    const free = tries.find(({ row, start }) => !clashes(want, start, start + width, row))
    if (free) placed.push({ ...want, left: free.start, row: free.row })
  }
  return placed
}

export interface PointLabel {
  readonly at: Point
  readonly text: string
}
export interface PlacedPoint extends PointLabel {
  readonly x: number
  readonly y: number
  readonly anchor: 'start' | 'end' | 'middle'
}
/** Names points of a scatter plot: right, left, above, below of each, the first place that touches no label, no point and none of `lines`. */
export function placeAroundPoints(
  points: readonly PointLabel[],
  box: Box,
  size: number,
  lines: readonly (readonly Point[])[] = [],
): PlacedPoint[] {
  const dots = points.map(({ at: [x, y] }): Box => ({ left: x - 4, right: x + 4, top: y - 4, bottom: y + 4 }))
  const taken: Box[] = [...dots, ...lines.flatMap(beads)]
  return points.flatMap((p, own) => {
    const [px, py] = p.at
    const w = textWidth(p.text, size)
    const tries: readonly (readonly [number, number, PlacedPoint['anchor'], number])[] = [
      [px + 7, py + 0.34 * size, 'start', px + 7],
      [px - 7, py + 0.34 * size, 'end', px - 7 - w],
      [px, py - 8, 'middle', px - w / 2],
      [px, py + 6 + size, 'middle', px - w / 2],
      [px + 6, py - 6, 'start', px + 6],
      [px + 6, py + 4 + size, 'start', px + 6],
      [px - 6, py - 6, 'end', px - 6 - w],
      [px - 6, py + 4 + size, 'end', px - 6 - w],
    ]
    for (const [x, y, anchor, left] of tries) {
      const area = { left, right: left + w, top: y - 0.8 * size, bottom: y + 0.2 * size }
      const inside = area.left >= box.left && area.right <= box.right && area.top >= box.top && area.bottom <= box.bottom
      const free = taken.every(
        (t, i) => i === own || t.left > area.right || t.right < area.left || t.top > area.bottom || t.bottom < area.top,
      )
      if (inside && free) {
        taken.push(area)
        return [{ ...p, x, y, anchor }]
      }
    }
    return []
  })
}

/** A polyline as small boxes 3 units apart. */
function beads(line: readonly Point[]): Box[] {
  return line.slice(1).flatMap(([x2, y2], i) => {
    const [x1, y1] = line[i]
    const count = Math.max(1, Math.ceil(Math.hypot(x2 - x1, y2 - y1) / 3))
    return Array.from({ length: count }, (_, n): Box => {
      const x = x1 + ((x2 - x1) * n) / count
      const y = y1 + ((y2 - y1) * n) / count
      return { left: x - 0.5, right: x + 0.5, top: y - 0.5, bottom: y + 0.5 }
    })
  })
}
