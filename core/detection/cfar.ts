import { toDb } from '../units/index.ts'
import { lnGamma } from './gamma.ts'

/** Cell-averaging CFAR: threshold multiplier over the mean of N reference cells. Mathematics. */
export const cfarMultiplier = (referenceCells: number, pfa: number): number => referenceCells * (pfa ** (-1 / referenceCells) - 1)

/** Loss of cell-averaging CFAR against a known noise level, dB: single pulse, exponential target. Mathematics. */
export function cfarLossDb(referenceCells: number, pfa: number, pd: number): number {
  const known = Math.log(pfa) / Math.log(pd)
  const averaged = cfarMultiplier(referenceCells, pfa) / (referenceCells * (pd ** (-1 / referenceCells) - 1))
  return toDb((averaged - 1) / (known - 1))
}

/**
 * Threshold of one sample of Weibull clutter power of spread a_w for a false-alarm probability, dB over its median and mean, and how much
 * higher than for exponential power (a_w = 1) over the mean. Mathematics.
 */
export function weibullThresholdDb(spread: number, pfa: number): { overMedianDb: number; overMeanDb: number; extraDb: number } {
  const overMeanDb = spread * toDb(-Math.log(pfa)) - (10 * lnGamma(1 + spread)) / Math.LN10
  return { overMedianDb: spread * toDb(-Math.log2(pfa)), overMeanDb, extraDb: overMeanDb - toDb(-Math.log(pfa)) }
}
