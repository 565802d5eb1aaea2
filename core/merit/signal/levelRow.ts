import { lossTable, type PathTable, pathTableAt } from '../../atmosphere/index.ts'
import { decibel, elevationTangent, slantSquared } from '../../clutter/index.ts'
import type { PolarShape } from '../../polar/index.ts'
import { roomOverNoiseDb } from './decibelTables.ts'
import { gainAt, isHeard, segmentIndex, stcAt, type TargetSignal } from './targetSignal.ts'

/** Echo of a target at one level along a ray, by range cell. */
export interface LevelRow {
  readonly slantM: Float32Array
  /** S/N after pattern, losses and STC less the required ratio, with the gain of a filter bank, dB. */
  readonly headDb: Float32Array
  /** Residue over noise that the echo bears and still passes, dB; −Infinity where it is too weak. */
  readonly roomDb: Float32Array
  readonly gainDb: Float32Array
  readonly stcDb: Float32Array
  /** 1 where the receiver listens. */
  readonly heard: Uint8Array
  /** 1 where the target stands above the beam peak. */
  readonly above: Uint8Array
  /** Loss of direct and reflected ray together where the mask is clear, two ways, dB; filled by `fillLobes` where anything reflects. */
  readonly lobeDb: Float32Array
}
export const makeLevelRow = (ranges: number): LevelRow => ({
  slantM: new Float32Array(ranges),
  headDb: new Float32Array(ranges),
  roomDb: new Float32Array(ranges),
  gainDb: new Float32Array(ranges),
  stcDb: new Float32Array(ranges),
  heard: new Uint8Array(ranges),
  above: new Uint8Array(ranges),
  lobeDb: new Float32Array(ranges),
})

/** What turns geometry into a row: the signal, the ratio asked for, the gain of a bank over noise (dB), the mast and the earth. */
export interface RowModel {
  readonly signal: TargetSignal
  readonly requiredDb: number
  readonly noiseGainDb: number
  readonly mastM: number
  /** 1 / effective earth radius; 0 = flat. */
  readonly c: number
  readonly rangeStepM: number
  /** Losses of the weather by height and range cell; null = none. */
  readonly loss: PathTable | null
}

/** Losses of the weather to targets between two heights; null where there are none. */
export function lossesBetween(t: TargetSignal, grid: PolarShape, mastM: number, c: number, lowM: number, highM: number): PathTable | null {
  return t.loss && lossTable(t.loss, mastM, c === 0 ? Number.POSITIVE_INFINITY : 1 / c, grid, lowM, highM)
}

/** Fills cells first … last−1 of a row: target at `aboveM` over sea level, or over the ground where `groundM` is given (its row starts at `from`). */
export function fillLevelRow(
  m: RowModel,
  row: LevelRow,
  first: number,
  last: number,
  aboveM: number,
  groundM: Float32Array | null,
  from: number,
): void {
  const { signal, noiseGainDb, mastM, c, rangeStepM, loss } = m
  const { slantM, headDb, roomDb, gainDb, stcDb, heard, above } = row
  const { segments } = signal
  const base = noiseGainDb - m.requiredDb
  let s = 0
  for (let j = first; j < last; j++) {
    const r = (j + 0.5) * rangeStepM
    const targetM = groundM ? groundM[from + j] + aboveM : aboveM
    const slant2 = slantSquared(mastM, targetM, r, c)
    const slant = Math.sqrt(slant2)
    const tan = elevationTangent(mastM, targetM, r, c)
    s = segmentIndex(signal, slant, s)
    const segment = segments[s]
    const gain = gainAt(signal, segment, tan)
    const stc = stcAt(signal, slant)
    let head = base + segment.atOneMetreDb + gain - 2 * decibel(slant2) - stc
    if (loss) head -= pathTableAt(loss, j, targetM)
    slantM[j] = slant
    gainDb[j] = gain
    stcDb[j] = stc
    headDb[j] = head
    roomDb[j] = roomOverNoiseDb(head) - noiseGainDb
    heard[j] = isHeard(signal, segment, slant) ? 1 : 0
    above[j] = tan > segment.tanPeak ? 1 : 0
  }
}
