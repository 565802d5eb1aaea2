import { touchingSlope } from './heightToSee.ts'
import type { StraightProfile } from './profile.ts'
import { ALLOWANCE_REACH, SIGHT_ALLOWANCE_M } from './sightState.ts'
import { heightOfY } from './straight.ts'

/** Scratch of the upper hull of one ray. */
export interface HullScratch {
  readonly x: Float64Array
  readonly y: Float64Array
  /** Point of the profile, or the point before the middle of a segment. */
  readonly point: Int32Array
}
export const makeHull = (points: number): HullScratch => ({
  x: new Float64Array(2 * points + 2),
  y: new Float64Array(2 * points + 2),
  point: new Int32Array(2 * points + 2),
})
/** Segments that rise this far above their ends also put their middle on the hull, m. */
const MIDDLE_M = 0.02

/**
 * Height to see of each cell centre along a ray in O(n): the tangent from a place to the upper hull of everything nearer, carried back to the mast. The
 * hull holds the points and the middles of hollow-downward segments; the tangent is then settled in closed form on the two segments at the hull point it
 * touches. Writes metres above the site's ground, at least 0.
 */
export function heightsToSee(
  p: StraightProfile,
  centre: Int32Array,
  cells: number,
  siteGroundM: number,
  inverse: number,
  postingM: number,
  h: HullScratch,
  out: Float32Array,
  offset: number,
): void {
  const { x, y, slope, bend, bulge, cutPoint } = p
  const { x: hx, y: hy, point: hp } = h
  let n = 1
  hx[0] = 0
  hy[0] = siteGroundM / (1 + siteGroundM * inverse)
  hp[0] = 0
  let j = 0
  let next = j < cells && centre[j] < p.cuts ? cutPoint[centre[j]] : -1
  for (let k = 1; k < p.count; k++) {
    const c = bend[k - 1]
    if (c < 0) {
      const half = 0.5 * (x[k] - x[k - 1])
      if (-c * half * half > MIDDLE_M && half > 0) push(x[k - 1] + half, y[k - 1] + half * (slope[k - 1] + c * half), k - 1)
    }
    if (next === k) {
      const xd = x[k]
      const yd = y[k]
      while (n >= 2 && (hy[n - 1] - hy[n - 2]) * (xd - hx[n - 1]) <= (yd - hy[n - 1]) * (hx[n - 1] - hx[n - 2])) n--
      const q = hp[n - 1]
      const near = xd - ALLOWANCE_REACH * postingM
      let least = ((hx[n - 1] >= near ? yd + SIGHT_ALLOWANCE_M : yd) - hy[n - 1]) / (xd - hx[n - 1])
      for (let s = q > 0 ? q - 1 : 0; s <= q && s < k; s++) least = Math.min(least, touch(s, xd, yd, near))
      if (bulge[k - 1] > 0) least = Math.min(least, touch(k - 1, xd, yd, near))
      const heightM = heightOfY(yd - least * xd, 0, inverse) - siteGroundM
      while (next === k) {
        out[offset + j] = heightM > 0 ? heightM : 0
        j++
        next = j < cells && centre[j] < p.cuts ? cutPoint[centre[j]] : -1
      }
    }
    push(x[k], y[k], k)
  }

  function push(px: number, py: number, point: number): void {
    while (n >= 2 && (hy[n - 1] - hy[n - 2]) * (px - hx[n - 1]) <= (py - hy[n - 1]) * (hx[n - 1] - hx[n - 2])) n--
    hx[n] = px
    hy[n] = py
    hp[n] = point
    n++
  }
  function touch(s: number, xd: number, yd: number, near: number): number {
    return touchingSlope(x[s], y[s], slope[s], bend[s], x[s + 1], xd, x[s + 1] >= near ? yd + SIGHT_ALLOWANCE_M : yd)
  }
}
