import { describe, expect, it, vi } from 'vitest'
import type { StudyClient } from '../../app/compute/client.ts'
import {
  addCandidate,
  changeMastHeight,
  createFileStore,
  createGroundStore,
  createResultsStore,
  createStudyStore,
  createViewStore,
  optionKey,
  setField,
  takeTell,
} from '../../app/document/index.ts'
import { keepGround, type ReadGround } from '../../app/steps/session/groundKeeper.ts'
import { createNoticeStore } from '../../app/steps/session/notices.ts'
import { keepRunning } from '../../app/steps/session/runKeeper.ts'
import { type Ask, WGS84 } from '../../core/index.ts'

const ANSWER = { serial: 7, minM: 0, maxM: 100, voidPct: 0, corners: [] }

/** A client that notes what it is asked and knows only the ground. */
function fakeClient() {
  const asked: { kind: keyof Ask; body: unknown }[] = []
  const client: StudyClient = {
    ask: async (kind, body) => {
      asked.push({ kind, body })
      if (kind === 'ground') return ANSWER as never
      if (kind === 'groundAt') return (body as Ask['groundAt']).at.map((_p, i) => (i === 0 ? 42 : null)) as never
      return null
    },
    listen: () => () => {},
    close: () => {},
  }
  return { client, asked, of: (kind: keyof Ask) => asked.filter((a) => a.kind === kind) }
}
function setUp() {
  const study = createStudyStore()
  const view = createViewStore()
  const ground = createGroundStore()
  const results = createResultsStore()
  const files = createFileStore()
  const fake = fakeClient()
  const runner = keepRunning(study, view, ground, results, fake.client, createNoticeStore())
  return { study, view, ground, results, files, runner, ...fake }
}
const ready = (s: ReturnType<typeof setUp>) => {
  setField(s.study, 'terrain', [{ file: 'dem.tif' }], 'added dem.tif')
  addCandidate(s.study, { lon: 1, lat: 1 })
  s.ground.setState({ state: 'ready', ground: ANSWER })
  s.runner.onGround()
}
const settled = () => new Promise((done) => setTimeout(done, 0))

describe('running by itself', () => {
  it('sends nothing until there is ground, then the whole study with what is shown', () => {
    const s = setUp()
    addCandidate(s.study, { lon: 1, lat: 1 })
    expect(s.of('study')).toHaveLength(0)
    ready(s)
    expect(s.of('study').at(-1)?.body).toMatchObject({
      doc: s.study.getState().doc,
      show: { option: { candidate: 'A', heightM: 10, tiltDeg: 0 }, layer: 'clutter-to-noise' },
      hold: false,
    })
  })
  it('sends again when the study or what is shown changes, and not otherwise', () => {
    const s = setUp()
    ready(s)
    const before = s.of('study').length
    s.view.getState().set({ step: 'compare', theme: 'night' })
    expect(s.of('study')).toHaveLength(before)
    s.view.getState().set({ layer: 'masked' })
    setField(s.study, 'radar.antenna.tiltDeg', 2, 'changed tilt')
    expect(s.of('study').length).toBeGreaterThanOrEqual(before + 2)
    expect(s.of('study').at(-1)?.body).toMatchObject({ show: { option: { tiltDeg: 2 }, layer: 'masked' } })
  })
  it('a study with a value that has to change is not sent', () => {
    const s = setUp()
    ready(s)
    const before = s.of('study').length
    setField(s.study, 'radar.frequencyHz', 50e9, 'changed frequency')
    expect(s.of('study')).toHaveLength(before)
  })
  it('stop holds, run goes on', () => {
    const s = setUp()
    ready(s)
    s.runner.stop()
    expect(s.of('study').at(-1)?.body).toMatchObject({ hold: true })
    s.runner.run()
    expect(s.of('study').at(-1)?.body).toMatchObject({ hold: false })
  })
  it('asks the ground under the candidates when they move', async () => {
    const s = setUp()
    ready(s)
    addCandidate(s.study, { lon: 9, lat: 9 })
    await settled()
    expect(s.ground.getState().candidateM).toEqual(
      new Map([
        ['A', 42],
        ['B', null],
      ]),
    )
  })
  it('drops results of options that are gone', () => {
    const s = setUp()
    ready(s)
    const ref = { candidate: 'A', heightM: 20, tiltDeg: 0 }
    takeTell(s.results, { kind: 'figures', results: [{ ref, serial: 1 } as never], holds: [1] }, 0)
    expect(s.results.getState().byOption.has(optionKey(ref))).toBe(true)
    changeMastHeight(s.study, 'A', 20, 25)
    expect(s.results.getState().byOption.size).toBe(0)
  })
  it('drops every result when the ground cannot be read or its file is gone: they were of another', () => {
    for (const state of ['failed', 'none'] as const) {
      const s = setUp()
      ready(s)
      const ref = { candidate: 'A', heightM: 20, tiltDeg: 0 }
      takeTell(s.results, { kind: 'figures', results: [{ ref, serial: 1 } as never], holds: [1] }, 0)
      const { serial } = s.results.getState()
      s.ground.setState({ state, ground: null })
      expect(s.results.getState().byOption.size).toBe(0)
      expect(s.results.getState().serial).toBeGreaterThan(serial)
    }
  })
})

describe('keeping the ground', () => {
  const parts = (name: string) =>
    ({
      ground: {
        shape: { width: 2, height: 1, crs: WGS84, x0: 10, y0: 50, colX: 0.5, colY: 0, rowX: 0, rowY: -0.5 },
        heightM: new Float32Array(2),
        code: null,
        codes: [],
        obstacles: [],
        verticalErrorM: 10,
      },
      roads: [],
      obstacles: [],
      notes: [name],
    }) as unknown as Awaited<ReturnType<ReadGround>>
  it('reads when the file is here, again when what is stated of it changes, and not for a candidate or a need', async () => {
    const s = setUp()
    const read = vi.fn<ReadGround>(async () => parts('read'))
    keepGround(s.study, s.files, s.ground, s.client, read, s.runner.onGround)
    setField(s.study, 'terrain', [{ file: 'dem.tif' }], 'added dem.tif')
    expect(s.ground.getState()).toMatchObject({ state: 'none', missing: ['dem.tif'] })
    s.files.getState().give([{ name: 'dem.tif', blob: new Blob(['x']) }])
    await settled()
    expect(s.ground.getState()).toMatchObject({ state: 'ready', ground: { serial: 7 }, notes: ['read'] })
    expect(s.ground.getState().ground?.corners[0]).toEqual({ lon: 9.75, lat: 50.25 })
    addCandidate(s.study, { lon: 1, lat: 1 })
    setField(s.study, 'needs', [{ id: 'n1', kind: 'layer', heightM: 300 }], 'added need 1')
    await settled()
    expect(read).toHaveBeenCalledTimes(1)
    setField(s.study, 'terrain[0].unit', 'ft', 'stated the unit')
    await settled()
    expect(read).toHaveBeenCalledTimes(2)
  })
  it('an older reading that ends late is not taken', async () => {
    const s = setUp()
    const ends: ((p: Awaited<ReturnType<ReadGround>>) => void)[] = []
    keepGround(s.study, s.files, s.ground, s.client, () => new Promise((end) => ends.push(end)), s.runner.onGround)
    s.files.getState().give([{ name: 'dem.tif', blob: new Blob(['x']) }])
    setField(s.study, 'terrain', [{ file: 'dem.tif' }], 'added dem.tif')
    setField(s.study, 'terrain[0].unit', 'ft', 'stated the unit')
    ends[1](parts('new'))
    await settled()
    ends[0](parts('old'))
    await settled()
    expect(s.ground.getState().notes).toEqual(['new'])
  })
  it('a file that cannot be read is said in one sentence', async () => {
    const s = setUp()
    keepGround(s.study, s.files, s.ground, s.client, () => Promise.reject(new Error('odd')), s.runner.onGround)
    s.files.getState().give([{ name: 'dem.tif', blob: new Blob(['x']) }])
    setField(s.study, 'terrain', [{ file: 'dem.tif' }], 'added dem.tif')
    await settled()
    expect(s.ground.getState().state).toBe('failed')
    expect(s.ground.getState().trouble).toMatch(/odd/)
  })
})
