import type { ControlPoints } from './controlPoints.ts'
import { keepPatch, type Walk } from './patches.ts'
import { isInner, strideStretch } from './stride.ts'

/** Where a ray's ground is known to, and why it ends. */
export const WALK_END = { reach: 0, edge: 1, void: 2 } as const

/** Largest number of entries a walk over a raster of this size can write for a given number of control points. */
export const walkCapacity = (width: number, height: number, controls: number): number => 2 * (width + height) + 4 * controls + 16

/**
 * Walks one ray over the bilinear surface through the posts. Between two crossings the height is z₀ + b(s−s₀) + q(s−s₀)², q = twist of the patch along the
 * ray; at each crossing it is linear between two posts. Stops at the last line of posts (edge) or before a patch with a void post.
 *
 * Each stretch between control points is walked as if toward growing columns and rows: `near` and `far` are meant along the ray, u and v grow along it.
 */
export function walkRay(heightM: Float32Array, width: number, height: number, control: ControlPoints, out: Walk): void {
  const { ground, patches } = out
  const lastCol = width - 2
  const lastRow = height - 2
  let k = 0
  out.end = WALK_END.reach
  for (let i = 0; i + 1 < control.count; i++) {
    const c0 = control.col[i]
    const r0 = control.row[i]
    const s0 = control.distM[i]
    const ds = control.distM[i + 1] - s0
    const dc = control.col[i + 1] - c0
    const dr = control.row[i + 1] - r0
    const right = dc >= 0
    const down = dr >= 0
    // patch the stretch starts in; on a line of posts, the one ahead
    const pc = right ? Math.min(Math.floor(c0), dc > 0 ? width : lastCol) : Math.ceil(c0) - 1
    const pr = down ? Math.min(Math.floor(r0), dr > 0 ? height : lastRow) : Math.ceil(r0) - 1
    if (!(pc >= 0 && pr >= 0 && pc <= lastCol && pr <= lastRow && Number.isFinite(dc) && Number.isFinite(dr))) {
      out.end = WALK_END.edge
      break
    }
    const across = Math.abs(dc)
    const along = Math.abs(dr)
    const stepC = across > 0 ? 1 / across : Number.POSITIVE_INFINITY
    const stepR = along > 0 ? 1 / along : Number.POSITIVE_INFINITY
    const toCol = right ? 1 : -1
    const toRow = down ? width : -width
    let colsLeft = right ? lastCol - pc : pc
    let rowsLeft = down ? lastRow - pr : pr
    // place in the patch, 0 at the near post
    let u0 = right ? c0 - pc : pc + 1 - c0
    let v0 = down ? r0 - pr : pr + 1 - r0
    let tc = across > 0 ? (1 - u0) * stepC : Number.POSITIVE_INFINITY
    let tr = along > 0 ? (1 - v0) * stepR : Number.POSITIVE_INFINITY
    let at = (pr + (down ? 0 : 1)) * width + pc + (right ? 0 : 1)
    let nn = heightM[at]
    let fn = heightM[at + toCol]
    let nf = heightM[at + toRow]
    let ff = heightM[at + toCol + toRow]
    const bendPerTwist = (across * along) / (ds * ds)
    let twist = nn - fn - nf + ff
    if (Number.isNaN(twist)) {
      out.end = WALK_END.void
      break
    }
    ground[3 * k] = s0
    ground[3 * k + 1] = (nn * (1 - u0) + fn * u0) * (1 - v0) + (nf * (1 - u0) + ff * u0) * v0
    ground[3 * k + 2] = twist * bendPerTwist
    if (patches) keepPatch(patches, k, at, u0, v0, right, down, width, bendPerTwist)
    k++
    if (isInner(control, i, width, height)) {
      const after = strideStretch(heightM, width, control, i, out, k)
      if (after > 0) {
        k = after
        if (i + 2 === control.count) k = endInside(heightM, width, control, i + 1, right, down, bendPerTwist, out, k)
        continue
      }
    }
    // the crossing at hand: distance, height, and place in the patch behind it
    let s = 0
    let z = 0
    let u = 0
    let v = 0
    for (;;) {
      if (tc <= tr) {
        if (tc >= 1) break
        u = 1
        v = v0 + tc * along
        z = fn + v * (ff - fn)
        s = s0 + tc * ds
        tc += stepC
        u0 -= 1
        if (--colsLeft < 0) {
          out.end = WALK_END.edge
          break
        }
        at += toCol
        nn = fn
        nf = ff
        fn = heightM[at + toCol]
        ff = heightM[at + toCol + toRow]
        twist = nn - fn - nf + ff
        if (Number.isNaN(twist)) {
          at -= toCol
          out.end = WALK_END.void
          break
        }
        if (patches) keepPatch(patches, k, at, 0, v, right, down, width, bendPerTwist)
      } else {
        if (tr >= 1) break
        u = u0 + tr * across
        v = 1
        z = nf + u * (ff - nf)
        s = s0 + tr * ds
        tr += stepR
        v0 -= 1
        if (--rowsLeft < 0) {
          out.end = WALK_END.edge
          break
        }
        at += toRow
        nn = nf
        fn = ff
        nf = heightM[at + toRow]
        ff = heightM[at + toCol + toRow]
        twist = nn - fn - nf + ff
        if (Number.isNaN(twist)) {
          at -= toRow
          out.end = WALK_END.void
          break
        }
        if (patches) keepPatch(patches, k, at, u, 0, right, down, width, bendPerTwist)
      }
      ground[3 * k] = s
      ground[3 * k + 1] = z
      ground[3 * k + 2] = twist * bendPerTwist
      k++
    }
    const ended = out.end !== WALK_END.reach
    if (!ended && i + 2 < control.count) continue
    if (!ended) {
      s = s0 + ds
      u = u0 + across
      v = v0 + along
      z = (nn * (1 - u) + fn * u) * (1 - v) + (nf * (1 - u) + ff * u) * v
    }
    // the last known place of the ray
    ground[3 * k] = s
    ground[3 * k + 1] = z
    ground[3 * k + 2] = 0
    if (patches) keepPatch(patches, k, at, u, v, right, down, width, 0)
    k++
    break
  }
  out.count = k
}

/** Writes the last place of a ray that ends inside the raster. */
function endInside(
  heightM: Float32Array,
  width: number,
  control: ControlPoints,
  i: number,
  right: boolean,
  down: boolean,
  bendPerTwist: number,
  out: Walk,
  k: number,
): number {
  const nearCol = right ? Math.ceil(control.col[i]) - 1 : Math.floor(control.col[i]) + 1
  const nearRow = down ? Math.ceil(control.row[i]) - 1 : Math.floor(control.row[i]) + 1
  const u = right ? control.col[i] - nearCol : nearCol - control.col[i]
  const v = down ? control.row[i] - nearRow : nearRow - control.row[i]
  const at = nearRow * width + nearCol
  const toCol = right ? 1 : -1
  const toRow = down ? width : -width
  const top = heightM[at] * (1 - u) + heightM[at + toCol] * u
  const low = heightM[at + toRow] * (1 - u) + heightM[at + toCol + toRow] * u
  out.ground[3 * k] = control.distM[i]
  out.ground[3 * k + 1] = top * (1 - v) + low * v
  out.ground[3 * k + 2] = 0
  if (out.patches) keepPatch(out.patches, k, at, u, v, right, down, width, bendPerTwist)
  return k + 1
}
