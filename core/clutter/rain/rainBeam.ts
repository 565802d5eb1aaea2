import { elevationGainForClutter } from '../../antenna/index.ts'
import type { Weather } from '../../atmosphere/index.ts'
import { circularOf, type RadarInput } from '../../radar/index.ts'
import { DEG_PER_RAD, fromDb } from '../../units/index.ts'
import type { ModelNote } from '../types.ts'
import { RAIN_LIMITS, rainReflectivity } from './rainVolume.ts'

/** ∫ of the two-way Gaussian azimuth beam over its one-way half-power width: √(π/8 ln 2). */
export const TWO_WAY_WIDTH = Math.sqrt(Math.PI / (8 * Math.LN2))
export const NOTE_RAIN_FREQUENCY: ModelNote = {
  mark: 'outside model',
  about: 'rain clutter: frequency outside 0.1 to 12 GHz, drops are not small against the wavelength',
}

/** Rain as a radar with one elevation pattern and tilt sees it. */
export interface RainBeam {
  /** Volume reflectivity, m²/m³, after the rejection of circular polarisation. */
  readonly eta: number
  readonly topM: number
  readonly extentM: number
  /** ∫ g_T·g_R de from straight down, rad, by the sine of elevation from −1 to 1. */
  readonly upTo: Float64Array
  readonly notes: readonly ModelNote[]
}
const ENTRIES = 16_384

/** Tables for the rain of a weather; null when it is dry. Two-way elevation gain with the side-lobe floor, the peak 1. */
export function rainBeam(w: Weather, r: RadarInput, tiltDeg: number): RainBeam | null {
  if (!(w.rainRateMmH > 0)) return null
  const rejected = r.polarisation === 'circular' ? circularOf(r).rainLossDb : 0
  const { low, high } = RAIN_LIMITS.frequencyGHz
  const outside = r.frequencyHz < low * 1e9 || r.frequencyHz > high * 1e9
  return {
    eta: rainReflectivity(r.frequencyHz, w.rainRateMmH) * fromDb(-rejected),
    topM: w.rainTopM,
    extentM: w.rainExtentM,
    upTo: gainIntegral(r, tiltDeg),
    notes: outside ? [NOTE_RAIN_FREQUENCY] : [],
  }
}

/** Simpson's rule between the entries, in elevation. */
function gainIntegral({ antenna, receiveAntenna }: RadarInput, tiltDeg: number): Float64Array {
  const twoWay = (e: number): number => {
    const g = elevationGainForClutter(antenna, e * DEG_PER_RAD, tiltDeg)
    return g * (receiveAntenna ? elevationGainForClutter(receiveAntenna, e * DEG_PER_RAD, tiltDeg) : g)
  }
  const out = new Float64Array(ENTRIES + 1)
  let from = -Math.PI / 2
  let before = twoWay(from)
  for (let i = 1; i <= ENTRIES; i++) {
    const to = Math.asin((2 * i) / ENTRIES - 1)
    const after = twoWay(to)
    out[i] = out[i - 1] + ((to - from) / 6) * (before + 4 * twoWay((from + to) / 2) + after)
    from = to
    before = after
  }
  return out
}

function integralTo(t: Float64Array, sine: number): number {
  const x = (Math.min(1, Math.max(-1, sine)) + 1) * (ENTRIES / 2)
  const i = Math.min(ENTRIES - 1, x | 0)
  return t[i] + (x - i) * (t[i + 1] - t[i])
}

/**
 * Echo of the rain at a slant range, per metre of gate and radian of azimuth, m: η·R²·0.753·∫g_T g_R de from the local horizon to the rain top.
 * `floorM` is the lowest height in sight there, m MSL; `c` the curvature of the effective earth, 1/m. 0 beyond the rain.
 */
export function rainPerMetre(b: RainBeam, antennaM: number, floorM: number, rangeM: number, slantM: number, c: number): number {
  if (rangeM > b.extentM || !(floorM < b.topM)) return 0
  const drop = 0.5 * slantM * c
  const seen = integralTo(b.upTo, (b.topM - antennaM) / slantM - drop) - integralTo(b.upTo, (floorM - antennaM) / slantM - drop)
  return seen > 0 ? b.eta * slantM * slantM * TWO_WAY_WIDTH * seen : 0
}
