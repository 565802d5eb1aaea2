import type { TracedRay } from '../../terrain/index.ts'
import { type Cuts, placeCuts } from '../plane/profile.ts'

// The sweep's form of a ray in the straight plane: crossings only, with the polar cells noted beside them, so that whole cells can be passed over. The
// loops are short, hold few arrays, and have no branch the processor would have to guess: that, not the arithmetic, is what a crossing costs.

/** One ray cut into contiguous cells. Scratch, filled again for each ray; shared by all antenna heights. */
export interface CellProfile {
  count: number
  /** Per crossing: X, Y, quadratic term to the next, 1/m. */
  readonly line: Float64Array
  /** Cells whose centre lies on known ground. */
  known: number
  /** Per cell: surface at the centre (m), its slope along the ray, and a height Y that no segment touching the cell exceeds. */
  readonly cell: Float64Array
  /** Per cell: the crossing that ends the segment holding the centre, and the one that ends the segment holding the far edge. */
  readonly at: Int32Array
  /** Highest Y of the segments that end in a cell. */
  readonly top: Float64Array
}
export const makeCellProfile = (track: number, cells: number): CellProfile => ({
  count: 0,
  line: new Float64Array(track),
  known: 0,
  cell: new Float64Array(3 * cells),
  at: new Int32Array(2 * cells),
  top: new Float64Array(cells),
})

/** Rounding allowed for where a highest Y is put together from sums, m. */
const TOP_SLACK_M = 1e-6
/** Below any surface. */
const LOWEST_M = -1e6

/**
 * Fills the profile from a traced ray. `cuts` holds centre and far edge of each cell in turn, evenly spaced. Heights go through the exact map; inside a
 * segment the surface is the parabola of the patch less 1/2R, which differs from the mapped patch by under a thousandth of its own bulge.
 */
export function fillCells(t: TracedRay, inverse: number, cuts: Cuts, out: CellProfile): void {
  placeCuts(cuts, inverse)
  out.count = t.count
  out.known = 0
  if (t.count === 0) return
  const marks = out.at.length
  const perMark = 1 / cuts.m[0]
  out.at.fill(0)
  out.top.fill(LOWEST_M)
  straightenLine(t.surface, t.count, inverse, out.line)
  noteCells(t.surface, t.count, out.line, perMark, marks, out.at, out.top)
  // marks the ray reaches
  const lastM = t.surface[3 * t.count - 3]
  const reached = Math.min(marks, Math.floor(lastM * perMark + 1e-9))
  out.known = (reached + 1) >> 1
  settleCells(t.surface, t.count, cuts.m, out, reached)
}

/** straightX, straightDrop and straightY of every crossing: the hottest lines of the sweep. */
function straightenLine(surface: Float64Array, count: number, inverse: number, line: Float64Array): void {
  const half = 0.5 * inverse
  const end = 3 * count
  for (let i = 0; i < end; i += 3) {
    const s = surface[i]
    const z = surface[i + 1]
    const a = s * inverse
    const p = a * a
    const w = z * inverse
    line[i] = s + s * p * (1 / 3 + p * (2 / 15))
    line[i + 1] = (z - 0.5 * s * a * (1 + p * (5 / 12 + p * (61 / 360)))) * (1 - w * (1 - w * (1 - w)))
    line[i + 2] = surface[i + 2] - half
  }
}

/** Last crossing of each half cell, and the highest Y of the segments that end in each cell (greater of two without a branch: half of sum and difference). */
function noteCells(
  surface: Float64Array,
  count: number,
  line: Float64Array,
  perMark: number,
  marks: number,
  last: Int32Array,
  top: Float64Array,
): void {
  let x0 = 0
  let y0 = line[1]
  let c = line[2]
  for (let k = 1; k < count; k = (k + 1) | 0) {
    const i = Math.imul(k, 3)
    const x = line[i]
    const y = line[(i + 1) | 0]
    const length = x - x0
    const high = 0.5 * (y + y0 + Math.abs(y - y0)) + 0.25 * Math.abs(c * length * length)
    const mark = (surface[i] * perMark) | 0
    if (mark >= marks) break
    last[mark] = k
    const j = mark >> 1
    const before = top[j]
    top[j] = 0.5 * (high + before + Math.abs(high - before))
    x0 = x
    y0 = y
    c = line[(i + 2) | 0]
  }
}

/** From the last crossings to where each mark lies, the surface and slope at the centres, and the tops of all segments that touch a cell. */
function settleCells(surface: Float64Array, count: number, cutM: Float64Array, out: CellProfile, reached: number): void {
  const { at, cell, top, line } = out
  let ends = 0
  for (let k = 0; k < reached; k++) {
    const more = (at[k] - ends) | 0
    ends = (ends + (more & ~(more >> 31))) | 0
    at[k] = Math.min(ends + 1, count - 1)
  }
  if ((reached & 1) === 1) at[reached] = count - 1
  for (let j = 0; j < out.known; j++) {
    const i = 3 * at[2 * j]
    const s0 = surface[i - 3]
    const z0 = surface[i - 2]
    const q = surface[i - 1]
    const metres = surface[i] - s0
    const rise = metres > 0 ? (surface[i + 1] - z0) / metres - q * metres : 0
    const u = cutM[2 * j] - s0
    cell[3 * j] = z0 + u * (rise + q * u)
    cell[3 * j + 1] = rise + 2 * q * u
    // the segment over the far edge ends in a later cell
    const f = 3 * at[2 * j + 1]
    const length = line[f] - line[f - 3]
    const y0 = line[f - 2]
    const y1 = line[f + 1]
    const over = 0.5 * (y0 + y1 + Math.abs(y1 - y0)) + 0.25 * Math.abs(line[f - 1] * length * length)
    const own = top[j]
    cell[3 * j + 2] = 0.5 * (over + own + Math.abs(over - own)) + TOP_SLACK_M
  }
}
