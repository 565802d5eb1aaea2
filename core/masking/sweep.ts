import type { Earth } from '../geodesy/index.ts'
import { CELL, type PolarShape } from '../polar/index.ts'
import { type Ground, RELIEF, type Site } from '../terrain/index.ts'
import type { Work } from '../work/index.ts'
import { uniformCuts, writeGround, writeSeen } from './cells.ts'
import { heightsToSee, makeHull } from './heightLadder.ts'
import { horizonRow } from './horizon.ts'
import { straighten } from './profile.ts'
import { makeRunner, setEarth } from './ray.ts'
import { runSight } from './sightRun.ts'
import type { HorizonRow, SightCells, SiteCells } from './types.ts'

/** Keys of the results, set by the caller. */
export interface SweepKeys {
  readonly site?: string
  readonly masks?: readonly string[]
}
/** About this many points of rays are run between two yields: a few milliseconds. */
const POINTS_PER_TURN = 60_000

/**
 * Sight from one site over the whole polar grid for any number of mast heights (m above the site's ground), all on one sampling of the ground: state,
 * share in sight, coverage floor with its error band and horizon per height; ground, code, relief, slope and height to see once. Every crossing of every
 * ray is visited; geometry is exact on the effective sphere. NaN and CELL.beyondVoid or CELL.outside where the ground is not known.
 */
export function* sweep(
  g: Ground,
  site: Site,
  heightsM: readonly number[],
  grid: PolarShape,
  earth: Earth,
  options: { readonly keys?: SweepKeys } = {},
): Work<{ site: SiteCells; masks: SightCells[] }> {
  const { azimuths, ranges } = grid
  const cuts = uniformCuts(ranges, grid.rangeStepM)
  const r = makeRunner(g, site, ranges * grid.rangeStepM, cuts.cutM.length, grid.azimuthStepDeg)
  const hull = makeHull(r.profile.x.length)
  const cells = azimuths * ranges
  const siteCells = {
    kind: 'site' as const,
    version: 1 as const,
    key: options.keys?.site ?? '',
    grid,
    groundM: new Float32Array(cells).fill(Number.NaN),
    code: new Uint8Array(cells).fill(255),
    relief: new Uint8Array(cells).fill(RELIEF.unknown),
    slopePermille: new Int16Array(cells),
    heightToSeeM: new Float32Array(cells).fill(Number.NaN),
    siteGroundM: r.siteGroundM,
    effectiveRadiusM: new Float64Array(azimuths),
  }
  const masks = heightsM.map((heightM, h) => ({
    kind: 'sight' as const,
    version: 1 as const,
    key: options.keys?.masks?.[h] ?? '',
    grid,
    heightM,
    state: new Uint8Array(cells),
    inSight: new Uint16Array(cells),
    floorM: new Float32Array(cells),
    floorBandM: new Float32Array(cells),
    horizon: [] as HorizonRow[],
  }))
  const centres = Float64Array.from({ length: ranges }, (_, j) => (j + 0.5) * grid.rangeStepM)
  let points = 0
  for (let i = 0; i < azimuths; i++) {
    const azimuthDeg = i * grid.azimuthStepDeg
    const offset = i * ranges
    r.tracer.trace(azimuthDeg)
    setEarth(r, earth, azimuthDeg)
    siteCells.effectiveRadiusM[i] = r.effectiveRadiusM
    straighten(r.tracer.track, r.inverse, cuts.cutM, r.profile)
    writeGround(r.profile, cuts, siteCells, offset)
    const known = Math.min(ranges, (r.profile.cuts + 1) >> 1)
    r.tracer.sampleCells(centres, known, siteCells.code, siteCells.relief, offset)
    heightsToSee(r.profile, cuts.centre, known, r.siteGroundM, r.inverse, g.postingM, hull, siteCells.heightToSeeM, offset)
    const unknownState = r.tracer.track.unknownWhy === 'void' ? CELL.beyondVoid : CELL.outside
    for (const mask of masks) {
      const antennaM = r.siteGroundM + mask.heightM
      r.antennaY = antennaM / (1 + antennaM * r.inverse)
      runSight(r.profile, r.antennaY, r.run)
      writeSeen(r, r.run, cuts, mask, offset, unknownState)
      mask.horizon.push(horizonRow(r, azimuthDeg, antennaM, r.run.endTangent, r.run.endControlX))
    }
    points += r.profile.count * (1 + masks.length)
    if (points > POINTS_PER_TURN) {
      points = 0
      yield { done: i + 1, total: azimuths }
    }
  }
  return { site: siteCells, masks }
}
