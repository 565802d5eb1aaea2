import { InputError } from '../../errors/index.ts'
import type { ModelMark } from '../types.ts'

/** Rows a land table must have. */
export const LAND_ROWS = [
  'rural low relief',
  'forest low relief',
  'farmland',
  'open ground',
  'rural high relief',
  'forest high relief',
  'mountains',
  'urban',
  'urban over open ground',
  'rural negative depression',
] as const
export type LandRow = (typeof LAND_ROWS)[number]

/** One band of depression angle [fromDeg, toDeg); null = no limit on that side. */
export interface LandBand {
  readonly fromDeg: number | null
  readonly toDeg: number | null
  /** Mean σ°F⁴, dB, one value per frequency of the table. */
  readonly meanDb: readonly number[]
  /** Weibull spread a_w at cell areas of 10³ and 10⁶ m². */
  readonly spread1e3: number
  readonly spread1e6: number
}
export interface LandTable {
  readonly source: string
  readonly mark: ModelMark
  /** Rising. */
  readonly frequenciesMHz: readonly number[]
  readonly rows: Readonly<Record<LandRow, readonly LandBand[]>>
}

/** Where the low-angle land model holds, as data. */
export const LAND_LIMITS = {
  /** Unmarked inside; clamped to the nearest band and marked outside. */
  frequencyHz: { low: 167e6, high: 9.2e9 },
  /** The table is for depression angles up to this; beyond, it runs over into γ·sin ψ. */
  highestDepressionDeg: 8,
} as const

type Json = Record<string, unknown>
const isRecord = (v: unknown): v is Json => typeof v === 'object' && v !== null && !Array.isArray(v)

/**
 * Reads a user's land table: `{ source, frequenciesMHz, rows: { "<row>": [{ fromDeg, toDeg, meanDb, spread1e3, spread1e6 }] } }` with every
 * row of LAND_ROWS, bands rising and without gaps. Throws InputError naming the key.
 */
export function readLandTable(json: unknown, fileName: string): LandTable {
  const refuse = (place: string, found: string, remedy: string): never => {
    throw new InputError({ code: 'land-table', file: fileName, place, found, remedy })
  }
  if (!isRecord(json)) return refuse('', 'is not an object', 'give a land table with source, frequenciesMHz and rows')
  const frequencies = json.frequenciesMHz
  if (!isRising(frequencies) || !(frequencies[0] > 0))
    return refuse('frequenciesMHz', 'is not a rising list of numbers', 'give frequencies in MHz, lowest first')
  const rows = json.rows
  if (!isRecord(rows)) return refuse('rows', 'is missing', `give the rows ${LAND_ROWS.slice(0, 3).join(', ')} …`)
  for (const name of Object.keys(rows))
    if (!LAND_ROWS.includes(name as LandRow))
      refuse(`rows.${name}`, 'is not a row of this model', `use ${LAND_ROWS.slice(0, 4).join(', ')} …`)
  const read = (name: LandRow): LandBand[] => {
    const bands = rows[name]
    if (!Array.isArray(bands) || bands.length === 0) return refuse(`rows.${name}`, 'is missing or empty', 'give at least one band')
    return bands.map((band, i) => readBand(band, `rows.${name}[${i}]`, bands[i - 1]))
  }
  const readBand = (band: unknown, place: string, before: unknown): LandBand => {
    if (!isRecord(band)) return refuse(place, 'is not an object', 'give fromDeg, toDeg, meanDb, spread1e3 and spread1e6')
    const { fromDeg = null, toDeg = null, meanDb, spread1e3, spread1e6 } = band
    const limit = (v: unknown): v is number | null => v === null || Number.isFinite(v)
    if (!limit(fromDeg) || !limit(toDeg) || (fromDeg !== null && toDeg !== null && !(fromDeg < toDeg)))
      return refuse(place, 'has no rising fromDeg and toDeg', 'give degrees, or null for no limit')
    if (isRecord(before) && before.toDeg !== fromDeg)
      refuse(place, `starts at ${fromDeg}`, `start it where the band before ends (${before.toDeg})`)
    if (!Array.isArray(meanDb) || meanDb.length !== frequencies.length || !meanDb.every((v) => Number.isFinite(v) && v <= 20))
      return refuse(`${place}.meanDb`, 'does not hold one dB value per frequency', `give ${frequencies.length} values`)
    const spread = (v: unknown): v is number => typeof v === 'number' && v > 0 && v <= 8
    if (!spread(spread1e3) || !spread(spread1e6)) return refuse(place, 'has no spread between 0 and 8', 'give spread1e3 and spread1e6')
    return { fromDeg, toDeg, meanDb, spread1e3, spread1e6 }
  }
  const source = typeof json.source === 'string' && json.source.trim() ? json.source.trim() : fileName
  return {
    source,
    mark: 'by hand',
    frequenciesMHz: frequencies,
    rows: Object.fromEntries(LAND_ROWS.map((name) => [name, read(name)])) as Record<LandRow, LandBand[]>,
  }
}

function isRising(v: unknown): v is number[] {
  return Array.isArray(v) && v.length > 0 && v.every((x, i) => Number.isFinite(x) && (i === 0 || x > v[i - 1]))
}
