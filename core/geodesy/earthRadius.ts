import { RAD_PER_DEG } from '../units/index.ts'
import type { Earth } from './types.ts'

/** WGS 84 ellipsoid (NIMA TR8350.2). */
export const WGS84_A_M = 6_378_137
export const WGS84_F = 1 / 298.257223563
const E2 = WGS84_F * (2 - WGS84_F)

/**
 * Radius of curvature of the WGS 84 ellipsoid along an azimuth (degrees) at a latitude (degrees), m: Euler's formula,
 * 1/R = cos²α/M + sin²α/N with M the meridian and N the prime-vertical radius. 6 335 439 m … 6 399 594 m.
 */
export function radiusOfCurvatureM(latDeg: number, azimuthDeg: number): number {
  const s = Math.sin(latDeg * RAD_PER_DEG)
  const w2 = 1 - E2 * s * s
  const primeVertical = WGS84_A_M / Math.sqrt(w2)
  const meridian = (primeVertical * (1 - E2)) / w2
  const c = Math.cos(azimuthDeg * RAD_PER_DEG)
  return 1 / ((c * c) / meridian + (1 - c * c) / primeVertical)
}

/**
 * Radius of the sphere on which rays are straight, m: factor k times the stated radius, else times the radius of curvature along the azimuth.
 * k <= 0 or k > 10 means a flat earth (ducting sensitivity, not a prediction): Infinity.
 */
export function effectiveRadiusM(earth: Earth, latDeg: number, azimuthDeg: number): number {
  const k = earth.effectiveEarthFactor
  if (!(k > 0) || k > 10) return Number.POSITIVE_INFINITY
  return k * (earth.earthRadiusM ?? radiusOfCurvatureM(latDeg, azimuthDeg))
}
