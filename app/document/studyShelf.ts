import { createStore } from 'zustand/vanilla'
import { canonicalJson, type StudyDoc } from '../../core/index.ts'
import type { Shelf } from './autosave.ts'
import { filesOf } from './draft.ts'
import type { GivenFile } from './fileStore.ts'

/** A study kept on this machine beside the one that is open. */
export interface ListedStudy {
  readonly id: string
  /** When it was last set aside, ms since 1970. */
  readonly at: number
  readonly doc: StudyDoc
}
interface Kept extends ListedStudy {
  readonly version: 1
}
export interface StudyList {
  /** Newest first. */
  readonly studies: readonly ListedStudy[]
}

const KEY = 'aside:'
const fileKey = (id: string, name: string): string => `aside-file:${id}/${name}`

/** Studies set aside: written when another one is opened, taken back with their files. */
export function createStudyShelf(shelf: Shelf, now: () => number) {
  const list = createStore<StudyList>()(() => ({ studies: [] }))
  const show = (studies: readonly ListedStudy[]) => list.setState({ studies: [...studies].sort((a, b) => b.at - a.at) })
  const others = (id: string) => list.getState().studies.filter((s) => s.id !== id)
  const find = (id: string) => list.getState().studies.find((s) => s.id === id)
  const freshId = (): string => {
    let n = now()
    while (find(String(n))) n++
    return String(n)
  }
  const write = async (kept: ListedStudy, files: readonly GivenFile[]) => {
    for (const f of files) await shelf.set(fileKey(kept.id, f.name), f.blob)
    await shelf.set(KEY + kept.id, { version: 1, ...kept } satisfies Kept)
    show([...others(kept.id), kept])
  }
  const filesBy = async ({ id, doc }: ListedStudy): Promise<GivenFile[]> => {
    const files: GivenFile[] = []
    for (const name of filesOf(doc)) {
      const blob = (await shelf.get(fileKey(id, name))) as Blob | undefined
      if (blob) files.push({ name, blob })
    }
    return files
  }
  const drop = async (id: string) => {
    await shelf.del(KEY + id)
    for (const key of await shelf.keys()) if (key.startsWith(fileKey(id, ''))) await shelf.del(key)
    show(others(id))
  }
  return {
    list,
    async load() {
      const keys = (await shelf.keys()).filter((k) => k.startsWith(KEY))
      const found = (await Promise.all(keys.map((k) => shelf.get(k)))) as (Kept | undefined)[]
      show(found.filter((k): k is Kept => k?.version === 1))
    },
    /** Keeps a study with the files it names; one just like it that is kept already is not kept twice. Rejects when there is no room. */
    async setAside(doc: StudyDoc, given: ReadonlyMap<string, GivenFile>): Promise<void> {
      const text = canonicalJson(doc)
      if (list.getState().studies.some((s) => canonicalJson(s.doc) === text)) return
      const files = filesOf(doc).flatMap((name) => given.get(name) ?? [])
      await write({ id: freshId(), at: now(), doc }, files)
    },
    /** The study with its files; it stays on the shelf until `remove`. null when it is gone. */
    async read(id: string): Promise<{ doc: StudyDoc; files: GivenFile[] } | null> {
      const study = find(id)
      return study ? { doc: study.doc, files: await filesBy(study) } : null
    },
    async rename(id: string, name: string): Promise<void> {
      const study = find(id)
      if (study) await write({ ...study, doc: { ...study.doc, name } }, [])
    },
    async duplicate(id: string): Promise<void> {
      const study = find(id)
      if (study) await write({ id: freshId(), at: now(), doc: { ...study.doc, name: `${study.doc.name}, copy` } }, await filesBy(study))
    },
    /** Takes a study off the shelf; returns what puts it back. */
    async remove(id: string): Promise<() => Promise<void>> {
      const study = find(id)
      const files = study ? await filesBy(study) : []
      await drop(id)
      return async () => {
        if (study) await write(study, files)
      }
    },
  }
}
export type StudyShelf = ReturnType<typeof createStudyShelf>
