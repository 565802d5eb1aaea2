import { elevationGain } from '../antenna/index.ts'
import { elevationAngleDeg, slantRangeM } from '../geodesy/index.ts'
import { signalToNoiseDb } from './equation.ts'
import type { RadarInput } from './types.ts'

/** Where a target is against an antenna: heights m MSL, ground range m, effective earth radius m (Infinity = flat). */
export interface TargetPlace {
  readonly antennaM: number
  readonly targetM: number
  readonly groundRangeM: number
  readonly effRadiusM: number
}

/**
 * Signal-to-noise ratio of a target at a height and ground range, dB, one pulse, free space, before STC; elevation pattern at its elevation,
 * the same both ways; −Infinity outside the pattern. Source: monostatic radar equation (Skolnik).
 */
export function targetSignalToNoiseDb(r: RadarInput, rcsM2: number, place: TargetPlace, tiltDeg: number = r.antenna.tiltDeg): number {
  const { antennaM, targetM, groundRangeM, effRadiusM } = place
  const gain = elevationGain(r.antenna, elevationAngleDeg(antennaM, targetM, groundRangeM, effRadiusM), tiltDeg)
  return signalToNoiseDb(r, {
    rcsM2,
    slantRangeM: slantRangeM(antennaM, targetM, groundRangeM, effRadiusM),
    transmitGain: gain,
    receiveGain: gain,
  })
}
