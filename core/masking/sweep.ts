import type { Earth } from '../geodesy/index.ts'
import { CELL, type PolarShape } from '../polar/index.ts'
import { type Ground, RELIEF, type Site } from '../terrain/index.ts'
import type { Work } from '../work/index.ts'
import { type CellProfile, fillCells, makeCellProfile } from './cellProfile.ts'
import { type GroundCells, packSlope, type SeenCells, uniformCuts, writeGround } from './cells.ts'
import { heightsToSee } from './heightLadder.ts'
import { horizonRow } from './horizon.ts'
import { makeHull } from './hull.ts'
import { cutGround } from './profile.ts'
import { makeRunner, setAntenna, setEarth } from './ray.ts'
import { sightPass } from './sightPass.ts'
import { RUN } from './sightRun.ts'
import type { HorizonRow, SightCells, SiteCells } from './types.ts'

/** Keys of the results, set by the caller. */
export interface SweepKeys {
  readonly site?: string
  readonly masks?: readonly string[]
}
export interface SweepOptions {
  readonly keys?: SweepKeys
  /** false leaves heightToSeeM empty (length 0), to be made by `heightToSeeCells` when it is asked for: it takes about as long as one height. */
  readonly heightToSee?: boolean
  /** true leaves all arrays of the site cells empty. */
  readonly sightOnly?: boolean
}
/** About this many points of rays are run between two yields: a few milliseconds. */
const POINTS_PER_TURN = 60_000

/**
 * Sight from one site over the whole polar grid for any number of mast heights (m above the site's ground), all on one sampling of the ground: state,
 * share in sight, coverage floor with its error band and horizon per height; ground, code, relief, slope and height to see once. Every crossing of every
 * ray is visited; geometry is exact on the effective sphere. NaN and CELL.beyondVoid or CELL.outside where the ground is not known. `sightOnly` leaves
 * out what no mast height changes (ground, code, relief, slope, height to see): another effective earth has no use for it.
 */
export function* sweep(
  g: Ground,
  site: Site,
  heightsM: readonly number[],
  grid: PolarShape,
  earth: Earth,
  options: SweepOptions = {},
): Work<{ site: SiteCells; masks: SightCells[] }> {
  const { azimuths, ranges } = grid
  const cuts = uniformCuts(ranges, grid.rangeStepM)
  const r = makeRunner(g, site, ranges * grid.rangeStepM, 0, grid.azimuthStepDeg)
  const track = r.tracer.track
  const p = makeCellProfile(track.surface.length, ranges)
  const hull = options.heightToSee === false || options.sightOnly ? null : makeHull(track.surface.length, ranges)
  const cells = options.sightOnly ? 0 : azimuths * ranges
  const siteCells = {
    kind: 'site' as const,
    version: 1 as const,
    key: options.keys?.site ?? '',
    grid,
    groundM: new Float32Array(cells),
    code: new Uint8Array(cells),
    relief: new Uint8Array(cells),
    slopePermille: new Int16Array(cells),
    heightToSeeM: new Float32Array(hull ? cells : 0),
    siteGroundM: r.siteGroundM,
    effectiveRadiusM: new Float64Array(azimuths),
  }
  const masks = heightsM.map((heightM, h) => makeSight(grid, heightM, options.keys?.masks?.[h] ?? ''))
  const ascending = [...masks].sort((a, b) => a.heightM - b.heightM)
  const centres = Float64Array.from({ length: ranges }, (_, j) => (j + 0.5) * grid.rangeStepM)
  const groundM = new Float64Array(ranges)
  const slope = new Float64Array(ranges)
  const whole = new Uint8Array(ranges)
  let points = 0
  for (let i = 0; i < azimuths; i++) {
    const azimuthDeg = i * grid.azimuthStepDeg
    const offset = i * ranges
    r.tracer.trace(azimuthDeg)
    setEarth(r, earth, azimuthDeg)
    siteCells.effectiveRadiusM[i] = r.effectiveRadiusM
    fillCells(track, r.inverse, cuts, p)
    const { known } = p
    if (!options.sightOnly) writeSite(known, offset)
    const unknownState = track.unknownWhy === 'void' ? CELL.beyondVoid : CELL.outside
    whole.fill(0)
    for (const mask of ascending) {
      setAntenna(r, mask.heightM)
      sightPass(r, p, cuts, whole, r.run.end, mask, offset)
      markUnknown(mask, offset + known, offset + ranges, unknownState)
      mask.horizon.push(horizonRow(r, azimuthDeg, r.siteGroundM + mask.heightM, r.run.end[RUN.tangent], r.run.end[RUN.controlX]))
    }
    points += p.count * (2 + 0.3 * masks.length)
    if (points > POINTS_PER_TURN) {
      points = 0
      yield { done: i + 1, total: azimuths }
    }
  }
  return { site: siteCells, masks }

  function writeSite(known: number, offset: number): void {
    if (track.ground === track.surface) groundOfCells(p, siteCells, offset)
    else {
      cutGround(track.ground, centres, known, groundM, slope)
      writeGround(groundM, slope, known, siteCells, offset)
    }
    r.tracer.sampleCells(centres, known, siteCells.code, siteCells.relief, offset)
    if (hull) heightsToSee(p, cuts, r.siteGroundM, r.inverse, g.postingM, hull, siteCells.heightToSeeM, offset)
    siteCells.groundM.fill(Number.NaN, offset + known, offset + ranges)
    siteCells.code.fill(255, offset + known, offset + ranges)
    siteCells.relief.fill(RELIEF.unknown, offset + known, offset + ranges)
    if (hull) siteCells.heightToSeeM.fill(Number.NaN, offset + known, offset + ranges)
  }
}

/** Ground at the cell centres where it is the surface. */
function groundOfCells(p: CellProfile, out: GroundCells, offset: number): void {
  const { cell, known } = p
  const { groundM, slopePermille } = out
  for (let j = 0; j < known; j++) {
    groundM[offset + j] = cell[3 * j]
    slopePermille[offset + j] = packSlope(cell[3 * j + 1])
  }
}
/** Empty result of one height. */
export const makeSight = (grid: PolarShape, heightM: number, key: string) => {
  const cells = grid.azimuths * grid.ranges
  return {
    kind: 'sight' as const,
    version: 1 as const,
    key,
    grid,
    heightM,
    state: new Uint8Array(cells),
    inSight: new Uint16Array(cells),
    floorM: new Float32Array(cells),
    floorBandM: new Float32Array(cells),
    horizon: [] as HorizonRow[],
  }
}
/** Cells past the end of what is known: no floor, nothing in sight. */
export function markUnknown(out: SeenCells, from: number, to: number, state: number): void {
  out.state.fill(state, from, to)
  out.inSight.fill(0, from, to)
  out.floorM.fill(Number.NaN, from, to)
  out.floorBandM.fill(Number.NaN, from, to)
}
