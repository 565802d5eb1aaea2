import type { CellProfile } from './cellProfile.ts'
import { touchingSlope } from './heightToSee.ts'
import type { Cuts } from './profile.ts'
import { ALLOWANCE_REACH, SIGHT_ALLOWANCE_M } from './sightState.ts'

/** Scratch of the upper hull of one ray: X, Y and the crossing (or the one before, for the middle of a segment), three numbers per corner. */
export type HullScratch = Float64Array
export const makeHull = (track: number, cells: number): HullScratch => new Float64Array(2 * track + 3 * cells + 6)
/** Segments that rise this far above their ends also put their middle on the hull, m. */
const MIDDLE_M = 0.02
/** Segments that rise less than this above their ends are not looked at for a touching line, m. */
const BULGE_M = 0.001

/**
 * Height to see of each cell centre of a ray, in O(n): the tangent from a place to the upper hull of everything nearer, carried back to the mast. On the
 * hull go crossings that stand above the chord of their neighbours, middles of hollow-downward segments, and the centres themselves (no other crossing
 * can be touched from beyond its neighbour); the tangent is then settled in closed form on the segments at the corner it touches. Writes metres above the
 * site's ground, at least 0.
 */
export function heightsToSee(
  p: CellProfile,
  cuts: Cuts,
  siteGroundM: number,
  inverse: number,
  postingM: number,
  h: HullScratch,
  out: Float32Array,
  offset: number,
): void {
  const { line, at, known } = p
  const cutX = cuts.x
  const nearM = ALLOWANCE_REACH * postingM
  // the last two corners in hand, those before in the scratch; n = 3 × corners in the scratch, tail excluded
  let n = 0
  let ax = 0
  let ay = 0
  let bx = 0
  let by = siteGroundM / (1 + siteGroundM * inverse)
  let bAt = 0
  let aAt = -1
  let k = 1
  for (let j = 0; j < known; j++) {
    const ends = at[2 * j]
    for (; k < ends; k++) {
      const i = 3 * k
      const x = line[i]
      const y = line[i + 1]
      const c = line[i - 1]
      const dx = x - line[i - 3]
      const rise = -0.25 * c * dx * dx
      const mx = x - 0.5 * dx
      // not behind a centre in the same segment
      if (rise > MIDDLE_M && mx > bx) {
        const my = 0.5 * (y + line[i - 2]) + rise
        while (aAt >= 0 && (by - ay) * (mx - bx) <= (my - by) * (bx - ax)) {
          bx = ax
          by = ay
          bAt = aAt
          n -= 3
          ax = h[n]
          ay = h[n + 1]
          aAt = h[n + 2]
        }
        h[n] = ax
        h[n + 1] = ay
        h[n + 2] = aAt
        n += 3
        ax = bx
        ay = by
        aAt = bAt
        bx = mx
        by = my
        bAt = k - 1
      }
      if ((y - line[i - 2]) * (line[i + 3] - x) < (line[i + 4] - y) * dx) continue
      while (aAt >= 0 && (by - ay) * (x - bx) <= (y - by) * (bx - ax)) {
        bx = ax
        by = ay
        bAt = aAt
        n -= 3
        ax = h[n]
        ay = h[n + 1]
        aAt = h[n + 2]
      }
      h[n] = ax
      h[n + 1] = ay
      h[n + 2] = aAt
      n += 3
      ax = bx
      ay = by
      aAt = bAt
      bx = x
      by = y
      bAt = k
    }
    // the segment from crossing `ends - 1` holds the centre
    const i = 3 * (ends - 1)
    const sx = line[i]
    const sy = line[i + 1]
    const c = line[i + 2]
    const length = line[i + 3] - sx
    const x = cutX[2 * j]
    const u = x - sx
    const slope = length > 0 ? (line[i + 4] - sy) / length - c * length : 0
    const y = sy + u * (slope + c * u)
    while (aAt >= 0 && (by - ay) * (x - bx) <= (y - by) * (bx - ax)) {
      bx = ax
      by = ay
      bAt = aAt
      n -= 3
      ax = h[n]
      ay = h[n + 1]
      aAt = h[n + 2]
    }
    const near = x - nearM
    let least = ((bx >= near ? y + SIGHT_ALLOWANCE_M : y) - by) / (x - bx)
    // the segment of the centre itself: touched inside it, or at its start
    const touched = c < 0 ? Math.sqrt(-c * SIGHT_ALLOWANCE_M) : 0
    let own = least
    if (touched > 0 && touched < -c * u) own = slope + 2 * (c * u + touched)
    else if (u > 0) own = slope + c * u + (sx >= near ? SIGHT_ALLOWANCE_M / u : 0)
    if (own < least) least = own
    for (let m = bAt > 0 ? bAt - 1 : 0; m <= bAt && m < ends - 1; m++) {
      const dx = line[3 * m + 3] - line[3 * m]
      if (-0.25 * line[3 * m + 2] * dx * dx > BULGE_M) {
        const touch = touchingSlope(line, m, x, y)
        if (touch < least) least = touch
      }
    }
    const lowest = y - least * x
    const heightM = lowest / (1 - lowest * inverse) - siteGroundM
    out[offset + j] = heightM > 0 ? heightM : 0
    h[n] = ax
    h[n + 1] = ay
    h[n + 2] = aAt
    n += 3
    ax = bx
    ay = by
    aAt = bAt
    bx = x
    by = y
    bAt = ends - 1
  }
}
