import type { Earth } from '../../geodesy/index.ts'
import { CELL, type PolarShape } from '../../polar/index.ts'
import { type Ground, RELIEF, type Site, siteGround } from '../../terrain/index.ts'
import type { Work } from '../../work/index.ts'
import { type GroundCells, packSlope, type SeenCells, uniformCuts, writeGround } from '../cells.ts'
import { HORIZON_NUMBERS, writeHorizon } from '../horizon.ts'
import { cutGround } from '../plane/profile.ts'
import { makeRunner, setAntenna, setEarth } from '../plane/ray.ts'
import { RUN } from '../plane/sightRun.ts'
import type { SightCells, SiteCells } from '../types.ts'
import { type CellProfile, fillCells, makeCellProfile } from './cellProfile.ts'
import { heightsToSee } from './heightLadder.ts'
import { makeHull } from './hull.ts'
import { sightPass } from './sightPass.ts'
import { makeSweepArrays, type SweepArrays, type SweepOptions, sweepResult } from './sweepArrays.ts'

/** About this many points of rays are run between two yields: a few milliseconds. */
const POINTS_PER_TURN = 60_000
/** Azimuths taken at a time: neighbours share what they read of the ground. */
const AZIMUTHS_PER_TURN = 8

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
  const helpers = options.helpers?.canShare(g) ? options.helpers : null
  const arrays = makeSweepArrays(grid, heightsM, options, helpers !== null)
  helpers?.begin(g, site, earth, arrays)
  yield* sweepShare(g, site, earth, arrays)
  for (;;) {
    const finished = Atomics.load(arrays.finished, 0)
    if (finished === grid.azimuths) break
    if (Atomics.load(arrays.finished, 1) > 0) throw new Error('a sweep helper failed')
    // the last azimuths are in a helper's hands: its core is not taken away by asking
    Atomics.wait(arrays.finished, 0, finished, 1)
    yield { done: grid.azimuths, total: grid.azimuths }
  }
  return sweepResult(arrays, siteGround(g, site), g.obstacles, options)
}

/**
 * One thread's share of a sweep: takes azimuths nobody has taken yet and fills their part of the arrays, until there are none. Alone it does the whole
 * sweep; with helpers on the same shared arrays (makeSweepArrays with `shared`, heights of the ground shared too) each does what it gets to, and the
 * numbers are the same. The sweep is done when all azimuths are `finished`; `sweepResult` then makes its result.
 */
export function* sweepShare(g: Ground, site: Site, earth: Earth, a: SweepArrays): Work<void> {
  const { grid } = a
  const { azimuths, ranges } = grid
  const cuts = uniformCuts(ranges, grid.rangeStepM)
  const r = makeRunner(g, site, ranges * grid.rangeStepM, 0, grid.azimuthStepDeg)
  const track = r.tracer.track
  const p = makeCellProfile(track.surface.length, ranges)
  const hull = a.heightToSeeM.length > 0 ? makeHull(track.surface.length, ranges) : null
  const withSite = a.groundM.length > 0
  const ascending = [...a.masks].sort((m, n) => m.heightM - n.heightM)
  const centres = Float64Array.from({ length: ranges }, (_, j) => (j + 0.5) * grid.rangeStepM)
  const groundM = new Float64Array(ranges)
  const slope = new Float64Array(ranges)
  const whole = new Uint8Array(ranges)
  let points = 0
  for (let first = take(a); first < azimuths; first = take(a)) {
    for (let i = first; i < Math.min(first + AZIMUTHS_PER_TURN, azimuths); i++) {
      const azimuthDeg = i * grid.azimuthStepDeg
      const offset = i * ranges
      r.tracer.trace(azimuthDeg)
      setEarth(r, earth, azimuthDeg)
      a.effectiveRadiusM[i] = r.effectiveRadiusM
      fillCells(track, r.inverse, cuts, p)
      const from = offset + p.known
      const to = offset + ranges
      if (withSite) {
        if (track.ground === track.surface) groundOfCells(p, a, offset)
        else {
          cutGround(track.ground, centres, p.known, groundM, slope)
          writeGround(groundM, slope, p.known, a, offset)
        }
        r.tracer.sampleCells(centres, p.known, a.code, a.relief, offset)
        a.groundM.fill(Number.NaN, from, to)
        a.code.fill(255, from, to)
        a.relief.fill(RELIEF.unknown, from, to)
      }
      if (hull) {
        heightsToSee(p, cuts, r.siteGroundM, r.inverse, g.postingM, hull, a.heightToSeeM, offset)
        a.heightToSeeM.fill(Number.NaN, from, to)
      }
      const unknownState = track.unknownWhy === 'void' ? CELL.beyondVoid : CELL.outside
      whole.fill(0)
      for (const mask of ascending) {
        setAntenna(r, mask.heightM)
        sightPass(r, p, cuts, whole, r.run.end, mask, offset)
        markUnknown(mask, from, to, unknownState)
        const antennaM = r.siteGroundM + mask.heightM
        const tangent = r.run.end[RUN.tangent]
        const controlX = r.run.end[RUN.controlX]
        mask.horizonIs[i] = writeHorizon(r, azimuthDeg, antennaM, tangent, controlX, mask.horizon, HORIZON_NUMBERS * i)
      }
      points += p.count * (2 + 0.3 * a.masks.length)
    }
    Atomics.add(a.finished, 0, Math.min(AZIMUTHS_PER_TURN, azimuths - first))
    if (points > POINTS_PER_TURN) {
      points = 0
      yield { done: Math.min(first + AZIMUTHS_PER_TURN, azimuths), total: azimuths }
    }
  }
}
const take = (a: SweepArrays): number => Atomics.add(a.taken, 0, AZIMUTHS_PER_TURN)

/** Ground at the cell centres where it is the surface. */
function groundOfCells(p: CellProfile, out: GroundCells, offset: number): void {
  const { cell, known } = p
  const { groundM, slopePermille } = out
  for (let j = 0; j < known; j++) {
    groundM[offset + j] = cell[3 * j]
    slopePermille[offset + j] = packSlope(cell[3 * j + 1])
  }
}
/** Cells past the end of what is known: no floor, nothing in sight. */
export function markUnknown(out: SeenCells, from: number, to: number, state: number): void {
  out.state.fill(state, from, to)
  out.inSight.fill(0, from, to)
  out.floorM.fill(Number.NaN, from, to)
  out.floorBandM.fill(Number.NaN, from, to)
}
