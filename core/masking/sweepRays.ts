import type { Earth } from '../geodesy/index.ts'
import { CELL } from '../polar/index.ts'
import { type Ground, RELIEF, type Site } from '../terrain/index.ts'
import { cutsAround, writeGround, writeSeen } from './cells.ts'
import { makeStraightProfile } from './plane/profile.ts'
import { runRay } from './plane/ray.ts'
import { makeSightRun } from './plane/sightRun.ts'
import { heldRunner } from './sightPoint.ts'

/** Cells of chosen rays, packed as in SiteCells and SightCells: index i * cells + j for azimuth i and centre j. */
export interface SweptRays {
  readonly azimuthsDeg: readonly number[]
  readonly centresM: Float64Array
  readonly cellM: number
  readonly siteGroundM: number
  readonly effectiveRadiusM: Float64Array
  readonly groundM: Float32Array
  readonly code: Uint8Array
  readonly relief: Uint8Array
  readonly slopePermille: Int16Array
  readonly state: Uint8Array
  readonly inSight: Uint16Array
  readonly floorM: Float32Array
  readonly floorBandM: Float32Array
}

/**
 * The cell quantities of `sweep` for chosen azimuths (degrees true) and cells of length cellM around chosen centres (ground range, m, ascending): what a
 * polar grid with a ray and a cell there would hold. Centres must be above 0.
 */
export function sweepRays(
  g: Ground,
  site: Site,
  heightM: number,
  earth: Earth,
  azimuthsDeg: readonly number[],
  centresM: readonly number[],
  cellM: number,
): SweptRays {
  const n = centresM.length
  const cells = azimuthsDeg.length * n
  const cuts = cutsAround(centresM, cellM)
  const count = cuts.cuts.m.length
  const reachM = count > 0 ? cuts.cuts.m[count - 1] : 0
  const held = heldRunner(g, site, reachM)
  const r = {
    ...held,
    profile: makeStraightProfile(held.tracer.track.surface.length, count),
    run: makeSightRun(count),
  }
  const centres = Float64Array.from(centresM)
  const groundM = new Float64Array(n)
  const slope = new Float64Array(n)
  const out = {
    azimuthsDeg,
    centresM: centres,
    cellM,
    siteGroundM: r.siteGroundM,
    effectiveRadiusM: new Float64Array(azimuthsDeg.length),
    groundM: new Float32Array(cells).fill(Number.NaN),
    code: new Uint8Array(cells).fill(255),
    relief: new Uint8Array(cells).fill(RELIEF.unknown),
    slopePermille: new Int16Array(cells),
    state: new Uint8Array(cells),
    inSight: new Uint16Array(cells),
    floorM: new Float32Array(cells),
    floorBandM: new Float32Array(cells),
  }
  azimuthsDeg.forEach((azimuthDeg, i) => {
    const offset = i * n
    r.tracer.traceTo(azimuthDeg, reachM)
    runRay(r, earth, azimuthDeg, heightM, cuts.cuts)
    out.effectiveRadiusM[i] = r.effectiveRadiusM
    let known = 0
    while (known < n && cuts.centre[known] < r.profile.cuts) known++
    for (let j = 0; j < known; j++) {
      groundM[j] = r.profile.cutGroundM[cuts.centre[j]]
      slope[j] = r.profile.cutSlope[cuts.centre[j]]
    }
    writeGround(groundM, slope, known, out, offset)
    if (!g.code) out.code.fill(0, offset, offset + known)
    r.tracer.sampleCells(centres, known, out.code, out.relief, offset)
    writeSeen(r, r.run, cuts, out, offset, r.tracer.track.unknownWhy === 'void' ? CELL.beyondVoid : CELL.outside)
  })
  return out
}
