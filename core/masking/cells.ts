import type { StraightProfile } from './profile.ts'
import { controlErrorM, type RayRunner } from './ray.ts'
import type { SightRun } from './sightRun.ts'
import { isInSight, knownState, packShare } from './sightState.ts'
import { heightOfY, rangeOfX, straightDrop, straightX } from './straight.ts'

/** Where the cells of one ray lie: for each cell the cut at its centre and at its edges (-1: the site itself). */
export interface RayCellCuts {
  readonly cells: number
  /** Ascending distances, m: what the profile is cut at. */
  readonly cutM: Float64Array
  readonly near: Int32Array
  readonly centre: Int32Array
  readonly far: Int32Array
}
/** Contiguous cells of equal length from the site outward. */
export function uniformCuts(cells: number, stepM: number): RayCellCuts {
  return {
    cells,
    cutM: Float64Array.from({ length: 2 * cells }, (_, k) => ((k + 1) * stepM) / 2),
    near: Int32Array.from({ length: cells }, (_, j) => 2 * j - 1),
    centre: Int32Array.from({ length: cells }, (_, j) => 2 * j),
    far: Int32Array.from({ length: cells }, (_, j) => 2 * j + 1),
  }
}
/** Cells of one length around any centres, m; they may overlap. A cell never reaches behind the site. */
export function cutsAround(centresM: readonly number[], cellM: number): RayCellCuts {
  const edges = centresM.map((c) => [Math.max(0, c - cellM / 2), c, c + cellM / 2])
  const cutM = Float64Array.from(new Set(edges.flat().filter((d) => d > 0))).sort()
  const at = (d: number): number => cutM.indexOf(d)
  const column = (i: number): Int32Array => Int32Array.from(edges, (e) => (e[i] > 0 ? at(e[i]) : -1))
  return { cells: centresM.length, cutM, near: column(0), centre: column(1), far: column(2) }
}

/** Ground at the cell centres of one ray; unknown cells keep what the arrays held. */
export interface GroundCells {
  readonly groundM: Float32Array
  readonly slopePermille: Int16Array
}
export function writeGround(p: StraightProfile, c: RayCellCuts, out: GroundCells, offset: number): void {
  for (let j = 0; j < c.cells; j++) {
    const k = c.centre[j]
    if (k >= p.cuts) continue
    out.groundM[offset + j] = p.cutGroundM[k]
    out.slopePermille[offset + j] = Math.max(-32767, Math.min(32767, Math.round(1000 * p.cutSlope[k])))
  }
}

export interface SeenCells {
  readonly state: Uint8Array
  readonly inSight: Uint16Array
  readonly floorM: Float32Array
  readonly floorBandM: Float32Array
}
/** Sight of the cells of one ray from the run just made; cells whose centre is not known get `unknownState`, no floor and nothing in sight. */
export function writeSeen(r: RayRunner, run: SightRun, c: RayCellCuts, out: SeenCells, offset: number, unknownState: number): void {
  const { profile: p, inverse, antennaY } = r
  const errorM = r.g.verticalErrorM
  for (let j = 0; j < c.cells; j++) {
    const k = c.centre[j]
    const at = offset + j
    if (k >= p.cuts) {
      out.state[at] = unknownState
      out.inSight[at] = 0
      out.floorM[at] = Number.NaN
      out.floorBandM[at] = Number.NaN
      continue
    }
    const near = c.near[j]
    const far = c.far[j]
    const nearX = near < 0 ? 0 : straightX(c.cutM[near], inverse)
    const farX = straightX(c.cutM[far], inverse)
    const seen = (far < p.cuts ? run.seenX[far] : run.endSeenX) - (near < 0 ? 0 : run.seenX[near])
    const share = seen / (farX - nearX)
    const tangent = run.tangent[k]
    const controlM = rangeOfX(run.controlX[k], inverse)
    const rangeM = c.cutM[k]
    const surfaceM = p.cutSurfaceM[k]
    const lineM = heightOfY(antennaY + tangent * straightX(rangeM, inverse), straightDrop(rangeM, inverse), inverse)
    const depthM = lineM - surfaceM
    const controlError = controlErrorM(r, run.controlX[k])
    const inSight = isInSight(depthM, rangeM - controlM, r.g.postingM)
    const t = rangeM / controlM
    const bandM = inSight ? controlError : Math.sqrt((controlError * t) ** 2 + (errorM * (1 - t)) ** 2)
    out.floorM[at] = inSight ? surfaceM : lineM
    out.floorBandM[at] = bandM
    out.state[at] = knownState(share, depthM, bandM)
    out.inSight[at] = packShare(share)
  }
}
