import { InputError } from '../../errors/index.ts'
import type { TerrainName } from '../../landcover/index.ts'
import { RADAR_LIMITS } from '../../radar/index.ts'
import { RELIEF } from '../../terrain/index.ts'
import { type SeaInput, seaAssessed, seaMeanDb, seaNotes } from '../sea/seaTable.ts'
import type { ModelNote } from '../types.ts'
import { GAMMA_LIMITS, gammaDbOf, steepStrengthDb } from './constantGamma.ts'
import { LAND_LIMITS, type LandBand, type LandRow, type LandTable } from './landTable.ts'
import { BUILT_IN_LAND_TABLE } from './landTableData.ts'

/** What the row choice may know beyond the place itself. */
export interface LandContext {
  /** Urban ground whose nearest other ground toward the radar, within 5 km, is low-relief farmland, open ground or water. */
  readonly urbanOverOpen?: boolean
  /** Depression plus local slope along the ray, degrees; the depression where not given. Counts over 8° depression only. */
  readonly grazingDeg?: number
  /** The water; without it sea clutter is not assessed. */
  readonly sea?: SeaInput
}
/** Spread of sea clutter: Rayleigh. Spikes at low grazing make it wider; no model of that is built in. */
export const SEA_BAND: LandBand = { fromDeg: null, toDeg: null, meanDb: [], spread1e3: 1, spread1e6: 1 }
/** The row and band taken for one place, with its numbers and the words that belong beside them. */
export interface LandChoice {
  /** Name of the table row, or 'sea' for water. */
  readonly rowName: LandRow | 'sea'
  /** Mean σ°F⁴, dB; null where no model is assessed. */
  readonly meanDb: number | null
  /** Band whose spread applies; null where no model is assessed. */
  readonly band: LandBand | null
  readonly notes: readonly ModelNote[]
}

/** Mean strength of a band at a frequency, dB: linear in log frequency between the table's bands, held beyond them. */
export function meanStrengthDb(band: LandBand, frequencyHz: number, table: LandTable = BUILT_IN_LAND_TABLE): number {
  const f = table.frequenciesMHz
  const mhz = frequencyHz / 1e6
  if (mhz <= f[0]) return band.meanDb[0]
  const i = f.findIndex((x) => mhz <= x)
  if (i < 0) return band.meanDb[f.length - 1]
  const share = Math.log(mhz / f[i - 1]) / Math.log(f[i] / f[i - 1])
  return band.meanDb[i - 1] + share * (band.meanDb[i] - band.meanDb[i - 1])
}

/** Words that hold for a whole table at a frequency. Throws InputError outside 30 MHz to 40 GHz. */
export function landTableNotes(frequencyHz: number, table: LandTable = BUILT_IN_LAND_TABLE): ModelNote[] {
  const { low, high } = RADAR_LIMITS.frequencyHz
  if (!(frequencyHz >= low && frequencyHz <= high))
    throw new InputError({
      code: 'frequency',
      place: 'radar.frequencyHz',
      found: `${frequencyHz} Hz is outside the clutter models`,
      remedy: 'give 30 MHz to 40 GHz in Hz',
    })
  const notes: ModelNote[] = [{ mark: table.mark, about: `land clutter table: ${table.source}` }]
  const held = LAND_LIMITS.frequencyHz
  if (frequencyHz < held.low || frequencyHz > held.high)
    notes.push({ mark: 'outside model', about: 'land clutter table: frequency beyond its bands, nearest band held' })
  return notes
}

export const NOTE_SEA: ModelNote = { mark: 'outside model', about: 'sea clutter not assessed' }
export const NOTE_STEEP: ModelNote = {
  mark: 'from memory',
  about: 'depression over 8°: the land clutter table runs over into γ·sin ψ, reached at 10° (γ after Barton 1985)',
}
export const NOTE_VERY_STEEP: ModelNote = { mark: 'outside model', about: 'depression over 60°: γ·sin ψ is for lower angles' }
export const NOTE_NEGATIVE: ModelNote = {
  mark: 'from memory',
  about: 'ground above the antenna horizontal: rows of low confidence, from memory',
}
export const NOTE_NEGATIVE_FALLBACK: ModelNote = {
  mark: 'outside model',
  about: 'ground above the antenna horizontal, other than rural low relief: engineering fallback, no published row',
}
export const NOTE_RELIEF: ModelNote = { mark: 'default', about: 'relief not known: taken as low' }

/**
 * Which row of the low-angle land table a place takes, its mean strength and spread. `reliefValue` is a value of RELIEF; depression in degrees
 * at the ground (slope not included). Over 8° it runs over into γ·sin ψ. Water takes the sea model where `context.sea` is given and the
 * frequency is its own (0.5 to 35 GHz). Source: bands of Billingsley, Low-Angle Radar Land Clutter (2002), from memory; the order of the
 * choices is our own.
 */
export function chooseRow(
  terrain: TerrainName,
  reliefValue: number,
  depressionDeg: number,
  frequencyHz: number,
  context: LandContext = {},
  table: LandTable = BUILT_IN_LAND_TABLE,
): LandChoice {
  if (terrain === 'water') return waterChoice(depressionDeg, frequencyHz, context.sea)
  const high = reliefValue === RELIEF.high || reliefValue === RELIEF.mountains
  const notes: ModelNote[] = []
  if (reliefValue === RELIEF.unknown) notes.push(NOTE_RELIEF)
  const steep = depressionDeg >= GAMMA_LIMITS.tableToDepressionDeg
  if (steep) notes.push(NOTE_STEEP)
  if (depressionDeg >= GAMMA_LIMITS.grazingDeg.high) notes.push(NOTE_VERY_STEEP)
  // Steep ground starts from the last value the table is for.
  const tableDeg = steep ? GAMMA_LIMITS.tableToDepressionDeg - 1e-9 : depressionDeg
  const own = ownRow(terrain, reliefValue, high)
  const general: LandRow = terrain === 'urban' ? 'urban' : high ? 'rural high relief' : 'rural low relief'
  const gammaDb = gammaDbOf(terrain, reliefValue)
  const take = (rowName: LandRow, band: LandBand, tableDb = meanStrengthDb(band, frequencyHz, table)): LandChoice => ({
    rowName,
    meanDb: steep ? steepStrengthDb(tableDb, gammaDb, depressionDeg, context.grazingDeg ?? depressionDeg) : tableDb,
    band,
    notes,
  })

  const over: LandRow = 'urban over open ground'
  const ownBand = (terrain === 'urban' && context.urbanOverOpen && bandAt(table, over, tableDeg)) || bandAt(table, own, tableDeg) || null
  if (ownBand) return take(table.rows[over].includes(ownBand) ? over : own, ownBand)
  if (depressionDeg >= 0) {
    const generalBand = bandAt(table, general, tableDeg) ?? table.rows[general][table.rows[general].length - 1]
    return take(general, generalBand)
  }
  // Below 0°: ground that stands above the local horizontal of the ray.
  notes.push(own === 'rural low relief' ? NOTE_NEGATIVE : NOTE_NEGATIVE_FALLBACK)
  if (terrain !== 'urban' && high) return take(general, table.rows[general][0])
  const negative: LandRow = 'rural negative depression'
  const negativeBand = bandAt(table, negative, depressionDeg) ?? table.rows[negative][0]
  const negativeDb = meanStrengthDb(negativeBand, frequencyHz, table)
  const lowest = table.rows[own][0]
  const step = negativeDb - meanStrengthDb(table.rows['rural low relief'][0], frequencyHz, table)
  const steppedDb = meanStrengthDb(lowest, frequencyHz, table) + step
  return steppedDb > negativeDb ? take(own, lowest, steppedDb) : take(negative, negativeBand)
}

function waterChoice(depressionDeg: number, frequencyHz: number, sea: SeaInput | undefined): LandChoice {
  if (!sea || !seaAssessed(frequencyHz)) return { rowName: 'sea', meanDb: null, band: null, notes: [NOTE_SEA] }
  return { rowName: 'sea', meanDb: seaMeanDb(frequencyHz, depressionDeg, sea), band: SEA_BAND, notes: seaNotes(depressionDeg, sea) }
}

function ownRow(terrain: TerrainName, reliefValue: number, high: boolean): LandRow {
  if (terrain === 'urban') return 'urban'
  if (reliefValue === RELIEF.mountains) return 'mountains'
  if (terrain === 'forest') return high ? 'forest high relief' : 'forest low relief'
  if (high) return 'rural high relief'
  return terrain === 'farmland' ? 'farmland' : terrain === 'open' ? 'open ground' : 'rural low relief'
}

function bandAt(table: LandTable, row: LandRow, depressionDeg: number): LandBand | undefined {
  return table.rows[row].find((b) => (b.fromDeg === null || depressionDeg >= b.fromDeg) && (b.toDeg === null || depressionDeg < b.toDeg))
}
