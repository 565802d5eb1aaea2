/** What a radar may say, as data: outside these a study is refused at the door. */
export const RADAR_LIMITS = {
  /** Carrier frequency, Hz. */
  frequencyHz: { low: 30e6, high: 40e9 },
  /** Noise bandwidth × compressed pulse width. */
  bandwidthTimesPulse: { low: 0.5, high: 2 },
} as const
