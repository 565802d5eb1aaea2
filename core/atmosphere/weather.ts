/** The air, rain and sea of a study as the kernels need them: what attenuates a ray and what sends echoes back. */
export interface Weather {
  readonly gas: 'none' | 'p676'
  /** Rain rate, mm/h; 0 = dry. It rains from the radar out to `rainExtentM` (ground range) and up to `rainTopM` (m MSL), in every direction. */
  readonly rainRateMmH: number
  readonly rainTopM: number
  readonly rainExtentM: number
  /** Sea state on Nathanson's scale. */
  readonly seaState: number
  /** Tide, m: moves the water of the raster, not the antenna. */
  readonly tideM: number
}
/** Rain and tide where a study states none. Common practice for a shower; our own choice. */
export const WEATHER_DEFAULTS = { rainTopM: 4_000, rainExtentM: 15_000, tideM: 0 } as const
