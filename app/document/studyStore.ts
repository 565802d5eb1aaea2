import { type TemporalState, temporal } from 'zundo'
import { createStore, type StoreApi } from 'zustand/vanilla'
import type { StudyDoc } from '../../core/index.ts'
import { emptyStudy } from './draft.ts'

/** What undo keeps: the document, and the words that name the change which led to it. */
interface Recorded {
  readonly doc: StudyDoc
  /** "moved B"; '' for a document as it was opened. */
  readonly change: string
}
export interface StudyState extends Recorded {
  /** One step of undo. `words` is a past tense with its object: "moved B", "renamed A". */
  edit(words: string, make: (doc: StudyDoc) => StudyDoc): void
  /** A step of a running drag: the first is recorded, the following fold into it until `drop`. */
  drag(words: string, make: (doc: StudyDoc) => StudyDoc): void
  /** Ends the running drag; harmless when there is none. */
  drop(): void
  /** Another document: undo starts anew. */
  load(doc: StudyDoc): void
}

export type StudyStore = StoreApi<StudyState> & { temporal: StoreApi<TemporalState<Recorded>> }

const UNDO_STEPS = 300

/** The study document with undo; no React, no page, so tests and memo use the same store. */
export function createStudyStore(start: StudyDoc = emptyStudy()): StudyStore {
  const store: StudyStore = createStore<StudyState>()(
    temporal(
      (set, get) => {
        const apply = (words: string, make: (doc: StudyDoc) => StudyDoc) => {
          const doc = make(get().doc)
          if (doc !== get().doc) set({ doc, change: words })
        }
        return {
          doc: start,
          change: '',
          edit: (words, make) => {
            history().resume()
            apply(words, make)
          },
          drag: (words, make) => {
            const before = get().doc
            apply(words, make)
            if (get().doc !== before) history().pause()
          },
          drop: () => history().resume(),
          load: (doc) => {
            history().resume()
            set({ doc, change: '' })
            history().clear()
          },
        }
      },
      {
        partialize: ({ doc, change }): Recorded => ({ doc, change }),
        equality: (a, b) => a.doc === b.doc,
        limit: UNDO_STEPS,
      },
    ),
  )
  const history = () => store.temporal.getState()
  return store
}

/** Takes the last change back. */
export const undo = (store: StudyStore): void => store.temporal.getState().undo()
/** Makes the change that was taken back again. */
export const redo = (store: StudyStore): void => store.temporal.getState().redo()
/** Words of what undo and redo would do now; null when there is nothing. */
export function undoWords(store: StudyStore): { undo: string | null; redo: string | null } {
  const { pastStates, futureStates } = store.temporal.getState()
  return {
    undo: pastStates.length > 0 ? store.getState().change : null,
    redo: futureStates.length > 0 ? (futureStates[futureStates.length - 1].change ?? null) : null,
  }
}
