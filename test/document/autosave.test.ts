import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest'
import {
  addCandidate,
  autosave,
  createFileStore,
  createSaveStore,
  createStudyStore,
  type Journal,
  restore,
  type Shelf,
  setField,
} from '../../app/document/index.ts'

function memoryShelf(full = { now: false }) {
  const kept = new Map<string, unknown>()
  const shelf: Shelf = {
    get: async (key) => kept.get(key),
    set: async (key, value) => {
      if (full.now) throw Object.assign(new Error('no room'), { name: 'QuotaExceededError' })
      kept.set(key, value)
    },
    del: async (key) => void kept.delete(key),
    keys: async () => [...kept.keys()],
  }
  return { shelf, kept, full }
}
function memoryJournal(): Journal & { kept: Map<string, string> } {
  const kept = new Map<string, string>()
  return { kept, getItem: (k) => kept.get(k) ?? null, setItem: (k, v) => void kept.set(k, v), removeItem: (k) => void kept.delete(k) }
}
const setUp = () => {
  const study = createStudyStore()
  const files = createFileStore()
  const save = createSaveStore()
  const { shelf, kept, full } = memoryShelf()
  const journal = memoryJournal()
  let clock = 1000
  const saver = autosave(study, files, save, shelf, journal, () => clock++)
  return { study, files, save, shelf, kept, full, journal, saver }
}
const dem = new Blob(['heights'])

describe('autosave', () => {
  beforeEach(() => void vi.useFakeTimers())
  afterEach(() => void vi.useRealTimers())

  it('keeps document and files and gives them back', async () => {
    const { study, files, save, shelf, journal } = setUp()
    files.getState().give([{ name: 'dem.tif', blob: dem }])
    setField(study, 'terrain', [{ file: 'dem.tif' }], 'added dem.tif')
    expect(save.getState().state).toBe('saving')
    await vi.advanceTimersByTimeAsync(600)
    expect(save.getState().state).toBe('saved')
    const back = await restore(shelf, journal)
    expect(back?.doc).toEqual(study.getState().doc)
    expect(await back?.files[0].blob.text()).toBe('heights')
  })
  it('writes once for many changes in a row', async () => {
    const { study, shelf } = setUp()
    const set = vi.spyOn(shelf, 'set')
    for (let n = 0; n < 30; n++) addCandidate(study, { lon: n, lat: 0 })
    await vi.advanceTimersByTimeAsync(600)
    expect(set).toHaveBeenCalledTimes(1)
  })
  it('says so when the disk is full, loses nothing, and saves with the next change', async () => {
    const { study, save, full, kept } = setUp()
    full.now = true
    addCandidate(study, { lon: 1, lat: 1 })
    await vi.advanceTimersByTimeAsync(600)
    expect(save.getState()).toMatchObject({ state: 'failed', trouble: expect.stringContaining('no room') })
    full.now = false
    addCandidate(study, { lon: 2, lat: 2 })
    await vi.advanceTimersByTimeAsync(600)
    expect(save.getState().state).toBe('saved')
    expect(kept.get('study')).toMatchObject({ doc: { candidates: [{ id: 'A' }, { id: 'B' }] } })
  })
  it('a page that goes away before the save has its document in the journal', async () => {
    const { study, shelf, journal, saver, full } = setUp()
    addCandidate(study, { lon: 1, lat: 1 })
    await vi.advanceTimersByTimeAsync(600)
    full.now = true
    addCandidate(study, { lon: 2, lat: 2 })
    void saver.flush()
    const back = await restore(shelf, journal)
    expect(back?.doc.candidates.map((c) => c.id)).toEqual(['A', 'B'])
  })
  it('a page that goes away while a save is under way has its document in the journal', async () => {
    const { study, shelf, journal, saver } = setUp()
    vi.spyOn(shelf, 'set').mockImplementation(() => new Promise(() => {}))
    addCandidate(study, { lon: 1, lat: 1 })
    await vi.advanceTimersByTimeAsync(600)
    void saver.flush()
    const back = await restore(shelf, journal)
    expect(back?.doc.candidates.map((c) => c.id)).toEqual(['A'])
  })
  it('drops files of an earlier study from the shelf', async () => {
    const { files, kept } = setUp()
    files.getState().give([{ name: 'old.tif', blob: dem }])
    await vi.advanceTimersByTimeAsync(600)
    files.getState().replace([{ name: 'new.tif', blob: dem }])
    await vi.advanceTimersByTimeAsync(600)
    expect([...kept.keys()].filter((k) => k.startsWith('file:'))).toEqual(['file:new.tif'])
  })
})
