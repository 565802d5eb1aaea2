/**
 * Suppression (improvement) a target needs so that S/(C/I + N) >= D₀, dB: (C/N) / [(S/N)/D₀ − 1]. All ratios in dB, the same pulse, pattern,
 * losses and STC in S and C. NaN = too weak (S/N at or below D₀: no suppression helps). 0 = none needed, also where C/N is undefined (NaN).
 * `noiseGainDb` is the noise gain of a filter bank; 0 for a canceller. Mathematics.
 */
export function suppressionNeededDb(cnrDb: number, snrDb: number, d0Db: number, noiseGainDb = 0): number {
  const room = 10 ** ((snrDb - d0Db) / 10) - 10 ** (-noiseGainDb / 10)
  if (!(room > 0)) return Number.NaN
  if (Number.isNaN(cnrDb)) return 0
  return Math.max(0, cnrDb - 10 * Math.log10(room))
}
