import type { TracedRay } from '../../terrain/index.ts'
import { straightDrop, straightX, straightY } from './straight.ts'

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
 * One ray in the straight plane: the crossings, and the cuts on the same surface. Scratch, filled again for each ray.
 *
 * `line` holds three numbers per point: X, Y, and the quadratic term of the surface from this point to the next (1/m).
 */
export interface StraightProfile {
  count: number
  readonly line: Float64Array
  /** Cuts that lie on known ground. */
  cuts: number
  /** Point of each cut; ground there, its slope along the ray, and the surface, m. */
  readonly cutPoint: Int32Array
  readonly cutGroundM: Float64Array
  readonly cutSlope: Float64Array
  readonly cutSurfaceM: Float64Array
}

/** Room for a track array of this length and so many cuts. */
export function makeStraightProfile(track: number, cuts: number): StraightProfile {
  return {
    count: 0,
    line: new Float64Array(track + 3 * cuts),
    cuts: 0,
    cutPoint: new Int32Array(cuts),
    cutGroundM: new Float64Array(cuts),
    cutSlope: new Float64Array(cuts),
    cutSurfaceM: new Float64Array(cuts),
  }
}

/**
 * Fills the profile from a traced ray; cuts past its end are left out. Heights at crossings and cuts go through the exact map; inside a segment the surface
 * is the parabola of the patch less 1/2R, which differs from the mapped patch by under a thousandth of its own bulge.
 */
export function straighten(t: TracedRay, inverse: number, cuts: Cuts, out: StraightProfile): void {
  placeCuts(cuts, inverse)
  const { surface, count } = t
  const { line, cutPoint, cutSurfaceM } = out
  const { m: cutM, x: cutX, drop: cutDrop } = cuts
  const total = cutM.length
  const half = 0.5 * inverse
  out.count = 0
  out.cuts = 0
  if (count === 0) return
  let k = 0
  let p = 0
  line[0] = 0
  line[1] = straightY(surface[1], 0, inverse)
  for (let j = 1; j < count; j++) {
    const s0 = surface[3 * j - 3]
    const z0 = surface[3 * j - 2]
    const q = surface[3 * j - 1]
    const s1 = surface[3 * j]
    const z1 = surface[3 * j + 1]
    const length = s1 - s0
    const rise = length > 0 ? (z1 - z0) / length - q * length : 0
    for (; k < total && cutM[k] <= s1; k++) {
      const u = cutM[k] - s0
      const z = z0 + u * (rise + q * u)
      cutSurfaceM[k] = z
      if (cutX[k] > line[3 * p]) {
        line[3 * p + 2] = q - half
        p++
        line[3 * p] = cutX[k]
        line[3 * p + 1] = straightY(z, cutDrop[k], inverse)
      }
      cutPoint[k] = p
    }
    const x1 = straightX(s1, inverse)
    // a cut on the crossing itself is not doubled; an upright step (an obstacle) is kept
    if (x1 > line[3 * p] || length <= 0) {
      line[3 * p + 2] = q - half
      p++
      line[3 * p] = x1
      line[3 * p + 1] = straightY(z1, straightDrop(s1, inverse), inverse)
    }
  }
  line[3 * p + 2] = 0
  out.count = p + 1
  out.cuts = k
  cutGround(t.ground, cutM, k, out.cutGroundM, out.cutSlope)
}

/** Ground and its slope along the ray at ascending distances that the ray reaches. */
export function cutGround(ground: Float64Array, cutM: Float64Array, cuts: number, outM: Float64Array, outSlope: Float64Array): void {
  let j = 1
  for (let k = 0; k < cuts; k++) {
    while (ground[3 * j] < cutM[k]) j++
    const s0 = ground[3 * j - 3]
    const z0 = ground[3 * j - 2]
    const q = ground[3 * j - 1]
    const length = ground[3 * j] - s0
    const rise = length > 0 ? (ground[3 * j + 1] - z0) / length - q * length : 0
    const u = cutM[k] - s0
    outM[k] = z0 + u * (rise + q * u)
    outSlope[k] = rise + 2 * q * u
  }
}
