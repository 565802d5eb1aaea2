/**
 * Weibull distribution of clutter power with spread a_w: P(X <= x) = 1 − exp[−ln2·(x/median)^(1/a_w)]. a_w = 1 is exponential power
 * (Rayleigh amplitude). All mathematics; valid for 0 < a_w <= 8.
 */

const LANCZOS = [
  0.99999999999980993, 676.5203681218851, -1259.1392167224028, 771.32342877765313, -176.61502916214059, 12.507343278686905,
  -0.13857109526572012, 9.9843695780195716e-6, 1.5056327351493116e-7,
]

/** Γ(x) for 0.5 <= x <= 100 (Lanczos series, 15 digits). */
export function gammaFunction(x: number): number {
  const y = x - 1
  let sum = LANCZOS[0]
  for (let i = 1; i < LANCZOS.length; i++) sum += LANCZOS[i] / (y + i)
  const t = y + 7.5
  return Math.sqrt(2 * Math.PI) * t ** (y + 0.5) * Math.exp(-t) * sum
}

/** Mean over median, dB: Γ(1+a)/(ln 2)^a. */
export const meanOverMedianDb = (spread: number): number => 10 * Math.log10(gammaFunction(1 + spread) / Math.LN2 ** spread)

/** Standard deviation over mean, dB: √(Γ(1+2a)/Γ(1+a)² − 1). */
export const sdOverMeanDb = (spread: number): number =>
  10 * Math.log10(Math.sqrt(gammaFunction(1 + 2 * spread) / gammaFunction(1 + spread) ** 2 - 1))

/** Level not exceeded with probability p (0 < p < 1), relative to the mean, dB: (−ln(1−p))^a / Γ(1+a). */
export const percentileOverMeanDb = (spread: number, p: number): number =>
  10 * Math.log10((-Math.log(1 - p)) ** spread / gammaFunction(1 + spread))

/** Probability that the power lies below its own mean. */
export const percentileOfMean = (spread: number): number => 1 - Math.exp(-(gammaFunction(1 + spread) ** (1 / spread)))

/**
 * Spread at a cell area in m²: linear in log10 of area between 10³ and 10⁶ m², held outside. Source: Billingsley, Low-Angle Radar Land Clutter
 * (2002), from memory.
 */
export function weibullSpread(band: { readonly spread1e3: number; readonly spread1e6: number }, areaM2: number): number {
  const share = Math.min(1, Math.max(0, (Math.log10(areaM2) - 3) / 3))
  return band.spread1e3 + (band.spread1e6 - band.spread1e3) * share
}
