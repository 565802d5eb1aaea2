import type { TracedRay } from '../terrain/index.ts'
import { straightDrop, straightX } from './straight.ts'

/** Distances a profile is cut at (cell edges and centres), ascending, with their places in the straight plane for one effective radius. */
export interface Cuts {
  readonly m: Float64Array
  readonly x: Float64Array
  readonly drop: Float64Array
  /** 1/R the x and drop are made for; -1 before the first. */
  inverse: number
}
export const makeCuts = (m: Float64Array): Cuts => ({ m, x: new Float64Array(m.length), drop: new Float64Array(m.length), inverse: -1 })

/** Puts the cuts into the straight plane of an effective radius, if they are not there already. */
export function placeCuts(cuts: Cuts, inverse: number): void {
  if (cuts.inverse === inverse) return
  const { m, x, drop } = cuts
  for (let k = 0; k < m.length; k++) {
    x[k] = straightX(m[k], inverse)
    drop[k] = straightDrop(m[k], inverse)
  }
  cuts.inverse = inverse
}

/**
 * One ray in the straight plane, shared by all antenna heights: the crossings, and the cuts on the same surface. From point p to the next the surface is
 * the chord plus bend·(x−X)·(x−X'). Scratch, filled again for each ray.
 */
export interface StraightProfile {
  count: number
  readonly x: Float64Array
  readonly y: Float64Array
  /** Quadratic term from this point to the next, 1/m. */
  readonly bend: Float64Array
  /** Cuts that lie on known ground. */
  cuts: number
  /** Point of each cut; ground there, its slope along the ray, and the surface, m. */
  readonly cutPoint: Int32Array
  readonly cutGroundM: Float64Array
  readonly cutSlope: Float64Array
  readonly cutSurfaceM: Float64Array
  /** Highest Y of the surface from the cut before to this one, bulges included. */
  readonly cutTop: Float64Array
}

export function makeStraightProfile(points: number, cuts: number): StraightProfile {
  const n = points + cuts
  return {
    count: 0,
    x: new Float64Array(n),
    y: new Float64Array(n),
    bend: new Float64Array(n),
    cuts: 0,
    cutPoint: new Int32Array(cuts),
    cutGroundM: new Float64Array(cuts),
    cutSlope: new Float64Array(cuts),
    cutSurfaceM: new Float64Array(cuts),
    cutTop: new Float64Array(cuts),
  }
}

/**
 * Fills the profile from a traced ray; cuts past its end are left out. Heights at crossings and cuts go through the exact map; inside a segment the surface
 * is the parabola of the patch less 1/2R, which differs from the mapped patch by under a thousandth of its own bulge.
 */
export function straighten(t: TracedRay, inverse: number, cuts: Cuts, out: StraightProfile): void {
  placeCuts(cuts, inverse)
  const { distM, surfaceM, bendPerM, groundM, groundBendPerM, count } = t
  const { x, y, bend, cutPoint, cutGroundM, cutSlope, cutSurfaceM, cutTop } = out
  const { m: cutM, x: cutX, drop: cutDrop } = cuts
  const total = cutM.length
  const half = 0.5 * inverse
  out.count = 0
  out.cuts = 0
  if (count === 0) return
  let k = 0
  let nextCut = total > 0 ? cutM[0] : Number.POSITIVE_INFINITY
  let s0 = 0
  let z0 = surfaceM[0]
  let w = z0 * inverse
  let x0 = 0
  let y0 = z0 * (1 - w * (1 - w * (1 - w)))
  x[0] = 0
  y[0] = y0
  let top = y0
  let p = 0
  for (let j = 1; j < count; j++) {
    const s1 = distM[j]
    const z1 = surfaceM[j]
    const q = bendPerM[j - 1]
    const c = q - half
    if (nextCut <= s1) {
      const length = s1 - s0
      const rise = length > 0 ? (z1 - z0) / length - q * length : 0
      do {
        const u = nextCut - s0
        const z = z0 + u * (rise + q * u)
        cutSurfaceM[k] = z
        cutGroundM[k] = z
        cutSlope[k] = rise + 2 * q * u
        const xc = cutX[k]
        w = z * inverse
        const yc = (z - cutDrop[k]) * (1 - w * (1 - w * (1 - w)))
        const lx = xc - x0
        if (lx > 0) {
          const bulge = c < 0 ? -0.25 * c * lx * lx : 0
          bend[p] = c
          const high = (yc > y0 ? yc : y0) + bulge
          if (high > top) top = high
          p++
          x[p] = xc
          y[p] = yc
          x0 = xc
          y0 = yc
        }
        cutPoint[k] = p
        cutTop[k] = top
        top = y0
        k++
        nextCut = k < total ? cutM[k] : Number.POSITIVE_INFINITY
      } while (nextCut <= s1)
    }
    const a = s1 * inverse
    const pp = a * a
    const x1 = s1 * (1 + pp * (1 / 3 + pp * (2 / 15)))
    w = z1 * inverse
    const y1 = (z1 - 0.5 * s1 * a * (1 + pp * (5 / 12 + pp * (61 / 360)))) * (1 - w * (1 - w * (1 - w)))
    const lx = x1 - x0
    // a cut on the crossing itself is not doubled; an upright step (an obstacle) is kept
    if (lx > 0 || s1 === s0) {
      const bulge = c < 0 ? -0.25 * c * lx * lx : 0
      bend[p] = c
      const high = (y1 > y0 ? y1 : y0) + bulge
      if (high > top) top = high
      p++
      x[p] = x1
      y[p] = y1
      x0 = x1
      y0 = y1
    }
    s0 = s1
    z0 = z1
  }
  bend[p] = 0
  out.count = p + 1
  out.cuts = k
  if (groundM !== surfaceM) cutGround(distM, groundM, groundBendPerM, cutM, k, cutGroundM, cutSlope)
}

/** Ground and its slope at the cuts where the surface is not the ground. */
function cutGround(
  distM: Float64Array,
  groundM: Float64Array,
  bendPerM: Float64Array,
  cutM: Float64Array,
  cuts: number,
  outM: Float64Array,
  outSlope: Float64Array,
): void {
  let j = 1
  for (let k = 0; k < cuts; k++) {
    while (distM[j] < cutM[k]) j++
    const length = distM[j] - distM[j - 1]
    const q = bendPerM[j - 1]
    const rise = length > 0 ? (groundM[j] - groundM[j - 1]) / length - q * length : 0
    const u = cutM[k] - distM[j - 1]
    outM[k] = groundM[j - 1] + u * (rise + q * u)
    outSlope[k] = rise + 2 * q * u
  }
}
