import { describe, expect, it } from 'vitest'
import {
  addCandidate,
  addCriterion,
  createStudyStore,
  rejectCandidate,
  removeCriterion,
  setCriterion,
  studyOptions,
  takeBackCandidate,
  undo,
} from '../../app/document/index.ts'

const criterion = { figure: 'mast_height_m', worst: 40, best: 0, weight: 1 }

describe('ranking and rejecting', () => {
  it('a rejected candidate has no options until it is taken back; each is one step back', () => {
    const store = createStudyStore()
    addCandidate(store, { lon: 1, lat: 1 })
    addCandidate(store, { lon: 2, lat: 2 })
    rejectCandidate(store, 'A', '  no road  ')
    expect(store.getState().doc.candidates[0].rejected).toBe('no road')
    expect(new Set(studyOptions(store.getState().doc).map((o) => o.candidate))).toEqual(new Set(['B']))
    takeBackCandidate(store, 'A')
    expect('rejected' in store.getState().doc.candidates[0]).toBe(false)
    undo(store)
    expect(store.getState().doc.candidates[0].rejected).toBe('no road')
    undo(store)
    expect(store.getState().doc.candidates[0].rejected).toBeUndefined()
  })
  it('is not rejected without a reason', () => {
    const store = createStudyStore()
    addCandidate(store, { lon: 1, lat: 1 })
    rejectCandidate(store, 'A', '  ')
    expect(store.getState().doc.candidates[0].rejected).toBeUndefined()
  })
  it('criteria are added once, changed and taken out; the last one takes the ranking with it', () => {
    const store = createStudyStore()
    const criteria = () => store.getState().doc.ranking?.criteria
    addCriterion(store, criterion)
    addCriterion(store, { ...criterion, weight: 9 })
    expect(criteria()).toEqual([criterion])
    setCriterion(store, 'mast_height_m', { weight: 2 })
    expect(criteria()).toEqual([{ ...criterion, weight: 2 }])
    undo(store)
    expect(criteria()).toEqual([criterion])
    removeCriterion(store, 'mast_height_m')
    expect('ranking' in store.getState().doc).toBe(false)
  })
})
