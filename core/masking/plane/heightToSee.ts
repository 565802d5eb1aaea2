import { ALLOWANCE_REACH, SIGHT_ALLOWANCE_M } from '../sightState.ts'
import type { StraightProfile } from './profile.ts'
import { NO_TANGENT } from './sightRun.ts'

/**
 * Y of the lowest antenna from which a point of a profile is in sight, exact for its segments: the highest of all lines through the point and a place
 * nearer the radar, carried back to the mast, with the allowance of isInSight. `NO_TANGENT` when nothing stands between.
 */
export function lowestAntennaY(p: StraightProfile, point: number, postingM: number): number {
  const { line } = p
  const xd = line[3 * point]
  const yd = line[3 * point + 1]
  const raised = yd + SIGHT_ALLOWANCE_M
  const near = xd - ALLOWANCE_REACH * postingM
  // least slope from any nearer place to the point
  let least = Number.POSITIVE_INFINITY
  for (let j = 0; j < point; j++) {
    const x = line[3 * j]
    if (xd > x) least = Math.min(least, ((x >= near ? raised : yd) - line[3 * j + 1]) / (xd - x))
    least = Math.min(least, touchingSlope(line, j, xd, line[3 * j + 3] >= near ? raised : yd))
  }
  return least === Number.POSITIVE_INFINITY ? NO_TANGENT : yd - least * xd
}

/** Y of the lowest antenna from which a target at Y `yd` over a point of a profile is in sight; `NO_TANGENT` when nothing stands between. */
export function lowestAntennaYOver(p: StraightProfile, point: number, yd: number): number {
  const { line } = p
  const xd = line[3 * point]
  let least = Number.POSITIVE_INFINITY
  for (let j = 0; j < point; j++) {
    const x = line[3 * j]
    if (xd > x) least = Math.min(least, (yd - line[3 * j + 1]) / (xd - x))
    least = Math.min(least, touchingSlope(line, j, xd, yd))
  }
  return least === Number.POSITIVE_INFINITY ? NO_TANGENT : yd - least * xd
}

/**
 * Slope of the line from (xd, yd) that touches from above, at a place inside it, the segment of a line of points (X, Y,
 * bend) that starts at point j; Infinity where there is none. At the
 * segment that ends in the point itself it is the surface's own slope there.
 */
export function touchingSlope(line: Float64Array, j: number, xd: number, yd: number): number {
  const x0 = line[3 * j]
  const y0 = line[3 * j + 1]
  const bend = line[3 * j + 2]
  const length = line[3 * j + 3] - x0
  if (!(bend < 0) || !(length > 0)) return Number.POSITIVE_INFINITY
  const slope = (line[3 * j + 4] - y0) / length - bend * length
  const t0 = xd - x0
  const t1 = t0 - length
  // in t = xd − x: y = alpha + beta t + bend t²
  const alpha = y0 + t0 * (slope + bend * t0)
  const beta = -(slope + 2 * bend * t0)
  const square = (alpha - yd) / bend
  if (t1 <= 0 && square <= 0) return -beta
  if (square < t1 * t1 || square > t0 * t0) return Number.POSITIVE_INFINITY
  const t = Math.sqrt(square)
  return (yd - alpha) / t - beta - bend * t
}
