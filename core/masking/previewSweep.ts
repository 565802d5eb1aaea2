import type { Earth } from '../geodesy/index.ts'
import { CELL, type PolarShape } from '../polar/index.ts'
import type { Ground, Site } from '../terrain/index.ts'
import { fillCells, makeCellProfile } from './cellProfile.ts'
import { uniformCuts } from './cells.ts'
import { horizonRow } from './horizon.ts'
import { makeRunner, setAntenna, setEarth } from './ray.ts'
import { sightPass } from './sightPass.ts'
import { RUN } from './sightRun.ts'
import { makeSight, markUnknown } from './sweep.ts'
import type { SightCells } from './types.ts'

/**
 * Coarse picture of one height while a candidate is being moved: every n-th azimuth of the grid (the step is widened to a whole number of azimuths),
 * every crossing of each ray. Same cells as `sweep` on the coarse grid. Does not yield.
 */
export function previewSweep(g: Ground, site: Site, heightM: number, grid: PolarShape, earth: Earth, everyNth: number): SightCells {
  const azimuths = Math.max(1, Math.ceil(grid.azimuths / everyNth))
  const coarse: PolarShape = { ...grid, azimuths, azimuthStepDeg: 360 / azimuths }
  const { ranges } = grid
  const cuts = uniformCuts(ranges, grid.rangeStepM)
  const r = makeRunner(g, site, ranges * grid.rangeStepM, 0, coarse.azimuthStepDeg)
  const track = r.tracer.track
  const p = makeCellProfile(track.surface.length, ranges)
  const mask = makeSight(coarse, heightM, '')
  const whole = new Uint8Array(ranges)
  for (let i = 0; i < azimuths; i++) {
    const azimuthDeg = i * coarse.azimuthStepDeg
    const offset = i * ranges
    r.tracer.trace(azimuthDeg)
    setEarth(r, earth, azimuthDeg)
    fillCells(track, r.inverse, cuts, p)
    whole.fill(0)
    setAntenna(r, heightM)
    sightPass(r, p, cuts, whole, r.run.end, mask, offset)
    markUnknown(mask, offset + p.known, offset + ranges, track.unknownWhy === 'void' ? CELL.beyondVoid : CELL.outside)
    mask.horizon.push(horizonRow(r, azimuthDeg, r.siteGroundM + heightM, r.run.end[RUN.tangent], r.run.end[RUN.controlX]))
  }
  return mask
}
