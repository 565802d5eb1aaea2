import { KERNEL_REACH_BEAMWIDTHS } from '../../antenna/index.ts'
import { type PathTable, passedTable, pathTableAt } from '../../atmosphere/index.ts'
import { azimuthOf, CELL, type PolarShape } from '../../polar/index.ts'
import { towardEcho } from '../discretes/discreteEchoes.ts'
import { rainPerMetre } from '../rain/rainBeam.ts'
import { type CellRows, slantSquared } from './cellSums.ts'
import type { OptionModel } from './optionModel.ts'

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
export function tooNear(nearestM: number, antennaM: number, groundM: number, rangeM: number, c: number): boolean {
  return rangeM <= 1.01 * nearestM && slantSquared(antennaM, groundM, rangeM, c) < nearestM * nearestM
}

/** Adds the echo of the rain in the gates on one azimuth to their sums. */
export function addRain(i: number, o: OptionModel, cells: CellRows, state: Uint8Array, all: Gates, rest: Gates | null): void {
  const { rain, cell, gateM, left } = o
  if (!rain) return
  const { centresM, groundM, floorM } = cells
  const n = centresM.length
  const c = 1 / cells.effectiveRadiusM[i]
  for (let j = 0, at = i * n; j < n && centresM[j] <= rain.extentM; j++, at++) {
    if (state[at] >= CELL.beyondVoid) continue
    const slantM = Math.sqrt(slantSquared(cell.antennaM, groundM[at], centresM[j], c))
    const v = gateM * rainPerMetre(rain, cell.antennaM, floorM[at], centresM[j], slantM, c)
    all.sums[j] += v
    if (rest) rest.sums[j] += v * left.rain
  }
}

/**
 * Radar equation and losses of the gates on one azimuth, each at the slant range of its middle cell; counts the cells known in each ring.
 * `passed`: what the weather lets through, by height and range.
 */
export function gatesOfRow(
  i: number,
  o: OptionModel,
  cells: CellRows,
  state: Uint8Array,
  passed: PathTable | null,
  all: Gates,
  rest: Gates | null,
  known: Uint32Array,
): void {
  const { constant } = o
  const { antennaM, nearestM } = o.cell
  const { centresM, groundM } = cells
  const { sums, gates, ring } = all
  const n = centresM.length
  const c = 1 / cells.effectiveRadiusM[i]
  for (let j = 0, at = i * n; j < n; j++, at++) {
    if (state[at] >= CELL.beyondVoid || tooNear(nearestM, antennaM, groundM[at], centresM[j], c)) continue
    known[j]++
    if (sums[j] === 0) continue
    const r2 = slantSquared(antennaM, groundM[at], centresM[j], c)
    const factor = passed ? (constant * pathTableAt(passed, j, groundM[at])) / (r2 * r2) : constant / (r2 * r2)
    const v = sums[j] * factor
    ring[j] += v
    gates[at] = v
    if (rest) {
      const w = rest.sums[j] * factor
      rest.ring[j] += w
      rest.gates[at] = w
    }
  }
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
