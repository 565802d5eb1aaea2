import type { CriterionDoc, StudyDoc } from '../../core/index.ts'
import { withValue } from './draft.ts'
import type { StudyStore } from './studyStore.ts'

const withCriteria = (doc: StudyDoc, criteria: CriterionDoc[]): StudyDoc =>
  withValue(doc, 'ranking', criteria.length === 0 ? undefined : { ...doc.ranking, criteria })
const criteriaOf = (doc: StudyDoc): CriterionDoc[] => doc.ranking?.criteria ?? []

/** One more figure to rank by; nothing when it is there already. */
export const addCriterion = (store: StudyStore, criterion: CriterionDoc): void =>
  store.getState().edit('added to the ranking', (doc) => {
    const now = criteriaOf(doc)
    return now.some((c) => c.figure === criterion.figure) ? doc : withCriteria(doc, [...now, criterion])
  })
export const removeCriterion = (store: StudyStore, figure: string): void =>
  store.getState().edit('took from the ranking', (doc) =>
    withCriteria(
      doc,
      criteriaOf(doc).filter((c) => c.figure !== figure),
    ),
  )
export const setCriterion = (store: StudyStore, figure: string, part: Partial<Omit<CriterionDoc, 'figure'>>): void =>
  store.getState().edit(`changed ${Object.keys(part)[0] ?? 'nothing'} in the ranking`, (doc) =>
    withCriteria(
      doc,
      criteriaOf(doc).map((c) => (c.figure === figure ? { ...c, ...part } : c)),
    ),
  )

/** A candidate is given up, with the reason; it is no longer worked out and stays listed. Nothing without a reason. */
export function rejectCandidate(store: StudyStore, id: string, reason: string): void {
  const words = reason.trim()
  if (words === '') return
  store.getState().edit(`rejected ${id}`, (doc) => ({
    ...doc,
    candidates: doc.candidates.map((c) => (c.id === id ? { ...c, rejected: words } : c)),
  }))
}
export const takeBackCandidate = (store: StudyStore, id: string): void =>
  store.getState().edit(`took back ${id}`, (doc) => ({
    ...doc,
    candidates: doc.candidates.map((c) => {
      if (c.id !== id) return c
      const { rejected: _rejected, ...kept } = c
      return kept
    }),
  }))
