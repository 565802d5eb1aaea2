import { InputError } from '../../../errors/index.ts'
import { type Feature, readFeatures, readTable, type Table } from '../../../intake/index.ts'
import { M_PER_FT } from '../../../units/index.ts'
import type { NeedPlace, NeedPlaces } from './types.ts'

/** What of a need its file is read with. */
export interface PlacesRequest {
  readonly id: string
  readonly kind: 'fixes' | 'track' | 'polygon'
  readonly file: string
  /** Height of the need, for files without heights of their own: the lowest level stated, m; null = none. */
  readonly heightM: number | null
  readonly heightAbove: 'sea' | 'ground'
  readonly qnhHpa: number | null
}

/** Columns a height may stand in, and what turns it into metres. */
const HEIGHT_COLUMNS = {
  alt_m_msl: { above: 'sea', metres: 1 },
  alt_ft_msl: { above: 'sea', metres: M_PER_FT },
  alt_m_agl: { above: 'ground', metres: 1 },
  alt_ft_agl: { above: 'ground', metres: M_PER_FT },
} as const
const FLIGHT_LEVEL = 'flight_level'
/** Pressure setting of flight levels, hPa, and height of one hectopascal near sea level, ft (standard atmosphere). */
const STANDARD_HPA = 1013.25
const FT_PER_HPA = 27.3

/**
 * Reads the file of a need: CSV of fixes, or of the corners of a track in order, with columns lon, lat, one of alt_m_msl, alt_ft_msl, alt_m_agl,
 * alt_ft_agl, flight_level, and maybe name; GeoJSON lines for a track and polygons for a polygon, at the need's own height. Throws InputError
 * with the row; a flight level needs the pressure setting (QNH), else it is no height.
 */
export function readPlaces(text: string, request: PlacesRequest): NeedPlaces {
  const { id: needId, kind, file } = request
  const fault = (place: string, found: string, remedy: string) => new InputError({ code: 'places', file, place, found, remedy })
  if (kind === 'polygon') {
    const rings = readFeatures(text, file).features.filter((f) => f.kind === 'Polygon')
    if (rings.length === 0) throw fault('features', 'no polygon in it', 'give a GeoJSON Polygon')
    return { needId, kind, places: [], rings: rings.map((f) => ({ feature: f.number, path: f.path })) }
  }
  const places = looksLikeJson(text)
    ? placesOfFeatures(readFeatures(text, file).features, request, fault)
    : placesOfTable(readTable(text, file), request, fault)
  const fewest = kind === 'track' ? 2 : 1
  if (places.length < fewest)
    throw fault(
      'rows',
      `${places.length} place(s) in it`,
      kind === 'track' ? 'give the corners of the track in order' : 'give a fix per row',
    )
  return { needId, kind, places, rings: [] }
}

const looksLikeJson = (text: string): boolean => /^\uFEFF?\s*\{/.test(text)
type Fault = (place: string, found: string, remedy: string) => InputError

function placesOfTable(table: Table, request: PlacesRequest, fault: Fault): NeedPlace[] {
  const columnOf = (name: string) => table.columns.findIndex((c) => c.toLowerCase() === name)
  const lon = columnOf('lon')
  const lat = columnOf('lat')
  if (lon < 0 || lat < 0) throw fault('header', `columns ${table.columns.join(', ').slice(0, 60)}`, 'give columns lon and lat in degrees')
  const name = columnOf('name')
  const heights = [...Object.keys(HEIGHT_COLUMNS), FLIGHT_LEVEL].filter((h) => columnOf(h) >= 0)
  if (heights.length > 1) throw fault('header', `heights in ${heights.join(' and ')}`, 'keep one column of heights')
  const [height] = heights
  if (height === undefined && request.heightM === null)
    throw fault('header', 'no column of heights', `name one ${Object.keys(HEIGHT_COLUMNS).join(', ')}, or give the need a heightM`)
  if (height === FLIGHT_LEVEL && request.qnhHpa === null)
    throw fault('header', 'flight levels are no heights without the pressure of the day', 'state qnhHpa in the need, or give alt_ft_msl')
  return table.rows.map((row, n) => {
    const number = (column: number, what: string, low: number, high: number): number => {
      const value = Number(row[column].trim() === '' ? Number.NaN : row[column])
      if (!(value >= low && value <= high))
        throw fault(`line ${table.lineOf(n)}`, `${what} is "${row[column].slice(0, 30)}"`, `give ${low} to ${high}`)
      return value
    }
    const at = {
      lon: number(lon, 'longitude', -180, 180),
      lat: number(lat, 'latitude', -90, 90),
      name: name < 0 ? `${n + 1}` : row[name].trim() || `${n + 1}`,
    }
    if (height === undefined) return { ...at, altM: request.heightM as number, above: request.heightAbove }
    const value = number(columnOf(height), height, -2000, 400_000)
    if (height === FLIGHT_LEVEL) {
      const ft = 100 * value + FT_PER_HPA * ((request.qnhHpa as number) - STANDARD_HPA)
      return { ...at, altM: ft * M_PER_FT, above: 'sea' as const }
    }
    const { above, metres } = HEIGHT_COLUMNS[height as keyof typeof HEIGHT_COLUMNS]
    return { ...at, altM: value * metres, above }
  })
}

/** Points as fixes, lines as a track; a height in the properties comes before the need's. A third coordinate is not read: it is ellipsoidal. */
function placesOfFeatures(features: readonly Feature[], request: PlacesRequest, fault: Fault): NeedPlace[] {
  const wanted = request.kind === 'track' ? 'LineString' : 'Point'
  const fitting = features.filter((f) => f.kind === wanted)
  if (request.kind === 'track' && fitting.length > 1)
    throw fault('features', `${fitting.length} lines in it`, 'give one LineString per track')
  return fitting.flatMap((f) => {
    const key = Object.keys(HEIGHT_COLUMNS).find((k) => typeof f.properties[k] === 'number') as keyof typeof HEIGHT_COLUMNS | undefined
    if (key === undefined && request.heightM === null)
      throw fault(
        `feature ${f.number}`,
        'no height',
        `give the need a heightM or the feature a property ${Object.keys(HEIGHT_COLUMNS).join(', ')}`,
      )
    const stated = key === undefined ? null : HEIGHT_COLUMNS[key]
    const altM = stated ? (f.properties[key as string] as number) * stated.metres : (request.heightM as number)
    const name = typeof f.properties.name === 'string' ? f.properties.name : ''
    return f.path.map((p, n) => ({
      ...p,
      name: name === '' || f.path.length > 1 ? `${name} ${n + 1}`.trim() : name,
      altM,
      above: stated?.above ?? request.heightAbove,
    }))
  })
}
