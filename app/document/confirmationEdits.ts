import type { ConfirmationDoc } from '../../core/index.ts'
import { withValue } from './draft.ts'
import type { StudyStore } from './studyStore.ts'

/** Something measured on site or in trial joins the study. It must be complete: the study's own checks refuse it otherwise. */
export const addConfirmation = (store: StudyStore, confirmation: ConfirmationDoc): void =>
  store.getState().edit('entered a measurement', (doc) => ({ ...doc, confirmations: [...(doc.confirmations ?? []), confirmation] }))

export const removeConfirmation = (store: StudyStore, index: number): void =>
  store.getState().edit('removed a measurement', (doc) => {
    const left = (doc.confirmations ?? []).filter((_, i) => i !== index)
    return withValue(doc, 'confirmations', left.length > 0 ? left : undefined)
  })
