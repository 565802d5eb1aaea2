import { elevationGain } from '../../antenna/index.ts'
import { decibel, elevationTangent, slantSquared } from '../../clutter/index.ts'
import { type RadarInput, signalToNoiseDb, stcDb } from '../../radar/index.ts'
import { DEG_PER_RAD, RAD_PER_DEG, SPEED_OF_LIGHT_MS, toDb } from '../../units/index.ts'

const GAIN_TO = 0.6
const GAIN_ENTRIES = 32_768
const GAIN_PER_UNIT = GAIN_ENTRIES / (2 * GAIN_TO)
const STC_STEP_M = 25
/** Outside the pattern: no echo. */
const NO_GAIN_DB = -200

/** A radar, tilt and target as loops over places need them: tables of elevation gain and STC, ranges it listens to. */
export interface TargetSignal {
  readonly radar: RadarInput
  readonly tiltDeg: number
  /** S/N of one pulse at 1 m slant range on the beam peak, before STC, dB. */
  readonly atOneMetreDb: number
  /** Two-way elevation gain by tangent of elevation from −0.6 to 0.6, dB. */
  readonly gainDb: Float32Array
  /** Attenuation by slant range in steps of 25 m, dB. */
  readonly stcDb: Float32Array
  readonly tanTilt: number
  readonly reach: Reach
}

/** Tables for one radar, tilt and target. Side-lobe floors are for clutter only and are not used here. */
export function targetSignal(radar: RadarInput, tiltDeg: number, rcsM2: number, longestSlantM: number): TargetSignal {
  const stc = new Float32Array(Math.ceil(longestSlantM / STC_STEP_M) + 3)
  if (radar.stc.kind !== 'none') for (let i = 0; i < stc.length; i++) stc[i] = stcDb(radar, i * STC_STEP_M)
  return {
    radar,
    tiltDeg,
    atOneMetreDb: signalToNoiseDb(radar, { rcsM2, slantRangeM: 1 }),
    gainDb: gainTable(radar, tiltDeg),
    stcDb: stc,
    tanTilt: Math.tan(tiltDeg * RAD_PER_DEG),
    reach: reachOf(radar),
  }
}

/** Gain tables of a radar by tilt: the same for every need and mast height. */
const gainTables = new WeakMap<RadarInput, Map<number, Float32Array>>()
function gainTable(radar: RadarInput, tiltDeg: number): Float32Array {
  const own = gainTables.get(radar) ?? new Map<number, Float32Array>()
  gainTables.set(radar, own)
  let table = own.get(tiltDeg)
  if (!table) {
    table = Float32Array.from({ length: GAIN_ENTRIES + 2 }, (_, i) => exactGainDb(radar, tiltDeg, i / GAIN_PER_UNIT - GAIN_TO))
    own.set(tiltDeg, table)
  }
  return table
}

function exactGainDb(radar: RadarInput, tiltDeg: number, tanElevation: number): number {
  const gain = elevationGain(radar.antenna, Math.atan(tanElevation) * DEG_PER_RAD, tiltDeg)
  return gain > 1e-10 ? 2 * toDb(gain) : NO_GAIN_DB
}

/** Two-way elevation gain toward a target, dB relative to the peak; −200 outside the pattern. */
export function gainAt(t: TargetSignal, tanElevation: number): number {
  const x = (tanElevation + GAIN_TO) * GAIN_PER_UNIT
  const i = x | 0
  if (!(x >= 0) || i > GAIN_ENTRIES) return exactGainDb(t.radar, t.tiltDeg, tanElevation)
  const v = t.gainDb[i]
  return v + (x - i) * (t.gainDb[i + 1] - v)
}

/** STC attenuation, dB, at a slant range, m. */
export function stcAt(t: TargetSignal, slantM: number): number {
  const x = slantM / STC_STEP_M
  const last = t.stcDb.length - 2
  const i = Math.min(last, x | 0)
  const v = t.stcDb[i]
  return v + Math.min(1, x - i) * (t.stcDb[i + 1] - v)
}

/** Slant ranges at which the receiver listens, m. */
export interface Reach {
  readonly nearestM: number
  readonly farthestM: number
  /** Unambiguous range of each PRF; an echo is eclipsed when it meets a later pulse on all of them, or on any where each dwell has to see it. */
  readonly unambiguousM: readonly number[]
  readonly anyEclipses: boolean
  readonly pulseM: number
}
function reachOf(r: RadarInput): Reach {
  const pulseM = (SPEED_OF_LIGHT_MS * r.pulseWidthS) / 2
  return {
    nearestM: (SPEED_OF_LIGHT_MS * (r.pulseWidthS + (r.recoveryS ?? 0))) / 2,
    farthestM: r.instrumentedRangeM,
    unambiguousM: r.prfHz.map((f) => SPEED_OF_LIGHT_MS / (2 * f)),
    anyEclipses: r.prfMode === 'dwellStagger',
    pulseM,
  }
}
/** Is an echo from a slant range heard: past the pulse and its recovery, inside the instrumented range, not eclipsed by a later pulse? */
export function isHeard(r: Reach, slantM: number): boolean {
  if (slantM < r.nearestM || slantM > r.farthestM) return false
  let eclipsed = 0
  for (const u of r.unambiguousM) {
    if (slantM + r.pulseM <= u) continue
    const apparent = slantM % u
    if (apparent < r.nearestM || apparent > u - r.pulseM) eclipsed++
  }
  return r.anyEclipses ? eclipsed === 0 : eclipsed < r.unambiguousM.length
}

/** Echo of a target at one level along a ray, by range cell. */
export interface LevelRow {
  readonly slantM: Float32Array
  /** S/N after pattern and STC less the required ratio, with the gain of a filter bank, dB. */
  readonly headDb: Float32Array
  /** Residue over noise that the echo bears and still passes, dB; −Infinity where it is too weak. */
  readonly roomDb: Float32Array
  readonly gainDb: Float32Array
  readonly stcDb: Float32Array
  /** 1 where the receiver listens. */
  readonly heard: Uint8Array
  /** 1 where the target stands above the beam peak. */
  readonly above: Uint8Array
}
export const makeLevelRow = (ranges: number): LevelRow => ({
  slantM: new Float32Array(ranges),
  headDb: new Float32Array(ranges),
  roomDb: new Float32Array(ranges),
  gainDb: new Float32Array(ranges),
  stcDb: new Float32Array(ranges),
  heard: new Uint8Array(ranges),
  above: new Uint8Array(ranges),
})

/** What turns geometry into `headDb`: the ratio asked for and the gain of a bank over noise, dB. */
export interface HeadModel {
  readonly signal: TargetSignal
  readonly requiredDb: number
  readonly noiseGainDb: number
  readonly room: (headDb: number) => number
}

/**
 * Fills cells first … last−1 of a row: target at `aboveM` over sea level, or over the ground where `groundM` is given (its row starts at `from`).
 * `c` = 1 / effective earth radius, 0 = flat.
 */
export function fillLevelRow(
  m: HeadModel,
  row: LevelRow,
  mastM: number,
  c: number,
  rangeStepM: number,
  first: number,
  last: number,
  aboveM: number,
  groundM: Float32Array | null,
  from: number,
): void {
  const { signal, requiredDb, noiseGainDb } = m
  const base = signal.atOneMetreDb - requiredDb + noiseGainDb
  for (let j = first; j < last; j++) {
    const r = (j + 0.5) * rangeStepM
    const targetM = groundM ? groundM[from + j] + aboveM : aboveM
    const slant2 = slantSquared(mastM, targetM, r, c)
    const slant = Math.sqrt(slant2)
    const tan = elevationTangent(mastM, targetM, r, c)
    const gain = gainAt(signal, tan)
    const stc = stcAt(signal, slant)
    const head = base + gain - 2 * decibel(slant2) - stc
    row.slantM[j] = slant
    row.gainDb[j] = gain
    row.stcDb[j] = stc
    row.headDb[j] = head
    row.roomDb[j] = m.room(head) - noiseGainDb
    row.heard[j] = isHeard(signal.reach, slant) ? 1 : 0
    row.above[j] = tan > signal.tanTilt ? 1 : 0
  }
}
