import { isInputError, type LonLat, parsePosition } from '../../../core/index.ts'
import type { RowRead } from '../../ui/index.ts'

/** Degrees as a table writes them: seven places are a centimetre. */
export const degreesText = (deg: number): string => String(Number(deg.toFixed(7))).replace('-', '−')

/**
 * Latitude and longitude of two cells, decimal or degrees-minutes-seconds; the first alone may hold a whole position in any written form.
 * `column` is that of the first cell.
 */
export function readPlace(lat: string, lon: string, column: number): RowRead<LonLat> {
  const text = lon.trim() === '' ? lat.trim() : `${lat.trim()}, ${lon.trim()}`
  if (text === '') return { ok: false, column, why: 'needed' }
  try {
    return { ok: true, value: parsePosition(text) }
  } catch (error) {
    if (isInputError(error)) return { ok: false, column, why: `${error.found}; ${error.remedy}` }
    throw error
  }
}
