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

/**
 * The crossings of one stretch, as walkRay's own loop writes them, made without a branch that depends on the ray's course: which grid line comes next is as
 * good as random to the processor, and guessing wrong costs more than the arithmetic. The ray steps along the axis it runs along more (`major`). In each
 * step the crossing of the other axis is written in any case and kept by moving on (0 or 1). Returns the new number of entries, or -1 where a post beside
 * the ray is void: the stretch is then to be walked with care.
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
  // never a whole line per step, so that no step meets two
  const ratio = Math.min(minor / major, 1 - 1e-12)
  const perRatio = 1 / ratio
  const perA = ds / major
  const perB = ds / minor
  const bendPerTwist = (across * along) / (ds * ds)
  const sA = s0 - a0 * perA
  const sB = s0 - b0 * perB
  const bA = b0 - a0 * ratio
  const steps = (Math.ceil(a0 + major) - 1) | 0
  // post on the last major line below the ray, and the two posts there beside the ray; `| 0` keeps whole numbers whole for the compiler
  let at = (pr * width + pc) | 0
  let z0 = heightM[at]
  let z1 = heightM[at + stepB]
  let k = (3 * entries) | 0
  let line = 0
  let b = bA
  let checked = 0
  for (let n = 1; n <= steps; n = (n + 1) | 0) {
    // posts on the major line ahead, and the third of the line behind: the patches on either side of the next minor line
    const a1 = (at + stepA) | 0
    const z2 = heightM[(at + stepB + stepB) | 0]
    const y0 = heightM[a1]
    const y1 = heightM[(a1 + stepB) | 0]
    const y2 = heightM[(a1 + stepB + stepB) | 0]
    const twist = z0 - y0 - z1 + y1
    const twistB = z1 - y1 - z2 + y2
    ground[(k - 1) | 0] = twist * bendPerTwist
    // the next minor line, wherever it is crossed
    const next = (line + 1) | 0
    const u = (next - b) * perRatio
    ground[k] = sB + next * perB
    ground[(k + 1) | 0] = z1 + u * (y1 - z1)
    ground[(k + 2) | 0] = twistB * bendPerTwist
    if (patches) keepPatch(patches, k / 3, at + stepB, byCol ? u : 0, byCol ? 0 : u, right, down, width, bendPerTwist)
    // the major line; was the minor one crossed before it?
    b = bA + n * ratio
    const moved = ((b | 0) - line) | 0
    line = (line + moved) | 0
    k = (k + Math.imul(moved, 3)) | 0
    at = (a1 + Math.imul(moved, stepB)) | 0
    z0 = heightM[at]
    z1 = heightM[(at + stepB) | 0]
    const v = b - line
    ground[k] = sA + n * perA
    ground[(k + 1) | 0] = z0 + v * (z1 - z0)
    if (patches) keepPatch(patches, k / 3, at, byCol ? 0 : v, byCol ? v : 0, right, down, width, bendPerTwist)
    k = (k + 3) | 0
    checked += twist + twistB
  }
  // the patch the stretch ends in, and a last minor line before its end
  const z2 = heightM[at + stepB + stepB]
  const y0 = heightM[at + stepA]
  const y1 = heightM[at + stepA + stepB]
  const y2 = heightM[at + stepA + stepB + stepB]
  const twist = z0 - y0 - z1 + y1
  const twistB = z1 - y1 - z2 + y2
  ground[k - 1] = twist * bendPerTwist
  checked += twist
  if (line + 1 < b0 + minor) {
    const u = (line + 1 - b) * perRatio
    ground[k] = sB + (line + 1) * perB
    ground[k + 1] = z1 + u * (y1 - z1)
    ground[k + 2] = twistB * bendPerTwist
    if (patches) keepPatch(patches, k / 3, at + stepB, byCol ? u : 0, byCol ? 0 : u, right, down, width, bendPerTwist)
    k += 3
    checked += twistB
  }
  const e = k / 3
  return Number.isNaN(checked) ? -1 : e
}
