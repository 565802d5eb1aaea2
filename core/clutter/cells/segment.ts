import { clutterGainTable, type GainTable } from '../../antenna/index.ts'
import type { Weather } from '../../atmosphere/index.ts'
import { gateLengthM, minimumRangeM, type RadarInput, radarConstantDb, rangeSegments } from '../../radar/index.ts'
import { fromDb } from '../../units/index.ts'
import { type RainBeam, rainBeam } from '../rain/rainBeam.ts'
import { gateWeights } from './cellSums.ts'

/** One pulse and pair of beams of an option with their tables, and the slant ranges they are used at. */
export interface Segment {
  /** [fromM, toM), never inside the pulse's own length. */
  readonly fromM: number
  readonly toM: number
  /** The only one and without an end: a cell is its own unless it is too near. */
  readonly alone: boolean
  readonly radar: RadarInput
  readonly beams: string
  /** Echo-to-noise ratio of 1 m² at 1 m. */
  readonly constant: number
  readonly gateM: number
  /** Weights of neighbouring range cells in a gate, m. */
  readonly weights: Float64Array
  readonly gain: GainTable
  readonly rain: RainBeam | null
  /** Range side lobes, power ratio (0 = none), and how far they reach to each side: the length of the pulse, m. */
  readonly lobe: number
  readonly pulseM: number
}

/** Ground range falls short of slant range by up to this height difference: a bound for where a segment's cells lie, m. */
const HIGHEST_DIFFERENCE_M = 9_000

/** Tables of every segment of a radar at a tilt. Throws InputError for a pattern that is refused. */
export function makeSegments(r: RadarInput, tiltDeg: number, rangeStepM: number, weather: Weather | undefined): Segment[] {
  const parts = rangeSegments(r)
  return parts.flatMap(({ fromM, toM, radar, rangeSidelobeDb, beams }) => {
    const pulseM = minimumRangeM(radar)
    if (toM <= pulseM) return []
    const gateM = gateLengthM(radar)
    return {
      fromM: Math.max(fromM, pulseM),
      toM,
      alone: parts.length === 1 && toM === Number.POSITIVE_INFINITY,
      radar,
      beams,
      constant: fromDb(radarConstantDb(radar)),
      gateM,
      weights: gateWeights(gateM, rangeStepM),
      gain: clutterGainTable(radar.antenna, tiltDeg, radar.receiveAntenna),
      rain: weather ? rainBeam(weather, radar, tiltDeg) : null,
      lobe: rangeSidelobeDb === null ? 0 : fromDb(rangeSidelobeDb),
      pulseM,
    }
  })
}

/** Segment that holds a slant range, m; undefined where nothing is received. */
export const segmentOf = (segments: readonly Segment[], slantM: number): Segment | undefined =>
  segments.find((s) => slantM >= s.fromM && slantM < s.toM)

/** Range cells whose slant range can lie in a segment: [first, end). */
export function cellsOfSegment(s: Segment, ranges: number, rangeStepM: number): [first: number, end: number] {
  if (s.alone) return [0, ranges]
  const nearest = Math.sqrt(Math.max(0, s.fromM ** 2 - HIGHEST_DIFFERENCE_M ** 2))
  return [Math.min(ranges, Math.floor((0.998 * nearest) / rangeStepM)), Math.min(ranges, Math.ceil((1.002 * s.toM) / rangeStepM) + 1)]
}

/** Range cells to each side that a gate and its range side lobes draw from. */
export const reachOf = (s: Segment, rangeStepM: number): number =>
  (s.weights.length >> 1) + (s.lobe > 0 ? Math.ceil(s.pulseM / rangeStepM) + 1 : 0)

/**
 * Echoes from other gates that the range side lobes of a compressed pulse bring into gate j, ratio: level × Σ of the gates within the length of
 * the pulse to each side, its own left out. `summed[k]` is the sum of the first k cells' echoes, one gate each.
 */
export function rangeLobes(s: Segment, summed: Float64Array, j: number, rangeStepM: number): number {
  const around = (halfM: number): number => sumTo(summed, j + 0.5 + halfM / rangeStepM) - sumTo(summed, j + 0.5 - halfM / rangeStepM)
  return Math.max(0, s.lobe * (rangeStepM / s.gateM) * (around(s.pulseM) - around(Math.min(s.pulseM, s.gateM / 2))))
}
function sumTo(summed: Float64Array, cell: number): number {
  const x = Math.min(summed.length - 1, Math.max(0, cell))
  const k = Math.min(summed.length - 2, x | 0)
  return summed[k] + (x - k) * (summed[k + 1] - summed[k])
}
