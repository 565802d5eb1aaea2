import type { ControlPoints } from './controlPoints.ts'

/** Where a ray's ground is known to, and why it ends. */
export const WALK_END = { reach: 0, edge: 1, void: 2 } as const

/** What the walk writes: one entry per grid line crossed, with the start, the control points and the end. */
export interface Walk {
  count: number
  end: number
  distM: Float64Array
  groundM: Float64Array
  /** Quadratic term of the ground from this entry to the next, 1/m. */
  groundBendPerM: Float64Array
  /** Kept only for ground with cover. */
  readonly patches: WalkedPatches | null
}
/** For each entry the patch ahead (its first post), the place in it (columns, rows from that post, 0..1) and twist -> bend, 1/m². */
export interface WalkedPatches {
  readonly post: Int32Array
  readonly u: Float64Array
  readonly v: Float64Array
  readonly bendPerTwist: Float64Array
}

/** Largest number of entries a walk over a raster of this size can write for a given number of control points. */
export const walkCapacity = (width: number, height: number, controls: number): number => 2 * (width + height) + 4 * controls + 16

/**
 * Walks one ray over the bilinear surface through the posts. Between two crossings the height is z₀ + b(s−s₀) + q(s−s₀)², q = twist of the patch along the
 * ray; at each crossing it is linear between two posts. Stops at the last line of posts (edge) or before a patch with a void post.
 */
export function walkRay(heightM: Float32Array, width: number, height: number, control: ControlPoints, out: Walk): void {
  const { distM, groundM, groundBendPerM, patches } = out
  const lastCol = width - 2
  const lastRow = height - 2
  let k = 0
  let byCol = false
  out.end = WALK_END.reach
  for (let i = 0; i + 1 < control.count; i++) {
    const c0 = control.col[i]
    const r0 = control.row[i]
    const s0 = control.distM[i]
    const dc = control.col[i + 1] - c0
    const dr = control.row[i + 1] - r0
    const ds = control.distM[i + 1] - s0
    const right = dc > 0
    const down = dr > 0
    const stepC = dc === 0 ? Number.POSITIVE_INFINITY : 1 / Math.abs(dc)
    const stepR = dr === 0 ? Number.POSITIVE_INFINITY : 1 / Math.abs(dr)
    const moveC = right ? 1 : -1
    const moveR = down ? 1 : -1
    // the patch the ray enters here
    let pc = right ? Math.floor(c0) : dc < 0 ? Math.ceil(c0) - 1 : Math.min(Math.floor(c0), lastCol)
    let pr = down ? Math.floor(r0) : dr < 0 ? Math.ceil(r0) - 1 : Math.min(Math.floor(r0), lastRow)
    if (!(pc >= 0 && pr >= 0 && pc <= lastCol && pr <= lastRow && Number.isFinite(dc) && Number.isFinite(dr))) {
      out.end = WALK_END.edge
      break
    }
    let tc = dc === 0 ? Number.POSITIVE_INFINITY : (right ? pc + 1 - c0 : c0 - pc) * stepC
    let tr = dr === 0 ? Number.POSITIVE_INFINITY : (down ? pr + 1 - r0 : r0 - pr) * stepR
    let at = pr * width + pc
    let z00 = heightM[at]
    let z01 = heightM[at + 1]
    let z10 = heightM[at + width]
    let z11 = heightM[at + width + 1]
    const twistScale = (dc * dr) / (ds * ds)
    let twist = z00 - z01 - z10 + z11
    if (Number.isNaN(twist)) {
      out.end = WALK_END.void
      break
    }
    const u0 = c0 - pc
    const v0 = r0 - pr
    distM[k] = s0
    groundM[k] = (z00 * (1 - u0) + z01 * u0) * (1 - v0) + (z10 * (1 - u0) + z11 * u0) * v0
    groundBendPerM[k] = twist * twistScale
    if (patches) {
      patches.post[k] = at
      patches.u[k] = u0
      patches.v[k] = v0
      patches.bendPerTwist[k] = twistScale
    }
    k++
    for (;;) {
      if (tc <= tr) {
        if (tc >= 1) break
        const v = r0 + tc * dr - pr
        const z = right ? z01 + v * (z11 - z01) : z00 + v * (z10 - z00)
        distM[k] = s0 + tc * ds
        groundM[k] = z
        if (patches) {
          byCol = true
          patches.u[k] = right ? 0 : 1
          patches.v[k] = v
        }
        pc += moveC
        if (pc < 0 || pc > lastCol) {
          out.end = WALK_END.edge
          break
        }
        at += moveC
        if (right) {
          z00 = z01
          z10 = z11
          z01 = heightM[at + 1]
          z11 = heightM[at + width + 1]
        } else {
          z01 = z00
          z11 = z10
          z00 = heightM[at]
          z10 = heightM[at + width]
        }
        tc += stepC
      } else {
        if (tr >= 1) break
        const u = c0 + tr * dc - pc
        const z = down ? z10 + u * (z11 - z10) : z00 + u * (z01 - z00)
        distM[k] = s0 + tr * ds
        groundM[k] = z
        if (patches) {
          byCol = false
          patches.u[k] = u
          patches.v[k] = down ? 0 : 1
        }
        pr += moveR
        if (pr < 0 || pr > lastRow) {
          out.end = WALK_END.edge
          break
        }
        if (down) {
          at += width
          z00 = z10
          z01 = z11
          z10 = heightM[at + width]
          z11 = heightM[at + width + 1]
        } else {
          at -= width
          z10 = z00
          z11 = z01
          z00 = heightM[at]
          z01 = heightM[at + 1]
        }
        tr += stepR
      }
      twist = z00 - z01 - z10 + z11
      if (Number.isNaN(twist)) {
        out.end = WALK_END.void
        break
      }
      groundBendPerM[k] = twist * twistScale
      if (patches) {
        patches.post[k] = at
        patches.bendPerTwist[k] = twistScale
      }
      k++
    }
    if (out.end !== WALK_END.reach) {
      // the crossing itself is the last known place
      groundBendPerM[k] = 0
      if (patches) {
        // no patch ahead (edge), or one with a void: keep the one behind
        if (byCol) patches.u[k] = right ? 1 : 0
        else patches.v[k] = down ? 1 : 0
        patches.post[k] = patches.post[k - 1]
        patches.bendPerTwist[k] = 0
      }
      k++
      break
    }
    if (i + 2 === control.count) {
      const u = control.col[i + 1] - pc
      const v = control.row[i + 1] - pr
      distM[k] = control.distM[i + 1]
      groundM[k] = (z00 * (1 - u) + z01 * u) * (1 - v) + (z10 * (1 - u) + z11 * u) * v
      groundBendPerM[k] = 0
      if (patches) {
        patches.post[k] = at
        patches.u[k] = u
        patches.v[k] = v
        patches.bendPerTwist[k] = 0
      }
      k++
    }
  }
  out.count = k
}
