import { fromDb, RAD_PER_DEG } from '../../units/index.ts'
import type { ModelNote } from '../types.ts'
import { SEA_LIMITS, seaStrengthDb } from './seaNrl.ts'

/** The water of a study. */
export interface SeaInput {
  readonly seaState: number
  readonly polarisation: 'H' | 'V' | 'circular'
}

/** Does the model cover the frequency? Outside, sea clutter is not assessed. */
export const seaAssessed = (frequencyHz: number): boolean =>
  frequencyHz >= SEA_LIMITS.frequencyGHz.low * 1e9 && frequencyHz <= SEA_LIMITS.frequencyGHz.high * 1e9

export const NOTE_SEA_LOW: ModelNote = {
  mark: 'outside model',
  about: 'sea clutter below 0.1° grazing: the value at 0.1° held, likely high',
}
export const NOTE_SEA_STEEP: ModelNote = { mark: 'outside model', about: 'sea clutter over 60° grazing: the value at 60° held' }
export const NOTE_SEA_STATE: ModelNote = { mark: 'outside model', about: 'sea state over 6: the value at 6 held' }
export const NOTE_SEA_CIRCULAR: ModelNote = { mark: 'outside model', about: 'sea clutter in circular polarisation: the higher of H and V' }

/**
 * Mean sea clutter, dB, at a depression in degrees (the grazing angle of level water): below 0.1° the value at 0.1°, over 60° that at 60°; null
 * at and below 0°, beyond the horizon of the effective earth. Circular polarisation takes the higher of H and V. Source: `seaStrengthDb`.
 */
export function seaMeanDb(frequencyHz: number, depressionDeg: number, sea: SeaInput): number | null {
  if (!(depressionDeg > 0)) return null
  const { grazingDeg, seaState } = SEA_LIMITS
  const grazing = Math.min(grazingDeg.high, Math.max(grazingDeg.low, depressionDeg))
  const state = Math.min(seaState.high, Math.max(seaState.low, sea.seaState))
  const db = (p: 'H' | 'V') => seaStrengthDb(frequencyHz / 1e9, grazing, state, p)
  return sea.polarisation === 'circular' ? Math.max(db('H'), db('V')) : db(sea.polarisation)
}

/** What stands beside sea clutter at a depression, degrees. */
export function seaNotes(depressionDeg: number, sea: SeaInput): ModelNote[] {
  const notes: ModelNote[] = []
  if (depressionDeg < SEA_LIMITS.grazingDeg.low) notes.push(NOTE_SEA_LOW)
  if (depressionDeg > SEA_LIMITS.grazingDeg.high) notes.push(NOTE_SEA_STEEP)
  if (sea.seaState > SEA_LIMITS.seaState.high) notes.push(NOTE_SEA_STATE)
  if (sea.polarisation === 'circular') notes.push(NOTE_SEA_CIRCULAR)
  return notes
}

const LOW_RAD = SEA_LIMITS.grazingDeg.low * RAD_PER_DEG
const HIGH_RAD = SEA_LIMITS.grazingDeg.high * RAD_PER_DEG
const ENTRIES_PER_RAD = 16_384

/** Mean sea clutter, ratio, by depression, for loops: linear between entries, right to 0.01 dB. */
export type SeaTable = Float64Array
export function seaTable(frequencyHz: number, sea: SeaInput): SeaTable {
  const count = Math.ceil((HIGH_RAD - LOW_RAD) * ENTRIES_PER_RAD) + 1
  return Float64Array.from({ length: count }, (_, i) =>
    fromDb(seaMeanDb(frequencyHz, (LOW_RAD + i / ENTRIES_PER_RAD) / RAD_PER_DEG, sea) ?? 0),
  )
}
/** Mean sea clutter at a depression in rad; 0 beyond the horizon of the effective earth. */
export function seaSigma(t: SeaTable, depressionRad: number): number {
  if (!(depressionRad > 0)) return 0
  const x = (depressionRad - LOW_RAD) * ENTRIES_PER_RAD
  if (x <= 0) return t[0]
  const i = x | 0
  if (i >= t.length - 1) return t[t.length - 1]
  return t[i] + (x - i) * (t[i + 1] - t[i])
}
