import { strFromU8, strToU8, unzip, zip } from 'fflate'
import { type FieldProblem, InputError, openDraft, type StudyDoc, sentence } from '../../core/index.ts'
import { filesOf } from './draft.ts'
import type { GivenFile } from './fileStore.ts'

export interface OpenedStudy {
  readonly doc: StudyDoc
  /** Files that came with it, by the name the study uses. */
  readonly files: readonly GivenFile[]
  readonly warnings: readonly string[]
  /** Files the study names that did not come with it. */
  readonly missing: readonly string[]
  /** What has to change first, with file, key and line; null where nothing has. */
  readonly trouble: string | null
}

/**
 * Reads a study that may still be in progress: values that have to change stay and are shown at their fields.
 * Throws InputError for JSON syntax, another format or version, and a document whose lists are not lists.
 */
export function readStudyText(text: string, fileName: string): Pick<OpenedStudy, 'doc' | 'warnings' | 'trouble'> {
  const { doc, problems, warnings } = openDraft(text, fileName)
  const broken = problems.find((p) => SHAPE_CODES.has(p.code) && !editable(p))
  if (broken) throw new InputError({ ...broken, file: fileName })
  const radar = { ...doc.radar, prfHz: doc.radar?.prfHz ?? [], antenna: doc.radar?.antenna ?? {} }
  return {
    doc: { ...doc, name: doc.name ?? '', terrain: doc.terrain ?? [], candidates: doc.candidates ?? [], radar: radar as StudyDoc['radar'] },
    warnings,
    trouble: problems[0] ? sentence({ ...problems[0], file: fileName }) : null,
  }
}
const SHAPE_CODES = new Set(['wrong-kind', 'wrong-shape', 'missing'])
/** A list or radar value that is simply not there, or a single radar value of the wrong kind, can be put right in the form. */
const editable = ({ path, code }: FieldProblem): boolean =>
  /^radar(\.antenna|\.suppression|\.stc)?(\.[A-Za-z]+)?$|^(terrain|candidates|name)$/.test(path) &&
  (code === 'missing' || (path.includes('.') && !/(prfHz|elevationTable|curve|antenna|suppression|stc)$/.test(path)))

/** Paths in a study are relative to it; the page knows files by that path and, dropped loose, by the last part of it. */
const lastPart = (path: string): string => path.split(/[\\/]/).at(-1) ?? path

/** Puts a study and loose files together. Throws InputError when the text is no study. */
export function openStudyText(text: string, fileName: string, loose: readonly GivenFile[]): OpenedStudy {
  const { doc, warnings, trouble } = readStudyText(text, fileName)
  const files: GivenFile[] = []
  const missing: string[] = []
  for (const name of filesOf(doc)) {
    const found = loose.find((f) => f.name === name) ?? loose.find((f) => lastPart(f.name) === lastPart(name))
    if (found) files.push({ name, blob: found.blob })
    else missing.push(name)
  }
  return { doc, files, warnings, missing, trouble }
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
export const studyText = (doc: StudyDoc): string => `${JSON.stringify(doc, null, 2)}\n`

/** A package: `study.json` and every file the study names, stored, as rasters are compressed already. */
export async function packStudy(doc: StudyDoc, files: ReadonlyMap<string, GivenFile>): Promise<Blob> {
  const entries: Record<string, [Uint8Array, { level: 0 | 6 }]> = { 'study.json': [strToU8(studyText(doc)), { level: 6 }] }
  for (const name of filesOf(doc)) {
    const file = files.get(name)
    if (file) entries[name] = [new Uint8Array(await file.blob.arrayBuffer()), { level: /\.tiff?$/i.test(name) ? 0 : 6 }]
  }
  const packed = await new Promise<Uint8Array>((resolve, reject) => zip(entries, (error, data) => (error ? reject(error) : resolve(data))))
  return new Blob([packed as BlobPart], { type: 'application/zip' })
}

/** A file name from the study's name: letters, digits and hyphens. */
export const fileStem = (doc: StudyDoc): string =>
  doc.name
    .normalize('NFKD')
    .replace(/\p{M}/gu, '')
    .replace(/[^\p{L}\p{N}]+/gu, '-')
    .replace(/^-+|-+$/g, '')
    .toLowerCase()
    .slice(0, 60) || 'study'
