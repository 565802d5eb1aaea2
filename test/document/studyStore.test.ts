import { describe, expect, it } from 'vitest'
import {
  addCandidate,
  changeMastHeight,
  createStudyStore,
  emptyStudy,
  filesOf,
  freeCandidateId,
  moveCandidate,
  problemsOf,
  redo,
  removeCandidate,
  runnable,
  setField,
  settleOption,
  studyOptions,
  undo,
  undoWords,
  valueAt,
  withValue,
} from '../../app/document/index.ts'

const withTwo = () => {
  const store = createStudyStore()
  addCandidate(store, { lon: -25.7, lat: 46.2 })
  addCandidate(store, { lon: -25.6, lat: 46.1 })
  return store
}

describe('undo', () => {
  it('names each step and takes it back', () => {
    const store = withTwo()
    moveCandidate(store, 'B', { lon: -25.5, lat: 46.1 })
    expect(undoWords(store)).toEqual({ undo: 'moved B', redo: null })
    undo(store)
    expect(store.getState().doc.candidates[1].lon).toBe(-25.6)
    expect(undoWords(store)).toEqual({ undo: 'placed B', redo: 'moved B' })
    redo(store)
    expect(store.getState().doc.candidates[1].lon).toBe(-25.5)
  })
  it('folds a drag into one step', () => {
    const store = withTwo()
    const start = store.getState().doc
    for (let n = 1; n <= 20; n++) moveCandidate(store, 'A', { lon: -25.7 + n / 1000, lat: 46.2 }, true)
    store.getState().drop()
    moveCandidate(store, 'B', { lon: -25.4, lat: 46.1 })
    undo(store)
    expect(store.getState().doc.candidates[0].lon).toBeCloseTo(-25.68, 9)
    undo(store)
    expect(store.getState().doc).toBe(start)
  })
  it('a change that changes nothing is no step', () => {
    const store = withTwo()
    setField(store, 'radar.frequencyHz', store.getState().doc.radar.frequencyHz, 'changed frequency')
    expect(undoWords(store).undo).toBe('placed B')
  })
  it('another study starts with an empty history', () => {
    const store = withTwo()
    store.getState().load(emptyStudy())
    expect(undoWords(store)).toEqual({ undo: null, redo: null })
  })
})

describe('key paths', () => {
  it('read and write objects and lists, and leave the rest shared', () => {
    const doc = emptyStudy()
    const next = withValue(doc, 'radar.antenna.tiltDeg', 2)
    expect(valueAt(next, 'radar.antenna.tiltDeg')).toBe(2)
    expect(next.candidates).toBe(doc.candidates)
    expect(valueAt(withValue(next, 'atmosphere.windMs', 5), 'atmosphere')).toEqual({ windMs: 5 })
    expect(valueAt(withValue({ needs: [{ id: 'n1' }] }, 'needs[0].pd', 0.5), 'needs[0].pd')).toBe(0.5)
  })
  it('clearing a value removes its key, and clearing nothing changes nothing', () => {
    const doc = withValue(emptyStudy(), 'radar.antenna.tiltDeg', 2)
    expect('tiltDeg' in withValue(doc, 'radar.antenna.tiltDeg', undefined).radar.antenna).toBe(false)
    expect(withValue(doc, 'atmosphere.windMs', undefined)).toBe(doc)
  })
})

describe('the document', () => {
  it('runs from the first place on, once there is terrain', () => {
    const store = withTwo()
    expect(runnable(store.getState().doc)).toBeNull()
    setField(store, 'terrain', [{ file: 'dem.tif' }], 'added dem.tif')
    expect(runnable(store.getState().doc)).toBe(store.getState().doc)
    setField(store, 'radar.frequencyHz', 50e9, 'changed frequency')
    expect(runnable(store.getState().doc)).toBeNull()
    expect(problemsOf(store.getState().doc).map((p) => p.path)).toEqual(['radar.frequencyHz'])
  })
  it('gives each candidate the first free letter', () => {
    const store = withTwo()
    removeCandidate(store, 'A')
    expect(freeCandidateId(store.getState().doc.candidates)).toBe('A')
    const many = [...'ABCDEFGHIJKLMNOPQRSTUVWXYZ'].map((id) => ({ id, lon: 0, lat: 0, mastHeightsM: [10] }))
    expect(freeCandidateId(many)).toBe('A1')
  })
  it('lists each file once', () => {
    const doc = { ...emptyStudy(), terrain: [{ file: 'a.tif' }, { file: 'b.tif' }], landCover: { file: 'a.tif', legend: 'nlcd' as const } }
    expect(filesOf(doc)).toEqual(['a.tif', 'b.tif'])
  })
  it('keeps the option on show one that exists: the nearest mast of the same candidate', () => {
    const store = withTwo()
    const shown = { candidate: 'B', heightM: 20, tiltDeg: 0 }
    expect(settleOption(store.getState().doc, shown)).toBe(shown)
    changeMastHeight(store, 'B', 20, 23)
    expect(settleOption(store.getState().doc, shown)).toEqual({ candidate: 'B', heightM: 23, tiltDeg: 0 })
    removeCandidate(store, 'B')
    expect(settleOption(store.getState().doc, shown)).toEqual({ candidate: 'A', heightM: 10, tiltDeg: 0 })
    expect(studyOptions(store.getState().doc)).toHaveLength(3)
  })
})
