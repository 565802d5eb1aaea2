import { KERNEL_REACH_BEAMWIDTHS } from '../../antenna/index.ts'
import { type PathTable, passedTable, pathTableAt } from '../../atmosphere/index.ts'
import { azimuthOf, CELL, type PolarShape } from '../../polar/index.ts'
import { towardEcho } from '../discretes/discreteEchoes.ts'
import { type RainBeam, rainPerMetre } from '../rain/rainBeam.ts'
import { type CellRows, cellClutter, gateSums, slantSquared } from './cellSums.ts'
import type { OptionModel } from './optionModel.ts'
import { cellsOfSegment, rangeLobes, reachOf, type Segment } from './segment.ts'

/** One kind of sum, all of the clutter or what suppression leaves: a row of cells and its gates, every gate of the grid, sums round the rings. */
export interface Gates {
  readonly row: Float64Array
  readonly sums: Float64Array
  /** Clutter-to-noise of the gates per radian of azimuth, ratio. */
  readonly gates: Float32Array
  readonly ring: Float64Array
}
export const makeGates = ({ azimuths, ranges }: PolarShape): Gates => ({
  row: new Float64Array(ranges),
  sums: new Float64Array(ranges),
  gates: new Float32Array(azimuths * ranges),
  ring: new Float64Array(ranges),
})

/** Is the cell nearer than the pulse allows? The slant range is worked out only where it can decide. */
function tooNear(nearestM: number, antennaM: number, groundM: number, rangeM: number, c: number): boolean {
  return rangeM <= 1.01 * nearestM && slantSquared(antennaM, groundM, rangeM, c) < nearestM * nearestM
}
/** Is a cell at a place received with a segment's pulse and beams? */
function isOwn(s: Segment, antennaM: number, groundM: number, rangeM: number, c: number): boolean {
  if (s.alone) return !tooNear(s.fromM, antennaM, groundM, rangeM, c)
  const r2 = slantSquared(antennaM, groundM, rangeM, c)
  return r2 >= s.fromM * s.fromM && r2 < s.toM * s.toM
}
/** Is anything received from a cell? */
export function isReceived(segments: readonly Segment[], antennaM: number, groundM: number, rangeM: number, c: number): boolean {
  for (let k = 0; k < segments.length; k++) if (isOwn(segments[k], antennaM, groundM, rangeM, c)) return true
  return false
}

/**
 * One azimuth of the first pass with one pulse and pair of beams: cells, gates, rain, radar equation and losses, each gate at the slant range of
 * its middle cell, range side lobes; counts the cells known in each ring. `passed`: what the weather lets through, by height and range.
 */
export function segmentRow(
  i: number,
  o: OptionModel,
  segment: Segment,
  cells: CellRows,
  state: Uint8Array,
  passed: PathTable | null,
  all: Gates,
  rest: Gates | null,
  known: Uint32Array,
  use: Float64Array,
): void {
  const { antennaM } = o.cell
  const { centresM, groundM } = cells
  const n = centresM.length
  const c = 1 / cells.effectiveRadiusM[i]
  const [first, end] = cellsOfSegment(segment, n, o.rangeStepM)
  const reach = segment.alone ? 0 : reachOf(segment, o.rangeStepM)
  const half = segment.alone ? 0 : segment.weights.length >> 1
  const from = Math.max(0, first - reach)
  const to = Math.min(n, end + reach)
  cellClutter(o.cell, segment, cells, i, { patterned: all.row, residual: rest?.row ?? null, plain: null }, use, from, to)
  const gateFrom = from === 0 ? 0 : from + half
  const gateTo = to === n ? n : to - half
  gateSums(all.row, segment.weights, all.sums, gateFrom, gateTo)
  if (rest) gateSums(rest.row, segment.weights, rest.sums, gateFrom, gateTo)
  if (segment.rain) addRain(i, o, segment, segment.rain, cells, state, all, rest, gateFrom, gateTo)
  const { constant, fromM } = segment
  for (let j = gateFrom, at = i * n + gateFrom; j < gateTo; j++, at++) {
    if (all.sums[j] === 0) continue
    if (state[at] >= CELL.beyondVoid || tooNear(segment.pulseM, antennaM, groundM[at], centresM[j], c)) {
      all.sums[j] = 0
      if (rest) rest.sums[j] = 0
      continue
    }
    const r2 = slantSquared(antennaM, groundM[at], centresM[j], c)
    const factor = passed ? (constant * pathTableAt(passed, j, groundM[at])) / (r2 * r2) : constant / (r2 * r2)
    all.sums[j] *= factor
    if (rest) rest.sums[j] *= factor
  }
  if (segment.lobe > 0) {
    addRangeLobes(segment, o.rangeStepM, all.sums, gateFrom, gateTo)
    if (rest) addRangeLobes(segment, o.rangeStepM, rest.sums, gateFrom, gateTo)
  }
  for (let j = first, at = i * n + first; j < end; j++, at++) {
    if (state[at] >= CELL.beyondVoid) continue
    if (segment.alone ? tooNear(fromM, antennaM, groundM[at], centresM[j], c) : !isOwn(segment, antennaM, groundM[at], centresM[j], c))
      continue
    known[j]++
    const v = all.sums[j]
    if (v === 0) continue
    all.ring[j] += v
    all.gates[at] = v
    if (rest) {
      rest.ring[j] += rest.sums[j]
      rest.gates[at] = rest.sums[j]
    }
  }
}

/** Adds the echo of the rain in the gates on one azimuth to their sums. */
function addRain(
  i: number,
  o: OptionModel,
  { gateM }: Segment,
  rain: RainBeam,
  cells: CellRows,
  state: Uint8Array,
  all: Gates,
  rest: Gates | null,
  from: number,
  to: number,
): void {
  const { antennaM } = o.cell
  const { centresM, groundM, floorM } = cells
  const n = centresM.length
  const c = 1 / cells.effectiveRadiusM[i]
  for (let j = from, at = i * n + from; j < to && centresM[j] <= rain.extentM; j++, at++) {
    if (state[at] >= CELL.beyondVoid) continue
    const slantM = Math.sqrt(slantSquared(antennaM, groundM[at], centresM[j], c))
    const v = gateM * rainPerMetre(rain, antennaM, floorM[at], centresM[j], slantM, c)
    all.sums[j] += v
    if (rest) rest.sums[j] += v * o.left.rain
  }
}

/** Adds to gates [from, to) what the range side lobes bring in from the others. */
function addRangeLobes(s: Segment, rangeStepM: number, echoes: Float64Array, from: number, to: number): void {
  const summed = runningSum(echoes, from, to)
  for (let j = from; j < to; j++) echoes[j] += rangeLobes(s, summed, j - from, rangeStepM)
}
/** Sums of the first 0, 1, 2 … entries of [from, to). */
export function runningSum(values: Float64Array, from: number, to: number): Float64Array {
  const out = new Float64Array(to - from + 1)
  for (let j = from; j < to; j++) out[j - from + 1] = out[j - from] + values[j]
  return out
}

/** What the weather lets through of the power of ground echoes, ratio, in place of dB; null where it takes nothing. */
export function passedOver(o: OptionModel, cells: CellRows, grid: PolarShape): PathTable | null {
  if (!o.loss) return null
  let [low, high] = [Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY]
  for (const h of cells.groundM) {
    if (h < low) low = h
    if (h > high) high = h
  }
  if (!(low <= high)) [low, high] = [0, 0]
  return passedTable(o.loss, o.cell.antennaM, cells.effectiveRadiusM[0], grid, low, high)
}

/** Adds the discrete echoes that the beam on azimuth i takes in to a row of clutter-to-noise ratios, each times `share`. */
export function addDiscretes(i: number, o: OptionModel, grid: PolarShape, beamwidthDeg: number, share: number, row: Float64Array): void {
  for (const echo of o.discretes) {
    const gain = towardEcho(azimuthOf(grid, i), echo, beamwidthDeg, KERNEL_REACH_BEAMWIDTHS * beamwidthDeg)
    if (gain > 0) addToGates(echo.rangeM, echo.reachM, grid.rangeStepM, echo.ratio * gain * share, row)
  }
}
/** Adds a value to the gates whose middle lies within reach of a range. */
export function addToGates(rangeM: number, reachM: number, rangeStepM: number, value: number, row: Float64Array): void {
  const from = Math.max(0, Math.ceil((rangeM - reachM) / rangeStepM - 0.5))
  const to = Math.min(row.length - 1, Math.floor((rangeM + reachM) / rangeStepM - 0.5))
  for (let j = from; j <= to; j++) row[j] += value
}
