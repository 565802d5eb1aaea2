import { fromDb } from '../units/index.ts'
import { gammaQ, lnGamma } from './gamma.ts'

/** Target fluctuation: 0 steady, 1 and 2 exponential (scan to scan, pulse to pulse), 3 and 4 with one dominant echo. */
export type SwerlingCase = 0 | 1 | 2 | 3 | 4

/** Where exact detection is computed: pulses 1 to 10 000, Pfa 1e-15 to 0.1. Outside, RangeError. */
export const DETECTION_LIMITS = { pulses: { low: 1, high: 10_000 }, pfa: { low: 1e-15, high: 0.1 } } as const

function checkInputs(pfa: number, pulses: number): void {
  const { pulses: n, pfa: f } = DETECTION_LIMITS
  if (!(pulses >= n.low && pulses <= n.high)) throw new RangeError(`pulses ${pulses}: expected ${n.low} to ${n.high}`)
  if (!(pfa >= f.low && pfa <= f.high)) throw new RangeError(`false-alarm probability ${pfa}: expected ${f.low} to ${f.high}`)
}

/** Threshold on the sum of N square-law samples in units of mean noise power: Q(N, T) = Pfa. N need not be whole. Mathematics. */
export function detectionThreshold(pfa: number, pulses: number): number {
  checkInputs(pfa, pulses)
  let low = 0
  let high = pulses + 50
  while (gammaQ(pulses, high) > pfa) high *= 1.5
  for (let n = 0; n < 200 && high - low > 1e-13 * high; n++) {
    const mid = (low + high) / 2
    if (gammaQ(pulses, mid) > pfa) low = mid
    else high = mid
  }
  return (low + high) / 2
}

/** Gamma order of the fluctuation over the pulses integrated; Infinity for a steady target. */
const orderOf = (swerling: SwerlingCase, pulses: number): number => [Number.POSITIVE_INFINITY, 1, pulses, 2, 2 * pulses][swerling]

/**
 * Probability of detection of N non-coherently integrated square-law pulses at a mean S/N per pulse in dB. The echo adds m pairs of degrees of
 * freedom, Poisson for a steady target, negative binomial for a fluctuating one; exact. Threshold from `detectionThreshold`. Mathematics
 * (the classical Marcum and Swerling results). Throws RangeError outside DETECTION_LIMITS.
 */
export function probabilityOfDetection(snrDb: number, threshold: number, pulses: number, swerling: SwerlingCase): number {
  const mean = pulses * fromDb(snrDb)
  const order = orderOf(swerling, pulses)
  const steady = order === Number.POSITIVE_INFINITY
  if (steady && mean > 700) return 1
  const miss = steady ? 0 : mean / (order + mean)
  let weight = steady ? Math.exp(-mean) : Math.exp(order * Math.log1p(-miss))
  let below = 1 - gammaQ(pulses, threshold)
  let drop = Math.exp(pulses * Math.log(threshold) - threshold - lnGamma(pulses + 1))
  let missed = 0
  for (let m = 0; m < 100_000; m++) {
    missed += weight * below
    // once the terms are gone, what is left of `below` is rounding
    if (below <= 1e-15 || (drop < 1e-17 && m + pulses > threshold)) break
    below = Math.max(0, below - drop)
    drop *= threshold / (pulses + m + 1)
    weight *= steady ? mean / (m + 1) : ((order + m) / (m + 1)) * miss
  }
  return Math.min(1, Math.max(0, 1 - missed))
}

/** Mean S/N per pulse that gives a stated Pd, dB; Pd between Pfa and 1. Throws RangeError outside. Mathematics, to 1e-6 dB. */
export function requiredSnrDb(pd: number, pfa: number, pulses: number, swerling: SwerlingCase): number {
  if (!(pd > pfa && pd < 1)) throw new RangeError(`probability of detection ${pd}: expected between the false-alarm probability and 1`)
  const threshold = detectionThreshold(pfa, pulses)
  let low = -60
  let high = 80
  for (let n = 0; n < 60; n++) {
    const mid = (low + high) / 2
    if (probabilityOfDetection(mid, threshold, pulses, swerling) < pd) low = mid
    else high = mid
  }
  return (low + high) / 2
}
