import { InputError } from '../errors/index.ts'
import { type LonLat, parsePosition } from '../geodesy/index.ts'
import { readFeatures, readTable, type Table } from '../intake/index.ts'
import { LIMITS, quantity, within } from './limits.ts'
import type { CandidateDoc } from './types.ts'

/** A candidate of a file; without an id or masts the study gives it its own. */
export type ReadCandidate = Omit<CandidateDoc, 'id' | 'mastHeightsM'> & { id?: string; mastHeightsM?: number[] }

const ID = /^[A-Za-z0-9_-]{1,32}$/
type Fault = (place: string, found: string, remedy: string) => InputError

/**
 * Candidates of a file: CSV with columns lon and lat in degrees, or position (decimal, degrees-minutes-seconds, UTM, MGRS), and maybe id, name,
 * mast_heights_m and tilts_deg (parted by spaces or semicolons), ground_m, notes; or GeoJSON points with properties id, name, mastHeightsM,
 * tiltsDeg, groundHeightM, notes. Throws InputError with file and row.
 */
export function readCandidates(text: string, fileName: string): ReadCandidate[] {
  const fault: Fault = (place, found, remedy) => new InputError({ code: 'candidates', file: fileName, place, found, remedy })
  const list = /^\uFEFF?\s*\{/.test(text) ? fromFeatures(text, fileName, fault) : fromTable(readTable(text, fileName), fault)
  if (list.length === 0) throw fault('rows', 'no candidate in it', 'give a row, or a GeoJSON point, for each')
  return list
}

function fromTable(table: Table, fault: Fault): ReadCandidate[] {
  const columnOf = (...names: string[]) => table.columns.findIndex((c) => names.includes(c.trim().toLowerCase()))
  const [lon, lat, position] = [columnOf('lon', 'longitude'), columnOf('lat', 'latitude'), columnOf('position', 'mgrs', 'utm')]
  if (position < 0 && (lon < 0 || lat < 0))
    throw fault('header', `columns ${table.columns.join(', ').slice(0, 60)}`, 'give columns lon and lat in degrees, or position')
  const columns = {
    id: columnOf('id'),
    name: columnOf('name'),
    masts: columnOf('mast_heights_m', 'mastheightsm', 'mast_m'),
    tilts: columnOf('tilts_deg', 'tiltsdeg'),
    ground: columnOf('ground_m', 'groundheightm'),
    notes: columnOf('notes'),
  }
  return table.rows.map((row, n) => {
    const place = `line ${table.lineOf(n)}`
    const cell = (column: number): string => (column < 0 ? '' : row[column]!.trim())
    const written = position >= 0 && cell(position) !== '' ? cell(position) : `${cell(lat)}, ${cell(lon)}`
    return candidate(
      placed(written, place, fault),
      {
        id: cell(columns.id),
        name: cell(columns.name),
        mastHeightsM: cell(columns.masts),
        tiltsDeg: cell(columns.tilts),
        groundHeightM: cell(columns.ground),
        notes: cell(columns.notes),
      },
      place,
      fault,
    )
  })
}

function fromFeatures(text: string, fileName: string, fault: Fault): ReadCandidate[] {
  return readFeatures(text, fileName)
    .features.filter((f) => f.kind === 'Point')
    .map((f) => candidate(f.path[0]!, f.properties, `feature ${f.number}`, fault))
}

function placed(text: string, place: string, fault: Fault): LonLat {
  try {
    return parsePosition(text)
  } catch (error) {
    if (error instanceof InputError) throw fault(place, error.found, error.remedy)
    throw error
  }
}

/** One candidate from its place and its further values, text or numbers. */
function candidate(at: LonLat, given: Readonly<Record<string, unknown>>, place: string, fault: Fault): ReadCandidate {
  const text = (key: string): string | undefined => {
    const v = given[key]
    return typeof v === 'string' || typeof v === 'number' ? String(v).trim() || undefined : undefined
  }
  const id = text('id')
  if (id !== undefined && !ID.test(id))
    throw fault(place, `identifier is "${id.slice(0, 40)}"`, 'use 1 to 32 of the characters A-Z a-z 0-9 _ -')
  const numbers = (key: 'mastHeightsM' | 'tiltsDeg' | 'groundHeightM'): number[] | undefined => {
    const v = given[key]
    const list = Array.isArray(v) ? v : typeof v === 'string' ? v.split(/[;\s]+/).filter(Boolean) : typeof v === 'number' ? [v] : []
    const limit = LIMITS[`candidates[].${key}${key === 'groundHeightM' ? '' : '[]'}`]!
    for (const x of list)
      if (!within(limit, Number(x)))
        throw fault(
          place,
          `${limit.what} is ${JSON.stringify(x)}`,
          `give ${quantity(limit.low, limit.unit)} to ${quantity(limit.high, limit.unit)}`,
        )
    return list.length > 0 ? list.map(Number) : undefined
  }
  const mastHeightsM = numbers('mastHeightsM')
  const tiltsDeg = numbers('tiltsDeg')
  const groundHeightM = numbers('groundHeightM')?.[0]
  const [name, notes] = [text('name'), text('notes')]
  return {
    ...(id === undefined ? {} : { id }),
    ...(name === undefined ? {} : { name }),
    lon: at.lon,
    lat: at.lat,
    ...(groundHeightM === undefined ? {} : { groundHeightM }),
    ...(mastHeightsM === undefined ? {} : { mastHeightsM: [...new Set(mastHeightsM)].sort((a, b) => a - b) }),
    ...(tiltsDeg === undefined ? {} : { tiltsDeg }),
    ...(notes === undefined ? {} : { notes }),
  }
}
