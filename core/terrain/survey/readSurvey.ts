import { InputError } from '../../errors/index.ts'
import { readTable } from '../../intake/index.ts'
import { wrap360 } from '../../units/index.ts'
import { DEFAULT_SURVEY_ERROR_DEG, type SurveyRow } from './types.ts'

/** Columns of numbers of a survey with what each may be; `error_deg` may be left out. */
const NUMBERS = {
  azimuth_deg: { what: 'azimuth', low: -360, high: 360 },
  elevation_deg: { what: 'elevation', low: -45, high: 89 },
  range_m: { what: 'range', low: 1, high: 500_000 },
  instrument_height_m: { what: 'instrument height', low: 0, high: 1000 },
} as const
const ERROR = { what: 'error', low: 0, high: 10 } as const
const METHOD = 'method'

/**
 * Reads a surveyed horizon: CSV with columns azimuth_deg (true), elevation_deg, range_m (ground range to what was measured), instrument_height_m (above the
 * ground at the candidate), method, and maybe error_deg (90 %). Rows come back by rising azimuth. Throws InputError with the line for a column that is
 * missing, a number that is none or out of range, no method, and an azimuth given twice.
 */
export function readSurvey(text: string, file: string): SurveyRow[] {
  const table = readTable(text, file)
  const fault = (place: string, found: string, remedy: string) => new InputError({ code: 'survey', file, place, found, remedy })
  const columnOf = (name: string): number => table.columns.findIndex((c) => c.toLowerCase() === name)
  const wanted = [...Object.keys(NUMBERS), METHOD]
  const missing = wanted.filter((name) => columnOf(name) < 0)
  if (missing.length > 0) throw fault('header', `no column ${missing.join(', ')}`, `give columns ${wanted.join(', ')}`)
  if (table.rows.length === 0) throw fault('rows', 'no row in it', 'give a row per azimuth that was measured')
  const lines = new Map<number, number>()
  const rows = table.rows.map((row, n): SurveyRow => {
    const line = table.lineOf(n)
    const number = (name: string, { what, low, high }: { what: string; low: number; high: number }): number => {
      const typed = row[columnOf(name)].trim()
      const value = typed === '' ? Number.NaN : Number(typed)
      if (value >= low && value <= high) return value
      throw fault(`line ${line}, ${name}`, typed === '' ? `no ${what}` : `${what} is "${typed.slice(0, 30)}"`, `give ${low} to ${high}`)
    }
    const method = row[columnOf(METHOD)].trim()
    if (method === '') throw fault(`line ${line}, ${METHOD}`, 'no method', 'say how it was measured, such as theodolite or photograph')
    const azimuthDeg = wrap360(number('azimuth_deg', NUMBERS.azimuth_deg))
    const before = lines.get(azimuthDeg)
    if (before !== undefined)
      throw fault(`line ${line}, azimuth_deg`, `azimuth ${azimuthDeg} stands on line ${before} already`, 'keep one row per azimuth')
    lines.set(azimuthDeg, line)
    const error = columnOf('error_deg')
    return {
      azimuthDeg,
      elevationDeg: number('elevation_deg', NUMBERS.elevation_deg),
      rangeM: number('range_m', NUMBERS.range_m),
      instrumentHeightM: number('instrument_height_m', NUMBERS.instrument_height_m),
      method,
      errorDeg: error < 0 || row[error].trim() === '' ? DEFAULT_SURVEY_ERROR_DEG : number('error_deg', ERROR),
    }
  })
  return rows.sort((a, b) => a.azimuthDeg - b.azimuthDeg)
}
