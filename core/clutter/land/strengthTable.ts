import type { GroundCode } from '../../landcover/index.ts'
import { RELIEF } from '../../terrain/index.ts'
import { DEG_PER_RAD, fromDb, RAD_PER_DEG, toDb } from '../../units/index.ts'
import type { ModelNote } from '../types.ts'
import { chooseRow, landTableNotes } from './landRow.ts'
import { LAND_LIMITS, type LandTable } from './landTable.ts'
import { BUILT_IN_LAND_TABLE } from './landTableData.ts'

/** Strength of every ground code, relief and band of depression at one frequency, so that a loop over cells only looks it up. */
export interface StrengthTable {
  /** Rising band edges of depression, rad; first −Infinity, last +Infinity. */
  readonly edgesRad: Float64Array
  readonly bands: number
  /** Mean σ°F⁴, ratio, at ((code × 4 + relief) × bands + band); 0 where no model is assessed. Relief: low, high, mountains, unknown. */
  readonly sigma: Float64Array
  /** Bit i set = notes[i] holds for that entry. */
  readonly noteBits: Uint32Array
  readonly notes: readonly ModelNote[]
  /** Notes that hold for every entry. */
  readonly always: readonly ModelNote[]
}
const RELIEF_SLOTS = [RELIEF.low, RELIEF.high, RELIEF.mountains, RELIEF.unknown] as const

/** Slot of a relief value in the table. */
export const reliefSlot = (relief: number): number => Math.min(relief, 3)

/** Builds the table for the codes of a ground. Throws InputError for a frequency outside 30 MHz to 40 GHz. */
export function strengthTable(codes: readonly GroundCode[], frequencyHz: number, table: LandTable = BUILT_IN_LAND_TABLE): StrengthTable {
  const edges = new Set<number>([0, LAND_LIMITS.highestDepressionDeg])
  for (const bands of Object.values(table.rows))
    for (const { fromDeg, toDeg } of bands) for (const edge of [fromDeg, toDeg]) if (edge !== null) edges.add(edge)
  const inner = [...edges].sort((a, b) => a - b)
  const edgesRad = Float64Array.from([Number.NEGATIVE_INFINITY, ...inner.map((d) => d * RAD_PER_DEG), Number.POSITIVE_INFINITY])
  const bands = edgesRad.length - 1
  const sigma = new Float64Array(codes.length * 4 * bands)
  const noteBits = new Uint32Array(sigma.length)
  const notes: ModelNote[] = []
  codes.forEach(({ terrain }, c) => {
    RELIEF_SLOTS.forEach((relief, slot) => {
      for (let b = 0; b < bands; b++) {
        const choice = chooseRow(terrain, relief, middleDeg(edgesRad, b), frequencyHz, {}, table)
        const at = (c * 4 + slot) * bands + b
        sigma[at] = choice.meanDb === null ? 0 : fromDb(choice.meanDb)
        for (const note of choice.notes) {
          if (!notes.includes(note)) notes.push(note)
          noteBits[at] |= 1 << notes.indexOf(note)
        }
      }
    })
  })
  return { edgesRad, bands, sigma, noteBits, notes, always: landTableNotes(frequencyHz, table) }
}

function middleDeg(edgesRad: Float64Array, band: number): number {
  const lo = edgesRad[band] * DEG_PER_RAD
  const hi = edgesRad[band + 1] * DEG_PER_RAD
  return lo === Number.NEGATIVE_INFINITY ? hi - 1 : hi === Number.POSITIVE_INFINITY ? lo + 1 : (lo + hi) / 2
}

/** Band of a depression, rad; starting from a guess (neighbouring cells mostly share it). */
export function bandOf(edgesRad: Float64Array, depressionRad: number, guess: number): number {
  let b = guess
  while (depressionRad >= edgesRad[b + 1]) b++
  while (depressionRad < edgesRad[b]) b--
  return b
}

/** The notes that always hold, then those of the entries in use, each with its share of the ground in sight. */
export function notesInUse(t: StrengthTable, use: Float64Array): ModelNote[] {
  const all = use.reduce((sum, u) => sum + u, 0)
  const some = t.notes.flatMap((note, n) => {
    const share = use.reduce((sum, u, entry) => sum + ((t.noteBits[entry] >>> n) & 1 ? u : 0), 0) / all
    return share > 0 ? [{ ...note, share }] : []
  })
  return [...t.always, ...some]
}

/**
 * Mean σ°F⁴, dB, by ground code, relief and depression in degrees; NaN where nothing is assessed (water) or the code is unknown. Throws
 * InputError for a frequency outside 30 MHz to 40 GHz.
 */
export function strengthByCode(
  codes: readonly GroundCode[],
  frequencyHz: number,
  table: LandTable = BUILT_IN_LAND_TABLE,
): (code: number, relief: number, depressionDeg: number) => number {
  const t = strengthTable(codes, frequencyHz, table)
  const db = Float64Array.from(t.sigma, (v) => (v > 0 ? toDb(v) : Number.NaN))
  let band = t.bands >> 1
  return (code, relief, depressionDeg) => {
    if (code >= codes.length || !Number.isFinite(depressionDeg)) return Number.NaN
    band = bandOf(t.edgesRad, depressionDeg * RAD_PER_DEG, band)
    return db[(code * 4 + reliefSlot(relief)) * t.bands + band]
  }
}
