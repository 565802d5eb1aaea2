import type { Point } from '../drawing.ts'

/** Values on a grid, by column then row: index column · rows + row. NaN counts as below every threshold. */
export interface Field {
  readonly columns: number
  readonly rows: number
  readonly values: ArrayLike<number>
}
/** Where values reach a threshold. Points are (column, row) with fractions. */
export interface Contour {
  /** Closed outlines, holes run the other way: fill by the even-odd rule. */
  readonly rings: readonly Point[][]
  /** The outlines without what runs along the edge of the grid. */
  readonly lines: readonly Point[][]
}
// edges of a cell
const BOTTOM = 0
const RIGHT = 1
const TOP = 2
const LEFT = 3
/** From edge to edge by the corners that are in (1 lower left, 2 lower right, 4 upper right, 8 upper left); what is in lies to the left. */
const PIECES: readonly (readonly [number, number][])[] = [
  [],
  [[BOTTOM, LEFT]],
  [[RIGHT, BOTTOM]],
  [[RIGHT, LEFT]],
  [[TOP, RIGHT]],
  [],
  [[TOP, BOTTOM]],
  [[TOP, LEFT]],
  [[LEFT, TOP]],
  [[BOTTOM, TOP]],
  [],
  [[RIGHT, TOP]],
  [[LEFT, RIGHT]],
  [[BOTTOM, RIGHT]],
  [[LEFT, BOTTOM]],
  [],
]
const APART = {
  5: [
    [BOTTOM, LEFT],
    [TOP, RIGHT],
  ],
  10: [
    [RIGHT, BOTTOM],
    [LEFT, TOP],
  ],
} as const
const JOINED = {
  5: [
    [TOP, LEFT],
    [BOTTOM, RIGHT],
  ],
  10: [
    [LEFT, BOTTOM],
    [RIGHT, TOP],
  ],
} as const

/** Outline of the places with values at or over a threshold, straight between samples: marching squares with saddles told by the mean of their corners. */
export function contourOf(field: Field, threshold: number): Contour {
  const { columns, rows, values } = field
  const wide = columns + 2
  const at = (i: number, j: number): number => {
    const v = i < 0 || j < 0 || i >= columns || j >= rows ? Number.NEGATIVE_INFINITY : values[i * rows + j]
    return Number.isNaN(v) ? Number.NEGATIVE_INFINITY : v
  }
  // edge from (i, j) to the right: even; upward: odd
  const edgeOf = (i: number, j: number, side: number): number => {
    const x = i + 1 + (side === RIGHT ? 1 : 0)
    const y = j + 1 + (side === TOP ? 1 : 0)
    return 2 * (y * wide + x) + (side === BOTTOM || side === TOP ? 0 : 1)
  }
  const next = new Int32Array(2 * wide * (rows + 3)).fill(-1)
  const starts: number[] = []
  for (let i = -1; i < columns; i++)
    for (let j = -1; j < rows; j++) {
      const corners = [at(i, j), at(i + 1, j), at(i + 1, j + 1), at(i, j + 1)]
      let code = 0
      for (let n = 0; n < 4; n++) if (corners[n] >= threshold) code |= 1 << n
      const saddle = code === 5 || code === 10
      const joined = saddle && corners.reduce((sum, v) => sum + Math.max(v, threshold - 100), 0) / 4 >= threshold
      const pieces = saddle ? (joined ? JOINED : APART)[code as 5 | 10] : PIECES[code]
      for (const [from, to] of pieces) {
        const start = edgeOf(i, j, from)
        next[start] = edgeOf(i, j, to)
        starts.push(start)
      }
    }
  const pointOf = (edge: number): { point: Point; onEdge: boolean } => {
    const upward = edge % 2 === 1
    const cell = (edge - (upward ? 1 : 0)) / 2
    const i = (cell % wide) - 1
    const j = Math.floor(cell / wide) - 1
    const first = at(i, j)
    const second = upward ? at(i, j + 1) : at(i + 1, j)
    const share = first === Number.NEGATIVE_INFINITY ? 1 : second === Number.NEGATIVE_INFINITY ? 0 : (threshold - first) / (second - first)
    const onEdge = upward ? j < 0 || j + 1 >= rows : i < 0 || i + 1 >= columns
    return { point: upward ? [i, j + share] : [i + share, j], onEdge }
  }
  const rings: Point[][] = []
  const lines: Point[][] = []
  for (const start of starts) {
    if (next[start] < 0) continue
    const ring: Point[] = []
    let line: Point[] = []
    let edge = start
    while (next[edge] >= 0) {
      const { point, onEdge } = pointOf(edge)
      ring.push(point)
      if (onEdge) {
        if (line.length > 1) lines.push(line)
        line = []
      } else line.push(point)
      const to = next[edge]
      next[edge] = -1
      edge = to
    }
    const { point, onEdge } = pointOf(start)
    if (!onEdge && line.length > 0) line.push(point)
    if (line.length > 1) lines.push(line)
    if (ring.length > 2) rings.push(ring)
  }
  return { rings, lines }
}
