import { elevationGain } from '../../antenna/index.ts'
import { type PathLoss, pathLoss, twoWayLossDb, type Weather } from '../../atmosphere/index.ts'
import { type RadarInput, type RangeSegment, radarConstantDb, rangeSegments, stcDb, targetPolarisationLossDb } from '../../radar/index.ts'
import { DEG_PER_RAD, RAD_PER_DEG, SPEED_OF_LIGHT_MS, toDb } from '../../units/index.ts'

const GAIN_TO = 0.6
const GAIN_ENTRIES = 32_768
const GAIN_PER_UNIT = GAIN_ENTRIES / (2 * GAIN_TO)
const STC_STEP_M = 25
/** Outside the pattern: no echo. */
const NO_GAIN_DB = -200

/** The radar over the slant ranges that one pulse and one pair of beams serve. */
export interface SignalSegment {
  readonly fromM: number
  readonly toM: number
  readonly radar: RadarInput
  /** Names of the beams; '' for the antenna's own. */
  readonly beams: string
  /** S/N of one pulse at 1 m slant range on the beam peak, before STC, without losses of the weather, dB. */
  readonly atOneMetreDb: number
  /** Two-way elevation gain by tangent of elevation from −0.6 to 0.6, dB. */
  readonly gainDb: Float32Array
  /** Tangent of the elevation of the transmitting beam's peak. */
  readonly tanPeak: number
  /** Slant ranges inside this are under the pulse and its recovery; length of the pulse, m. */
  readonly nearestM: number
  readonly pulseM: number
}
/** A radar, tilt and target as loops over places need them. */
export interface TargetSignal {
  readonly radar: RadarInput
  readonly tiltDeg: number
  /** Nearest first; a range in none of them is not received. */
  readonly segments: readonly SignalSegment[]
  /** Attenuation by slant range in steps of 25 m, dB. */
  readonly stcDb: Float32Array
  readonly loss: PathLoss | null
  /** Unambiguous range of each PRF, m, and on how many of them an echo may meet a later pulse and still be heard. */
  readonly unambiguousM: readonly number[]
  readonly mayEclipse: number
}

/** Tables for one radar, tilt and target. Side-lobe floors are for clutter only and are not used here. */
export function targetSignal(radar: RadarInput, weather: Weather, tiltDeg: number, rcsM2: number, longestSlantM: number): TargetSignal {
  const stc = new Float32Array(Math.ceil(longestSlantM / STC_STEP_M) + 3)
  if (radar.stc.kind !== 'none') for (let i = 0; i < stc.length; i++) stc[i] = stcDb(radar, i * STC_STEP_M)
  const targetDb = toDb(rcsM2) - targetPolarisationLossDb(radar)
  return {
    radar,
    tiltDeg,
    segments: segmentsOf(radar, tiltDeg).map((s) => ({ ...s, atOneMetreDb: s.atOneMetreDb + targetDb })),
    stcDb: stc,
    loss: pathLoss(weather, radar.frequencyHz, radar.polarisation),
    unambiguousM: radar.prfHz.map((f) => SPEED_OF_LIGHT_MS / (2 * f)),
    mayEclipse: radar.prfHz.length - (radar.prfMode === 'dwellStagger' ? (radar.dwellsNeeded ?? radar.prfHz.length) : 1),
  }
}

/** Segments of a radar by tilt, for 1 m²: the same for every need and mast height. */
const known = new WeakMap<RadarInput, Map<number, readonly SignalSegment[]>>()
function segmentsOf(radar: RadarInput, tiltDeg: number): readonly SignalSegment[] {
  const own = known.get(radar) ?? new Map<number, readonly SignalSegment[]>()
  known.set(radar, own)
  let segments = own.get(tiltDeg)
  if (!segments) {
    segments = rangeSegments(radar).map((s) => segmentOf(s, tiltDeg))
    own.set(tiltDeg, segments)
  }
  return segments
}
function segmentOf({ fromM, toM, radar, beams }: RangeSegment, tiltDeg: number): SignalSegment {
  return {
    fromM,
    toM,
    radar,
    beams,
    atOneMetreDb: radarConstantDb(radar),
    gainDb: Float32Array.from({ length: GAIN_ENTRIES + 2 }, (_, i) => exactGainDb(radar, tiltDeg, i / GAIN_PER_UNIT - GAIN_TO)),
    tanPeak: Math.tan((tiltDeg + (radar.antenna.offsetDeg ?? 0)) * RAD_PER_DEG),
    nearestM: (SPEED_OF_LIGHT_MS * (radar.pulseWidthS + (radar.recoveryS ?? 0))) / 2,
    pulseM: (SPEED_OF_LIGHT_MS * radar.pulseWidthS) / 2,
  }
}

function exactGainDb({ antenna, receiveAntenna }: RadarInput, tiltDeg: number, tanElevation: number): number {
  const e = Math.atan(tanElevation) * DEG_PER_RAD
  const transmit = elevationGain(antenna, e, tiltDeg)
  const gain = transmit * (receiveAntenna ? elevationGain(receiveAntenna, e, tiltDeg) : transmit)
  return gain > 1e-20 ? toDb(gain) : NO_GAIN_DB
}

/** Two-way elevation gain of a segment toward a target, dB relative to the peaks; −200 outside the pattern. */
export function gainAt(t: TargetSignal, s: SignalSegment, tanElevation: number): number {
  const x = (tanElevation + GAIN_TO) * GAIN_PER_UNIT
  const i = x | 0
  if (!(x >= 0) || i > GAIN_ENTRIES) return exactGainDb(s.radar, t.tiltDeg, tanElevation)
  const v = s.gainDb[i]
  return v + (x - i) * (s.gainDb[i + 1] - v)
}

/** STC attenuation, dB, at a slant range, m. */
export function stcAt(t: TargetSignal, slantM: number): number {
  const x = slantM / STC_STEP_M
  const last = t.stcDb.length - 2
  const i = Math.min(last, x | 0)
  const v = t.stcDb[i]
  return v + Math.min(1, x - i) * (t.stcDb[i + 1] - v)
}

/** Number of the segment that holds a slant range, looked for from a guess on; the nearest one where none holds it. */
export function segmentIndex(t: TargetSignal, slantM: number, guess: number): number {
  const { segments } = t
  let s = guess
  while (s + 1 < segments.length && slantM >= segments[s + 1].fromM) s++
  while (s > 0 && slantM < segments[s].fromM) s--
  return s
}

/** Is an echo heard: in a segment, past the pulse and its recovery, inside the instrumented range, not eclipsed by a later pulse? */
export function isHeard(t: TargetSignal, s: SignalSegment, slantM: number): boolean {
  if (slantM < s.fromM || slantM >= s.toM || slantM < s.nearestM || slantM > t.radar.instrumentedRangeM) return false
  let eclipsed = 0
  for (const u of t.unambiguousM) {
    if (slantM + s.pulseM <= u) continue
    const apparent = slantM % u
    if (apparent < s.nearestM || apparent > u - s.pulseM) eclipsed++
  }
  return eclipsed <= t.mayEclipse
}

/** Echo of a target at one place; dB. */
export interface TargetEcho {
  readonly segment: SignalSegment
  readonly gainDb: number
  readonly stcDb: number
  /** Gas and rain, both ways. */
  readonly lossDb: number
  /** S/N of one pulse after STC. */
  readonly snrDb: number
  readonly heard: boolean
  /** Above the peak of the transmitting beam? */
  readonly above: boolean
}
/** The echo of a target at a slant and ground range (m), an elevation (tangent, at the antenna) and a height (m MSL). Source: radar equation (Skolnik). */
export function echoAt(
  t: TargetSignal,
  antennaM: number,
  targetM: number,
  rangeM: number,
  slantM: number,
  tanElevation: number,
): TargetEcho {
  const segment = t.segments[segmentIndex(t, slantM, 0)]
  const gainDb = gainAt(t, segment, tanElevation)
  const stc = stcAt(t, slantM)
  const lossDb = twoWayLossDb(t.loss, antennaM, targetM, rangeM, slantM)
  return {
    segment,
    gainDb,
    stcDb: stc,
    lossDb,
    snrDb: segment.atOneMetreDb + gainDb - 40 * Math.log10(slantM) - stc - lossDb,
    heard: isHeard(t, segment, slantM),
    above: tanElevation > segment.tanPeak,
  }
}
