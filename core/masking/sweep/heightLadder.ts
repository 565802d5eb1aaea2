import { touchingSlope } from '../plane/heightToSee.ts'
import type { Cuts } from '../plane/profile.ts'
import { ALLOWANCE_REACH, SIGHT_ALLOWANCE_M } from '../sightState.ts'
import { type CellProfile, straightenRest } from './cellProfile.ts'
import { dropUnder, type Hull, push, pushArc } from './hull.ts'

/**
 * Height to see of each cell centre of a ray, in O(n): the tangent from a place to the upper hull of everything nearer, carried back to the mast, with the
 * allowance of isInSight. On the hull go crossings that stand above the chord of their neighbours (no other can be touched from beyond its neighbour),
 * hollow-downward segments, and the centres themselves; the tangent is then settled in closed form on the segments at the corner it touches. Writes metres
 * above the site's ground, at least 0.
 */
export function heightsToSee(
  p: CellProfile,
  cuts: Cuts,
  siteGroundM: number,
  inverse: number,
  postingM: number,
  h: Hull,
  out: Float32Array,
  offset: number,
): void {
  straightenRest(p, 0)
  const { line, at, known } = p
  const nearM = ALLOWANCE_REACH * postingM
  h.count = 0
  push(h, 0, siteGroundM / (1 + siteGroundM * inverse), 0)
  let doneX = 0
  let k = 1
  for (let j = 0; j < known; j++) {
    const ends = at[2 * j]
    for (; k < ends; k++) {
      const i = 3 * k
      const x = line[i]
      const y = line[i + 1]
      pushArc(h, p, k, doneX, x)
      if ((y - line[i - 2]) * (line[i + 3] - x) >= (line[i + 4] - y) * (x - line[i - 3])) push(h, x, y, k)
      doneX = x
    }
    const x = cuts.x[2 * j]
    pushArc(h, p, ends, doneX, x)
    // the segment that holds the centre
    const i = 3 * (ends - 1)
    const startX = line[i]
    const startY = line[i + 1]
    const c = line[i + 2]
    const length = line[i + 3] - startX
    const u = x - startX
    const slope = length > 0 ? (line[i + 4] - startY) / length - c * length : 0
    const y = startY + u * (slope + c * u)
    dropUnder(h, x, y)
    const corner = h.count - 1
    const near = x - nearM
    let least = ((h.x[corner] >= near ? y + SIGHT_ALLOWANCE_M : y) - h.y[corner]) / (x - h.x[corner])
    // its own segment: touched inside it, or at its start
    const touched = c < 0 ? Math.sqrt(-c * SIGHT_ALLOWANCE_M) : 0
    if (touched > 0 && touched < -c * u) least = Math.min(least, slope + 2 * (c * u + touched))
    else if (u > 0) least = Math.min(least, slope + c * u + (startX >= near ? SIGHT_ALLOWANCE_M / u : 0))
    const first = Math.max(0, h.at[corner] - 1)
    for (let s = first; s <= first + 2 && s < ends - 1; s++)
      least = Math.min(least, touchingSlope(line, s, x, line[3 * s + 3] >= near ? y + SIGHT_ALLOWANCE_M : y))
    const lowest = y - least * x
    out[offset + j] = Math.max(0, lowest / (1 - lowest * inverse) - siteGroundM)
    push(h, x, y, ends - 1)
    doneX = x
  }
}
