import { InputError, readCandidates, type StudyDoc } from '../../core/index.ts'
import { addCandidates, type FileStore, filesOf, type GivenFile, openPackage, openStudyText, type StudyStore } from '../document/index.ts'
import { addToStudy } from './addToStudy.ts'
import { fileRole } from './fileRole.ts'
import type { FileRole } from './types.ts'

export interface TakenIn {
  /** A study was opened: everything of the one before is gone. */
  readonly opened: boolean
  readonly warnings: readonly string[]
  /** Files the opened study names that are not here yet. */
  readonly missing: readonly string[]
  /** What has to change first in the opened study; null where nothing has. */
  readonly trouble: string | null
}
type Named = Blob & { readonly name: string }

/**
 * Takes dropped or picked files into the study: a study or package replaces what is open (loose files beside it join it), anything else is
 * added in one step of undo. `beforeOpening` runs when another study is about to take the
 * place of the open one. `as` overrides the guess of what a file is. Throws InputError and changes nothing when one cannot be used.
 */
export async function takeIn(
  study: StudyStore,
  given: FileStore,
  dropped: readonly Named[],
  as?: FileRole,
  beforeOpening: () => Promise<void> = async () => {},
): Promise<TakenIn> {
  const sorted = await Promise.all(dropped.map(async (file) => ({ file, role: as ?? (await fileRole(file)) })))
  const head = sorted.find((s) => s.role === 'study' || s.role === 'package')
  if (head) {
    const loose = sorted.filter((s) => s !== head).map(({ file }) => ({ name: file.name, blob: file }))
    const opened =
      head.role === 'package'
        ? await openPackage(new Uint8Array(await head.file.arrayBuffer()), head.file.name)
        : openStudyText(await head.file.text(), head.file.name, loose)
    await beforeOpening()
    given.getState().replace(opened.files)
    study.getState().load(opened.doc)
    return { opened: true, warnings: opened.warnings, missing: opened.missing, trouble: opened.trouble }
  }
  const useless = sorted.find((s) => s.role === 'unknown')
  if (useless)
    throw new InputError({
      code: 'unknown-file',
      file: useless.file.name,
      found: 'neither GeoTIFF, GeoJSON, CSV, study nor package',
      remedy: 'give a .tif, .geojson, .csv, .json or .zip file',
    })
  const places = sorted.filter((s) => s.role === 'candidates')
  const lists = await Promise.all(places.map(async ({ file }) => ({ name: file.name, list: readCandidates(await file.text(), file.name) })))
  for (const { name, list } of lists) addCandidates(study, list, `added ${list.length} candidate${list.length > 1 ? 's' : ''} of ${name}`)
  const others = sorted.filter((s) => s.role !== 'candidates')
  if (others.length === 0) return { opened: false, warnings: [], missing: [], trouble: null }
  const doc = study.getState().doc
  given.getState().give(others.map(({ file }) => ({ name: nameInStudy(doc, file.name), blob: file }) satisfies GivenFile))
  const words = others.length === 1 ? `added ${others[0].file.name}` : `added ${others.length} files`
  study.getState().edit(words, (before) => others.reduce((d, s) => addToStudy(d, nameInStudy(d, s.file.name), s.role), before))
  return { opened: false, warnings: [], missing: [], trouble: null }
}

/** A study may name a file with folders; a dropped file of that last name is that file. */
const nameInStudy = (doc: StudyDoc, name: string): string => filesOf(doc).find((n) => n === name || n.endsWith(`/${name}`)) ?? name
