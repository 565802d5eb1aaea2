import type { CandidateDoc } from '../../core/index.ts'
import type { StudyStore } from './studyStore.ts'

const change = (store: StudyStore, words: string, id: string, of: (c: CandidateDoc) => CandidateDoc): void =>
  store.getState().edit(words, (doc) => ({ ...doc, candidates: doc.candidates.map((c) => (c.id === id ? of(c) : c)) }))

/** A surveyed horizon of a candidate, by its file; it is compared, and taken only when asked. */
export const setSurvey = (store: StudyStore, id: string, file: string): void =>
  change(store, `took the surveyed horizon of ${id}`, id, (c) => ({ ...c, measuredHorizon: { file } }))

export const removeSurvey = (store: StudyStore, id: string): void =>
  change(store, `removed the surveyed horizon of ${id}`, id, ({ measuredHorizon: _file, useMeasuredHorizon: _use, ...rest }) => rest)

/** Take the higher of surveyed and computed horizon, or the computed one alone. */
export const takeSurvey = (store: StudyStore, id: string, take: boolean): void =>
  change(
    store,
    take ? `takes the surveyed horizon of ${id}` : `leaves the surveyed horizon of ${id}`,
    id,
    ({ useMeasuredHorizon: _use, ...rest }) => (take ? { ...rest, useMeasuredHorizon: true } : rest),
  )
