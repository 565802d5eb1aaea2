import type { ControlPoints } from './controlPoints.ts'
import { keepPatch, type Walk } from './patches.ts'

/** A stretch keeps at least this many posts from the raster's edge to be taken by `strideStretch`. */
const MARGIN = 3

/** Can the stretch from control point i to the next be taken without looking for the raster's edge? */
export const isInner = (control: ControlPoints, i: number, width: number, height: number): boolean => {
  const { col, row } = control
  const right = width - 1 - MARGIN
  const low = height - 1 - MARGIN
  return (
    col[i] > MARGIN &&
    col[i + 1] > MARGIN &&
    row[i] > MARGIN &&
    row[i + 1] > MARGIN &&
    col[i] < right &&
    col[i + 1] < right &&
    row[i] < low &&
    row[i + 1] < low
  )
}

/** Most lines of posts of one axis in one stretch (a stretch is 500 m where posts are under 5 m); finer ground is walked with care. */
const MOST_LINES = 16_384
/** Scratch: for each line of the minor axis, the last line of the major axis before it. */
const lastMajor = new Int32Array(MOST_LINES)

/**
 * The crossings of one stretch, as walkRay's own loop writes them, made without a branch that depends on the ray's course: which grid line comes next is as
 * good as random to the processor, and guessing wrong costs more than the arithmetic. The lines of the axis the ray runs along more (`major`) are written
 * first, each at its own place in the sequence: its number plus the number of lines of the other axis met before it; then those others, likewise. Returns
 * the new number of entries, or -1 where a post beside the ray is void (or posts are too fine): the stretch is then to be walked with care.
 */
export function strideStretch(heightM: Float32Array, width: number, control: ControlPoints, i: number, out: Walk, entries: number): number {
  const { ground, patches } = out
  const c0 = control.col[i]
  const r0 = control.row[i]
  const s0 = control.distM[i]
  const ds = control.distM[i + 1] - s0
  const dc = control.col[i + 1] - c0
  const dr = control.row[i + 1] - r0
  const right = dc >= 0
  const down = dr >= 0
  const across = Math.abs(dc)
  const along = Math.abs(dr)
  const byCol = across >= along
  // near post of the patch the stretch starts in, and the place in the patch, 0 at the near post
  const pc = right ? Math.floor(c0) : Math.ceil(c0)
  const pr = down ? Math.floor(r0) : Math.ceil(r0)
  const u0 = right ? c0 - pc : pc - c0
  const v0 = down ? r0 - pr : pr - r0
  const major = byCol ? across : along
  const minor = byCol ? along : across
  const a0 = byCol ? u0 : v0
  const b0 = byCol ? v0 : u0
  const stepC = right ? 1 : -1
  const stepR = down ? width : -width
  const stepA = (byCol ? stepC : stepR) | 0
  const stepB = (byCol ? stepR : stepC) | 0
  const stepAB = (stepA + stepB) | 0
  // place on the minor axis at major line n: bA + n·ratio; never a whole line per step, so that no step meets two
  const ratio = Math.min(minor / major, 1 - 1e-12)
  const bA = b0 - a0 * ratio
  const perA = ds / major
  const sA = s0 - a0 * perA
  const bendPerTwist = (across * along) / (ds * ds)
  const base = (pr * width + pc) | 0
  const first = (3 * (entries - 1)) | 0
  const majors = Math.max(0, Math.ceil(a0 + major) - 1) | 0
  // a ray along a line of posts starts on it and never meets another: none, not one less
  const minors = Math.max(0, Math.ceil(b0 + minor) - 1) | 0
  if (majors >= MOST_LINES) return -1
  lastMajor[0] = 0
  let checked = 0
  let reached = 0
  for (let n = 1; n <= majors; n = (n + 1) | 0) {
    const b = bA + n * ratio
    // rounding may carry b onto a line the stretch ends at
    const line = b < minors + 1 ? b | 0 : minors
    const at = (base + Math.imul(n, stepA) + Math.imul(line, stepB)) | 0
    const z0 = heightM[at]
    const z1 = heightM[(at + stepB) | 0]
    const twist = z0 - z1 - heightM[(at + stepA) | 0] + heightM[(at + stepAB) | 0]
    const k = (first + Math.imul(3, n + line)) | 0
    ground[k] = sA + n * perA
    ground[(k + 1) | 0] = z0 + (b - line) * (z1 - z0)
    ground[(k + 2) | 0] = twist * bendPerTwist
    lastMajor[line] = n
    reached = line
    checked += twist
  }
  // rounding may also leave the last line just unmet: it is met after the last line of the major axis
  for (let line = reached + 1; line < minors; line++) lastMajor[line] = majors
  const perRatio = 1 / ratio
  const perB = ds / minor
  const sB = s0 - b0 * perB
  for (let m = 1; m <= minors; m = (m + 1) | 0) {
    const n = lastMajor[(m - 1) | 0]
    const at = (base + Math.imul(n, stepA) + Math.imul(m, stepB)) | 0
    const z0 = heightM[at]
    const z1 = heightM[(at + stepA) | 0]
    const twist = z0 - z1 - heightM[(at + stepB) | 0] + heightM[(at + stepAB) | 0]
    const k = (first + Math.imul(3, n + m)) | 0
    ground[k] = sB + m * perB
    ground[(k + 1) | 0] = z0 + (m - bA - n * ratio) * perRatio * (z1 - z0)
    ground[(k + 2) | 0] = twist * bendPerTwist
    checked += twist
  }
  if (Number.isNaN(checked)) return -1
  if (patches) {
    for (let n = 1; n <= majors; n++) {
      const b = bA + n * ratio
      const line = b < minors + 1 ? b | 0 : minors
      const v = b - line
      const near = base + n * stepA + line * stepB
      keepPatch(patches, entries - 1 + n + line, near, byCol ? 0 : v, byCol ? v : 0, right, down, width, bendPerTwist)
    }
    for (let m = 1; m <= minors; m++) {
      const n = lastMajor[m - 1]
      const u = (m - bA - n * ratio) * perRatio
      const near = base + n * stepA + m * stepB
      keepPatch(patches, entries - 1 + n + m, near, byCol ? u : 0, byCol ? 0 : u, right, down, width, bendPerTwist)
    }
  }
  return entries + majors + minors
}
