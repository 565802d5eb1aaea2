import { RAD_PER_DEG } from '../units/index.ts'
import { ALPHA_HORIZONTAL, ALPHA_VERTICAL, K_HORIZONTAL, K_VERTICAL, type RainCoefficients } from './rainCoefficients.ts'

export const RAIN_LOSS_LIMITS = { frequencyGHz: { low: 1, high: 1000 } } as const
export interface RainLaw {
  readonly k: number
  readonly alpha: number
}

const fitted = (logF: number, q: RainCoefficients): number =>
  q.a.reduce((sum, a, j) => sum + a * Math.exp(-(((logF - q.b[j]) / q.c[j]) ** 2)), 0) + q.m * logF + q.c0

/** k and α for horizontal and vertical polarisation at 1 to 1000 GHz. Source: Recommendation ITU-R P.838-3, equations 2 and 3. */
export function rainLaws(frequencyGHz: number): { horizontal: RainLaw; vertical: RainLaw } {
  const logF = Math.log10(frequencyGHz)
  return {
    horizontal: { k: 10 ** fitted(logF, K_HORIZONTAL), alpha: fitted(logF, ALPHA_HORIZONTAL) },
    vertical: { k: 10 ** fitted(logF, K_VERTICAL), alpha: fitted(logF, ALPHA_VERTICAL) },
  }
}

/** k and α for a path elevation and a polarisation tilt (0 horizontal, 90 vertical, 45 circular). Source: P.838-3, equations 4 and 5. */
export function rainLaw(frequencyGHz: number, elevationDeg: number, polarisationTiltDeg: number): RainLaw {
  const { horizontal: h, vertical: v } = rainLaws(frequencyGHz)
  const mix = Math.cos(elevationDeg * RAD_PER_DEG) ** 2 * Math.cos(2 * polarisationTiltDeg * RAD_PER_DEG)
  const k = (h.k + v.k + (h.k - v.k) * mix) / 2
  return { k, alpha: (h.k * h.alpha + v.k * v.alpha + (h.k * h.alpha - v.k * v.alpha) * mix) / (2 * k) }
}

/** Specific attenuation by rain, one way, dB/km: k·R^α, rain rate in mm/h; 0 without rain. */
export const rainLossDbKm = (law: RainLaw, rainRateMmH: number): number => (rainRateMmH > 0 ? law.k * rainRateMmH ** law.alpha : 0)
