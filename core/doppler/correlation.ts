import { MPH_PER_MS } from '../units/index.ts'

/** Correlation of clutter between two looks a time t (s) apart: 1 at 0. */
export type Correlation = (timeS: number) => number

/** Gaussian velocity spectrum of spread σ_v (m/s): exp[−8(πσ_v t/λ)²]; times cos(4πv̄t/λ) for a mean velocity. Mathematics. */
export function gaussianCorrelation(spreadMs: number, wavelengthM: number, meanMs = 0): Correlation {
  const a = 8 * ((Math.PI * spreadMs) / wavelengthM) ** 2
  const b = (4 * Math.PI * meanMs) / wavelengthM
  return (t) => Math.exp(-a * t * t) * (b === 0 ? 1 : Math.cos(b * t))
}

/** Spread of the spectrum that scanning a Gaussian two-way beam gives, over the PRF: √ln2/(π n), n hits in the one-way half-power width. Mathematics. */
export const scanningSpreadOverPrf = (hits: number): number => Math.sqrt(Math.LN2) / Math.PI / hits

/** Correlation between pulses of a scanning Gaussian beam. */
export function scanningCorrelation(hits: number, prfHz: number): Correlation {
  const sigmaHz = scanningSpreadOverPrf(hits) * prfHz
  return (t) => Math.exp(-2 * (Math.PI * sigmaHz * t) ** 2)
}

/** Where the vegetation spectrum holds. Below 1 mph of wind the 1 mph values are held. */
export const VEGETATION_LIMITS = { windMs: { low: 1 / MPH_PER_MS, high: 60 / MPH_PER_MS }, frequencyHz: { low: 30e6, high: 12e9 } } as const

/** Fixed-to-moving power ratio r and slope β (s/m) of the spectrum of wind-blown vegetation. */
export interface VegetationSpectrum {
  readonly fixedOverMoving: number
  readonly slopeSPerM: number
}
/**
 * Wind-blown vegetation: r = 489.8 w^−1.55 f^−1.21, 1/β = 0.1048(log w + 0.4147), w in statute mph, f in GHz. Source: Billingsley,
 * Low-Angle Radar Land Clutter (2002), from memory, corroborated by one reprint.
 */
export function vegetationSpectrum(windMs: number, frequencyHz: number): VegetationSpectrum {
  const mph = Math.max(1, windMs * MPH_PER_MS)
  return {
    fixedOverMoving: 489.8 * mph ** -1.55 * (frequencyHz / 1e9) ** -1.21,
    slopeSPerM: 1 / (0.1048 * (Math.log10(mph) + 0.4147)),
  }
}
/** σ_v of the moving part alone, m/s: √2/β. Mathematics. */
export const movingSpreadMs = (v: VegetationSpectrum): number => Math.SQRT2 / v.slopeSPerM

/** Correlation of a fixed part and a two-sided exponential one: r/(1+r) + 1/(1+r) · 1/(1 + (4πt/βλ)²). Mathematics. */
export function vegetationCorrelation(v: VegetationSpectrum, wavelengthM: number): Correlation {
  const fixed = v.fixedOverMoving / (1 + v.fixedOverMoving)
  const a = (4 * Math.PI) / (v.slopeSPerM * wavelengthM)
  return (t) => fixed + (1 - fixed) / (1 + (a * t) ** 2)
}

/** One correlation times another: independent causes of spread. */
export const bothCorrelations =
  (a: Correlation, b: Correlation): Correlation =>
  (t) =>
    a(t) * b(t)

/** Spread of rain echoes, m/s. Source: Nathanson, Radar Design Principles, from memory; shear part capped at 6 m/s. */
export function rainSpreadMs(
  rangeM: number,
  elevationBeamwidthDeg: number,
  shearMsPerKm = 4,
  turbulenceMs = 1,
): { shearMs: number; totalMs: number } {
  const shearMs = Math.min(6, 0.42 * shearMsPerKm * (rangeM / 1000) * ((elevationBeamwidthDeg * Math.PI) / 180))
  return { shearMs, totalMs: Math.hypot(shearMs, turbulenceMs) }
}
