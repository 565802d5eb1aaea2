import { type Earth, geodesicInverse, type LonLat } from '../geodesy/index.ts'
import type { Ground, Site } from '../terrain/index.ts'
import { lowestAntennaYOver } from './plane/heightToSee.ts'
import { makeCuts, straighten } from './plane/profile.ts'
import { setEarth } from './plane/ray.ts'
import { heightOfY, straightDrop, straightY } from './plane/straight.ts'
import { heldRunner } from './sightPoint.ts'

/** Which masts see the top of something at a place, at several effective earths on one tracing of its ray. */
export interface TopSight {
  /** Azimuth at the radar and, of the same ray, at the place, degrees true; ground range, m. */
  readonly azimuthDeg: number
  readonly azimuthAtPlaceDeg: number
  readonly rangeM: number
  /** Top, m MSL; NaN where the ground is not known. */
  readonly topM: number
  /**
   * Lowest electrical centre above the site's ground, m, from which the top is at or over the coverage floor, one per earth; Infinity where cover or an
   * obstacle at the place itself stands higher; NaN where the ground is not known.
   */
  readonly lowestMastM: readonly number[]
}

/** Sight of a point `aboveGroundM` over the ground of a place, whatever the mast: exact for the crossings of its own ray. */
export function topSight(g: Ground, site: Site, earths: readonly Earth[], at: LonLat, aboveGroundM: number): TopSight {
  const { azimuthDeg, distanceM: rangeM, azimuthAtToDeg: azimuthAtPlaceDeg } = geodesicInverse(site, at)
  const r = heldRunner(g, site, rangeM)
  const place = { azimuthDeg, azimuthAtPlaceDeg, rangeM }
  const unknown = { ...place, topM: Number.NaN, lowestMastM: earths.map(() => Number.NaN) }
  if (!(rangeM > 1e-3) || Number.isNaN(r.siteGroundM)) return unknown
  r.tracer.traceTo(azimuthDeg, rangeM)
  const cuts = makeCuts(Float64Array.of(rangeM))
  const lowestMastM: number[] = []
  let topM = Number.NaN
  for (const earth of earths) {
    setEarth(r, earth, azimuthDeg)
    straighten(r.tracer.track, r.inverse, cuts, r.profile)
    if (r.profile.cuts === 0) return unknown
    topM = r.profile.cutGroundM[0] + aboveGroundM
    if (r.profile.cutSurfaceM[0] > topM) lowestMastM.push(Number.POSITIVE_INFINITY)
    else {
      const topY = straightY(topM, straightDrop(rangeM, r.inverse), r.inverse)
      const antennaY = lowestAntennaYOver(r.profile, r.profile.cutPoint[0], topY)
      lowestMastM.push(Math.max(0, heightOfY(antennaY, 0, r.inverse) - r.siteGroundM))
    }
  }
  return { ...place, topM, lowestMastM }
}
