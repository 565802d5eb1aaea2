import { CELL } from '../../polar/index.ts'
import type { SeenCells } from '../cells.ts'
import type { Cuts } from '../plane/profile.ts'
import { controlErrorM, type RayRunner } from '../plane/ray.ts'
import { RUN, type RunState, raise, startRun } from '../plane/sightRun.ts'
import { isInSight, packShare, SIGHT_ALLOWANCE_M, WHOLE_CELL } from '../sightState.ts'
import { type CellProfile, straightenCell, straightenRest } from './cellProfile.ts'

/** A share this near 1 is a cell seen without a break. */
const UNBROKEN = 1 - 1e-9
/** Square of (line's height / effective radius) up to which a series of three terms is exact to 0.1 mm. */
const SMALL = 1e-6
/** A surface this little under the line stands on it, m: rounding. */
const ON_LINE_M = 1e-9

/**
 * Sight of the contiguous cells of one ray from one antenna height: the numbers of runSight and writeSeen, with the cells passed over that lie wholly under
 * the line so far (by their highest point) or were seen unbroken from a lower height of the same ray: what a mast sees, a taller one sees. Heights must
 * come in ascending order, with `whole` (one per cell) cleared before the first. Leaves the state at the end of the ray in `s`.
 */
export function sightPass(r: RayRunner, p: CellProfile, cuts: Cuts, whole: Uint8Array, s: RunState, out: SeenCells, offset: number): void {
  const { line, cell, at, known } = p
  const { x: cutX, drop } = cuts
  const { state, inSight, floorM, floorBandM } = out
  const { inverse, antennaY } = r
  const groundErrorM = r.g.verticalErrorM
  const postingM = r.g.postingM
  const spiked = r.tracer.track.spikes.length > 0
  startRun(s, antennaY)
  s[RUN.errorM] = groundErrorM
  let m = s[RUN.tangent]
  let nearX = 0
  let controlX = 0
  let perControlX = 0
  let passed = false
  // does the state hold the surface at the near edge?
  let ready = false
  for (let j = 0; j < known; j++) {
    const i = offset + j
    const farX = cutX[2 * j + 1]
    if (whole[j] === 1) {
      state[i] = CELL.inSight
      inSight[i] = 65535
      floorM[i] = cell[3 * j]
      floorBandM[i] = groundErrorM
      nearX = farX
      passed = true
      ready = false
      continue
    }
    if (passed) {
      // a run of cells seen whole has ended: the highest line is the one to its far edge
      passed = false
      s[RUN.endX] = nearX
      surfaceAt(line, at[2 * j - 1], s)
      ready = true
      s[RUN.controlX] = nearX
      s[RUN.tangent] = (s[RUN.toY] - antennaY) / nearX
      m = s[RUN.tangent]
    }
    const centreX = cutX[2 * j]
    const surfaceM = cell[3 * j]
    let share = 0
    let tangent = m
    let touchedX = s[RUN.controlX]
    if (cell[3 * j + 2] > antennaY + m * (m > 0 ? nearX : farX)) {
      straightenCell(p, j)
      const first = j > 0 ? at[2 * j - 1] : 1
      const middle = at[2 * j]
      if (!ready) {
        s[RUN.endX] = nearX
        surfaceAt(line, first, s)
        ready = true
      }
      s[RUN.endX] = farX
      if (risesThroughout(line, first, at[2 * j + 1], s)) {
        whole[j] = 1
        m = s[RUN.tangent]
        state[i] = CELL.inSight
        inSight[i] = 65535
        floorM[i] = surfaceM
        floorBandM[i] = groundErrorM
        nearX = farX
        continue
      }
      s[RUN.seenX] = 0
      s[RUN.endX] = centreX
      walk(line, first, middle, s)
      tangent = s[RUN.tangent]
      touchedX = s[RUN.controlX]
      s[RUN.endX] = farX
      walk(line, middle, at[2 * j + 1], s)
      share = s[RUN.seenX] / (farX - nearX)
      if (share >= UNBROKEN) whole[j] = 1
      m = s[RUN.tangent]
    } else ready = false
    if (spiked) s[RUN.errorM] = controlErrorM(r, touchedX)
    const errorM = s[RUN.errorM]
    // the line so far at the centre, back to metres (heightOfY)
    const y = antennaY + tangent * centreX
    const w = y * inverse
    const lineM = (y + drop[2 * j]) * (w * w < SMALL ? 1 + w * (1 + w * (1 + w)) : 1 / (1 - w))
    const depthM = lineM - surfaceM
    let bandM = errorM
    if (depthM <= SIGHT_ALLOWANCE_M && isInSight(depthM, centreX - touchedX, postingM)) floorM[i] = surfaceM
    else {
      if (touchedX !== controlX) {
        controlX = touchedX
        perControlX = 1 / controlX
      }
      const t = centreX * perControlX
      const a = errorM * t
      const b = groundErrorM * (1 - t)
      bandM = Math.sqrt(a * a + b * b)
      floorM[i] = lineM
    }
    floorBandM[i] = bandM
    nearX = farX
    if (share > 0) {
      state[i] = share >= WHOLE_CELL ? CELL.inSight : CELL.partly
      inSight[i] = packShare(share)
    } else {
      state[i] = depthM < bandM ? CELL.marginal : CELL.masked
      inSight[i] = 0
    }
  }
  if (passed) {
    s[RUN.endX] = nearX
    surfaceAt(line, at[2 * known - 1], s)
    s[RUN.controlX] = nearX
    s[RUN.tangent] = (s[RUN.toY] - antennaY) / nearX
  }
  // a ray that ends in the middle of a cell: the horizon needs the rest
  if (p.count < 2) return
  const first = known > 0 ? at[2 * known - 1] : 1
  straightenRest(p, first - 1)
  s[RUN.endX] = nearX
  surfaceAt(line, first, s)
  s[RUN.endX] = line[3 * p.count - 3]
  walk(line, first, p.count - 1, s)
}

/** Sets to… of the state to the surface at X = endX inside the segment that ends at crossing `ends`. */
function surfaceAt(line: Float64Array, ends: number, s: RunState): void {
  const x = s[RUN.endX]
  const i = 3 * ends
  const x0 = line[i - 3]
  const y0 = line[i - 2]
  const length = line[i] - x0
  const u = x - x0
  if (u >= length) {
    s[RUN.toX] = line[i]
    s[RUN.toY] = line[i + 1]
    return
  }
  s[RUN.toX] = x
  s[RUN.toY] = y0 + u * ((line[i + 1] - y0) / length + line[i - 1] * (u - length))
}

/**
 * Does the surface, from the place in to… of the state on the line so far to X = endX in the segment that ends at crossing `last`, rise faster than the line
 * to it throughout? Then all of it is in sight: moves line and place on to the end. Otherwise leaves the state alone.
 */
function risesThroughout(line: Float64Array, first: number, last: number, s: RunState): boolean {
  const endX = s[RUN.endX]
  const antennaY = s[RUN.antennaY]
  let x0 = s[RUN.toX]
  let y0 = s[RUN.toY]
  if (y0 - antennaY - s[RUN.tangent] * x0 < -ON_LINE_M || endX > line[3 * last]) return false
  let f = 0
  for (let k = first; k <= last; k = (k + 1) | 0) {
    const i = Math.imul(k, 3)
    let x1 = line[i]
    let y1 = line[(i + 1) | 0]
    const c = line[(i - 1) | 0]
    let length = x1 - x0
    if (k === last) {
      const u = endX - x0
      if (u < length) y1 = y0 + u * ((y1 - y0) / length + c * (u - length))
      x1 = endX
      length = u
    }
    f = (y1 - antennaY) / x1
    if (!(y1 - y0 - Math.abs(c) * length * length > f * length)) return false
    x0 = x1
    y0 = y1
  }
  s[RUN.tangent] = f
  s[RUN.controlX] = x0
  s[RUN.toX] = x0
  s[RUN.toY] = y0
  return true
}

/**
 * Runs from the place in to… of the state, in the segment that ends at crossing `first`, to X = endX in the one that ends at `last`, raising the highest
 * line; leaves the place there in to….
 */
function walk(line: Float64Array, first: number, last: number, s: RunState): void {
  const toX = s[RUN.endX]
  const antennaY = s[RUN.antennaY]
  let x0 = s[RUN.toX]
  let y0 = s[RUN.toY]
  let m = s[RUN.tangent]
  let g0 = y0 - antennaY - m * x0
  let seenX = s[RUN.seenX]
  for (let k = first; k <= last; k = (k + 1) | 0) {
    const i = Math.imul(k, 3)
    let x1 = line[i]
    let y1 = line[(i + 1) | 0]
    const c = line[(i - 1) | 0]
    let length = x1 - x0
    if (k === last && toX < x1) {
      const u = toX - x0
      y1 = y0 + u * ((y1 - y0) / length + c * (u - length))
      x1 = toX
      length = u
    }
    const bow = Math.abs(c) * length * length
    let g1 = y1 - antennaY - m * x1
    if (g1 > 0 || 0.5 * (g0 + g1 + Math.abs(g0 - g1)) + 0.25 * bow > 0) {
      // from the line on, and rising faster than the line to its end throughout: all of it in sight
      const f = (y1 - antennaY) / x1
      if (g0 > -ON_LINE_M && y1 - y0 - bow > f * length) {
        seenX += length
        m = f
        s[RUN.controlX] = x1
        g1 = 0
      } else {
        s[RUN.fromX] = x0
        s[RUN.fromY] = y0
        s[RUN.toX] = x1
        s[RUN.toY] = y1
        s[RUN.bend] = c
        s[RUN.tangent] = m
        s[RUN.seenX] = seenX
        raise(s)
        m = s[RUN.tangent]
        seenX = s[RUN.seenX]
        g1 = y1 - antennaY - m * x1
      }
    }
    x0 = x1
    y0 = y1
    g0 = g1
  }
  s[RUN.toX] = x0
  s[RUN.toY] = y0
  s[RUN.tangent] = m
  s[RUN.seenX] = seenX
}
