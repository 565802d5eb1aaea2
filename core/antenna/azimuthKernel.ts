import { RAD_PER_DEG } from '../units/index.ts'

/** How far the two-way beam is followed to each side, in one-way half-power beamwidths: −54 dB two-way there. */
export const KERNEL_REACH_BEAMWIDTHS = 1.5

/**
 * Weights of neighbouring azimuths for one pointing: two-way Gaussian beam, an odd number of them, the middle one on the pointing. They sum
 * to the one-way half-power beamwidth in radians, so that uniform ground gives the cell width of the land clutter data (range × beamwidth).
 * @param beamwidthDeg one-way half-power azimuth beamwidth, > 0
 * @param stepDeg azimuth step, > 0; meant to be at most a quarter of the beamwidth
 */
export function azimuthKernel(beamwidthDeg: number, stepDeg: number): Float64Array {
  const most = Math.floor((360 / stepDeg - 1) / 2)
  const half = Math.max(0, Math.min(Math.floor((KERNEL_REACH_BEAMWIDTHS * beamwidthDeg) / stepDeg + 1e-9), most))
  const weights = new Float64Array(2 * half + 1)
  let sum = 0
  for (let n = -half; n <= half; n++) {
    const x = (n * stepDeg) / beamwidthDeg
    sum += weights[n + half] = Math.exp(-8 * Math.LN2 * x * x)
  }
  const scale = (beamwidthDeg * RAD_PER_DEG) / sum
  for (let n = 0; n < weights.length; n++) weights[n] *= scale
  return weights
}
