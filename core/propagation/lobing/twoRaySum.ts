import type { ReflectingRay } from './reflectingRay.ts'
import { REFLECTS, type ReflectionTable, tablePlace } from './reflectingSurface.ts'

/** Power of the two rays together is held over this share of the direct one: a perfect null has no level of its own. */
const LEAST_POWER = 1e-6

/** Tables of the surfaces by REFLECTS; the first is not used. */
export type ReflectionTables = readonly [none: null, open: ReflectionTable, water: ReflectionTable]

/** Tangent of the elevation, at the antenna, of the ray to the point found last (negative: below the horizontal). */
export const tangentToPoint = (ray: ReflectingRay): number => (ray.atHeightM - ray.antennaM) / ray.atM - (ray.atM * ray.c) / 2

/**
 * F² of direct and reflected ray together toward a target (m MSL) at a ground range (m), by the point found last; 1 where there is none. `patternRatio`:
 * field of the antenna toward the point over that toward the target. Heights over the tangent plane at the point; path difference exact for
 * straight rays over that plane. Source: Kerr, Propagation of Short Radio Waves (1951); mathematics.
 */
export function twoRayPower(
  ray: ReflectingRay,
  rangeM: number,
  targetM: number,
  tables: ReflectionTables,
  wavelengthM: number,
  patternRatio: number,
): number {
  if (ray.atKind === REFLECTS.none) return 1
  const d1 = ray.atM
  const d2 = rangeM - d1
  const half = ray.c / 2
  const h1 = ray.antennaM - ray.atHeightM - d1 * d1 * half
  const h2 = targetM - ray.atHeightM - d2 * d2 * half
  if (!(h1 > 0) || !(h2 > 0)) return 1
  const tan = (h1 + h2) / rangeM
  const divergence = 1 / Math.sqrt(1 + (4 * half * d1 * d2) / (rangeM * tan))
  const up = h1 + h2
  const apart = h1 - h2
  const difference = (4 * h1 * h2) / (Math.sqrt(rangeM * rangeM + up * up) + Math.sqrt(rangeM * rangeM + apart * apart))
  const theta = (2 * Math.PI * difference) / wavelengthM
  const { real, imaginary } = tables[ray.atKind] as ReflectionTable
  const x = tablePlace(tan)
  const n = x | 0
  const re = real[n] + (x - n) * (real[n + 1] - real[n])
  const im = imaginary[n] + (x - n) * (imaginary[n + 1] - imaginary[n])
  const size = divergence * patternRatio
  const power = 1 + 2 * size * (re * Math.cos(theta) + im * Math.sin(theta)) + size * size * (re * re + im * im)
  return power > LEAST_POWER ? power : LEAST_POWER
}
