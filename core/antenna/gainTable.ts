import { DEG_PER_RAD, RAD_PER_DEG } from '../units/index.ts'
import { checkElevationPattern, elevationGainForClutter } from './elevationPattern.ts'
import type { AntennaInput } from './types.ts'

/** Two-way elevation gain toward clutter by the tangent of elevation, for loops that may not call a transcendental. */
export interface GainTable {
  /** Tangent at values[0], and entries per unit of tangent. */
  readonly low: number
  readonly perUnit: number
  /** Two-way gain, ratio to the peak, linear between entries. */
  readonly values: Float64Array
  readonly transmit: AntennaInput
  readonly receive: AntennaInput
  readonly tiltDeg: number
}

const TABLE_TO = 0.6
/** Entries: 0.004° apart, closer where a beam or the rows of a pattern are narrow. */
const FEWEST_ENTRIES = 16_384
const MOST_ENTRIES = 65_536

/** Builds the table: entries dense against the beamwidth or the rows of a stated pattern. Throws InputError for a pattern that is refused. */
export function clutterGainTable(transmit: AntennaInput, tiltDeg: number = transmit.tiltDeg, receive: AntennaInput = transmit): GainTable {
  const scaleDeg = Math.min(...[transmit, receive].map(finestScaleDeg))
  const wanted = Math.ceil((2 * TABLE_TO) / ((scaleDeg / 120) * RAD_PER_DEG)) + 1
  const count = Math.min(MOST_ENTRIES, Math.max(FEWEST_ENTRIES, wanted))
  const values = new Float64Array(count)
  const perUnit = (count - 1) / (2 * TABLE_TO)
  for (let i = 0; i < count; i++) values[i] = exactTwoWay(transmit, receive, tiltDeg, i / perUnit - TABLE_TO)
  return { low: -TABLE_TO, perUnit, values, transmit, receive, tiltDeg }
}

/** Two-way gain toward clutter, ratio, at a tangent of elevation; beyond ±31° the pattern itself is asked. */
export function twoWayGain(t: GainTable, tanElevation: number): number {
  const x = (tanElevation - t.low) * t.perUnit
  const i = x | 0
  if (!(x >= 0) || i >= t.values.length - 1) return exactTwoWay(t.transmit, t.receive, t.tiltDeg, tanElevation)
  const v = t.values[i]
  return v + (x - i) * (t.values[i + 1] - v)
}

function exactTwoWay(transmit: AntennaInput, receive: AntennaInput, tiltDeg: number, tanElevation: number): number {
  const e = Math.atan(tanElevation) * DEG_PER_RAD
  const g = elevationGainForClutter(transmit, e, tiltDeg)
  return receive === transmit ? g * g : g * elevationGainForClutter(receive, e, tiltDeg)
}

/** Scale on which a pattern changes, degrees; refuses one that cannot be read one way. */
function finestScaleDeg(antenna: AntennaInput): number {
  checkElevationPattern(antenna)
  if (antenna.elevationPattern !== 'table') return Math.min(10, antenna.elevationBeamwidthDeg)
  return antenna.elevationTable.reduce((least, row, i, rows) => (i > 0 ? Math.min(least, (row[0] - rows[i - 1][0]) * 3) : least), 10)
}
