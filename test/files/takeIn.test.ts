import { describe, expect, it } from 'vitest'
import { createFileStore, createStudyStore, emptyStudy, studyText, undo, undoWords } from '../../app/document/index.ts'
import { fileRole, openServed, takeIn, takeOut } from '../../app/files/index.ts'

const file = (name: string, content: BlobPart) => new File([content], name)
/** The smallest TIFF directory: bits per sample and samples per pixel. */
function tiff(bits: number, samples = 1): ArrayBuffer {
  const view = new DataView(new ArrayBuffer(8 + 2 + 24 + 4))
  view.setUint16(0, 0x4949)
  view.setUint16(2, 42, true)
  view.setUint32(4, 8, true)
  view.setUint16(8, 2, true)
  const entry = (at: number, tag: number, value: number) => {
    view.setUint16(at, tag, true)
    view.setUint16(at + 2, 3, true)
    view.setUint32(at + 4, 1, true)
    view.setUint16(at + 8, value, true)
  }
  entry(10, 258, bits)
  entry(22, 277, samples)
  return view.buffer
}
const FEATURES = '{"type":"FeatureCollection","features":[{"type":"Feature","properties":{"KEY":1}}]}'

describe('what a dropped file is', () => {
  it.each([
    ['dem.tif', tiff(16), 'terrain'],
    ['cover.tif', tiff(8), 'landCover'],
    ['rgb.tif', tiff(8, 3), 'terrain'],
    ['noname', tiff(32), 'terrain'],
    ['broken.tif', '<html>', 'terrain'],
    ['masts.geojson', FEATURES.replace('KEY', 'heightM'), 'obstacles'],
    ['lines.geojson', FEATURES.replace('KEY', 'highway'), 'roads'],
    ['roads.geojson', FEATURES, 'roads'],
    ['s.json', studyText(emptyStudy()), 'study'],
    ['p.zip', 'PK', 'package'],
    ['points.csv', 'name,lon,lat,alt_m', 'fixes'],
    ['approach.csv', 'name,lon,lat,alt_m', 'track'],
    [
      'area.geojson',
      FEATURES.replace('"KEY":1', '"name":"x"').replace('{"type":"Feature",', '{"type":"Feature","geometry":{"type":"Polygon"},'),
      'polygon',
    ],
    ['notes.txt', 'hello', 'unknown'],
  ] as [string, BlobPart, string][])('%s', async (name, content, role) => expect(await fileRole(file(name, content))).toBe(role))
})

describe('taking files in', () => {
  it('several at once are one step of undo', async () => {
    const study = createStudyStore()
    const files = createFileStore()
    await takeIn(study, files, [file('dem.tif', tiff(16)), file('cover.tif', tiff(8))])
    expect(study.getState().doc.terrain).toEqual([{ file: 'dem.tif' }])
    expect(study.getState().doc.landCover).toEqual({ file: 'cover.tif', legend: 'worldcover' })
    expect(undoWords(study).undo).toBe('added 2 files')
    undo(study)
    expect(study.getState().doc.terrain).toEqual([])
    expect(files.getState().files.has('dem.tif')).toBe(true)
  })
  it('the user’s word goes before the guess', async () => {
    const study = createStudyStore()
    await takeIn(study, createFileStore(), [file('bytes.tif', tiff(8))], 'terrain')
    expect(study.getState().doc.terrain).toEqual([{ file: 'bytes.tif' }])
  })
  it('a file the study already names only brings its bytes', async () => {
    const study = createStudyStore({ ...emptyStudy(), terrain: [{ file: 'maps/dem.tif', unit: 'ft' }] })
    const files = createFileStore()
    await takeIn(study, files, [file('dem.tif', tiff(16))])
    expect(study.getState().doc.terrain).toEqual([{ file: 'maps/dem.tif', unit: 'ft' }])
    expect([...files.getState().files.keys()]).toEqual(['maps/dem.tif'])
  })
  it('a file of fixes becomes a need of its own', async () => {
    const study = createStudyStore()
    await takeIn(study, createFileStore(), [file('fixes.csv', 'name,lon,lat,alt_m')])
    expect(study.getState().doc.needs).toEqual([{ id: 'n1', name: 'fixes', must: true, kind: 'fixes', file: 'fixes.csv' }])
  })
  it('a study with its files replaces what is open', async () => {
    const study = createStudyStore()
    const files = createFileStore()
    const text = studyText({ ...emptyStudy(), name: 'other', terrain: [{ file: 'dem.tif' }] })
    const taken = await takeIn(study, files, [file('dem.tif', tiff(16)), file('s.json', text)])
    expect(taken).toEqual({ opened: true, warnings: [], missing: [], trouble: null })
    expect(study.getState().doc.name).toBe('other')
    expect(undoWords(study).undo).toBeNull()
  })
  it('one file that cannot be used: nothing is changed, the sentence names it', async () => {
    const study = createStudyStore()
    const before = study.getState().doc
    await expect(takeIn(study, createFileStore(), [file('dem.tif', tiff(16)), file('notes.txt', 'x')])).rejects.toThrow(/notes\.txt/)
    expect(study.getState().doc).toBe(before)
  })
  it('a file is taken out of every place that names it', () => {
    const doc = {
      ...emptyStudy(),
      terrain: [{ file: 'a.tif' }],
      landCover: { file: 'a.tif', legend: 'nlcd' as const },
      roads: { file: 'r.geojson' },
    }
    const next = takeOut(doc, 'a.tif')
    expect([next.terrain, next.landCover, next.roads]).toEqual([[], undefined, { file: 'r.geojson' }])
  })
})

describe('a served study', () => {
  const served = (answers: Record<string, string>): typeof fetch =>
    (async (url: string) =>
      url in answers
        ? new Response(answers[url], { headers: { 'content-type': 'application/octet-stream' } })
        : new Response('<!doctype html>', { headers: { 'content-type': 'text/html' } })) as unknown as typeof fetch
  it('comes with the files it names', async () => {
    const text = studyText({ ...emptyStudy(), terrain: [{ file: 'dem.tif' }], roads: { file: 'roads.geojson' } })
    const opened = await openServed('/demo/', served({ '/demo/study.json': text, '/demo/dem.tif': 'heights' }))
    expect(opened.files.map((f) => f.name)).toEqual(['dem.tif'])
    expect(opened.missing).toEqual(['roads.geojson'])
  })
  it('that is not there is said so', async () => {
    await expect(openServed('/demo/', served({}))).rejects.toThrow(/not served here/)
  })
})
