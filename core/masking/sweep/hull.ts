import type { CellProfile } from './cellProfile.ts'

/** Upper hull of the places passed so far along a ray in the straight plane: a stack of corners. */
export interface Hull {
  count: number
  readonly x: Float64Array
  readonly y: Float64Array
  /** Crossing the segment of the corner starts at. */
  readonly at: Int32Array
}
/** Room for a profile of so many numbers (three per crossing) and so many cells. */
export function makeHull(track: number, cells: number): Hull {
  const n = (track / 3) * (1 + MOST_ARC_POINTS) + cells + 1
  return { count: 0, x: new Float64Array(n), y: new Float64Array(n), at: new Int32Array(n) }
}

/** A hollow-downward segment is put on the hull as points so close that the chords lie this little under it, m. */
const ARC_M = 0.02
const MOST_ARC_POINTS = 15

/** Takes from the hull what can no longer be touched from places beyond (x, y). */
export function dropUnder(h: Hull, x: number, y: number): void {
  const { x: hx, y: hy } = h
  let n = h.count
  while (n >= 2 && (hy[n - 1] - hy[n - 2]) * (x - hx[n - 1]) <= (y - hy[n - 1]) * (hx[n - 1] - hx[n - 2])) n--
  h.count = n
}
export function push(h: Hull, x: number, y: number, at: number): void {
  dropUnder(h, x, y)
  const n = h.count
  h.x[n] = x
  h.y[n] = y
  h.at[n] = at
  h.count = n + 1
}

/** Puts on the hull the segment that ends at crossing k, between two X, where it stands above its chord. */
export function pushArc(h: Hull, p: CellProfile, k: number, fromX: number, toX: number): void {
  const { line } = p
  const x0 = line[3 * k - 3]
  const c = line[3 * k - 1]
  const length = line[3 * k] - x0
  const bulge = -0.25 * c * length * length
  if (!(bulge > ARC_M)) return
  const y0 = line[3 * k - 2]
  const slope = (line[3 * k + 1] - y0) / length - c * length
  const parts = Math.min(MOST_ARC_POINTS + 1, Math.ceil(Math.sqrt(bulge / ARC_M)))
  for (let n = 1; n < parts; n++) {
    const u = (length * n) / parts
    if (x0 + u > fromX && x0 + u < toX) push(h, x0 + u, y0 + u * (slope + c * u), k - 1)
  }
}
