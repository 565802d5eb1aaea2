import {
  type CandidateDoc,
  checkDoc,
  type FieldProblem,
  type NeedDoc,
  newStudy,
  STARTING_RADAR_NAME,
  type StudyDoc,
} from '../../core/index.ts'

/** A study with no files and no candidates, and a radar of round starting values that says so. */
export const emptyStudy = (): StudyDoc => newStudy('Untitled study')

/** Steps of a key path: `needs[0].sectorDeg` or `needs.0.sectorDeg`. */
const stepsOf = (path: string): string[] => path.split(/[.[\]]+/).filter((s) => s !== '')

/** Value at a key path; undefined where the path leads nowhere. */
export function valueAt(doc: unknown, path: string): unknown {
  let here = doc
  for (const key of stepsOf(path)) {
    if (here === null || typeof here !== 'object') return undefined
    here = (here as Record<string, unknown>)[key]
  }
  return here
}

/** A copy of `doc` with the value at `path` replaced; undefined removes the key. Missing objects on the way are made. */
export function withValue<T>(doc: T, path: string, value: unknown): T {
  return withSteps(doc, stepsOf(path), value) as T
}
function withSteps(doc: unknown, [key, ...rest]: string[], value: unknown): unknown {
  if (doc === undefined) return undefined
  const old = (doc as Record<string, unknown>)[key]
  const copy = (Array.isArray(doc) ? [...doc] : { ...(doc as object) }) as Record<string, unknown>
  const next = rest.length === 0 ? value : withSteps(old ?? (value === undefined ? undefined : {}), rest, value)
  if (next === old) return doc
  if (next !== undefined) copy[key] = next
  else if (Array.isArray(copy)) copy.splice(Number(key), 1)
  else delete copy[key]
  return copy
}

/** Is the radar still the round values a new study starts with? */
export const hasStartingRadar = (doc: StudyDoc): boolean => doc.radar.name === STARTING_RADAR_NAME

const checked = new WeakMap<StudyDoc, readonly FieldProblem[]>()
/** Everything wrong with the document, at its key paths; checked once per document. */
export function problemsOf(doc: StudyDoc): readonly FieldProblem[] {
  let problems = checked.get(doc)
  if (!problems) {
    problems = checkDoc(doc).problems
    checked.set(doc, problems)
  }
  return problems
}

/** The document, once it can run; null while terrain is missing, no candidate is left or a value has to change. */
export const runnable = (doc: StudyDoc): StudyDoc | null =>
  doc.terrain.length > 0 && doc.candidates.some((c) => c.rejected === undefined) && problemsOf(doc).length === 0 ? doc : null

/** Names of every file the document refers to, each once. */
export function filesOf(doc: StudyDoc): string[] {
  const names = [
    ...doc.terrain.map((t) => t.file),
    doc.landCover?.file,
    doc.obstacles?.file,
    doc.roads?.file,
    doc.facades?.file,
    doc.tables?.lowAngleLand,
    ...(doc.needs ?? []).map((n) => n.file),
    ...doc.candidates.map((c) => c.measuredHorizon?.file),
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

/** n1, n2, …: the first that no need has. */
export function freeNeedId(needs: readonly NeedDoc[]): string {
  let n = needs.length + 1
  while (needs.some((need) => need.id === `n${n}`)) n++
  return `n${n}`
}
