import { slantRangeM } from '../geodesy/index.ts'
import { fromDb } from '../units/index.ts'
import { type GasLoss, gasLossDbKm, twoWayGasLossDb } from './gasLoss.ts'
import { RAIN_LOSS_LIMITS, rainLaw, rainLossDbKm } from './rainLoss.ts'
import type { Weather } from './weather.ts'

/** What takes power from a ray at one frequency, per kilometre and where. */
export interface PathLoss {
  /** Near the ground, one way; null = not assessed. */
  readonly gas: GasLoss | null
  /** One way, dB/km. */
  readonly rainDbKm: number
  readonly rainTopM: number
  readonly rainExtentM: number
}
const POLARISATION_TILT_DEG = { H: 0, V: 90, circular: 45 } as const

/**
 * Losses of the weather at a frequency; null where there are none. Rain below 1 GHz takes the law of 1 GHz (beyond the Recommendation, loss
 * under 0.01 dB/km). Sources: ITU-R P.676-12 for gas (reference air at sea level), ITU-R P.838-3 for rain on a level path.
 */
export function pathLoss(w: Weather, frequencyHz: number, polarisation: 'H' | 'V' | 'circular'): PathLoss | null {
  const ghz = frequencyHz / 1e9
  const gas = w.gas === 'p676' ? gasLossDbKm(ghz) : null
  const law = rainLaw(Math.max(ghz, RAIN_LOSS_LIMITS.frequencyGHz.low), 0, POLARISATION_TILT_DEG[polarisation])
  const rainDbKm = rainLossDbKm(law, w.rainRateMmH)
  return gas || rainDbKm > 0 ? { gas, rainDbKm, rainTopM: w.rainTopM, rainExtentM: w.rainExtentM } : null
}

/** Share of a ray that lies in the rain: below its top, height taken linear along the ray, and inside its extent. */
export function shareInRain(p: PathLoss, antennaM: number, targetM: number, groundRangeM: number): number {
  const extent = Math.min(1, p.rainExtentM / groundRangeM)
  const rise = targetM - antennaM
  const crossing = (p.rainTopM - antennaM) / rise
  if (antennaM <= p.rainTopM) return rise > 0 ? Math.min(extent, crossing) : extent
  return rise < 0 ? Math.max(0, extent - crossing) : 0
}

/** Two-way loss of a ray, gas and rain apart, dB >= 0. Heights m MSL; ground and slant range m, > 0. Same sources as `pathLoss`. */
export function twoWayLossParts(
  p: PathLoss,
  antennaM: number,
  targetM: number,
  groundRangeM: number,
  slantM: number,
): { readonly gasDb: number; readonly rainDb: number } {
  const gasDb = p.gas ? twoWayGasLossDb(p.gas, antennaM, targetM, slantM) : 0
  const rainDb = p.rainDbKm > 0 ? (2 * p.rainDbKm * slantM * shareInRain(p, antennaM, targetM, groundRangeM)) / 1000 : 0
  return { gasDb, rainDb }
}
/** Their sum, dB; echo and clutter alike lose it. 0 where the weather takes nothing (null). */
export function twoWayLossDb(p: PathLoss | null, antennaM: number, targetM: number, groundRangeM: number, slantM: number): number {
  if (!p) return 0
  const { gasDb, rainDb } = twoWayLossParts(p, antennaM, targetM, groundRangeM, slantM)
  return gasDb + rainDb
}

/** Heights of a table lie this far apart, m: linear between them, the loss is right to 0.3 %. */
const HEIGHT_STEP_M = 250

/** What a two-way path costs from one antenna, by height and ground range, for loops: rows of `ranges` values, one per height. */
export interface PathTable {
  readonly values: Float32Array
  readonly ranges: number
  readonly lowM: number
  readonly heights: number
}

/**
 * Two-way loss, dB, of rays from an antenna (m MSL) over a sphere of the effective radius, at the middle of each range step, to targets between
 * two heights (m MSL).
 */
export function lossTable(
  p: PathLoss,
  antennaM: number,
  effRadiusM: number,
  grid: { readonly ranges: number; readonly rangeStepM: number },
  lowM: number,
  highM: number,
): PathTable {
  const heights = Math.max(2, Math.ceil((highM - lowM) / HEIGHT_STEP_M) + 1)
  const { ranges, rangeStepM } = grid
  const values = new Float32Array(heights * ranges)
  for (let h = 0, at = 0; h < heights; h++) {
    const targetM = lowM + h * HEIGHT_STEP_M
    for (let j = 0; j < ranges; j++, at++) {
      const rangeM = (j + 0.5) * rangeStepM
      values[at] = twoWayLossDb(p, antennaM, targetM, rangeM, slantRangeM(antennaM, targetM, rangeM, effRadiusM))
    }
  }
  return { values, ranges, lowM, heights }
}

/** The same as the share of power that is let through, ratio. */
export const passedTable = (...args: Parameters<typeof lossTable>): PathTable => {
  const t = lossTable(...args)
  return { ...t, values: t.values.map((db) => fromDb(-db)) }
}

/** Value of a table in range step j at a height (m MSL): linear between heights, held beyond the first and last. */
export function pathTableAt(t: PathTable, j: number, heightM: number): number {
  const x = Math.min(t.heights - 1, Math.max(0, (heightM - t.lowM) / HEIGHT_STEP_M))
  const h = Math.min(t.heights - 2, x | 0)
  const at = h * t.ranges + j
  const low = t.values[at]
  return low + (x - h) * (t.values[at + t.ranges] - low)
}
