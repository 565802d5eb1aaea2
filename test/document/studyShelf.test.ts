import { describe, expect, it } from 'vitest'
import { createStudyShelf, emptyStudy, type Shelf } from '../../app/document/index.ts'
import type { StudyDoc } from '../../core/index.ts'

function memoryShelf(full = { now: false }) {
  const kept = new Map<string, unknown>()
  const shelf: Shelf = {
    get: async (key) => kept.get(key),
    set: async (key, value) => {
      if (full.now) throw new Error('no room')
      kept.set(key, value)
    },
    del: async (key) => void kept.delete(key),
    keys: async () => [...kept.keys()],
  }
  return { shelf, kept, full }
}
const moor = (name = 'Moor'): StudyDoc => ({ ...emptyStudy(), name, terrain: [{ file: 'moor.tif' }] })
const files = new Map([
  ['moor.tif', { name: 'moor.tif', blob: new Blob(['heights']) }],
  ['left-over.tif', { name: 'left-over.tif', blob: new Blob(['x']) }],
])
async function withMoor() {
  const place = memoryShelf()
  let clock = 100
  const studies = createStudyShelf(place.shelf, () => clock++)
  await studies.setAside(moor(), files)
  const names = () => studies.list.getState().studies.map((s) => s.doc.name)
  return { ...place, studies, names, id: studies.list.getState().studies[0].id }
}

describe('studies set aside', () => {
  it('come back with the files they name, after another visit too', async () => {
    const { shelf, id } = await withMoor()
    const again = createStudyShelf(shelf, () => 999)
    await again.load()
    const back = await again.read(id)
    expect(back?.doc).toEqual(moor())
    expect(back?.files.map((f) => f.name)).toEqual(['moor.tif'])
    expect(await back?.files[0].blob.text()).toBe('heights')
  })
  it('one just like it is kept once; a changed one beside it, newest first', async () => {
    const { studies, names } = await withMoor()
    await studies.setAside(moor(), files)
    expect(names()).toEqual(['Moor'])
    await studies.setAside(moor('Moor, second thoughts'), files)
    expect(names()).toEqual(['Moor, second thoughts', 'Moor'])
  })
  it('are renamed and duplicated with their files', async () => {
    const { studies, names, id } = await withMoor()
    await studies.rename(id, 'Heath')
    await studies.duplicate(id)
    expect(names()).toEqual(['Heath, copy', 'Heath'])
    const copy = await studies.read(studies.list.getState().studies[0].id)
    expect(copy?.files.map((f) => f.name)).toEqual(['moor.tif'])
  })
  it('deleting leaves nothing behind, and can be undone', async () => {
    const { studies, names, kept, id } = await withMoor()
    const undo = await studies.remove(id)
    expect([...kept.keys()]).toEqual([])
    expect(names()).toEqual([])
    await undo()
    expect(names()).toEqual(['Moor'])
    expect((await studies.read(id))?.files).toHaveLength(1)
  })
  it('deleting one touches no other', async () => {
    const { studies, names, id } = await withMoor()
    await studies.duplicate(id)
    await studies.remove(id)
    expect(names()).toEqual(['Moor, copy'])
    expect((await studies.read(studies.list.getState().studies[0].id))?.files).toHaveLength(1)
  })
  it('no room is told to whoever asked', async () => {
    const { studies, full } = await withMoor()
    full.now = true
    await expect(studies.setAside(moor('Other'), files)).rejects.toThrow('no room')
  })
})
