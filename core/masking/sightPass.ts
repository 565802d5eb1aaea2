import { CELL } from '../polar/index.ts'
import type { SeenCells } from './cells.ts'
import type { Cuts } from './profile.ts'
import { controlErrorM, type RayRunner } from './ray.ts'
import { RUN, type RunState, raise, startRun } from './sightRun.ts'
import { isInSight, knownState, packShare, SIGHT_ALLOWANCE_M } from './sightState.ts'
import { heightOfY } from './straight.ts'

/** Whole cells in sight from the antenna height before: what a mast sees, a taller one sees. */
export type WholeCells = Uint8Array
/** A share this near 1 is a cell seen without a break. */
const UNBROKEN = 1 - 1e-9

/**
 * Sight of the contiguous cells of one ray from one antenna height: the same numbers as runSight and writeSeen, with the cells skipped that lie wholly
 * under the line so far (by their highest point) or were seen unbroken from a lower height of the same ray. Heights must come in ascending order, with
 * `whole` cleared before the first. Cells from `known` on are left to the caller.
 */
export function sightPass(r: RayRunner, cuts: Cuts, known: number, whole: WholeCells, s: RunState, out: SeenCells, offset: number): void {
  const { x, y, bend, cutPoint, cutTop, cutSurfaceM, count } = r.profile
  const { x: cutX, drop } = cuts
  const { state, inSight, floorM, floorBandM } = out
  const { inverse, antennaY } = r
  const antennaErrorM = r.g.verticalErrorM
  const edges = r.profile.cuts
  startRun(s, antennaY)
  let m = s[RUN.tangent]
  let controlX = 0
  let perControlX = 0
  let errorM = antennaErrorM
  let from = 0
  let fromX = 0
  for (let j = 0; j < known; j++) {
    const centre = 2 * j
    const far = centre + 1
    const to = far < edges ? cutPoint[far] : count - 1
    const toX = cutX[far]
    const at = offset + j
    if (whole[j] === 1) {
      m = (y[to] - antennaY) / x[to]
      controlX = x[to]
      s[RUN.tangent] = m
      s[RUN.controlX] = controlX
      perControlX = 1 / controlX
      errorM = controlErrorM(r, controlX)
      state[at] = CELL.inSight
      inSight[at] = 65535
      floorM[at] = cutSurfaceM[centre]
      floorBandM[at] = errorM
      from = to
      fromX = toX
      continue
    }
    const top = Math.max(cutTop[centre], far < edges ? cutTop[far] : Number.POSITIVE_INFINITY)
    let share = 0
    let lineY: number
    if (top <= antennaY + Math.min(m * fromX, m * toX)) lineY = antennaY + m * cutX[centre]
    else {
      s[RUN.seenX] = 0
      const middle = cutPoint[centre]
      walk(from, middle)
      lineY = antennaY + s[RUN.tangent] * cutX[centre]
      m = s[RUN.tangent]
      const atCentreX = s[RUN.controlX]
      walk(middle, to)
      share = s[RUN.seenX] / (toX - fromX)
      if (share >= UNBROKEN) whole[j] = 1
      if (atCentreX !== controlX) {
        controlX = atCentreX
        perControlX = 1 / controlX
        errorM = controlErrorM(r, controlX)
      }
    }
    const surfaceM = cutSurfaceM[centre]
    const lineM = heightOfY(lineY, drop[centre], inverse)
    const depthM = lineM - surfaceM
    if (depthM <= SIGHT_ALLOWANCE_M && isInSight(depthM, cutX[centre] - controlX, r.g.postingM)) {
      floorM[at] = surfaceM
      floorBandM[at] = errorM
      state[at] = knownState(share, depthM, errorM)
    } else {
      const t = cutX[centre] * perControlX
      const a = errorM * t
      const b = antennaErrorM * (1 - t)
      const bandM = Math.sqrt(a * a + b * b)
      floorM[at] = lineM
      floorBandM[at] = bandM
      state[at] = knownState(share, depthM, bandM)
    }
    inSight[at] = packShare(share)
    m = s[RUN.tangent]
    if (s[RUN.controlX] !== controlX) {
      controlX = s[RUN.controlX]
      perControlX = 1 / controlX
      errorM = controlErrorM(r, controlX)
    }
    from = to
    fromX = toX
  }
  // past the last cell whose centre is known the ray may still rise: the horizon needs it
  walk(from, count - 1)

  function walk(first: number, last: number): void {
    let tangent = s[RUN.tangent]
    let x0 = x[first]
    let g0 = y[first] - antennaY - tangent * x0
    for (let p = first + 1; p <= last; p++) {
      const x1 = x[p]
      const c = bend[p - 1]
      const length = x1 - x0
      let g1 = y[p] - antennaY - tangent * x1
      if (g1 > 0 || (c < 0 && Math.max(g0, g1) - 0.25 * c * length * length > 0)) {
        raise(r.profile, p, s)
        tangent = s[RUN.tangent]
        g1 = y[p] - antennaY - tangent * x1
      }
      x0 = x1
      g0 = g1
    }
  }
}
