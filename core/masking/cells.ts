import { type Cuts, makeCuts } from './plane/profile.ts'
import { controlErrorM, type RayRunner } from './plane/ray.ts'
import { RUN, type SightRun } from './plane/sightRun.ts'
import { heightOfY, rangeOfX } from './plane/straight.ts'
import { isInSight, knownState, packShare } from './sightState.ts'

/** Where the cells of one ray lie: for each cell the cut at its centre and at its edges (-1: the site itself). */
export interface RayCellCuts {
  readonly cells: number
  readonly cuts: Cuts
  readonly near: Int32Array
  readonly centre: Int32Array
  readonly far: Int32Array
}
/** Contiguous cells of equal length from the site outward: cut 2j is the centre of cell j, cut 2j + 1 its far edge; a last cut no ray reaches. */
export const uniformCuts = (cells: number, stepM: number): Cuts =>
  makeCuts(Float64Array.from({ length: 2 * cells + 1 }, (_, k) => (k < 2 * cells ? ((k + 1) * stepM) / 2 : Number.POSITIVE_INFINITY)))

/** Cells of one length around any centres, m; they may overlap. A cell never reaches behind the site. */
export function cutsAround(centresM: readonly number[], cellM: number): RayCellCuts {
  const edges = centresM.map((c) => [Math.max(0, c - cellM / 2), c, c + cellM / 2])
  const m = Float64Array.from(new Set(edges.flat().filter((d) => d > 0))).sort()
  const index = new Map(Array.from(m, (d, k) => [d, k]))
  const column = (i: number): Int32Array => Int32Array.from(edges, (e) => index.get(e[i]) ?? -1)
  return { cells: centresM.length, cuts: makeCuts(m), near: column(0), centre: column(1), far: column(2) }
}

const STEEPEST_PERMILLE = 32767
/** Slope as per mille in 16 bits. */
export function packSlope(slope: number): number {
  const permille = Math.floor(1000 * slope + 0.5)
  if (Math.abs(permille) <= STEEPEST_PERMILLE) return permille
  return permille > 0 ? STEEPEST_PERMILLE : -STEEPEST_PERMILLE
}

/** Ground and slope at the cell centres of one ray; unknown cells keep what the arrays held. */
export interface GroundCells {
  readonly groundM: Float32Array
  readonly slopePermille: Int16Array
}
export function writeGround(groundM: Float64Array, slope: Float64Array, known: number, out: GroundCells, offset: number): void {
  for (let j = 0; j < known; j++) {
    out.groundM[offset + j] = groundM[j]
    out.slopePermille[offset + j] = packSlope(slope[j])
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
  const { x: cutX, drop, m: cutM } = c.cuts
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
    const seen = (far < p.cuts ? run.seenX[far] : run.end[RUN.seenX]) - (near < 0 ? 0 : run.seenX[near])
    const share = seen / (cutX[far] - (near < 0 ? 0 : cutX[near]))
    const controlX = run.controlX[k]
    const surfaceM = p.cutSurfaceM[k]
    const lineM = heightOfY(antennaY + run.tangent[k] * cutX[k], drop[k], inverse)
    const depthM = lineM - surfaceM
    const controlError = controlErrorM(r, controlX)
    const inSight = isInSight(depthM, cutM[k] - rangeOfX(controlX, inverse), r.g.postingM)
    const t = cutX[k] / controlX
    const bandM = inSight ? controlError : Math.sqrt((controlError * t) ** 2 + (errorM * (1 - t)) ** 2)
    out.floorM[at] = inSight ? surfaceM : lineM
    out.floorBandM[at] = bandM
    out.state[at] = knownState(share, depthM, bandM)
    out.inSight[at] = packShare(share)
  }
}
