import { elevationGain } from '../antenna/index.ts'
import { type RadarInput, signalToNoiseDb, stcDb } from '../radar/index.ts'
import { DEG_PER_RAD, toDb } from '../units/index.ts'

const GAIN_STEPS_PER_DEG = 100
const STC_STEP_M = 25

/** One-pulse S/N of a stated target anywhere over the site, from tables: two-way elevation gain by angle, STC by slant range. */
export interface TargetSignal {
  /** S/N at 1 m slant range and peak gain, dB, with no STC. */
  readonly atOneMetreDb: number
  /** Two-way elevation gain by angle, dB relative to peak, from −90° in steps of 0.01°; floor −200 dB. */
  readonly gainDb: Float32Array
  /** STC attenuation by slant range in steps of 25 m, dB. */
  readonly stcDb: Float32Array
}

/** Tables for one radar, tilt and target. The elevation side-lobe floor is for clutter only and is not used here. */
export function targetSignal(radar: RadarInput, tiltDeg: number, rcsM2: number, longestSlantM: number): TargetSignal {
  const antenna = { ...radar.antenna, tiltDeg }
  const gainDb = new Float32Array(180 * GAIN_STEPS_PER_DEG + 1)
  for (let i = 0; i < gainDb.length; i++) {
    const gain = elevationGain(antenna, i / GAIN_STEPS_PER_DEG - 90)
    gainDb[i] = gain > 1e-10 ? 2 * toDb(gain) : -200
  }
  const stc = new Float32Array(Math.ceil(longestSlantM / STC_STEP_M) + 2)
  for (let i = 0; i < stc.length; i++) stc[i] = stcDb(radar, i * STC_STEP_M)
  return { atOneMetreDb: signalToNoiseDb(radar, { rcsM2, slantRangeM: 1 }), gainDb, stcDb: stc }
}

/** S/N after STC, dB, of a target at a slant range (m) and an elevation tangent at the antenna. */
export function snrDbAt(t: TargetSignal, slantM: number, tanElevation: number): number {
  const bin = Math.round((Math.atan(tanElevation) * DEG_PER_RAD + 90) * GAIN_STEPS_PER_DEG)
  return t.atOneMetreDb + t.gainDb[bin] - 40 * Math.log10(slantM) - stcAt(t, slantM)
}

/** STC attenuation, dB, at a slant range, m. */
export function stcAt(t: TargetSignal, slantM: number): number {
  const bin = Math.round(slantM / STC_STEP_M)
  return t.stcDb[bin < t.stcDb.length ? bin : t.stcDb.length - 1]
}
