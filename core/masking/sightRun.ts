import type { StraightProfile } from './profile.ts'

/** What one antenna height gives along one ray, at each cut of the profile and at its end. Tangents are of lines from the antenna in the straight plane. */
export interface SightRun {
  /** Highest line to the surface up to the cut, and X of the point it touches. */
  readonly tangent: Float64Array
  readonly controlX: Float64Array
  /** X-length in sight from the site to the cut. */
  readonly seenX: Float64Array
  endTangent: number
  endControlX: number
  endSeenX: number
}
export const makeSightRun = (cuts: number): SightRun => ({
  tangent: new Float64Array(cuts),
  controlX: new Float64Array(cuts),
  seenX: new Float64Array(cuts),
  endTangent: NO_TANGENT,
  endControlX: 0,
  endSeenX: 0,
})

/** Lower than any line to a surface: nothing met yet. */
export const NO_TANGENT = -1e300

/**
 * Runs outward over a profile from an antenna at Y = antennaY, keeping the highest line so far. In each segment the highest line is at an end or, where
 * the surface is hollow downward, at the point where a line from the antenna touches it (closed form). The part of a segment in sight runs from where
 * the surface comes up through the line so far to its own highest line.
 */
export function runSight(p: StraightProfile, antennaY: number, out: SightRun): void {
  const { x, inverseX, y, slope, bend, bulge, cutPoint, count, cuts } = p
  let m = NO_TANGENT
  let controlX = 0
  let seen = 0
  let before = NO_TANGENT
  let k = 0
  let nextCut = cuts > 0 ? cutPoint[0] : -1
  while (nextCut === 0) {
    record()
  }
  for (let j = 1; j < count; j++) {
    const f = (y[j] - antennaY) * inverseX[j]
    if ((f > before ? f : before) + bulge[j - 1] > m) {
      const x0 = x[j - 1]
      const x1 = x[j]
      let top = f
      let topX = x1
      if (bulge[j - 1] > 0) {
        const c = bend[j - 1]
        const a = y[j - 1] - antennaY - x0 * (slope[j - 1] - c * x0)
        if (a < c * x0 * x0 && a > c * x1 * x1) {
          const xs = Math.sqrt(a / c)
          const g = a / xs + slope[j - 1] - 2 * c * x0 + c * xs
          if (g > top) {
            top = g
            topX = xs
          }
        }
      }
      if (top > m) {
        seen += topX - x0 - entry(y[j - 1] - antennaY - m * x0, slope[j - 1] - m, bend[j - 1], topX - x0)
        m = top
        controlX = topX
      }
    }
    before = f
    while (nextCut === j) record()
  }
  out.endTangent = m
  out.endControlX = controlX
  out.endSeenX = seen

  function record(): void {
    out.tangent[k] = m
    out.controlX[k] = controlX
    out.seenX[k] = seen
    k++
    nextCut = k < cuts ? cutPoint[k] : -1
  }
}

/**
 * Distance into a segment at which gap + slope·u + bend·u² comes up through 0, between 0 and `most`; the gap to the line so far is never above 0
 * (but for rounding).
 */
export function entry(gap: number, slope: number, bend: number, most: number): number {
  const under = gap < 0 ? gap : 0
  if (under === 0 && slope >= 0) return 0
  const root = Math.sqrt(Math.max(0, slope * slope - 4 * bend * under))
  const u = slope > 0 ? (-2 * under) / (slope + root) : bend > 0 ? (root - slope) / (2 * bend) : most
  return u < most ? u : most
}
