import type { AntennaDoc, CandidateDoc, RadarDoc, StudyDoc } from '../../core/index.ts'

/** The radar while it is being entered: any field may still be missing. */
export type DraftRadar = Omit<Partial<RadarDoc>, 'antenna'> & { antenna: Partial<AntennaDoc> }
/** The document as the app edits it: a study file whose radar need not be whole yet. */
export interface DraftStudy extends Omit<StudyDoc, 'radar'> {
  radar: DraftRadar
}

/** Fields of the radar without which nothing can be computed, as key paths of the study file. */
export const REQUIRED_RADAR_PATHS = [
  'radar.frequencyHz',
  'radar.peakPowerW',
  'radar.pulseWidthS',
  'radar.prfHz',
  'radar.antenna.gainDbi',
  'radar.antenna.azimuthBeamwidthDeg',
] as const

/** A study with nothing in it but a name. */
export const emptyStudy = (): DraftStudy => ({
  format: 'sightfell-study',
  version: 1,
  name: 'Untitled study',
  terrain: [],
  radar: { antenna: {} },
  candidates: [],
})

/** Value at a key path such as `radar.antenna.tiltDeg` or `needs.0.rcsM2`; undefined where the path leads nowhere. */
export function valueAt(doc: unknown, path: string): unknown {
  let here = doc
  for (const key of path.split('.')) {
    if (here === null || typeof here !== 'object') return undefined
    here = (here as Record<string, unknown>)[key]
  }
  return here
}

/** A copy of `doc` with the value at `path` replaced; undefined removes the key. Missing objects on the way are made. */
export function withValue<T>(doc: T, path: string, value: unknown): T {
  const [key, ...rest] = path.split('.')
  if (value === undefined && valueAt(doc, key) === undefined) return doc
  const copy = (Array.isArray(doc) ? [...doc] : { ...doc }) as Record<string, unknown>
  const next = rest.length === 0 ? value : withValue(copy[key] ?? {}, rest.join('.'), value)
  if (next === undefined) {
    if (Array.isArray(copy)) copy.splice(Number(key), 1)
    else delete copy[key]
  } else copy[key] = next
  return copy as T
}

/** Required radar fields that are still empty. */
export function missingRadarPaths(doc: DraftStudy): string[] {
  return REQUIRED_RADAR_PATHS.filter((path) => {
    const value = valueAt(doc, path)
    return value === undefined || value === null || (Array.isArray(value) && value.length === 0)
  })
}

/** The document as a study that can run, or null while terrain, radar or every candidate is missing. */
export function runnable(doc: DraftStudy): StudyDoc | null {
  if (doc.terrain.length === 0 || doc.candidates.length === 0 || missingRadarPaths(doc).length > 0) return null
  return doc as StudyDoc
}

/** Names of every file the document refers to, each once. */
export function filesOf(doc: DraftStudy): string[] {
  const names = [
    ...doc.terrain.map((t) => t.file),
    doc.landCover?.file,
    doc.obstacles?.file,
    doc.roads?.file,
    doc.facades?.file,
    doc.tables?.lowAngleLand,
    ...(doc.needs ?? []).map((n) => n.file),
  ]
  return [...new Set(names.filter((n): n is string => Boolean(n)))]
}

/** The first free letter A…Z, then A1, B1, … */
export function freeCandidateId(candidates: readonly CandidateDoc[]): string {
  const taken = new Set(candidates.map((c) => c.id))
  for (let n = 0; ; n++) {
    const id = String.fromCharCode(65 + (n % 26)) + (n < 26 ? '' : Math.floor(n / 26))
    if (!taken.has(id)) return id
  }
}
