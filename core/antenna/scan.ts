import { RAD_PER_DEG, toDb } from '../units/index.ts'

/** Pulses while the one-way half-power beam passes a point: θ·PRF/(6·rpm). Mathematics. */
export const hitsPerScan = (azimuthBeamwidthDeg: number, prfHz: number, rotationRpm: number): number =>
  (azimuthBeamwidthDeg * prfHz) / (6 * rotationRpm)

/** Time the one-way half-power beam stays on a point, s. */
export const dwellS = (azimuthBeamwidthDeg: number, rotationRpm: number): number => azimuthBeamwidthDeg / (6 * rotationRpm)

/**
 * Peak gain from half-power beamwidths, dBi: K/(θaz·θel). K in square degrees: 26 000 typical reflector, 32 000 low loss, 41 253 the ideal.
 */
export const gainFromBeamwidthsDbi = (azimuthDeg: number, elevationDeg: number, kSquareDeg = 26_000): number =>
  toDb(kSquareDeg / (azimuthDeg * elevationDeg))

/** Gain given up by shaping a beam to cosecant squared between two angles, dB (0 < low < high < 90): 2 − θ₀ cot θₘ (Skolnik). */
export const cosecantGainLossDb = (lowDeg: number, highDeg: number): number =>
  toDb(2 - (lowDeg * RAD_PER_DEG) / Math.tan(highDeg * RAD_PER_DEG))
