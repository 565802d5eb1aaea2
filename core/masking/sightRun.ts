import type { StraightProfile } from './profile.ts'

/** Lower than any line to a surface: nothing met yet. */
export const NO_TANGENT = -1e300

/** State of a run outward, in one array so that the hot loops pass no numbers about: see the indices below. */
export type RunState = Float64Array
export const RUN = {
  /** Y of the antenna. */
  antennaY: 0,
  /** Tangent of the highest line from the antenna to the surface so far. */
  tangent: 1,
  /** X of the point that line touches. */
  controlX: 2,
  /** X-length in sight so far. */
  seenX: 3,
} as const
export function startRun(s: RunState, antennaY: number): void {
  s[RUN.antennaY] = antennaY
  s[RUN.tangent] = NO_TANGENT
  s[RUN.controlX] = 0
  s[RUN.seenX] = 0
}

/**
 * The segment that ends at point j comes up through the highest line so far: finds its own highest line, at its end or, where it is hollow downward, where
 * a line from the antenna touches it (closed form), and adds the part in sight: from where it comes up through the old line to where it touches the new.
 */
export function raise(p: StraightProfile, j: number, s: RunState): void {
  const { x, y, bend } = p
  const antennaY = s[RUN.antennaY]
  const old = s[RUN.tangent]
  const x0 = x[j - 1]
  const x1 = x[j]
  const length = x1 - x0
  const c = bend[j - 1]
  const slope = length > 0 ? (y[j] - y[j - 1]) / length - c * length : 0
  let top = (y[j] - antennaY) / x1
  let topX = x1
  if (c < 0 && length > 0) {
    const a = y[j - 1] - antennaY - x0 * (slope - c * x0)
    if (a < c * x0 * x0 && a > c * x1 * x1) {
      const xs = Math.sqrt(a / c)
      const g = a / xs + slope - 2 * c * x0 + c * xs
      if (g > top) {
        top = g
        topX = xs
      }
    }
  }
  if (!(top > old)) return
  const gap = Math.min(0, y[j - 1] - antennaY - old * x0)
  const steep = slope - old
  const most = topX - x0
  let from = 0
  if (gap < 0 || steep < 0) {
    const root = Math.sqrt(Math.max(0, steep * steep - 4 * c * gap))
    from = Math.min(most, steep > 0 ? (-2 * gap) / (steep + root) : c > 0 ? (root - steep) / (2 * c) : most)
  }
  s[RUN.seenX] += most - from
  s[RUN.tangent] = top
  s[RUN.controlX] = topX
}

/** What one antenna height gives along one ray: the state of the run at each cut of the profile and at its end. */
export interface SightRun {
  readonly tangent: Float64Array
  readonly controlX: Float64Array
  readonly seenX: Float64Array
  /** State at the end of the ray. */
  readonly end: RunState
}
export const makeSightRun = (cuts: number): SightRun => ({
  tangent: new Float64Array(cuts),
  controlX: new Float64Array(cuts),
  seenX: new Float64Array(cuts),
  end: new Float64Array(4),
})

/** Runs outward over a whole profile from an antenna at Y = antennaY. */
export function runSight(p: StraightProfile, antennaY: number, out: SightRun): void {
  const { x, y, bend, cutPoint, count, cuts } = p
  const s = out.end
  startRun(s, antennaY)
  let j = 0
  for (let k = 0; k <= cuts; k++) {
    const to = k < cuts ? cutPoint[k] : count - 1
    for (; j < to; ) {
      j++
      const m = s[RUN.tangent]
      const g0 = y[j - 1] - antennaY - m * x[j - 1]
      const g1 = y[j] - antennaY - m * x[j]
      const length = x[j] - x[j - 1]
      if (Math.max(g0, g1) + Math.max(0, -0.25 * bend[j - 1] * length * length) > 0) raise(p, j, s)
    }
    if (k < cuts) {
      out.tangent[k] = s[RUN.tangent]
      out.controlX[k] = s[RUN.controlX]
      out.seenX[k] = s[RUN.seenX]
    }
  }
}
