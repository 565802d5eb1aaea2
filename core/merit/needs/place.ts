/** What a need's check found in each polar cell; every bit that applies is set. low: the same at the smaller k. */
export const PLACE = {
  inNeed: 1,
  inSight: 2,
  marginal: 4,
  unknown: 8,
  groundAbove: 16,
  detectable: 32,
  usable: 64,
  lowInSight: 128,
  lowDetectable: 256,
  lowUsable: 512,
} as const
/** One more than any sum of PLACE bits. */
export const PLACES = 1024
