import { DEG_PER_RAD, toDb } from '../units/index.ts'

/** Geometry of the ray reflected off a smooth sphere between two heights above it. */
export interface ReflectionPoint {
  /** Ground range from the first end, m. */
  readonly distanceM: number
  /** Heights over the tangent plane at the point, m. */
  readonly effectiveM: readonly [number, number]
  readonly grazingDeg: number
  readonly divergence: number
  readonly pathDifferenceM: number
}

/**
 * Where the ray from h₁ (m) reaches h₂ (m) at a ground range (m) by one reflection off a smooth sphere of effective radius (m). Valid in
 * sight of each other and above a grazing angle of about (λ/2πa_e)^⅓. Source: Kerr, Propagation of Short Radio Waves (1951); mathematics.
 */
export function reflectionPoint(firstM: number, secondM: number, rangeM: number, effectiveRadiusM: number): ReflectionPoint {
  const p = (2 / Math.sqrt(3)) * Math.sqrt(effectiveRadiusM * (firstM + secondM) + (rangeM / 2) ** 2)
  const xi = Math.asin(Math.min(1, Math.max(-1, (2 * effectiveRadiusM * rangeM * (secondM - firstM)) / p ** 3)))
  const d1 = rangeM / 2 - p * Math.sin(xi / 3)
  const d2 = rangeM - d1
  const h1 = firstM - d1 ** 2 / (2 * effectiveRadiusM)
  const h2 = secondM - d2 ** 2 / (2 * effectiveRadiusM)
  const tan = (h1 + h2) / rangeM
  return {
    distanceM: d1,
    effectiveM: [h1, h2],
    grazingDeg: Math.atan(tan) * DEG_PER_RAD,
    divergence: 1 / Math.sqrt(1 + (2 * d1 * d2) / (effectiveRadiusM * rangeM * tan)),
    pathDifferenceM: (2 * h1 * h2) / rangeM,
  }
}

/**
 * Propagation factor F of direct and reflected ray together, as a field ratio: |1 + ρ D g e^{j(φ − 2πδ/λ)}|, ρ and φ the reflection
 * coefficient, g the pattern of the reflected ray over the direct one. Mathematics.
 */
export function twoRayFactor(p: ReflectionPoint, wavelengthM: number, magnitude: number, phaseDeg: number, patternRatio = 1): number {
  const size = magnitude * p.divergence * patternRatio
  const phase = phaseDeg / DEG_PER_RAD - (2 * Math.PI * p.pathDifferenceM) / wavelengthM
  return Math.hypot(1 + size * Math.cos(phase), size * Math.sin(phase))
}

/** Two-way F⁴, dB. */
export const fourthPowerDb = (factor: number): number => 2 * toDb(factor ** 2)
