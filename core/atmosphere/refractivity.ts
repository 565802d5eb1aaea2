/** Saturation vapour pressure over water, hPa; −40 to +50 °C. Source: Recommendation ITU-R P.453-14, equations 9 and 10. */
export function saturationPressureHpa(temperatureC: number, pressureHpa: number): number {
  const t = temperatureC
  const enhancement = 1 + 1e-4 * (7.2 + pressureHpa * (0.032 + 5.9e-6 * t * t))
  return enhancement * 6.1121 * Math.exp(((18.678 - t / 234.5) * t) / (t + 257.14))
}

/** Vapour pressure, hPa, from relative humidity in %. */
export const vapourPressureHpa = (temperatureC: number, pressureHpa: number, relativeHumidityPct: number): number =>
  (relativeHumidityPct / 100) * saturationPressureHpa(temperatureC, pressureHpa)

/** Refractivity, N units, from dry-air and vapour pressure. Source: Recommendation ITU-R P.453-14, equation 6. */
export function refractivity(temperatureC: number, pressureHpa: number, relativeHumidityPct: number): number {
  const T = temperatureC + 273.15
  const e = vapourPressureHpa(temperatureC, pressureHpa, relativeHumidityPct)
  return (77.6 * (pressureHpa - e)) / T + (72 * e) / T + (3.75e5 * e) / (T * T)
}

/** The older short form 77.6/T·(P + 4810·e/T), N units: within 0.02 of `refractivity`. */
export function refractivityShortForm(temperatureC: number, pressureHpa: number, relativeHumidityPct: number): number {
  const T = temperatureC + 273.15
  return (77.6 / T) * (pressureHpa + (4810 * vapourPressureHpa(temperatureC, pressureHpa, relativeHumidityPct)) / T)
}

/** The gradient that bends a ray as the earth curves, N/km: 10⁶/a rounded as Recommendation ITU-R P.834 prints it. */
const DUCTING_GRADIENT_N_PER_KM = 157

/**
 * Effective-earth factor from the refractivity gradient near the ground, N/km: 157/(157 + dN/dh). null at and beyond the ducting limit
 * (−157 N/km), where the ray follows or dives below the curve of the earth and no factor exists. Source: Recommendation ITU-R P.834.
 */
export function effectiveEarthFactor(gradientNPerKm: number): number | null {
  const room = DUCTING_GRADIENT_N_PER_KM + gradientNPerKm
  return room > 1e-6 ? DUCTING_GRADIENT_N_PER_KM / room : null
}

/** Reference atmosphere N(h) = 315·exp(−h/7.35 km): surface value and scale height, from memory (Recommendation ITU-R P.453). */
export const REFERENCE_ATMOSPHERE = { surfaceN: 315, scaleHeightM: 7350 } as const
