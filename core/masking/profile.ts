import type { TracedRay } from '../terrain/index.ts'
import { straightDrop, straightX } from './straight.ts'

/**
 * One ray in the straight plane, shared by all antenna heights: the crossings, and the cuts asked for (cell edges and centres) on the same surface.
 * From point p to the next the surface is Y + slope·(x−X) + bend·(x−X)². Scratch, filled again for each ray.
 */
export interface StraightProfile {
  count: number
  x: Float64Array
  /** 1/X; a very large number at the site itself. */
  inverseX: Float64Array
  y: Float64Array
  /** Slope of the surface at the point, toward the next. */
  slope: Float64Array
  bend: Float64Array
  /** How much the segment that starts here can stand above its ends as an angle tangent; 0 where it cannot. */
  bulge: Float64Array
  /** Point of each cut (-1: beyond what is known), and ground there: height, slope along the ray. Surface height too. */
  cutPoint: Int32Array
  cutGroundM: Float64Array
  cutSurfaceM: Float64Array
  cutSlope: Float64Array
  /** Cuts that lie on known ground. */
  cuts: number
}

const AT_SITE = 1e12

export function makeStraightProfile(points: number, cuts: number): StraightProfile {
  const n = points + cuts
  return {
    count: 0,
    x: new Float64Array(n),
    inverseX: new Float64Array(n),
    y: new Float64Array(n),
    slope: new Float64Array(n),
    bend: new Float64Array(n),
    bulge: new Float64Array(n),
    cutPoint: new Int32Array(cuts),
    cutGroundM: new Float64Array(cuts),
    cutSurfaceM: new Float64Array(cuts),
    cutSlope: new Float64Array(cuts),
    cuts: 0,
  }
}

/**
 * Fills the profile from a traced ray. `cutM` are ascending distances; those past the end of the ray are left out (cuts counts the others).
 * Heights at crossings and cuts go through the exact map; inside a segment the surface is the parabola of the patch less 1/2R, which differs from the
 * mapped patch by under 1e-3 of its own bulge.
 */
export function straighten(t: TracedRay, inverse: number, cutM: Float64Array, out: StraightProfile): void {
  const { distM, surfaceM, bendPerM, groundM, groundBendPerM, count } = t
  const { x, inverseX, y, slope, bend, bulge, cutPoint, cutGroundM, cutSurfaceM, cutSlope } = out
  const ownGround = groundM !== surfaceM
  const half = 0.5 * inverse
  const total = cutM.length
  out.count = 0
  out.cuts = 0
  if (count === 0) return
  let p = 0
  let k = 0
  let s0 = distM[0]
  let z0 = surfaceM[0]
  let nextCut = k < total ? cutM[k] : Number.POSITIVE_INFINITY
  x[0] = 0
  inverseX[0] = AT_SITE
  y[0] = z0 / (1 + z0 * inverse)
  for (let j = 1; j < count; j++) {
    const s1 = distM[j]
    const z1 = surfaceM[j]
    const length = s1 - s0
    const q = bendPerM[j - 1]
    const c = q - half
    const rise = length > 0 ? (z1 - z0) / length - q * length : 0
    while (nextCut <= s1) {
      const u = nextCut - s0
      const z = z0 + u * (rise + q * u)
      cutSurfaceM[k] = z
      if (ownGround) {
        const gq = groundBendPerM[j - 1]
        const g0 = groundM[j - 1]
        const gRise = length > 0 ? (groundM[j] - g0) / length - gq * length : 0
        cutGroundM[k] = g0 + u * (gRise + gq * u)
        cutSlope[k] = gRise + 2 * gq * u
      } else {
        cutGroundM[k] = z
        cutSlope[k] = rise + 2 * q * u
      }
      const last = x[p]
      const xc = straightX(nextCut, inverse)
      const yc = (z - straightDrop(nextCut, inverse)) / (1 + z * inverse)
      close(p, xc - last, yc, c)
      if (xc > last) {
        p++
        x[p] = xc
        inverseX[p] = 1 / xc
        y[p] = yc
      }
      cutPoint[k] = p
      k++
      nextCut = k < total ? cutM[k] : Number.POSITIVE_INFINITY
    }
    const x1 = straightX(s1, inverse)
    const y1 = (z1 - straightDrop(s1, inverse)) / (1 + z1 * inverse)
    close(p, x1 - x[p], y1, c)
    if (x1 > x[p] || length <= 0) {
      p++
      x[p] = x1
      inverseX[p] = 1 / x1
      y[p] = y1
    }
    s0 = s1
    z0 = z1
  }
  slope[p] = 0
  bend[p] = 0
  bulge[p] = 0
  out.count = p + 1
  out.cuts = k

  /** Settles the segment from point `from` over a length in X to a height Y. */
  function close(from: number, length: number, toY: number, c: number): void {
    if (length > 0) {
      slope[from] = (toY - y[from]) / length - c * length
      bend[from] = c
      bulge[from] = c < 0 ? -0.25 * c * length * length * inverseX[from] : 0
    } else {
      slope[from] = 0
      bend[from] = 0
      bulge[from] = 0
    }
  }
}
