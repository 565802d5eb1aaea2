import { fromDb, toDb } from '../units/index.ts'

// Limits of improvement set by the equipment, dB. Source: Radar Handbook (Skolnik, ed.), chapter on MTI radar, from memory.

/** Quantisation of N bits: 20 log[(2^N − 1)√0.75]. */
export const quantisationLimitDb = (bits: number): number => 20 * Math.log10((2 ** bits - 1) * Math.sqrt(0.75))
/** Pulse-to-pulse phase error, rad: 20 log(1/Δφ). */
export const phaseLimitDb = (phaseRad: number): number => 20 * Math.log10(1 / phaseRad)
/** Pulse-to-pulse amplitude error, ratio: 20 log(A/ΔA). */
export const amplitudeLimitDb = (relativeAmplitude: number): number => 20 * Math.log10(1 / relativeAmplitude)
/** Transmitter frequency change during a pulse: 20 log[1/(πΔfτ)]. */
export const transmitterFrequencyLimitDb = (changeHz: number, pulseWidthS: number): number =>
  20 * Math.log10(1 / (Math.PI * changeHz * pulseWidthS))
/** Local-oscillator frequency change over the echo delay T: 20 log[1/(2πΔfT)]. */
export const oscillatorFrequencyLimitDb = (changeHz: number, delayS: number): number =>
  20 * Math.log10(1 / (2 * Math.PI * changeHz * delayS))
/** Timing jitter: 20 log[τ/(√2 Δt √(Bτ))]. */
export const timingLimitDb = (pulseWidthS: number, jitterS: number, timeBandwidth: number): number =>
  20 * Math.log10(pulseWidthS / (Math.SQRT2 * jitterS * Math.sqrt(timeBandwidth)))
/** Width jitter: 20 log[τ/(Δτ √(Bτ))]. */
export const widthLimitDb = (pulseWidthS: number, jitterS: number, timeBandwidth: number): number =>
  20 * Math.log10(pulseWidthS / (jitterS * Math.sqrt(timeBandwidth)))

/** Several limits together, dB: 1/I = Σ 1/Iᵢ. Mathematics. */
export const combineLimitsDb = (limitsDb: readonly number[]): number => -toDb(limitsDb.reduce((sum, db) => sum + fromDb(-db), 0))
