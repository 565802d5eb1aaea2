import { InputError } from '../errors/index.ts'

/** A square of the military grid as UTM: its centre, and the side of the square. */
export interface MgrsSquare {
  readonly zone: number
  readonly south: boolean
  readonly eastingM: number
  readonly northingM: number
  readonly sideM: number
}
const SHAPE = /^(\d{1,2})\s*([A-Z])\s*([A-Z])([A-Z])\s*(\d*)(?:\s+(\d+))?$/i
const POLAR = /^[ABYZ]\s*[A-Z]{2}\s*\d/i
const LETTERS = 'ABCDEFGHJKLMNPQRSTUV'
const COLUMNS = ['ABCDEFGH', 'JKLMNPQR', 'STUVWXYZ'] as const
const BANDS = 'CDEFGHJKLMNPQRSTUVWX'
/** Least northing of each latitude band, in 100 km; below it a row letter stands for the next cycle of 2 000 km. */
const BAND_START_100KM = [11, 20, 28, 37, 46, 55, 64, 73, 82, 91, 0, 8, 17, 26, 35, 44, 53, 62, 70, 79] as const
const ROW_CYCLE_M = 2_000_000
const SQUARE_M = 100_000
/** Digits of easting and northing together that a place takes at the least: a square of 100 m. */
const LEAST_DIGITS = 6

const REMEDY = 'write zone, band, square and 3 to 5 digits each of easting and northing: 33UXP 01234 56789'
const fault = (found: string): InputError => new InputError({ code: 'position', found, remedy: REMEDY })

/** Does a text look like a reference of the military grid? */
export const looksLikeMgrs = (text: string): boolean => SHAPE.test(text.trim()) || POLAR.test(text.trim())

/**
 * Reads a reference of the military grid (MGRS, WGS 84, lettering AA): zone, latitude band, 100 km square, then as many digits of easting as of
 * northing. The place is the centre of the square named. Throws InputError for polar squares, letters the zone does not have, an odd number
 * of digits, or a square of 1 km and more. Source: National Geospatial-Intelligence Agency, NGA.STND.0037, Universal Grids and Grid Reference
 * Systems (2014), ch. 3, lettering and band limits from memory of it.
 */
export function parseMgrs(text: string): MgrsSquare {
  const t = text.trim()
  if (POLAR.test(t)) throw fault('polar squares (UPS) are not read')
  const parts = SHAPE.exec(t)
  if (!parts) throw fault(`"${t.slice(0, 40)}" is no grid reference`)
  const zone = Number(parts[1])
  const [band, column, row] = [parts[2]!, parts[3]!, parts[4]!].map((s) => s.toUpperCase()) as [string, string, string]
  if (zone < 1 || zone > 60) throw fault(`grid zone ${zone} does not exist`)
  const bandAt = BANDS.indexOf(band)
  if (bandAt < 0) throw fault(`latitude band ${band} does not exist`)
  const columnAt = COLUMNS[(zone - 1) % 3]!.indexOf(column)
  const rowAt = LETTERS.indexOf(row)
  if (columnAt < 0 || rowAt < 0) throw fault(`square ${column}${row} does not exist in zone ${zone}`)
  const digits = parts[6] === undefined ? parts[5]! : parts[5]! + parts[6]
  const parted = parts[6] === undefined || parts[5]!.length === parts[6].length
  if (digits.length % 2 !== 0 || !parted) throw fault(`${digits.length} digits are not as many for easting as for northing`)
  if (digits.length < LEAST_DIGITS || digits.length > 10) throw fault(`"${t.slice(0, 40)}" has ${digits.length} digits`)
  const half = digits.length / 2
  const sideM = 10 ** (5 - half)
  const south = band < 'N'
  const inSquare = (s: string): number => Number(s) * sideM + sideM / 2
  const rowShift = zone % 2 === 0 ? 5 : 0
  let northingM = ((rowAt - rowShift + LETTERS.length) % LETTERS.length) * SQUARE_M
  while (northingM < BAND_START_100KM[bandAt]! * SQUARE_M) northingM += ROW_CYCLE_M
  return {
    zone,
    south,
    eastingM: (columnAt + 1) * SQUARE_M + inSquare(digits.slice(0, half)),
    northingM: northingM + inSquare(digits.slice(half)),
    sideM,
  }
}
