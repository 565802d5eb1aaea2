import { describe, expect, it } from 'vitest'
import { createOwnRadars, createStudyStore, setField, takeStartingSet, takeTemplate, undo, undoWords } from '../../app/document/index.ts'
import { templateRows } from '../../app/words/index.ts'
import { RADAR_TEMPLATES, radarOfTemplate } from '../../core/index.ts'

const shelf = () => {
  const kept = new Map<string, unknown>()
  return {
    get: async (k: string) => kept.get(k),
    set: async (k: string, v: unknown) => void kept.set(k, structuredClone(v)),
    del: async (k: string) => void kept.delete(k),
    keys: async () => [...kept.keys()],
  }
}

describe('starting from a template', () => {
  it('is one step of undo, named', () => {
    const store = createStudyStore()
    const before = store.getState().doc
    takeTemplate(store, 'T1')
    expect(undoWords(store).undo).toBe('took the radar Terminal, S band, klystron')
    undo(store)
    expect(store.getState().doc).toEqual(before)
    takeStartingSet(store, 'coastal')
    expect(store.getState().doc.needs?.map((n) => n.name)).toEqual(['Small craft with reflector', 'Coaster'])
    undo(store)
    expect(store.getState().doc).toEqual(before)
  })
  it('a value typed over is no longer the template’s', () => {
    const store = createStudyStore()
    takeTemplate(store, 'T1')
    setField(store, 'radar.antenna.gainDbi', 34, 'changed gain')
    expect(store.getState().doc.radar.origins?.['antenna.gainDbi']).toBeUndefined()
    expect(store.getState().doc.radar.origins?.['antenna.azimuthBeamwidthDeg']).toBe('from memory: ITU-R M.1464, radars A and B')
  })
})

describe('own radars', () => {
  it('are kept by name, offered again, replaced and forgotten', async () => {
    const place = shelf()
    const { store } = createOwnRadars(place)
    await store.getState().keep({ ...radarOfTemplate('V1'), name: 'Harbour' })
    await store.getState().keep({ ...radarOfTemplate('V1'), name: 'Harbour', noiseFigureDb: 6 })
    await store.getState().keep({ ...radarOfTemplate('W2'), name: 'Dish' })
    const again = createOwnRadars(place)
    await again.load()
    expect(again.store.getState().radars.map((r) => [r.name, r.noiseFigureDb])).toEqual([
      ['Dish', 2.5],
      ['Harbour', 6],
    ])
    await again.store.getState().forget('Dish')
    expect(await place.keys()).toEqual(['radar:Harbour'])
  })
})

describe('values of a template at the face', () => {
  const row = (path: string, system: 'nautical' | 'metric' = 'nautical') =>
    templateRows(RADAR_TEMPLATES.find((t) => t.id === 'E1')!.values, 'radar', system).find((r) => r.path === path)
  it('stand in the units of the form with their origin', () => {
    expect(row('peakPowerW')).toMatchObject({ label: 'Peak power', value: { value: '5\u202f000', unit: 'kW' }, basis: 'from memory' })
    expect(row('instrumentedRangeM')).toMatchObject({ value: { value: '160', unit: 'NM' }, basis: 'read' })
    expect(row('instrumentedRangeM', 'metric')).toMatchObject({ value: { value: '296.3', unit: 'km' } })
    expect(row('antenna.elevationPattern')).toMatchObject({ value: { value: 'cosecant-squared', unit: '' } })
  })
})
