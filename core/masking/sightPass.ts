import { CELL } from '../polar/index.ts'
import type { CellProfile } from './cellProfile.ts'
import type { SeenCells } from './cells.ts'
import type { Cuts } from './profile.ts'
import { controlErrorM, type RayRunner } from './ray.ts'
import { RUN, type RunState, raise, startRun } from './sightRun.ts'
import { isInSight, knownState, packShare, SIGHT_ALLOWANCE_M, WHOLE_CELL } from './sightState.ts'

/** A share this near 1 is a cell seen without a break. */
const UNBROKEN = 1 - 1e-9

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
  const antennaErrorM = r.g.verticalErrorM
  const postingM = r.g.postingM
  const spiked = r.tracer.track.spikes.length > 0
  startRun(s, antennaY)
  let m = s[RUN.tangent]
  let controlX = 0
  let perControlX = 0
  let errorM = antennaErrorM
  let nearX = 0
  for (let j = 0; j < known; j++) {
    const centreX = cutX[2 * j]
    const farX = cutX[2 * j + 1]
    const surfaceM = cell[3 * j]
    const i = offset + j
    if (whole[j] === 1) {
      // seen to its far edge, so the highest line ends there
      farEnd(line, at[2 * j + 1], farX, s)
      m = (s[RUN.toY] - antennaY) / s[RUN.toX]
      controlX = s[RUN.toX]
      perControlX = 1 / controlX
      s[RUN.tangent] = m
      s[RUN.controlX] = controlX
      if (spiked) errorM = controlErrorM(r, controlX)
      state[i] = CELL.inSight
      inSight[i] = 65535
      floorM[i] = surfaceM
      floorBandM[i] = errorM
      nearX = farX
      continue
    }
    let share = 0
    if (cell[3 * j + 2] > antennaY + m * (m > 0 ? nearX : farX)) {
      s[RUN.seenX] = 0
      walk(line, j > 0 ? at[2 * j - 1] : 1, nearX, at[2 * j], centreX, s)
      m = s[RUN.tangent]
      if (s[RUN.controlX] !== controlX) {
        controlX = s[RUN.controlX]
        perControlX = 1 / controlX
        if (spiked) errorM = controlErrorM(r, controlX)
      }
      walk(line, at[2 * j], centreX, at[2 * j + 1], farX, s)
      share = s[RUN.seenX] / (farX - nearX)
      if (share >= UNBROKEN) whole[j] = 1
    }
    // the line so far at the centre, back to metres (heightOfY)
    const y = antennaY + m * centreX
    const lineM = (y + drop[2 * j]) / (1 - y * inverse)
    const depthM = lineM - surfaceM
    if (depthM <= SIGHT_ALLOWANCE_M && isInSight(depthM, centreX - controlX, postingM)) {
      floorM[i] = surfaceM
      floorBandM[i] = errorM
      state[i] = knownState(share, depthM, errorM)
      inSight[i] = packShare(share)
    } else {
      const t = centreX * perControlX
      const a = errorM * t
      const b = antennaErrorM * (1 - t)
      const bandM = Math.sqrt(a * a + b * b)
      floorM[i] = lineM
      floorBandM[i] = bandM
      if (share > 0) {
        state[i] = share >= WHOLE_CELL ? CELL.inSight : CELL.partly
        inSight[i] = packShare(share)
      } else {
        state[i] = depthM < bandM ? CELL.marginal : CELL.masked
        inSight[i] = 0
      }
    }
    m = s[RUN.tangent]
    if (s[RUN.controlX] !== controlX) {
      controlX = s[RUN.controlX]
      perControlX = 1 / controlX
      if (spiked) errorM = controlErrorM(r, controlX)
    }
    nearX = farX
  }
  // a ray that ends in the middle of a cell: the horizon needs the rest
  if (p.count > 1) walk(line, known > 0 ? at[2 * known - 1] : 1, nearX, p.count - 1, line[3 * p.count - 3], s)
}

/** Sets to… of the state to the surface at X inside the segment that ends at crossing `ends`, and bend to its quadratic term. */
function farEnd(line: Float64Array, ends: number, x: number, s: RunState): void {
  const i = 3 * ends
  const x0 = line[i - 3]
  const y0 = line[i - 2]
  const c = line[i - 1]
  const x1 = line[i]
  s[RUN.bend] = c
  if (x >= x1) {
    s[RUN.toX] = x1
    s[RUN.toY] = line[i + 1]
    return
  }
  const length = x1 - x0
  const u = x - x0
  s[RUN.toX] = x
  s[RUN.toY] = y0 + u * ((line[i + 1] - y0) / length + c * (u - length))
}

/**
 * Runs from X = fromX, in the segment that ends at crossing `first`, to X = toX in the one that ends at `last`, raising the highest line. The surface at
 * both is taken inside the segments.
 */
function walk(line: Float64Array, first: number, fromX: number, last: number, toX: number, s: RunState): void {
  const antennaY = s[RUN.antennaY]
  farEnd(line, first, fromX, s)
  let m = s[RUN.tangent]
  let x0 = s[RUN.toX]
  let y0 = s[RUN.toY]
  let g0 = y0 - antennaY - m * x0
  for (let k = first; k <= last; k++) {
    const i = 3 * k
    let x1 = line[i]
    let y1 = line[i + 1]
    const c = line[i - 1]
    if (k === last) {
      farEnd(line, k, toX, s)
      x1 = s[RUN.toX]
      y1 = s[RUN.toY]
    }
    const length = x1 - x0
    let g1 = y1 - antennaY - m * x1
    if (g1 > 0 || (c < 0 && (g0 > g1 ? g0 : g1) > 0.25 * c * length * length)) {
      s[RUN.fromX] = x0
      s[RUN.fromY] = y0
      s[RUN.toX] = x1
      s[RUN.toY] = y1
      s[RUN.bend] = c
      raise(s)
      m = s[RUN.tangent]
      g1 = y1 - antennaY - m * x1
    }
    x0 = x1
    y0 = y1
    g0 = g1
  }
}
