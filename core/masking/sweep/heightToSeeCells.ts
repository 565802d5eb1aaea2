import type { Earth } from '../../geodesy/index.ts'
import type { PolarShape } from '../../polar/index.ts'
import type { Ground, Site } from '../../terrain/index.ts'
import type { Work } from '../../work/index.ts'
import { uniformCuts } from '../cells.ts'
import { makeRunner, setEarth } from '../plane/ray.ts'
import { fillCells, makeCellProfile } from './cellProfile.ts'
import { heightsToSee } from './heightLadder.ts'
import { makeHull } from './hull.ts'

const POINTS_PER_TURN = 60_000

/** SiteCells.heightToSeeM by itself, for a sweep that left it out: same rays, same numbers. NaN where the ground is not known. */
export function* heightToSeeCells(g: Ground, site: Site, grid: PolarShape, earth: Earth): Work<Float32Array> {
  const { azimuths, ranges } = grid
  const cuts = uniformCuts(ranges, grid.rangeStepM)
  const r = makeRunner(g, site, ranges * grid.rangeStepM, 0, grid.azimuthStepDeg)
  const { track } = r.tracer
  const p = makeCellProfile(track.surface.length, ranges)
  const hull = makeHull(track.surface.length, ranges)
  const out = new Float32Array(azimuths * ranges).fill(Number.NaN)
  let points = 0
  for (let i = 0; i < azimuths; i++) {
    const azimuthDeg = i * grid.azimuthStepDeg
    r.tracer.trace(azimuthDeg)
    setEarth(r, earth, azimuthDeg)
    fillCells(track, r.inverse, cuts, p)
    heightsToSee(p, cuts, r.siteGroundM, r.inverse, g.postingM, hull, out, i * ranges)
    points += 2 * p.count
    if (points > POINTS_PER_TURN) {
      points = 0
      yield { done: i + 1, total: azimuths }
    }
  }
  return out
}
