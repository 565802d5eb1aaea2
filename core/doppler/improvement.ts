import { dwellS } from '../antenna/index.ts'
import type { ImprovementDb, ModelNote } from '../clutter/index.ts'
import type { GroundCode } from '../landcover/index.ts'
import type { RadarInput } from '../radar/index.ts'
import { blindSpeedMs, staggerFirstBlind } from './blindSpeed.ts'
import { HIGHEST_IMPROVEMENT_DB } from './canceller.ts'
import { bothCorrelations, type Correlation, VEGETATION_LIMITS } from './correlation.ts'
import { type ClutterKind, type ClutterMotion, motionCorrelation } from './motion.ts'
import { bankImprovementDb, hitsOf, integratedPulses, processingGain, staggeredImprovementDb } from './processing.ts'
import { combineLimitsDb, quantisationLimitDb } from './stability.ts'

/** Improvement factor of one kind of clutter. */
export interface ImprovementRow {
  /** Terrain name, 'rain', 'discrete' or 'folded'. */
  readonly about: ClutterKind | 'folded'
  /** After the limits of the equipment, dB. */
  readonly improvementDb: number
  /** What scanning and the clutter's own motion allow, dB; null where suppression is stated or none. */
  readonly spectralDb: number | null
}
/** What the radar's suppression does to each kind of clutter. */
export interface SuppressionBy {
  readonly kind: RadarInput['suppression']['kind']
  readonly rows: readonly ImprovementRow[]
  /** The one value all kinds share, dB; null where they differ. */
  readonly uniformDb: number | null
  readonly stabilityDb: number | null
  readonly quantisationDb: number | null
  /** Pulses in the half-power beam, and those that count in integration. */
  readonly hits: number
  readonly pulses: number
  /** Gain over noise of a filter of a bank, ratio; 1 without one. */
  readonly noiseGain: number
  /** Blind speeds of each PRF, m/s, or the first one of a pulse stagger in whole ratios; empty where suppression is stated or none. */
  readonly blindSpeedsMs: readonly number[]
  readonly notes: readonly ModelNote[]
}

/** Is clutter from an earlier pulse suppressed with the rest? Only at a PRF constant in the dwell and with a coherent transmitter. */
const foldedIsSuppressed = (r: RadarInput): boolean => r.coherentTransmitter && r.prfMode !== 'pulseStagger'

/**
 * Improvement factor by kind of clutter for a radar over ground of the codes given, dB: correlation by scanning (Gaussian two-way beam) times the
 * kind's own motion, through a canceller of 1 to 4 pulses or a filter bank; 1/I = 1/I_spectral + 1/I_stability + 1/I_quantisation. Stated: that
 * value for every kind; none: 0 dB. Several PRFs: pulse stagger on its own intervals, dwell stagger the least of its PRFs. Sources: canceller and
 * bank mathematics; vegetation spectrum of Billingsley (2002), sea and rain spreads and equipment limits from memory.
 */
export function suppressionBy(r: RadarInput, motion: ClutterMotion, codes: readonly GroundCode[]): SuppressionBy {
  const { kind, stabilityLimitDb, bits, statedDb } = r.suppression
  const processed = kind === 'canceller' || kind === 'filterBank'
  const quantisationDb = processed && bits !== null ? quantisationLimitDb(bits) : null
  const stabilityDb = processed ? stabilityLimitDb : null
  const limits = [stabilityDb, quantisationDb].filter((x) => x !== null)
  const row = (about: ClutterKind): ImprovementRow => {
    if (!processed) return { about, improvementDb: kind === 'stated' ? statedDb : 0, spectralDb: null }
    const spectralDb = spectralImprovementDb(r, motion, about)
    return { about, improvementDb: Math.max(0, combineLimitsDb([spectralDb, ...limits])), spectralDb }
  }
  const terrains = [...new Set(codes.map((c) => c.terrain))]
  const rows: ImprovementRow[] = [...terrains, 'rain' as const, 'discrete' as const].map(row)
  const least = rows.filter((x) => x.about !== 'rain').reduce((low, x) => Math.min(low, x.improvementDb), Number.POSITIVE_INFINITY)
  rows.push({ about: 'folded', improvementDb: foldedIsSuppressed(r) ? least : 0, spectralDb: null })
  const first = rows[0].improvementDb
  return {
    kind,
    rows,
    uniformDb: rows.every((x) => x.improvementDb === first) ? first : null,
    stabilityDb,
    quantisationDb,
    hits: hitsOf(r),
    pulses: integratedPulses(r),
    noiseGain: processingGain(r),
    blindSpeedsMs: processed ? blindSpeeds(r) : [],
    notes: processed ? notesOf(r, motion, terrains, limits.length > 0) : kind === 'stated' ? [STATED] : [],
  }
}
const STATED: ModelNote = { mark: 'by hand', about: 'suppression: as stated for the radar, the same for every kind of clutter' }

/** The same as numbers for the clutter sums: one per ground code and one per other kind. */
export function improvementDb(by: SuppressionBy, codes: readonly GroundCode[]): ImprovementDb {
  const of = (about: ImprovementRow['about']): number => by.rows.find((x) => x.about === about)?.improvementDb ?? 0
  const byCode = codes.map((c) => of(c.terrain))
  return { byCode, sea: of('water'), rain: of('rain'), discrete: of('discrete'), folded: of('folded') }
}

/** What scanning and motion allow a canceller or bank, dB; the least over the PRFs of a dwell stagger. */
function spectralImprovementDb(r: RadarInput, motion: ClutterMotion, about: ClutterKind): number {
  const { kind, pulses, window } = r.suppression
  const { azimuthBeamwidthDeg, elevationBeamwidthDeg } = r.antenna
  const sigmaHz = Math.sqrt(Math.LN2) / Math.PI / dwellS(azimuthBeamwidthDeg, r.rotationRpm)
  const scan: Correlation = (t) => Math.exp(-2 * (Math.PI * sigmaHz * t) ** 2)
  const correlation = bothCorrelations(scan, motionCorrelation(about, motion, r.frequencyHz, elevationBeamwidthDeg))
  const intervals = r.prfHz.map((f) => 1 / f)
  if (kind === 'canceller' && pulses < 2) return 0
  if (kind === 'canceller' && r.prfMode === 'pulseStagger') return staggeredImprovementDb(pulses, correlation, intervals)
  const of = (t: number) =>
    kind === 'canceller' ? staggeredImprovementDb(pulses, correlation, [t]) : bankImprovementDb(window ?? 'hamming', pulses, correlation, t)
  return intervals.reduce((low, t) => Math.min(low, of(t)), HIGHEST_IMPROVEMENT_DB)
}

/** First blind speed of each PRF; of a pulse stagger whose intervals are whole multiples of a microsecond, the first that all share. */
function blindSpeeds(r: RadarInput): number[] {
  if (r.prfMode !== 'pulseStagger') return r.prfHz.map((f) => blindSpeedMs(r.frequencyHz, f))
  const micros = r.prfHz.map((f) => Math.round(1e6 / f))
  const meanS = micros.reduce((s, t) => s + t, 0) / micros.length / 1e6
  return [staggerFirstBlind(micros) * blindSpeedMs(r.frequencyHz, 1 / meanS)]
}

function notesOf(r: RadarInput, motion: ClutterMotion, terrains: readonly string[], limited: boolean): ModelNote[] {
  const notes: ModelNote[] = []
  if (terrains.some((t) => t === 'forest' || t === 'rural' || t === 'farmland')) {
    notes.push({ mark: 'from memory', about: 'suppression: spectrum of wind-blown vegetation (Billingsley)' })
    const { windMs: wind, frequencyHz: f } = VEGETATION_LIMITS
    if (motion.windMs < wind.low || motion.windMs > wind.high || r.frequencyHz < f.low || r.frequencyHz > f.high)
      notes.push({ mark: 'outside model', about: 'suppression: wind or frequency outside the vegetation spectrum' })
  }
  if (terrains.includes('water')) notes.push({ mark: 'from memory', about: 'suppression: spread of sea echoes by wind' })
  if (limited) notes.push({ mark: 'from memory', about: 'suppression: limits of stability and quantisation' })
  return notes
}
