import { RAD_PER_DEG } from '../../units/index.ts'

/**
 * Constant-gamma land clutter, mean σ° in dB at a grazing angle in degrees (0 < angle <= 90): γ·sin ψ. Propagation is not included.
 * Source: Richards, Fundamentals of Radar Signal Processing, near eq. 2.64.
 */
export const constantGammaDb = (gammaDb: number, grazingDeg: number): number =>
  gammaDb + 10 * Math.log10(Math.sin(grazingDeg * RAD_PER_DEG))
