import { type Earth, elevationAngleDeg } from '../geodesy/index.ts'
import type { Ground, Site } from '../terrain/index.ts'
import { HORIZON_IS, horizonName } from './horizonIs.ts'
import { makeCuts } from './plane/profile.ts'
import { controllingOf, makeRunner, type RayRunner, runRay } from './plane/ray.ts'
import { RUN } from './plane/sightRun.ts'
import type { HorizonRow } from './types.ts'

/** Numbers of one horizon in a row of them: elevation (deg), range and height (m), longitude and latitude of the controlling point. */
export const HORIZON_NUMBERS = 5

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
  const numbers = new Float64Array(HORIZON_NUMBERS)
  return azimuthsDeg.map((azimuthDeg) => {
    r.tracer.trace(azimuthDeg)
    runRay(r, earth, azimuthDeg, heightM, NO_CUTS)
    const is = writeHorizon(r, azimuthDeg, r.siteGroundM + heightM, r.run.end[RUN.tangent], r.run.end[RUN.controlX], numbers, 0)
    return horizonOf(azimuthDeg, numbers, 0, is, g.obstacles)
  })
}

/** Writes the horizon of the ray just run, from its highest line, at `at`; returns what it is. */
export function writeHorizon(
  r: RayRunner,
  azimuthDeg: number,
  antennaM: number,
  tangent: number,
  controlX: number,
  numbers: Float64Array,
  at: number,
): number {
  const why = r.tracer.track.unknownWhy
  const ended = why === 'edge' ? HORIZON_IS.edge : why === 'void' ? HORIZON_IS.void : null
  if (!(controlX > 0)) {
    numbers.fill(Number.NaN, at, at + HORIZON_NUMBERS)
    return ended ?? HORIZON_IS.terrain
  }
  const c = controllingOf(r, tangent, controlX)
  const place = r.tracer.place(c.rangeM, azimuthDeg)
  numbers[at] = elevationAngleDeg(antennaM, c.heightM, c.rangeM, r.effectiveRadiusM)
  numbers[at + 1] = c.rangeM
  numbers[at + 2] = c.heightM
  numbers[at + 3] = place.lon
  numbers[at + 4] = place.lat
  return ended ?? c.is
}
/** The row of those numbers. */
export const horizonOf = (
  azimuthDeg: number,
  numbers: Float64Array,
  at: number,
  is: number,
  obstacles: readonly { readonly name: string }[],
): HorizonRow => ({
  azimuthDeg,
  elevationDeg: numbers[at],
  rangeM: numbers[at + 1],
  heightM: numbers[at + 2],
  lon: numbers[at + 3],
  lat: numbers[at + 4],
  obstacle: horizonName(is, obstacles),
})
