import type { StraightProfile } from './profile.ts'

/** Lower than any line to a surface: nothing met yet. */
export const NO_TANGENT = -1e300

/**
 * State of a run outward from one antenna, in one array: a number handed from function to function costs an object, one read from an array does not.
 * Indices below; `from…` and `to…` are the segment
 * that `raise` is asked about.
 */
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
  fromX: 4,
  fromY: 5,
  toX: 6,
  toY: 7,
  bend: 8,
  /** 90 % error of what the line touches, m (the sweep's). */
  errorM: 9,
  /** Where a piece of the run ends (the sweep's). */
  endX: 10,
} as const
export const makeRunState = (): RunState => new Float64Array(11)
export function startRun(s: RunState, antennaY: number): void {
  s[RUN.antennaY] = antennaY
  s[RUN.tangent] = NO_TANGENT
  s[RUN.controlX] = 0
  s[RUN.seenX] = 0
}

/**
 * A segment may come up through the highest line so far: finds its own highest line, at its end or, where it is hollow downward, where a line from the
 * antenna touches it (closed form), and adds the part in sight: from where it comes up through the old line to where it touches the new.
 */
export function raise(s: RunState): void {
  const antennaY = s[0]
  const old = s[1]
  const x0 = s[4]
  const y0 = s[5]
  const x1 = s[6]
  const y1 = s[7]
  const c = s[8]
  const length = x1 - x0
  const slope = length > 0 ? (y1 - y0) / length - c * length : 0
  let top = (y1 - antennaY) / x1
  let topX = x1
  if (c < 0 && length > 0) {
    const a = y0 - antennaY - x0 * (slope - c * x0)
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
  const gap = y0 - antennaY - old * x0
  const steep = slope - old
  const most = topX - x0
  let from = 0
  if (gap < 0 || steep < 0) {
    let under = 0
    if (gap < 0) under = gap
    const square = steep * steep - 4 * c * under
    const root = square > 0 ? Math.sqrt(square) : 0
    from = steep > 0 ? (-2 * under) / (steep + root) : c > 0 ? (root - steep) / (2 * c) : most
    if (from > most) from = most
  }
  s[3] += most - from
  s[1] = top
  s[2] = topX
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
  end: makeRunState(),
})

/** Runs outward over a whole profile from an antenna at Y = antennaY. */
export function runSight(p: StraightProfile, antennaY: number, out: SightRun): void {
  const { line, cutPoint, count, cuts } = p
  const s = out.end
  startRun(s, antennaY)
  let j = 0
  for (let k = 0; k <= cuts; k++) {
    for (const to = k < cuts ? cutPoint[k] : count - 1; j < to; j++) {
      s[4] = line[3 * j]
      s[5] = line[3 * j + 1]
      s[6] = line[3 * j + 3]
      s[7] = line[3 * j + 4]
      s[8] = line[3 * j + 2]
      raise(s)
    }
    if (k < cuts) {
      out.tangent[k] = s[RUN.tangent]
      out.controlX[k] = s[RUN.controlX]
      out.seenX[k] = s[RUN.seenX]
    }
  }
}
