import { type Earth, elevationAngleDeg } from '../geodesy/index.ts'
import type { Ground, Site } from '../terrain/index.ts'
import { makeCuts } from './profile.ts'
import { controllingOf, makeRunner, type RayRunner, runRay } from './ray.ts'
import { RUN } from './sightRun.ts'
import type { HorizonRow } from './types.ts'

/** Said in place of the controlling point where the ray ends before what was asked. */
export const AT_LEAST_EDGE = 'at least: edge of terrain'
export const AT_LEAST_VOID = 'at least: void in terrain'

const NO_CUTS = makeCuts(new Float64Array(0))

/**
 * Horizon from one antenna height at chosen azimuths (degrees true), each on its own ray, to maxRangeM or the end of known ground. Exact geometry on the
 * effective sphere. Numbers are NaN where not even the ground at the mast is known.
 */
export function horizonAt(
  g: Ground,
  site: Site,
  heightM: number,
  earth: Earth,
  azimuthsDeg: readonly number[],
  maxRangeM: number,
): HorizonRow[] {
  const r = makeRunner(g, site, maxRangeM, 0)
  return azimuthsDeg.map((azimuthDeg) => {
    r.tracer.trace(azimuthDeg)
    runRay(r, earth, azimuthDeg, heightM, NO_CUTS)
    return horizonRow(r, azimuthDeg, r.siteGroundM + heightM, r.run.end[RUN.tangent], r.run.end[RUN.controlX])
  })
}

/** The row of the ray just run, from its highest line. */
export function horizonRow(r: RayRunner, azimuthDeg: number, antennaM: number, tangent: number, controlX: number): HorizonRow {
  const t = r.tracer.track
  const why = t.unknownWhy === 'edge' ? AT_LEAST_EDGE : t.unknownWhy === 'void' ? AT_LEAST_VOID : null
  if (!(controlX > 0)) {
    const none = Number.NaN
    return { azimuthDeg, elevationDeg: none, rangeM: none, heightM: none, lon: none, lat: none, obstacle: why ?? 'terrain' }
  }
  const c = controllingOf(r, tangent, controlX)
  const place = r.tracer.place(c.rangeM, azimuthDeg)
  return {
    azimuthDeg,
    elevationDeg: elevationAngleDeg(antennaM, c.heightM, c.rangeM, r.effectiveRadiusM),
    rangeM: c.rangeM,
    heightM: c.heightM,
    lon: place.lon,
    lat: place.lat,
    obstacle: why ?? c.obstacle,
  }
}
