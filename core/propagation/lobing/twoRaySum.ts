import { RAD_PER_DEG } from '../../units/index.ts'
import type { ReflectionPoint } from '../twoRay.ts'
import { reflectionPoint } from '../twoRay.ts'
import { type ReflectionTable, tablePlace } from './reflectingSurface.ts'

/** Power of the two rays together is held over this share of the direct one: a perfect null has no level of its own. */
const LEAST_POWER = 1e-6
/** Stands for a flat earth, m. */
const FLAT_RADIUS_M = 1e10

/** Tables of the surfaces by REFLECTS; the first is not used. */
export type ReflectionTables = readonly [none: null, open: ReflectionTable, water: ReflectionTable]

/**
 * Reflection off a level surface (m MSL) on the way from an antenna to a target (m MSL) at a ground range (m); `c` = 1 / effective earth radius, 0 =
 * flat. null where either end lies under the surface's own horizon. Path difference exact for straight rays over the tangent plane at the point.
 * Source: Kerr, Propagation of Short Radio Waves (1951); mathematics.
 */
export function pointOnSurface(antennaM: number, targetM: number, surfaceM: number, rangeM: number, c: number): ReflectionPoint | null {
  if (!(antennaM > surfaceM) || !(targetM > surfaceM)) return null
  const p = reflectionPoint(antennaM - surfaceM, targetM - surfaceM, rangeM, Math.min(1 / c, FLAT_RADIUS_M))
  const [h1, h2] = p.effectiveM
  if (!(h1 > 0) || !(h2 > 0)) return null
  return { ...p, pathDifferenceM: (4 * h1 * h2) / (Math.hypot(rangeM, h1 + h2) + Math.hypot(rangeM, h1 - h2)) }
}

/** Tangent of the elevation, at the antenna, of the ray to a point on a surface (m MSL); negative: below the horizontal. */
export const tangentToPoint = (p: ReflectionPoint, antennaM: number, surfaceM: number, c: number): number =>
  (surfaceM - antennaM) / p.distanceM - (p.distanceM * c) / 2

/**
 * F² of direct and reflected ray together: |1 + ρ D g e^{j(φ − 2πδ/λ)}|², never under 1e-6. `patternRatio`: field of the antenna toward the point over
 * that toward the target. Mathematics.
 */
export function twoRayPower(p: ReflectionPoint, table: ReflectionTable, wavelengthM: number, patternRatio: number): number {
  const x = tablePlace(Math.tan(p.grazingDeg * RAD_PER_DEG))
  const n = x | 0
  const re = table.real[n] + (x - n) * (table.real[n + 1] - table.real[n])
  const im = table.imaginary[n] + (x - n) * (table.imaginary[n + 1] - table.imaginary[n])
  const theta = (2 * Math.PI * p.pathDifferenceM) / wavelengthM
  const size = p.divergence * patternRatio
  const power = 1 + 2 * size * (re * Math.cos(theta) + im * Math.sin(theta)) + size * size * (re * re + im * im)
  return power > LEAST_POWER ? power : LEAST_POWER
}
