import { RAD_PER_DEG, SPEED_OF_LIGHT_MS, toDb } from '../../units/index.ts'

/** Z = 200 R^1.6 (Marshall and Palmer, 1948) and |K|² of water. Rayleigh regime, up to about X band. */
const MARSHALL_PALMER = { a: 200, b: 1.6 } as const
const WATER_K2 = 0.93
export const RAIN_LIMITS = { frequencyGHz: { low: 0.1, high: 12 } } as const

/** Reflectivity factor Z, mm⁶/m³, of rain in mm/h. */
export const reflectivityFactor = (rainRateMmH: number): number => MARSHALL_PALMER.a * rainRateMmH ** MARSHALL_PALMER.b

/** Volume reflectivity η, m²/m³: π⁵|K|²Z·10⁻¹⁸/λ⁴ (Rayleigh scattering; mathematics on Marshall and Palmer's law). */
export function rainReflectivity(frequencyHz: number, rainRateMmH: number): number {
  const lambda = SPEED_OF_LIGHT_MS / frequencyHz
  return (Math.PI ** 5 * WATER_K2 * reflectivityFactor(rainRateMmH) * 1e-18) / lambda ** 4
}
export const rainReflectivityDb = (frequencyHz: number, rainRateMmH: number): number => toDb(rainReflectivity(frequencyHz, rainRateMmH))

/** Effective volume of a Gaussian beam and gate, m³: πR²θaθe·cτ/(16 ln 2). Source: Probert-Jones (1962). */
export const gaussianVolumeM3 = (rangeM: number, azimuthBeamwidthDeg: number, elevationBeamwidthDeg: number, pulseWidthS: number): number =>
  (Math.PI * rangeM * rangeM * azimuthBeamwidthDeg * RAD_PER_DEG * elevationBeamwidthDeg * RAD_PER_DEG * SPEED_OF_LIGHT_MS * pulseWidthS) /
  (16 * Math.LN2)
