import { SPEED_OF_LIGHT_MS, wavelengthM } from '../units/index.ts'

/** n-th blind speed of a constant PRF, m/s: n λ PRF/2. Mathematics. */
export const blindSpeedMs = (frequencyHz: number, prfHz: number, order = 1): number => (order * wavelengthM(frequencyHz) * prfHz) / 2
/** Range beyond which an echo falls into the next pulse interval, m: c/(2 PRF). Mathematics. */
export const unambiguousRangeM = (prfHz: number): number => SPEED_OF_LIGHT_MS / (2 * prfHz)

const gcd = (a: number, b: number): number => (b === 0 ? a : gcd(b, a % b))

/** First blind speed of intervals in whole-number ratios, as a multiple of that of the mean PRF: mean of the ratios in lowest terms. Mathematics. */
export function staggerFirstBlind(ratios: readonly number[]): number {
  if (ratios.length === 0 || !ratios.every((r) => Number.isInteger(r) && r > 0))
    throw new RangeError('stagger ratios: expected whole numbers above 0')
  const divisor = ratios.reduce(gcd)
  return ratios.reduce((s, r) => s + r, 0) / ratios.length / divisor
}
