import { effectiveEarthFactor, REFERENCE_ATMOSPHERE, refractivity } from './refractivity.ts'

export interface AirAtGround {
  readonly temperatureC: number
  readonly pressureHpa: number
  readonly relativeHumidityPct: number
}
export interface EarthFactorOfAir {
  /** Refractivity at the ground, N units. */
  readonly surfaceN: number
  /** Its gradient just above the ground, N/km. */
  readonly gradientNPerKm: number
  /** null where no factor exists (ducting). */
  readonly effectiveEarthFactor: number | null
}
/**
 * Effective-earth factor of an exponential atmosphere with the refractivity that the air at the ground has: gradient −N/7.35 km at the ground.
 * Valid where the air is well mixed; −40 to +50 °C. Sources: Recommendation ITU-R P.453-14 (N from temperature, pressure, humidity), scale
 * height from memory of the same, ITU-R P.834 (factor from the gradient).
 */
export function earthFactorOfAir({ temperatureC, pressureHpa, relativeHumidityPct }: AirAtGround): EarthFactorOfAir {
  const surfaceN = refractivity(temperatureC, pressureHpa, relativeHumidityPct)
  const gradientNPerKm = (-1000 * surfaceN) / REFERENCE_ATMOSPHERE.scaleHeightM
  return { surfaceN, gradientNPerKm, effectiveEarthFactor: effectiveEarthFactor(gradientNPerKm) }
}
