import { basename, resolve } from 'node:path'
import {
  clutterOptions,
  DEG_PER_RAD,
  earthOf,
  InputError,
  type LonLat,
  type PointClutter,
  pointClutter,
  polarShape,
  readTable,
  type SightPoint,
  sightPoint,
  siteOf,
} from '../../../core/index.ts'
import type { CommandLine } from '../arguments.ts'
import { csvLine, csvNumber } from '../csv.ts'
import { loadGround } from '../loadGround.ts'
import { candidateNamed, heightOption, loadStudy, readText, sayWarnings, tiltOption } from '../loadStudy.ts'
import { makeTurns, type Progress } from '../progress.ts'

export const POINT_COLUMNS = [
  'lon',
  'lat',
  'azimuth_deg',
  'range_m',
  'ground_m',
  'in_sight',
  'coverage_floor_m',
  'height_to_see_m',
  'depression_deg',
  'grazing_deg',
  'terrain_class',
  'clutter_strength_db',
  'clutter_rcs_dbsm',
  'clutter_to_noise_db',
  'note',
] as const

interface WrittenPoint extends LonLat {
  /** As they stand in the file. */
  readonly lonText: string
  readonly latText: string
}

/** The places of a CSV with columns lon and lat. @throws InputError with file and line */
export function readPoints(text: string, file: string): WrittenPoint[] {
  const { columns, rows, lineOf } = readTable(text, file)
  const names = columns.map((c) => c.trim().toLowerCase())
  const fault = (place: string, found: string, remedy: string) => new InputError({ code: 'points', file, place, found, remedy })
  const [lonAt, latAt] = ['lon', 'lat'].map((name) => {
    const at = names.indexOf(name)
    if (at < 0)
      throw fault('line 1', `no column "${name}" among ${names.slice(0, 8).join(', ') || 'nothing'}`, 'begin with the header lon,lat')
    if (names.indexOf(name, at + 1) >= 0) throw fault('line 1', `two columns "${name}"`, 'keep one')
    return at
  }) as [number, number]
  return rows.map((row, n) => {
    const read = (at: number, name: string, limit: number): [string, number] => {
      const written = (row[at] ?? '').trim()
      const value = /^[-+]?(\d+\.?\d*|\.\d+)(e[-+]?\d+)?$/i.test(written) ? Number(written) : Number.NaN
      if (!(Math.abs(value) <= limit))
        throw fault(
          `line ${lineOf(n)}`,
          `${name} is "${written.slice(0, 40)}"`,
          `give degrees from -${limit} to ${limit} with a decimal point`,
        )
      return [written, value]
    }
    const [lonText, lon] = read(lonAt, 'lon', 360)
    const [latText, lat] = read(latAt, 'lat', 90)
    return { lonText, latText, lon, lat }
  })
}

/** `points`: every place on its own ray and at its own range, one CSV row each in the order given. */
export async function points(line: CommandLine, progress: Progress): Promise<void> {
  const loaded = await loadStudy(line.study)
  const { study } = loaded
  const candidate = candidateNamed(loaded, line.options.candidate as string)
  const heightM = heightOption(line.options.height as string)
  const tiltDeg = tiltOption(line.options.tilt, candidate)
  const file = resolve(line.options.points as string)
  const places = readPoints(await readText(file, '--points'), basename(file))
  const { ground, read, warnings } = await loadGround(loaded, [candidate], progress)
  const site = siteOf(candidate)
  const earth = earthOf(study)
  const options = clutterOptions(study, ground, read.landTable, site, heightM)
  const clutterAt = pointClutter(ground, site, heightM, earth, study.radar, tiltDeg, polarShape(study.run), options)
  const out: string[] = [csvLine(POINT_COLUMNS)]
  progress.inputIsGood()
  const turn = makeTurns(progress, 'Points')
  for (const [n, at] of places.entries()) {
    const s = sightPoint(ground, site, heightM, earth, at)
    out.push(pointLine(at, s, s.unknown === null ? clutterAt(at, s) : null))
    await turn(n + 1, places.length)
  }
  process.stdout.write(out.join(''))
  sayWarnings([...loaded.warnings, ...warnings])
}

/** One row; numbers of unknown ground are empty. */
function pointLine(at: WrittenPoint, s: SightPoint, c: PointClutter | null): string {
  return csvLine([
    at.lonText,
    at.latText,
    csvNumber(s.azimuthDeg, 5),
    csvNumber(s.rangeM, 3),
    csvNumber(s.groundM, 3),
    s.unknown === null && s.inSight ? '1' : '0',
    csvNumber(s.floorM, 3),
    csvNumber(s.heightToSeeM, 3),
    csvNumber(s.depressionDeg, 5),
    csvNumber(s.depressionDeg + Math.atan(s.slope) * DEG_PER_RAD, 5),
    c?.rowName ?? '',
    csvNumber(c?.strengthDb, 3),
    csvNumber(c?.rcsDbsm, 3),
    csvNumber(c?.cnrDb, 3),
    noteOf(s, c),
  ])
}

const UNKNOWN = { void: 'unknown: the ray crosses a void in the terrain', edge: 'unknown: outside the terrain' } as const
/** Why numbers are missing, and the marks of those that are there. */
function noteOf(s: SightPoint, c: PointClutter | null): string {
  const notes: string[] = []
  if (s.unknown !== null) notes.push(UNKNOWN[s.unknown])
  if (s.marginal) notes.push('marginal: masked by less than the error band')
  const hasClutter = c !== null && (c.strengthDb !== null || c.rcsDbsm !== null || c.cnrDb !== null)
  if (hasClutter) for (const { mark, about } of c.notes) notes.push(`${mark}: ${about}`)
  return notes.join('; ')
}
