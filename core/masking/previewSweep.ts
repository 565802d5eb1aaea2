import type { Earth } from '../geodesy/index.ts'
import type { PolarShape } from '../polar/index.ts'
import { CELL } from '../polar/index.ts'
import type { Ground, Site } from '../terrain/index.ts'
import { uniformCuts, writeSeen } from './cells.ts'
import { horizonRow } from './horizon.ts'
import { makeRunner, runRay } from './ray.ts'
import type { HorizonRow, SightCells } from './types.ts'

/**
 * Coarse picture of one height while a candidate is being moved: every n-th azimuth of the grid (the step is widened to a whole number of azimuths),
 * every crossing of each ray. Same cells as `sweep` on the coarse grid. Does not yield.
 */
export function previewSweep(g: Ground, site: Site, heightM: number, grid: PolarShape, earth: Earth, everyNth: number): SightCells {
  const azimuths = Math.max(1, Math.ceil(grid.azimuths / everyNth))
  const coarse: PolarShape = { ...grid, azimuths, azimuthStepDeg: 360 / azimuths }
  const { ranges } = grid
  const cuts = uniformCuts(ranges, grid.rangeStepM)
  const r = makeRunner(g, site, ranges * grid.rangeStepM, cuts.cutM.length, coarse.azimuthStepDeg)
  const cells = azimuths * ranges
  const mask = {
    kind: 'sight' as const,
    version: 1 as const,
    key: '',
    grid: coarse,
    heightM,
    state: new Uint8Array(cells),
    inSight: new Uint16Array(cells),
    floorM: new Float32Array(cells),
    floorBandM: new Float32Array(cells),
    horizon: [] as HorizonRow[],
  }
  for (let i = 0; i < azimuths; i++) {
    const azimuthDeg = i * coarse.azimuthStepDeg
    r.tracer.trace(azimuthDeg)
    runRay(r, earth, azimuthDeg, heightM, cuts.cutM)
    writeSeen(r, r.run, cuts, mask, i * ranges, r.tracer.track.unknownWhy === 'void' ? CELL.beyondVoid : CELL.outside)
    mask.horizon.push(horizonRow(r, azimuthDeg, r.siteGroundM + heightM, r.run.endTangent, r.run.endControlX))
  }
  return mask
}
