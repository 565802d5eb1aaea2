import { InputError } from '../errors/index.ts'
import { M_PER_FT, M_PER_US_SURVEY_FT } from '../units/index.ts'
import type { TiffImage } from './tiffImage.ts'

export type HeightUnit = 'm' | 'ft' | 'us-ft'
export const METRES_PER: Readonly<Record<HeightUnit, number>> = { m: 1, ft: M_PER_FT, 'us-ft': M_PER_US_SURVEY_FT }

/** VerticalUnitsGeoKey (EPSG units of measure). */
const UNIT_CODES: Readonly<Record<number, HeightUnit>> = { 9001: 'm', 9002: 'ft', 9003: 'us-ft' }
/** Vertical systems in feet (EPSG registry 10.0). */
const SYSTEMS_IN_FEET: Readonly<Record<number, HeightUnit>> = {
  5702: 'us-ft',
  6360: 'us-ft',
  8052: 'us-ft',
  6130: 'ft',
  6131: 'ft',
  6132: 'ft',
  8050: 'ft',
  8228: 'ft',
}
/** Vertical systems whose axis points down (EPSG registry 10.0). */
const DEPTHS = new Set([
  5336, 5612, 5614, 5706, 5715, 5734, 5739, 5789, 5831, 5861, 5862, 5863, 5864, 5865, 5866, 5867, 5873, 6357, 6358, 6359, 7976, 8051, 8053,
  8358, 8378, 8897, 9287, 9288, 9672,
])
/** Geographic systems with ellipsoidal height (WGS 84, ETRS89, NAD83(2011), GDA2020). */
const THREE_D = new Set([4979, 4937, 6319, 7843])

/** Value of one <Item> of GDAL's metadata for band 1 ("sample 0") or the file. */
export function gdalItem(metadata: string, name: string): string | null {
  for (const m of metadata.matchAll(/<Item\b([^>]*)>([\s\S]*?)<\/Item>/g)) {
    if (!new RegExp(`\\bname="${name}"`, 'i').test(m[1])) continue
    const sample = /\bsample="(\d+)"/.exec(m[1])
    if (!sample || sample[1] === '0') return m[2].trim()
  }
  return null
}

/**
 * Unit of the heights: stated in the study, else the file's own words, else its vertical system, else metres.
 * Throws InputError for depths, ellipsoidal heights, and units that are none of metre, foot, US survey foot.
 */
export function heightUnitOf(image: TiffImage, stated: HeightUnit | null, heights: string | undefined, place: string): HeightUnit {
  const keys = image.tags.geoKeys ?? {}
  const vertical = typeof keys.VerticalCSTypeGeoKey === 'number' ? keys.VerticalCSTypeGeoKey : null
  const fault = (code: string, key: string, found: string, remedy: string): InputError =>
    new InputError({ code, file: image.file, place: `${place}.${key}`, found, remedy })
  const ellipsoidal =
    (vertical !== null && vertical >= 5001 && vertical <= 5033) ||
    (vertical !== null && THREE_D.has(vertical)) ||
    THREE_D.has(keys.GeographicTypeGeoKey as number)
  if (heights === 'ellipsoidal' || ellipsoidal)
    throw fault('ellipsoidal-heights', 'heights', 'the heights are above the ellipsoid', 'convert them to heights above mean sea level')
  if (vertical !== null && DEPTHS.has(vertical))
    throw fault('depths', 'heights', 'the raster holds depths (positive down)', 'convert them to heights above mean sea level')
  if (stated) return stated
  const words = gdalItem(image.tags.gdalMetadata, 'UNITTYPE')
  if (words) {
    const unit = unitOfWords(words)
    if (!unit)
      throw fault('height-unit', 'unit', `the height unit "${words.slice(0, 30)}" is not known`, `state ${place}.unit: m, ft or us-ft`)
    return unit
  }
  const code = keys.VerticalUnitsGeoKey
  if (typeof code === 'number' && code !== 0 && code !== 32767) {
    const unit = UNIT_CODES[code]
    if (!unit) throw fault('height-unit', 'unit', `the height unit (EPSG ${code}) is not known`, `state ${place}.unit: m, ft or us-ft`)
    return unit
  }
  return (vertical !== null && SYSTEMS_IN_FEET[vertical]) || 'm'
}

function unitOfWords(words: string): HeightUnit | null {
  const w = words
    .toLowerCase()
    .replace(/[\s_.-]+/g, ' ')
    .trim()
  if (/^(m|met(er|re)s?|mètres?)$/.test(w)) return 'm'
  if (/us survey (foot|feet)|^(us ft|ftus|us foot|us feet|survey feet|foot us|feet us)$/.test(w)) return 'us-ft'
  if (/^(ft|foot|feet|international foot|international feet|foot international)$/.test(w)) return 'ft'
  return null
}
