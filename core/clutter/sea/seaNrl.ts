/** Where the sea model holds; sea state on Nathanson's scale, linear co-polar, averaged over wind direction. */
export const SEA_LIMITS = {
  frequencyGHz: { low: 0.5, high: 35 },
  grazingDeg: { low: 0.1, high: 60 },
  seaState: { low: 0, high: 6 },
} as const

/** Coefficients c1…c5 of Appendix B of the report, by polarisation. */
const COEFFICIENTS = {
  H: [-73.0, 20.781, 7.351, 25.65, 0.0054],
  V: [-50.796, 25.93, 0.7093, 21.588, 0.00211],
} as const

/**
 * Mean sea clutter reflectivity σ°, dB (m²/m²), apparent: propagation of the measurements is in it. Grazing in degrees (0.1 to 60), frequency
 * in GHz (0.5 to 35), sea state 0 to 6; outside these the caller marks the value. Source: Gregers-Hansen and Mital, An Improved Empirical
 * Model for Radar Sea Clutter Reflectivity, NRL/MR/5310--12-9346 (2012), equation 7, Appendix B; fit error about 2 to 2.6 dB.
 */
export function seaStrengthDb(frequencyGHz: number, grazingDeg: number, seaState: number, polarisation: 'H' | 'V'): number {
  const [c1, c2, c3, c4, c5] = COEFFICIENTS[polarisation]
  const a = grazingDeg
  return (
    c1 +
    c2 * Math.log10(Math.sin((a * Math.PI) / 180)) +
    ((27.5 + c3 * a) * Math.log10(frequencyGHz)) / (1 + 0.95 * a) +
    c4 * (1 + seaState) ** (1 / (2 + 0.085 * a + 0.033 * seaState)) +
    c5 * a * a
  )
}
