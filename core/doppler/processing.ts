import { hitsPerScan } from '../antenna/index.ts'
import type { RadarInput } from '../radar/index.ts'
import { toDb, wavelengthM } from '../units/index.ts'
import { cancellerResponse, cancellerWeights, HIGHEST_IMPROVEMENT_DB, INDEPENDENT_SHARE } from './canceller.ts'
import type { Correlation } from './correlation.ts'
import { clutterCovariance, windowWeights } from './filterBank.ts'

/** Pulses while the one-way half-power beam passes a point, at the slowest PRF of a dwell or the mean interval of a pulse stagger. */
export function hitsOf(r: RadarInput): number {
  const intervals = r.prfHz.map((f) => 1 / f)
  const intervalS = r.prfMode === 'pulseStagger' ? intervals.reduce((s, t) => s + t, 0) / intervals.length : Math.max(...intervals)
  return hitsPerScan(r.antenna.azimuthBeamwidthDeg, 1 / intervalS, r.rotationRpm)
}

/** Most pulses that detection is computed for. */
const MOST_PULSES = 10_000
/**
 * Pulses that count as independent in integration: hits × 1, 0.667, 0.514, 0.433 for cancellers of 1 to 4 pulses (from memory), hits / M for a
 * bank of M; from 1 to 10 000.
 */
export function integratedPulses(r: RadarInput): number {
  const { kind, pulses } = r.suppression
  const hits = hitsOf(r)
  const n = kind === 'canceller' ? hits * INDEPENDENT_SHARE[Math.min(4, pulses) - 1] : kind === 'filterBank' ? hits / pulses : hits
  return Math.min(MOST_PULSES, Math.max(1, n))
}

/**
 * Improvement factor of a binomial canceller whose pulses come at the intervals given, in order and repeated, dB: noise gain over clutter gain,
 * mean over every starting pulse. One interval: the canceller of `cancellerImprovementDb`. At most HIGHEST_IMPROVEMENT_DB. Mathematics.
 */
export function staggeredImprovementDb(pulses: number, correlation: Correlation, intervalsS: readonly number[]): number {
  const w = cancellerWeights(pulses)
  const noise = w.reduce((s, x) => s + x * x, 0)
  let clutter = 0
  for (let start = 0; start < intervalsS.length; start++) {
    const at = [0]
    for (let i = 1; i < pulses; i++) at.push(at[i - 1] + intervalsS[(start + i - 1) % intervalsS.length])
    // Σ wᵢwⱼ ρ = −Σ wᵢwⱼ (1 − ρ), since the weights sum to 0
    for (let i = 0; i < pulses; i++) for (let j = 0; j < i; j++) clutter -= 2 * w[i] * w[j] * (1 - correlation(at[i] - at[j]))
  }
  const left = clutter / intervalsS.length
  return left > noise * 10 ** (-HIGHEST_IMPROVEMENT_DB / 10) ? Math.min(HIGHEST_IMPROVEMENT_DB, toDb(noise / left)) : HIGHEST_IMPROVEMENT_DB
}

export type BankWindow = 'uniform' | 'hamming'
/** Velocities a bank is averaged over, per filter. */
const STEPS_PER_FILTER = 8

/** Best filter of a bank of M at a Doppler frequency (share of the PRF), against clutter of one correlation. */
export interface BankPoint {
  /** |wᴴs|²/(wᴴMw), ratio. */
  readonly improvement: number
  /** |wᴴs|²/(wᴴw), ratio. */
  readonly noiseGain: number
}

/** A bank of M filters at k/M of the PRF against one clutter correlation: `at(f)` gives the best filter there, the one with the most improvement. */
export function filterBank(window: BankWindow, pulses: number, correlation: Correlation, intervalS: number) {
  const m = clutterCovariance(pulses, (lag) => correlation(lag * intervalS), 10 ** (-HIGHEST_IMPROVEMENT_DB / 10))
  const taper = windowWeights(window, pulses)
  const noise = taper.reduce((s, x) => s + x * x, 0)
  // wᴴMw of filter k: the window's own autocorrelation against M, turned to k/M
  const clutter = Float64Array.from({ length: pulses }, (_, k) => {
    let sum = 0
    for (let i = 0; i < pulses; i++)
      for (let j = 0; j < pulses; j++) sum += taper[i] * taper[j] * m[i * pulses + j] * Math.cos((2 * Math.PI * k * (i - j)) / pulses)
    return Math.max(sum, noise * 10 ** (-HIGHEST_IMPROVEMENT_DB / 10))
  })
  const at = (frequencyOverPrf: number): BankPoint => {
    let best: BankPoint = { improvement: 0, noiseGain: 0 }
    for (let k = 0; k < pulses; k++) {
      let re = 0
      let im = 0
      for (let n = 0; n < pulses; n++) {
        const phase = 2 * Math.PI * n * (frequencyOverPrf - k / pulses)
        re += taper[n] * Math.cos(phase)
        im += taper[n] * Math.sin(phase)
      }
      const signal = re * re + im * im
      if (signal / clutter[k] > best.improvement) best = { improvement: signal / clutter[k], noiseGain: signal / noise }
    }
    return best
  }
  return { at, steps: pulses * STEPS_PER_FILTER }
}

/** Improvement factor of a bank, dB: mean over target velocities of what the best filter gives (the sense of IEEE 686). Mathematics. */
export function bankImprovementDb(window: BankWindow, pulses: number, correlation: Correlation, intervalS: number): number {
  const { at, steps } = filterBank(window, pulses, correlation, intervalS)
  let sum = 0
  for (let n = 0; n < steps; n++) sum += at(n / steps).improvement
  return Math.min(HIGHEST_IMPROVEMENT_DB, toDb(sum / steps))
}

/** Gain of one filter of a bank over white noise at its own frequency, ratio: M for a uniform window, less for a tapered one; 1 without a bank. */
export function processingGain(r: RadarInput): number {
  const { kind, pulses, window } = r.suppression
  if (kind !== 'filterBank') return 1
  const w = windowWeights(window ?? 'hamming', pulses)
  const sum = w.reduce((s, x) => s + x, 0)
  return (sum * sum) / w.reduce((s, x) => s + x * x, 0)
}

/**
 * Power response of the processing to a radial velocity, relative to its mean over velocity, ratio: the factor on the echo for a canceller, on
 * the improvement for a bank. Dwell stagger: the least of its PRFs, since each dwell has to see the target. 1 where suppression is stated or none.
 */
export function velocityResponse(r: RadarInput): (radialSpeedMs: number) => number {
  const lambda = wavelengthM(r.frequencyHz)
  const { kind, pulses, window } = r.suppression
  const intervals = r.prfHz.map((f) => 1 / f)
  if (kind === 'canceller' && pulses > 1) {
    if (r.prfMode === 'pulseStagger') return (v) => cancellerResponse(pulses, intervals, v, lambda)
    return (v) => intervals.reduce((least, t) => Math.min(least, cancellerResponse(pulses, [t], v, lambda)), Number.POSITIVE_INFINITY)
  }
  if (kind === 'filterBank') {
    const hits = hitsOf(r)
    const banks = intervals.map((t) => {
      const sigma = Math.sqrt(Math.LN2) / Math.PI / (hits * Math.max(...intervals))
      const bank = filterBank(window ?? 'hamming', pulses, (s) => Math.exp(-2 * (Math.PI * sigma * s) ** 2), t)
      let sum = 0
      for (let n = 0; n < bank.steps; n++) sum += bank.at(n / bank.steps).improvement
      return { t, at: bank.at, mean: sum / bank.steps }
    })
    return (v) => banks.reduce((least, b) => Math.min(least, b.at((2 * v * b.t) / lambda).improvement / b.mean), Number.POSITIVE_INFINITY)
  }
  return () => 1
}
