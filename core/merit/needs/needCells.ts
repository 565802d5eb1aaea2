import { CELL } from '../../polar/index.ts'
import { canonicalJson, type SettledNeed } from '../../study/index.ts'
import { toDb, wavelengthM } from '../../units/index.ts'
import { finish, type Work } from '../../work/index.ts'
import { antennaM, meanEffectiveRadiusM, type OptionCells, residueOf } from '../optionCells.ts'
import { fillLevelRow, lossesBetween, makeLevelRow, type RowModel } from '../signal/levelRow.ts'
import { fillLobes, lobeGrid, lobeModel } from '../signal/lobing/index.ts'
import { overloadOf, thresholdRiseOf } from '../signal/receiverLimits.ts'
import { targetSignal } from '../signal/targetSignal.ts'
import { type LevelTest, makeNeedRow, type NeedRow, startRow, testLevel } from './levelTest.ts'
import { lossCode } from './needTypes.ts'
import { PLACE } from './place.ts'
import { fillRayRow, makeRayRow } from './rayRow.ts'
import { type NeedSpans, spansOf } from './spans.ts'

/** A need of kind layer or polygon tested in every cell of one option. Arrays of one value per polar cell; worst of the need's levels. */
export interface NeedCells {
  /** Bits of PLACE; 0 outside the need. */
  readonly place: Uint16Array
  /** Height margin, m: least over the levels of (level − floor); NaN outside the need and where unknown. */
  readonly marginM: Float32Array
  /** S/(C/I+N) less the required ratio, dB; NaN unless in sight at every level. */
  readonly signalDb: Float32Array
  /** Suppression needed and what there is, dB; 0 needed = none needed; NaN unless detectable. */
  readonly neededDb: Float32Array
  readonly availableDb: Float32Array
  /** Why it is not usable: code of LOSS_CAUSES; 0 where usable and outside the need. */
  readonly cause: Uint8Array
}

/** Takes the cells first … last−1 of one row of a need; the row's first cell has index `from`. */
export type EachNeedRow = (row: NeedRow, from: number, first: number, last: number) => void
/** Azimuths between two yields of a scan. */
const AZIMUTHS_PER_TURN = 24

/** The cells of a need, all of them. */
export function needCells(o: OptionCells, need: SettledNeed): NeedCells {
  const count = o.site.groundM.length
  const values = (): Float32Array => new Float32Array(count).fill(Number.NaN)
  const out: NeedCells = {
    place: new Uint16Array(count),
    marginM: values(),
    signalDb: values(),
    neededDb: values(),
    availableDb: values(),
    cause: new Uint8Array(count),
  }
  const scan = scanNeed(o, need, (row, from, first, last) => {
    for (const key of ['place', 'marginM', 'signalDb', 'neededDb', 'availableDb', 'cause'] as const)
      out[key].set(row[key].subarray(first, last), from + first)
  })
  finish(scan)
  return out
}

/**
 * Tests a layer or polygon need in every cell of an option, at every level above its ground, and hands out the cells first … last−1 of one row at
 * a time (index `from` + j). In sight: level − floor ≥ the floor's error band. Detectable: in sight, heard, and S/N ≥ the required ratio. Usable:
 * detectable and S/(C/I+N) ≥ it. Signal: one pulse after STC, elevation pattern, knife edge near the mask, F never over 1. Clutter: mean of the
 * resolution cell at the target's azimuth and slant range. Returns the spans of the need.
 */
export function* scanNeed(o: OptionCells, need: SettledNeed, each: EachNeedRow): Work<NeedSpans> {
  const { grid, groundM } = o.site
  const { azimuths, ranges, rangeStepM } = grid
  const spans = spansOf(o.place, grid, need, o.places.find((p) => p.needId === need.id) ?? null)
  const mast = antennaM(o)
  const c = 1 / meanEffectiveRadiusM(o.site)
  const noiseGainDb = toDb(o.suppression.noiseGain)
  const signal = targetSignal(o.radar, o.atmosphere, o.tiltDeg, need.rcsM2, ranges * rangeStepM * 1.5 + 50_000)
  const [lowM, highM] = signal.loss ? targetHeights(o, need) : [0, 0]
  const rowModel = (curvature: number): RowModel => ({
    signal,
    requiredDb: need.requiredRatioDb,
    noiseGainDb,
    mastM: mast,
    c: curvature,
    rangeStepM,
    loss: lossesBetween(signal, grid, mast, curvature, lowM, highM),
  })
  const { floorM, floorBandM, state } = o.mask
  const residue = residueOf(o, thresholdRiseOf(o))
  const ray = makeRayRow(ranges, rangeStepM, mast, c)
  const aboveSea = need.heightAbove === 'sea'
  const model = rowModel(c)
  const lowModel = o.lowK ? rowModel(1 / o.lowK.meanRadiusM) : null
  const tests = need.levelsM.map(
    (levelM): LevelTest => ({
      levelM,
      aboveSea,
      row: makeLevelRow(ranges),
      rowLow: lowModel && makeLevelRow(ranges),
      ray,
      groundM,
      floorM,
      floorBandM,
      clearLowM: o.lowK?.clearM ?? null,
      residue,
      overload: overloadOf(o),
      noiseGainDb,
      wavelengthM: wavelengthM(o.radar.frequencyHz),
      rangeStepM,
      ranges,
    }),
  )
  const fill = (first: number, last: number, ground: Float32Array | null, from: number): void => {
    for (const t of tests) {
      fillLevelRow(model, t.row, first, last, t.levelM, ground, from)
      if (t.rowLow && lowModel) fillLevelRow(lowModel, t.rowLow, first, last, t.levelM, ground, from)
    }
  }
  if (aboveSea) fill(0, ranges, null, 0)
  const lobing = lobeModel(o.ground, o.radar, o.atmosphere)
  const lobes =
    lobing &&
    lobeGrid(
      lobing,
      o.mask,
      signal,
      mast,
      c,
      canonicalJson([need.kind, need.id, need.heightAbove, need.fromRangeM, need.toRangeM, need.sectorDeg]),
      tests.map(({ levelM, row, rowLow }) => ({
        levelM,
        rows: [{ row, c }, ...(rowLow && lowModel ? [{ row: rowLow, c: lowModel.c }] : [])],
      })),
    )
  const cells = { groundM, code: o.site.code, relief: o.site.relief, inSight: o.mask.inSight }
  const row = makeNeedRow(ranges)
  for (let i = 0; i < azimuths; i++) {
    if (i % AZIMUTHS_PER_TURN === 0) yield { done: i, total: azimuths }
    const pairs = spans.pairs[i]
    if (!pairs) continue
    const from = i * ranges
    const end = pairs[pairs.length - 1]
    fillRayRow(ray, floorM, groundM, from, end, mast, c, rangeStepM)
    if (!aboveSea) fill(pairs[0], end, groundM, from)
    if (lobes) fillLobes(lobes, cells, pairs[0], end, !aboveSea, from)
    for (let p = 0; p < pairs.length; p += 2) {
      startRow(row, pairs[p], pairs[p + 1])
      for (const t of tests) testLevel(t, row, pairs[p], pairs[p + 1], from)
      finishRow(row, state, pairs[p], pairs[p + 1], from)
      each(row, from, pairs[p], pairs[p + 1])
    }
  }
  return spans
}

/** Lowest and highest target of a need, m MSL. */
function targetHeights(o: OptionCells, need: SettledNeed): [number, number] {
  const low = Math.min(...need.levelsM)
  const high = Math.max(...need.levelsM)
  if (need.heightAbove === 'sea') return [low, high]
  let lowest = Number.POSITIVE_INFINITY
  let highest = Number.NEGATIVE_INFINITY
  for (const h of o.site.groundM) {
    if (h < lowest) lowest = h
    if (h > highest) highest = h
  }
  return highest >= lowest ? [lowest + low, highest + high] : [low, high]
}

const UNKNOWN = lossCode('unknown')

/** Turns what every level found into the row's bits; takes back numbers that do not stand. */
function finishRow(row: NeedRow, state: Uint8Array, first: number, last: number, from: number): void {
  const { tested, marginal, place, cause, marginM, signalDb, neededDb, availableDb } = row
  for (let j = first; j < last; j++) {
    const s = state[from + j]
    const unknown = s === CELL.beyondVoid || s === CELL.outside || s === 0
    const every = unknown || tested[j] === 0 ? 0 : place[j]
    if (unknown || tested[j] === 0) {
      place[j] = PLACE.inNeed | (unknown ? PLACE.unknown : PLACE.groundAbove)
      cause[j] = unknown ? UNKNOWN : 0
      marginM[j] = Number.NaN
    } else {
      place[j] = PLACE.inNeed | every | (every & PLACE.inSight ? 0 : marginal[j])
      if (every & PLACE.usable) cause[j] = 0
    }
    if (!(every & PLACE.inSight)) signalDb[j] = Number.NaN
    if (!(every & PLACE.detectable)) neededDb[j] = availableDb[j] = Number.NaN
  }
}
