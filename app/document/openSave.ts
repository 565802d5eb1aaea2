import { strFromU8, strToU8, unzip, zip } from 'fflate'
import { InputError, parseStudy } from '../../core/index.ts'
import { type DraftStudy, filesOf, missingRadarPaths, withValue } from './draft.ts'
import type { GivenFile } from './fileStore.ts'

export interface OpenedStudy {
  readonly doc: DraftStudy
  /** Files that came with it, by the name the study uses. */
  readonly files: readonly GivenFile[]
  readonly warnings: readonly string[]
  /** Files the study names that did not come with it. */
  readonly missing: readonly string[]
}

/** Any value the schema accepts, put where a half-entered radar has none yet, and taken out again after the check. */
const STAND_IN: Readonly<Record<string, unknown>> = {
  'radar.frequencyHz': 1e9,
  'radar.peakPowerW': 1,
  'radar.pulseWidthS': 1e-6,
  'radar.prfHz': [1000],
  'radar.antenna.gainDbi': 0,
  'radar.antenna.azimuthBeamwidthDeg': 1,
}

/** Reads a study file. A radar that is not whole yet is accepted, as this app saves such studies; all else is checked. Throws InputError. */
export function readStudyText(text: string, fileName: string): { doc: DraftStudy; warnings: readonly string[] } {
  const unfinished = unfinishedStudy(text)
  const parsed = unfinished ? parseStudy(JSON.stringify(unfinished.whole), fileName) : parseStudy(text, fileName)
  let doc = parsed.doc as DraftStudy
  for (const path of unfinished?.missing ?? []) doc = withValue(doc, path, undefined)
  if (!doc.radar.antenna) doc = { ...doc, radar: { ...doc.radar, antenna: {} } }
  return { doc, warnings: parsed.warnings }
}

/** The study with stand-ins where required radar fields are empty; null when none is, or it is no study of ours. */
function unfinishedStudy(text: string): { whole: unknown; missing: string[] } | null {
  let raw: DraftStudy
  try {
    raw = JSON.parse(text)
  } catch {
    return null // parseStudy names line and column
  }
  if (raw?.format !== 'sightfell-study' || typeof raw.radar !== 'object' || raw.radar === null) return null
  const missing = missingRadarPaths(raw)
  if (missing.length === 0) return null
  return { whole: missing.reduce((doc, path) => withValue(doc, path, STAND_IN[path]), raw), missing }
}

/** Paths in a study are relative to it; the page knows files by that path and, dropped loose, by the last part of it. */
const lastPart = (path: string): string => path.split(/[\\/]/).at(-1) ?? path

/** Puts a study and loose files together. Throws InputError when the text is no study. */
export function openStudyText(text: string, fileName: string, loose: readonly GivenFile[]): OpenedStudy {
  const { doc, warnings } = readStudyText(text, fileName)
  const files: GivenFile[] = []
  const missing: string[] = []
  for (const name of filesOf(doc)) {
    const found = loose.find((f) => f.name === name) ?? loose.find((f) => lastPart(f.name) === lastPart(name))
    if (found) files.push({ name, blob: found.blob })
    else missing.push(name)
  }
  return { doc, files, warnings, missing }
}

/** Opens a package: a ZIP of one study and its files. Throws InputError. */
export async function openPackage(bytes: Uint8Array, fileName: string): Promise<OpenedStudy> {
  const entries = await unzipped(bytes, fileName)
  const texts = Object.keys(entries).filter((n) => n.endsWith('.json'))
  const study = texts.find((n) => lastPart(n) === 'study.json') ?? texts.find((n) => strFromU8(entries[n]).includes('sightfell-study'))
  if (!study)
    throw new InputError({
      code: 'no-study-in-package',
      file: fileName,
      found: `no study among ${Object.keys(entries).length} files`,
      remedy: 'give a package saved here, or drop the files by themselves',
    })
  const folder = study.slice(0, study.length - lastPart(study).length)
  const loose = Object.entries(entries)
    .filter(([name]) => name !== study && !name.endsWith('/'))
    .map(([name, data]) => ({ name: name.startsWith(folder) ? name.slice(folder.length) : name, blob: new Blob([data as BlobPart]) }))
  return openStudyText(strFromU8(entries[study]), fileName, loose)
}

const unzipped = (bytes: Uint8Array, fileName: string) =>
  new Promise<Record<string, Uint8Array>>((resolve, reject) =>
    unzip(bytes, (error, entries) =>
      error
        ? reject(
            new InputError({
              code: 'not-a-package',
              file: fileName,
              found: `not a whole ZIP file (${error.message})`,
              remedy: 'save the package again',
            }),
          )
        : resolve(entries),
    ),
  )

/** The study file as text: two spaces, a line end. */
export const studyText = (doc: DraftStudy): string => `${JSON.stringify(doc, null, 2)}\n`

/** A package: `study.json` and every file the study names, stored, as rasters are compressed already. */
export async function packStudy(doc: DraftStudy, files: ReadonlyMap<string, GivenFile>): Promise<Blob> {
  const entries: Record<string, [Uint8Array, { level: 0 | 6 }]> = { 'study.json': [strToU8(studyText(doc)), { level: 6 }] }
  for (const name of filesOf(doc)) {
    const file = files.get(name)
    if (file) entries[name] = [new Uint8Array(await file.blob.arrayBuffer()), { level: /\.tiff?$/i.test(name) ? 0 : 6 }]
  }
  const packed = await new Promise<Uint8Array>((resolve, reject) => zip(entries, (error, data) => (error ? reject(error) : resolve(data))))
  return new Blob([packed as BlobPart], { type: 'application/zip' })
}

/** A file name from the study's name: letters, digits and hyphens. */
export const fileStem = (doc: DraftStudy): string =>
  doc.name
    .normalize('NFKD')
    .replace(/[^\p{L}\p{N}]+/gu, '-')
    .replace(/^-+|-+$/g, '')
    .toLowerCase()
    .slice(0, 60) || 'study'
