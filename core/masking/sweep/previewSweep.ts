import type { Earth } from '../../geodesy/index.ts'
import type { PolarShape } from '../../polar/index.ts'
import { type Ground, type Site, siteGround } from '../../terrain/index.ts'
import { finish } from '../../work/index.ts'
import type { SightCells } from '../types.ts'
import { sweepShare } from './sweep.ts'
import { makeSweepArrays, sweepResult } from './sweepArrays.ts'

/**
 * Coarse picture of one height while a candidate is being moved: every n-th azimuth of the grid (the step is widened to a whole number of azimuths),
 * every crossing of each ray. Same cells as `sweep` on the coarse grid. Does not yield.
 */
export function previewSweep(g: Ground, site: Site, heightM: number, grid: PolarShape, earth: Earth, everyNth: number): SightCells {
  const azimuths = Math.max(1, Math.ceil(grid.azimuths / everyNth))
  const coarse: PolarShape = { ...grid, azimuths, azimuthStepDeg: 360 / azimuths }
  const options = { sightOnly: true, heightToSee: false }
  const arrays = makeSweepArrays(coarse, [heightM], options)
  finish(sweepShare(g, site, earth, arrays))
  return sweepResult(arrays, siteGround(g, site), g.obstacles, options).masks[0]
}
