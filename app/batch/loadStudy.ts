import { readFile, stat } from 'node:fs/promises'
import { basename, dirname, resolve } from 'node:path'
import { checkStudy, InputError, parseStudy, type SettledCandidate, type SettledStudy, type StudyDoc, settle } from '../../core/index.ts'
import { numberOption, usageError } from './arguments.ts'
import { fileFault } from './fileSource.ts'

/** A study file read, checked and settled. */
export interface LoadedStudy {
  readonly name: string
  readonly path: string
  /** Folder that the files named in the study are looked for in. */
  readonly dir: string
  readonly doc: StudyDoc
  readonly study: SettledStudy
  /** Remarks for stderr, once the command has succeeded. */
  readonly warnings: readonly string[]
}
const LARGEST_STUDY_BYTES = 64e6

/** Text of a file of modest size. @throws InputError where it cannot be read or is no study, list or table of that size */
export async function readText(path: string, place?: string): Promise<string> {
  try {
    const { size } = await stat(path)
    if (size > LARGEST_STUDY_BYTES)
      throw new InputError({
        code: 'file',
        file: basename(path),
        found: `the file has ${Math.round(size / 1e6)} MB`,
        remedy: 'give a text file up to 64 MB',
      })
    return await readFile(path, 'utf8')
  } catch (error) {
    if (error instanceof InputError) throw error
    throw fileFault(error, path, place)
  }
}

/** Reads a study. @throws InputError at its first problem */
export async function loadStudy(path: string): Promise<LoadedStudy> {
  const name = basename(path)
  const { doc, warnings } = parseStudy(await readText(path), name)
  const study = settle(doc, name)
  if (study.terrain.length === 0)
    throw new InputError({
      code: 'no-terrain',
      file: name,
      place: 'terrain',
      found: 'no terrain file',
      remedy: 'name an elevation raster in terrain[0].file',
    })
  if (study.candidates.length === 0)
    throw new InputError({
      code: 'no-candidates',
      file: name,
      place: 'candidates',
      found: study.rejected.length > 0 ? 'every candidate is rejected' : 'no candidate',
      remedy:
        study.rejected.length > 0
          ? 'take "rejected" out of one, or add a candidate'
          : 'give at least one candidate with id, lon, lat and mastHeightsM',
    })
  return { name, path, dir: dirname(resolve(path)), doc, study, warnings: [...warnings, ...checkStudy(study, doc)] }
}

/** The candidate asked for. @throws InputError naming those there are */
export function candidateNamed(loaded: LoadedStudy, id: string): SettledCandidate {
  const found = loaded.study.candidates.find((c) => c.id === id)
  if (found) return found
  const ids = loaded.study.candidates.map((c) => c.id)
  const some = ids.slice(0, 8).join(', ') + (ids.length > 8 ? ', …' : '')
  throw usageError('--candidate', `${loaded.name} has no candidate "${id.slice(0, 40)}"`, `use one of ${some}`)
}

/** `--height` of points, horizon and cell: any mast height, m. */
export const heightOption = (text: string): number => numberOption('height', text, 0, 1000, 'mast height', true)

/** `--tilt`, or the candidate's first, deg. */
export const tiltOption = (text: string | undefined, candidate: SettledCandidate): number =>
  text === undefined ? (candidate.tiltsDeg[0] as number) : numberOption('tilt', text, -90, 90, 'tilt')

/** Remarks, one line each. */
export function sayWarnings(warnings: readonly string[]): void {
  for (const w of warnings) process.stderr.write(`note: ${w}\n`)
}
