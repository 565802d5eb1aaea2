export const DEG_PER_RAD = 180 / Math.PI
export const RAD_PER_DEG = Math.PI / 180
/** Power ratio to dB; 0 gives -Infinity, so keep it away from results that are shown. */
export const toDb = (ratio: number): number => 10 * Math.log10(ratio)
/** dB to power ratio. */
export const fromDb = (db: number): number => 10 ** (db / 10)
/** Any angle to [0, 360). */
export const wrap360 = (deg: number): number => {
  const w = deg % 360
  return w < 0 ? w + 360 : w === 0 ? 0 : w
}
/** Any angle to [-180, 180). */
export const wrap180 = (deg: number): number => wrap360(deg + 180) - 180
export const wavelengthM = (frequencyHz: number): number => 299_792_458 / frequencyHz
