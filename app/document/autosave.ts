import { createStore } from 'zustand/vanilla'
import type { StudyDoc } from '../../core/index.ts'
import { filesOf } from './draft.ts'
import type { FileStore, GivenFile } from './fileStore.ts'
import type { StudyStore } from './studyStore.ts'

/** Where the page keeps things; IndexedDB in the browser, a map in tests. */
export interface Shelf {
  get(key: string): Promise<unknown>
  set(key: string, value: unknown): Promise<void>
  del(key: string): Promise<void>
  keys(): Promise<string[]>
}
/** A few synchronous kilobytes, for the moment the page goes away. */
export type Journal = Pick<Storage, 'getItem' | 'setItem' | 'removeItem'>

export interface SaveState {
  readonly state: 'saved' | 'saving' | 'failed'
  /** When the last save ended, ms since 1970; null before the first. */
  readonly at: number | null
  /** What failed, in words; '' otherwise. */
  readonly trouble: string
}
interface KeptStudy {
  readonly version: 1
  readonly at: number
  readonly doc: StudyDoc
}

const STUDY_KEY = 'study'
const FILE_KEY = 'file:'
const JOURNAL_KEY = 'sightfell.journal'
const QUIET_MS = 500

export const createSaveStore = () => createStore<SaveState>()(() => ({ state: 'saved', at: null, trouble: '' }))
export type SaveStore = ReturnType<typeof createSaveStore>

/** What an earlier visit left: document and files, or null. The journal wins where it is newer than the shelf. */
export async function restore(shelf: Shelf, journal: Journal | null): Promise<{ doc: StudyDoc; files: GivenFile[] } | null> {
  const kept = (await shelf.get(STUDY_KEY)) as KeptStudy | undefined
  const noted = readJournal(journal)
  const newest = noted && (!kept || noted.at > kept.at) ? noted : kept
  if (!newest) return null
  const files: GivenFile[] = []
  for (const name of filesOf(newest.doc)) {
    const blob = (await shelf.get(FILE_KEY + name)) as Blob | undefined
    if (blob) files.push({ name, blob })
  }
  return { doc: newest.doc, files }
}
function readJournal(journal: Journal | null): KeptStudy | null {
  try {
    return JSON.parse(journal?.getItem(JOURNAL_KEY) ?? 'null') as KeptStudy | null
  } catch {
    return null // a half-written note is no note
  }
}

/**
 * Saves document and files a moment after the last change. `flush` starts the save now and, as the page may be going away, writes the
 * document to the journal at once. A failed save (full disk) becomes state and is tried again with the next change.
 */
export function autosave(study: StudyStore, given: FileStore, save: SaveStore, shelf: Shelf, journal: Journal | null, now: () => number) {
  let timer: ReturnType<typeof setTimeout> | undefined
  let running: Promise<void> = Promise.resolve()
  /** Changes so far, and how many of them are on the shelf. */
  let changes = 0
  let kept = 0
  const onShelf = new Map<string, Blob>()

  const write = async () => {
    const upTo = changes
    const { doc } = study.getState()
    const { files } = given.getState()
    try {
      const at = now()
      await shelf.set(STUDY_KEY, { version: 1, at, doc } satisfies KeptStudy)
      for (const [name, file] of files)
        if (onShelf.get(name) !== file.blob) {
          await shelf.set(FILE_KEY + name, file.blob)
          onShelf.set(name, file.blob)
        }
      for (const key of await shelf.keys())
        if (key.startsWith(FILE_KEY) && !files.has(key.slice(FILE_KEY.length))) {
          await shelf.del(key)
          onShelf.delete(key.slice(FILE_KEY.length))
        }
      kept = upTo
      if (kept === changes) journal?.removeItem(JOURNAL_KEY)
      save.setState({ state: kept === changes ? 'saved' : 'saving', at: now(), trouble: '' })
    } catch (error) {
      save.setState({ state: 'failed', trouble: troubleOf(error) })
    }
  }
  const start = () => {
    clearTimeout(timer)
    timer = undefined
    running = running.then(write)
    return running
  }
  const changed = () => {
    changes++
    save.setState({ state: 'saving' })
    clearTimeout(timer)
    timer = setTimeout(start, QUIET_MS)
  }
  const stops = [
    study.subscribe((s, before) => s.doc !== before.doc && changed()),
    given.subscribe((s, before) => s.files !== before.files && changed()),
  ]
  return {
    flush(): Promise<void> {
      if (kept === changes) return running
      try {
        journal?.setItem(JOURNAL_KEY, JSON.stringify({ version: 1, at: now(), doc: study.getState().doc } satisfies KeptStudy))
      } catch {
        // the shelf below is the real save; it says so when it fails
      }
      return start()
    },
    stop() {
      clearTimeout(timer)
      for (const stop of stops) stop()
    },
    /** Files that `restore` took from the shelf need no second write. */
    known(files: readonly GivenFile[]) {
      for (const f of files) onShelf.set(f.name, f.blob)
    },
  }
}
export type Autosave = ReturnType<typeof autosave>

function troubleOf(error: unknown): string {
  const name = error instanceof Error ? error.name : ''
  if (name === 'QuotaExceededError') return 'this browser has no room left; save the package to a file, then free some space'
  return `${error instanceof Error ? error.message : String(error)}; save the package to a file`
}

/** The page's shelf. */
export async function openShelf(): Promise<Shelf> {
  const { createStore: openDb, del, get, keys, set } = await import('idb-keyval')
  const db = openDb('sightfell', 'study')
  return {
    get: (key) => get(key, db),
    set: (key, value) => set(key, value, db),
    del: (key) => del(key, db),
    keys: async () => (await keys(db)).map(String),
  }
}
