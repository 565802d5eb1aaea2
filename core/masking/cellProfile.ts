import type { TracedRay } from '../terrain/index.ts'
import { type Cuts, placeCuts } from './profile.ts'
import { straightY } from './straight.ts'

// The sweep's form of a ray in the straight plane: crossings only, with the polar cells noted beside them, so that whole cells can be passed over.
// Numbers that are read together lie side by side.

/** One ray cut into contiguous cells. Scratch, filled again for each ray; shared by all antenna heights. */
export interface CellProfile {
  count: number
  /** Per crossing: X, Y, quadratic term to the next, 1/m. */
  readonly line: Float64Array
  /** Cells whose centre lies on known ground. */
  known: number
  /** Per cell: surface at the centre (m), its slope along the ray, and the highest Y of the segments that touch the cell. */
  readonly cell: Float64Array
  /** Per cell: the crossing that ends the segment holding the centre, and the one that ends the segment holding the far edge. */
  readonly at: Int32Array
}
export const makeCellProfile = (track: number, cells: number): CellProfile => ({
  count: 0,
  line: new Float64Array(track),
  known: 0,
  cell: new Float64Array(3 * cells),
  at: new Int32Array(2 * cells),
})

/**
 * Fills the profile from a traced ray. `cuts` holds centre and far edge of each cell in turn. Heights go through the exact map; inside a segment the
 * surface is the parabola of the patch less 1/2R, which differs from the mapped patch by under a thousandth of its own bulge.
 */
export function fillCells(t: TracedRay, inverse: number, cuts: Cuts, out: CellProfile): void {
  placeCuts(cuts, inverse)
  const { surface, count } = t
  const { line, cell, at } = out
  const cutM = cuts.m
  const half = 0.5 * inverse
  out.count = count
  out.known = 0
  if (count === 0) return
  let k = 0
  let next = cutM[0]
  let s0 = 0
  let z0 = surface[1]
  let q = surface[2]
  let x0 = 0
  let y0 = straightY(z0, 0, inverse)
  line[0] = 0
  line[1] = y0
  let top = y0
  const end = 3 * count
  for (let i = 3, ends = 1; i < end; i += 3, ends++) {
    const s1 = surface[i]
    const z1 = surface[i + 1]
    // straightX, straightDrop and straightY written out: the hottest lines of the sweep
    const a = s1 * inverse
    const p = a * a
    const x1 = s1 + s1 * p * (1 / 3 + p * (2 / 15))
    const w = z1 * inverse
    const y1 = (z1 - 0.5 * s1 * a * (1 + p * (5 / 12 + p * (61 / 360)))) * (1 - w * (1 - w * (1 - w)))
    const c = q - half
    line[i - 1] = c
    line[i] = x1
    line[i + 1] = y1
    const length = x1 - x0
    const bulge = -0.25 * c * length * length
    const high = (y0 > y1 ? y0 : y1) + (bulge > 0 ? bulge : 0)
    if (high > top) top = high
    if (next <= s1) {
      const metres = s1 - s0
      const rise = metres > 0 ? (z1 - z0) / metres - q * metres : 0
      do {
        at[k] = ends
        const j = k >> 1
        if ((k & 1) === 0) {
          const u = next - s0
          cell[3 * j] = z0 + u * (rise + q * u)
          cell[3 * j + 1] = rise + 2 * q * u
        } else {
          cell[3 * j + 2] = top
          top = high
        }
        k++
        next = cutM[k]
      } while (next <= s1)
    }
    s0 = s1
    z0 = z1
    q = surface[i + 2]
    x0 = x1
    y0 = y1
  }
  line[end - 1] = 0
  out.known = (k + 1) >> 1
  if ((k & 1) === 1) {
    // the last known cell ends with the ray
    at[k] = count - 1
    cell[3 * (k >> 1) + 2] = top
  }
}
