import { plusRatioDb, type ResidueCells } from '../optionCells.ts'
import { aboveNoiseDb, roomOverNoiseDb } from '../signal/decibelTables.ts'
import { twoWayEdgeLossDb } from '../signal/edgeLoss.ts'
import type { LevelRow } from '../signal/levelRow.ts'
import type { Overload } from '../signal/receiverLimits.ts'
import { signalLoss } from './lossCause.ts'
import { lossCode } from './needTypes.ts'
import { PLACE } from './place.ts'
import type { RayRow } from './rayRow.ts'

/** One level of a need against the cells of one option; rows are those of the azimuth at hand. */
export interface LevelTest {
  readonly levelM: number
  readonly aboveSea: boolean
  readonly row: LevelRow
  /** The same at the smaller k; null where that is not worked out. */
  readonly rowLow: LevelRow | null
  readonly ray: RayRow
  readonly groundM: Float32Array
  readonly floorM: Float32Array
  readonly floorBandM: Float32Array
  readonly clearLowM: Float32Array | null
  readonly residue: ResidueCells
  readonly overload: Overload | null
  readonly noiseGainDb: number
  readonly wavelengthM: number
  readonly rangeStepM: number
  readonly ranges: number
}

/** What the levels of a need found in the cells of one row: while they are tested, what holds so far. Fields as in NeedCells. */
export interface NeedRow {
  /** Levels above the ground. */
  readonly tested: Uint8Array
  /** PLACE.marginal where any is. */
  readonly marginal: Uint8Array
  /** Bits of PLACE that hold at every level. */
  readonly place: Uint16Array
  /** Why the first level that fails fails. */
  readonly cause: Uint8Array
  readonly marginM: Float32Array
  readonly signalDb: Float32Array
  readonly neededDb: Float32Array
  readonly availableDb: Float32Array
}
export const makeNeedRow = (ranges: number): NeedRow => ({
  tested: new Uint8Array(ranges),
  marginal: new Uint8Array(ranges),
  place: new Uint16Array(ranges),
  cause: new Uint8Array(ranges),
  marginM: new Float32Array(ranges),
  signalDb: new Float32Array(ranges),
  neededDb: new Float32Array(ranges),
  availableDb: new Float32Array(ranges),
})
const EVERY = PLACE.inSight | PLACE.detectable | PLACE.usable | PLACE.lowInSight | PLACE.lowDetectable | PLACE.lowUsable
export function startRow(r: NeedRow, first: number, last: number): void {
  r.tested.fill(0, first, last)
  r.marginal.fill(0, first, last)
  r.place.fill(EVERY, first, last)
  r.cause.fill(0, first, last)
  r.marginM.fill(Number.POSITIVE_INFINITY, first, last)
  r.signalDb.fill(Number.POSITIVE_INFINITY, first, last)
  r.neededDb.fill(-1, first, last)
}

const OUT_OF_RANGE = lossCode('out-of-range')
const MASKED = lossCode('masked')
const MARGINAL = lossCode('marginal')
const LOBING = lossCode('lobing')
/** Clutter this far under the noise takes nothing from an echo that passes, dB. */
const LEAST_DB = -60

/** Tests one level in cells first … last−1 of a row that starts at `from`. Unknown ground counts as hidden; the caller tells it apart. */
export function testLevel(t: LevelTest, out: NeedRow, first: number, last: number, from: number): void {
  const { levelM, aboveSea, row, rowLow, groundM, floorM, floorBandM, clearLowM, overload } = t
  const { noiseGainDb, wavelengthM, rangeStepM, ranges } = t
  const { cnrDb, left: leftDb, lessDb, folded, foldedLeft, riseDb } = t.residue
  const { obstacleM, groundSlantM, rangeM } = t.ray
  const { tested, place, marginal, cause: why, marginM, signalDb, neededDb, availableDb } = out
  const perStep = 1 / rangeStepM
  for (let j = first; j < last; j++) {
    const at = from + j
    const ground = groundM[at]
    const target = aboveSea ? levelM : ground + levelM
    if (target < ground) continue
    tested[j]++
    const margin = target - floorM[at]
    const band = floorBandM[at]
    if (margin < marginM[j]) marginM[j] = margin
    const heard = row.heard[j] === 1
    if (!heard && why[j] === 0) why[j] = OUT_OF_RANGE

    // A target shares the gate of the ground at its own slant range.
    const gate = from + Math.min(ranges - 1, Math.max(0, j + Math.round((row.slantM[j] - groundSlantM[j]) * perStep)))
    let cnr = cnrDb[gate]
    let left = leftDb[gate] - lessDb
    if (folded !== null && folded[gate] > 0) {
      cnr = plusRatioDb(cnr, folded[gate])
      left = plusRatioDb(left, folded[gate] * foldedLeft)
    }
    const stc = row.stcDb[j]
    const overloaded = overload !== null && cnr - stc + 0.1 * overload.excessTenths[gate] > overload.limitDb
    if (overloaded) left = cnr
    if (riseDb !== null) {
      // the threshold stands higher over what is left of spiky clutter
      cnr += riseDb[gate]
      left += riseDb[gate]
    }
    const residue = left - stc
    let bits = 0

    if (rowLow !== null && clearLowM !== null && target >= clearLowM[at]) {
      bits |= PLACE.lowInSight
      let edge = twoWayEdgeLossDb(target - clearLowM[at] + band, rangeM[j], obstacleM[j], wavelengthM)
      if (edge === 0) edge = rowLow.lobeDb[j]
      const strength = rowLow.headDb[j] - edge
      if (strength >= 0 && rowLow.heard[j] === 1) {
        bits |= PLACE.lowDetectable
        // how much residue the echo bears, worked out only where there is any
        if (!(residue > LEAST_DB) || !(residue > (edge > 0 ? roomOverNoiseDb(strength) - noiseGainDb : rowLow.roomDb[j])))
          bits |= PLACE.lowUsable
      }
    }
    if (margin >= band) {
      bits |= PLACE.inSight
      let edge = twoWayEdgeLossDb(margin, rangeM[j], obstacleM[j], wavelengthM)
      const clear = edge === 0
      if (clear) edge = row.lobeDb[j]
      const strength = row.headDb[j] - edge
      const over = strength - aboveNoiseDb(residue + noiseGainDb)
      if (over < signalDb[j]) signalDb[j] = over
      if (strength >= 0 && heard) {
        bits |= PLACE.detectable
        const clutter = cnr - stc
        const room = !(clutter > LEAST_DB) ? clutter : edge > 0 ? roomOverNoiseDb(strength) - noiseGainDb : row.roomDb[j]
        const needed = clutter > room ? clutter - room : 0
        if (needed > neededDb[j]) {
          neededDb[j] = needed
          availableDb[j] = cnr >= left ? cnr - left : lessDb
        }
        if (over >= 0) bits |= PLACE.usable
      }
      if (!(bits & PLACE.usable) && why[j] === 0) {
        // what only the loss close over the mask takes away is the mask's, what only a null takes away is its own
        const free = edge > 0 && row.headDb[j] >= aboveNoiseDb(residue + noiseGainDb)
        why[j] = free
          ? clear
            ? LOBING
            : MASKED
          : signalLoss({
              headDb: strength,
              gainDb: row.gainDb[j],
              stcDb: stc,
              residueDb: left,
              noiseGainDb,
              above: row.above[j] === 1,
              echoResponseDb: 0,
              residueResponseDb: 0,
            })
      }
    } else {
      const isMarginal = margin > -band
      if (isMarginal) marginal[j] = PLACE.marginal
      if (why[j] === 0) why[j] = isMarginal ? MARGINAL : MASKED
    }
    place[j] &= bits
  }
}
