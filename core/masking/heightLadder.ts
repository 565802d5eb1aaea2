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
 * Height to see at every second cut (the cell centres of a sweep) along a ray, in O(n): the tangent from a place to the upper hull of everything nearer,
 * carried back to the mast. The hull holds the points and the middles of hollow-downward segments; the tangent is then settled in closed form on the two
 * segments at the hull point it touches. Writes metres above the site's ground, at least 0.
 */
export function heightsToSee(
  p: StraightProfile,
  cells: number,
  siteGroundM: number,
  inverse: number,
  postingM: number,
  h: HullScratch,
  out: Float32Array,
  offset: number,
): void {
  const { x, y, bend, cutPoint } = p
  const { x: hx, y: hy, point: hp } = h
  const nearM = ALLOWANCE_REACH * postingM
  let n = 0
  hx[0] = 0
  hy[0] = siteGroundM / (1 + siteGroundM * inverse)
  hp[0] = 0
  let k = 1
  for (let j = 0; j < cells; j++) {
    const centre = cutPoint[2 * j]
    for (; k <= centre; k++) {
      const px = x[k]
      const py = y[k]
      const c = bend[k - 1]
      if (c < 0) {
        const half = 0.5 * (px - x[k - 1])
        const rise = -c * half * half
        if (rise > MIDDLE_M) {
          const mx = px - half
          const my = 0.5 * (py + y[k - 1]) + rise
          while (n >= 1 && (hy[n] - hy[n - 1]) * (mx - hx[n]) <= (my - hy[n]) * (hx[n] - hx[n - 1])) n--
          n++
          hx[n] = mx
          hy[n] = my
          hp[n] = k - 1
        }
      }
      while (n >= 1 && (hy[n] - hy[n - 1]) * (px - hx[n]) <= (py - hy[n]) * (hx[n] - hx[n - 1])) n--
      n++
      hx[n] = px
      hy[n] = py
      hp[n] = k
    }
    // the centre itself is now the last of the hull: the one before it is what the tangent touches
    const xd = x[centre]
    const yd = y[centre]
    const near = xd - nearM
    const q = hp[n - 1]
    const raised = yd + SIGHT_ALLOWANCE_M
    let least = ((hx[n - 1] >= near ? raised : yd) - hy[n - 1]) / (xd - hx[n - 1])
    for (let s = q > 0 ? q - 1 : 0; s <= q && s < centre; s++)
      if (bend[s] < 0) least = Math.min(least, touchingSlope(p, s, xd, x[s + 1] >= near ? raised : yd))
    if (q < centre - 1 && bend[centre - 1] < 0) least = Math.min(least, touchingSlope(p, centre - 1, xd, raised))
    out[offset + j] = Math.max(0, heightOfY(yd - least * xd, 0, inverse) - siteGroundM)
  }
}
