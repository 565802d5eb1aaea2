import type { TracedRay } from '../../terrain/index.ts'
import { type Cuts, placeCuts } from '../plane/profile.ts'

// The sweep's form of a ray in the straight plane: crossings only, with the polar cells noted beside them, so that whole cells can be passed over. The
// loops are short, hold few arrays, and have no branch the processor would have to guess: that, not the arithmetic, is what a crossing costs.

/** One ray cut into contiguous cells. Scratch, filled again for each ray; shared by all antenna heights. */
export interface CellProfile {
  count: number
  /** Surface of the track this is made from, and 1/effective radius. */
  surface: Float64Array
  inverse: number
  /** Per crossing: X, Y, quadratic term to the next, 1/m. Only there where it has been asked for: straightenCell, straightenRest. */
  readonly line: Float64Array
  /** Cells whose segments are in `line`. */
  readonly straight: Uint8Array
  /** Cells whose centre lies on known ground. */
  known: number
  /** Per cell: surface at the centre (m), its slope along the ray, and a height Y that no segment touching the cell exceeds. */
  readonly cell: Float64Array
  /** Per cell: the crossing that ends the segment holding the centre, and the one that ends the segment holding the far edge. */
  readonly at: Int32Array
  /** Highest surface of the segments that end in a cell, m. */
  readonly top: Float64Array
}
export const makeCellProfile = (track: number, cells: number): CellProfile => ({
  count: 0,
  surface: new Float64Array(0),
  inverse: 0,
  line: new Float64Array(track),
  straight: new Uint8Array(cells),
  known: 0,
  cell: new Float64Array(3 * cells),
  at: new Int32Array(2 * cells),
  top: new Float64Array(cells),
})

/** Rounding allowed for where a highest surface is put together from sums, m. */
const TOP_SLACK_M = 1e-6
/** Below any surface. */
const LOWEST_M = -1e6

/** Fills the profile from a traced ray; `cuts` holds centre and far edge of each cell in turn, evenly spaced. */
export function fillCells(t: TracedRay, inverse: number, cuts: Cuts, out: CellProfile): void {
  placeCuts(cuts, inverse)
  out.count = t.count
  out.surface = t.surface
  out.inverse = inverse
  out.known = 0
  if (t.count === 0) return
  const marks = out.at.length
  const perMark = 1 / cuts.m[0]
  out.at.fill(0)
  out.top.fill(LOWEST_M)
  out.straight.fill(0)
  noteCells(t.surface, t.count, perMark, marks, out.at, out.top)
  // marks the ray reaches
  const lastM = t.surface[3 * t.count - 3]
  const reached = Math.min(marks, Math.floor(lastM * perMark + 1e-9))
  out.known = (reached + 1) >> 1
  settleCells(cuts, out, reached)
}

/** Last crossing of each half cell, and the highest surface of the segments that end in each cell (greater of two without a branch: half of sum and difference). */
function noteCells(surface: Float64Array, count: number, perMark: number, marks: number, last: Int32Array, top: Float64Array): void {
  let s0 = 0
  let z0 = surface[1]
  let q = surface[2]
  for (let k = 1; k < count; k = (k + 1) | 0) {
    const i = Math.imul(k, 3)
    const s = surface[i]
    const z = surface[(i + 1) | 0]
    const length = s - s0
    const high = 0.5 * (z + z0 + Math.abs(z - z0)) + 0.25 * Math.abs(q * length * length)
    const mark = (s * perMark) | 0
    if (mark >= marks) break
    last[mark] = k
    const j = mark >> 1
    const before = top[j]
    top[j] = 0.5 * (high + before + Math.abs(high - before))
    s0 = s
    z0 = z
    q = surface[(i + 2) | 0]
  }
}

/** From the last crossings to where each mark lies, the surface and slope at the centres, and the tops of all segments that touch a cell. */
function settleCells(cuts: Cuts, out: CellProfile, reached: number): void {
  const { at, cell, top, surface, count, inverse } = out
  const cutM = cuts.m
  const { drop } = cuts
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
    // the segment over the far edge ends in a later cell; nothing in the cell is higher in the plane than its highest surface would be at the near edge
    const f = 3 * at[2 * j + 1]
    const length = surface[f] - surface[f - 3]
    const z1 = surface[f - 2]
    const z2 = surface[f + 1]
    const over = 0.5 * (z1 + z2 + Math.abs(z2 - z1)) + 0.25 * Math.abs(surface[f - 1] * length * length)
    const own = top[j]
    const high = 0.5 * (over + own + Math.abs(over - own)) + TOP_SLACK_M
    const w = high * inverse
    cell[3 * j + 2] = (high - (j > 0 ? drop[2 * j - 1] : 0)) * (1 - w * (1 - w * (1 - w)))
  }
}

/** Puts the segments that touch a cell into the straight plane, if they are not there. */
export function straightenCell(p: CellProfile, j: number): void {
  if (p.straight[j] === 1) return
  p.straight[j] = 1
  straighten(p, j > 0 ? p.at[2 * j - 1] - 1 : 0, p.at[2 * j + 1])
}
/** Puts all segments from crossing `from` on into the straight plane. */
export const straightenRest = (p: CellProfile, from: number): void => straighten(p, from, p.count - 1)

/**
 * straightX, straightDrop and straightY of the crossings from `first` to `last`. Heights go through the exact map; inside a segment the surface is the
 * parabola of the patch less 1/2R, which differs from the mapped patch by under a thousandth of its own bulge.
 */
function straighten(p: CellProfile, first: number, last: number): void {
  const { surface, line, inverse } = p
  const half = 0.5 * inverse
  const end = 3 * last
  for (let i = 3 * first; i <= end; i += 3) {
    const s = surface[i]
    const z = surface[i + 1]
    const a = s * inverse
    const q = a * a
    const w = z * inverse
    line[i] = s + s * q * (1 / 3 + q * (2 / 15))
    line[i + 1] = (z - 0.5 * s * a * (1 + q * (5 / 12 + q * (61 / 360)))) * (1 - w * (1 - w * (1 - w)))
    line[i + 2] = surface[i + 2] - half
  }
}
