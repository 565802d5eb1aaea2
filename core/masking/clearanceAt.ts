import { type Earth, geodesicInverse, type LonLat } from '../geodesy/index.ts'
import type { Ground, Site } from '../terrain/index.ts'
import { makeCuts } from './plane/profile.ts'
import { heightOnLine, runRay } from './plane/ray.ts'
import { heldRunner } from './sightPoint.ts'

/** The coverage floor over one place from one antenna, at several effective earths on one tracing of its ray. */
export interface Clearance {
  /** Azimuth at the radar and, of the same ray, at the place, degrees true; ground range, m. */
  readonly azimuthDeg: number
  readonly azimuthAtPlaceDeg: number
  readonly rangeM: number
  /** Ground at the place and height of the antenna, m MSL; NaN where the ground is not known. */
  readonly groundM: number
  readonly antennaM: number
  /** Coverage floor by earth, m MSL; NaN where the ground is not known. */
  readonly floorsM: readonly number[]
}

/**
 * Coverage floor (m MSL, the higher of the horizon so far and the surface) over a place from an antenna `heightM` above the site's ground, one per earth:
 * the numbers of `sightPoint` without its height to see, its controlling obstacle and a second tracing. Exact geometry on the effective sphere.
 */
export function clearanceAt(g: Ground, site: Site, heightM: number, earths: readonly Earth[], at: LonLat): Clearance {
  const { azimuthDeg, distanceM: rangeM, azimuthAtToDeg: azimuthAtPlaceDeg } = geodesicInverse(site, at)
  const r = heldRunner(g, site, rangeM)
  const place = { azimuthDeg, azimuthAtPlaceDeg, rangeM, antennaM: r.siteGroundM + heightM }
  const unknown = { ...place, groundM: Number.NaN, floorsM: earths.map(() => Number.NaN) }
  if (!(rangeM > 1e-3)) return unknown
  r.tracer.traceTo(azimuthDeg, rangeM)
  const cuts = makeCuts(Float64Array.of(rangeM))
  const floorsM: number[] = []
  for (const earth of earths) {
    runRay(r, earth, azimuthDeg, heightM, cuts)
    if (r.profile.cuts === 0 || Number.isNaN(r.siteGroundM)) return unknown
    floorsM.push(Math.max(r.profile.cutSurfaceM[0], heightOnLine(r.antennaY, r.run.tangent[0], rangeM, r.inverse)))
  }
  return { ...place, groundM: r.profile.cutGroundM[0], floorsM }
}
