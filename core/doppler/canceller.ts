import { toDb } from '../units/index.ts'
import type { Correlation } from './correlation.ts'

/** Binomial weights of an N-pulse canceller, N from 2 to 6: 1 −1; 1 −2 1; … */
export function cancellerWeights(pulses: number): number[] {
  if (!(Number.isInteger(pulses) && pulses >= 2 && pulses <= 6)) throw new RangeError(`canceller of ${pulses} pulses: expected 2 to 6`)
  let w = [1]
  for (let n = 1; n < pulses; n++) w = [...w, 0].map((x, i) => x - (i > 0 ? w[i - 1] : 0))
  return w
}

/** Improvement beyond which double precision has no say, dB. */
export const HIGHEST_IMPROVEMENT_DB = 140

/**
 * Improvement factor of an N-pulse binomial canceller at a constant interval, dB: noise gain over clutter gain, exact from the correlation.
 * At most HIGHEST_IMPROVEMENT_DB. Mathematics.
 */
export function cancellerImprovementDb(pulses: number, correlation: Correlation, intervalS: number): number {
  const w = cancellerWeights(pulses)
  const noise = w.reduce((s, x) => s + x * x, 0)
  // Σ wᵢwⱼ ρ(i−j) = −Σ wᵢwⱼ (1 − ρ(i−j)), since the weights sum to 0
  let clutter = 0
  for (let lag = 1; lag < pulses; lag++) {
    let c = 0
    for (let i = 0; i + lag < pulses; i++) c += w[i] * w[i + lag]
    clutter -= 2 * c * (1 - correlation(lag * intervalS))
  }
  return clutter > noise * 10 ** (-HIGHEST_IMPROVEMENT_DB / 10)
    ? Math.min(HIGHEST_IMPROVEMENT_DB, toDb(noise / clutter))
    : HIGHEST_IMPROVEMENT_DB
}

/** Small-spread limit of a Gaussian spectrum: I₂ = 2u², I₃ = 2u⁴, I₄ = 4/3 u⁶ with u = PRF/(2πσ_f), dB. Mathematics. */
export function smallSpreadImprovementDb(pulses: 2 | 3 | 4, sigmaOverPrf: number): number {
  const u = 1 / (2 * Math.PI * sigmaOverPrf)
  return toDb([2 * u ** 2, 2 * u ** 4, (4 / 3) * u ** 6][pulses - 2])
}

/** Share of noise samples that stay independent after an N-pulse canceller, for integration: 1, 0.667, 0.514, 0.433 for 1 to 4 pulses. From memory. */
export const INDEPENDENT_SHARE = [1, 0.667, 0.514, 0.433] as const

/**
 * Power response of a canceller to a radial velocity, relative to its mean over velocity, for pulse intervals in order (repeated as needed);
 * several PRFs in pulse stagger take every starting interval. Mathematics.
 */
export function cancellerResponse(pulses: number, intervalsS: readonly number[], velocityMs: number, wavelengthM: number): number {
  const w = cancellerWeights(pulses)
  const noise = w.reduce((s, x) => s + x * x, 0)
  let sum = 0
  for (let start = 0; start < intervalsS.length; start++) {
    let re = 0
    let im = 0
    let t = 0
    for (let i = 0; i < pulses; i++) {
      const phase = (4 * Math.PI * velocityMs * t) / wavelengthM
      re += w[i] * Math.cos(phase)
      im += w[i] * Math.sin(phase)
      t += intervalsS[(start + i) % intervalsS.length]
    }
    sum += (re * re + im * im) / noise
  }
  return sum / intervalsS.length
}
