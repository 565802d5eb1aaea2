import { describe, expect, it } from 'vitest'
import {
  addCandidate,
  createStudyStore,
  emptyStudy,
  fileStem,
  openPackage,
  openStudyText,
  packStudy,
  problemsOf,
  setField,
  studyText,
} from '../../app/document/index.ts'

const study = () => {
  const store = createStudyStore({ ...emptyStudy(), name: 'Isle, first look' })
  setField(store, 'terrain', [{ file: 'maps/dem.tif' }], 'added dem.tif')
  addCandidate(store, { lon: -25.7, lat: 46.2 })
  return store.getState().doc
}

describe('study files', () => {
  it('what is saved opens as it was', () => {
    const doc = study()
    expect(openStudyText(studyText(doc), 'study.json', []).doc).toEqual(doc)
  })
  it('loose files join by the last part of their path; what is not there is named', () => {
    const dem = new Blob(['heights'])
    expect(openStudyText(studyText(study()), 's.json', [{ name: 'dem.tif', blob: dem }]).files).toEqual([
      { name: 'maps/dem.tif', blob: dem },
    ])
    expect(openStudyText(studyText(study()), 's.json', []).missing).toEqual(['maps/dem.tif'])
  })
  it('a value that has to change stays and is a problem at its field, not a refusal', () => {
    const doc = { ...study(), radar: { ...study().radar, frequencyHz: 50e9 } }
    const opened = openStudyText(studyText(doc), 's.json', []).doc
    expect(problemsOf(opened).map((p) => p.path)).toEqual(['radar.frequencyHz'])
  })
  it('a radar that is not whole yet opens', () => {
    const opened = openStudyText(
      '{"format":"sightfell-study","version":1,"name":"x","terrain":[],"radar":{},"candidates":[]}',
      's.json',
      [],
    ).doc
    expect(opened.radar.antenna).toEqual({})
    expect(problemsOf(opened).some((p) => p.path === 'radar.frequencyHz')).toBe(true)
  })
  it.each([
    ['{"format": "sightfell-study", }', /line 1, column/],
    ['{"format":"sightfell-study","version":7}', /version is 7/],
    ['{"a":1}', /format/],
    ['{"format":"sightfell-study","version":1,"name":"x","terrain":[],"radar":{},"candidates":"B"}', /candidates/],
  ])('refuses %s with a sentence', (text, sentence) => {
    expect(() => openStudyText(text, 'study.json', [])).toThrow(sentence)
  })
})

describe('a study with values that have to change', () => {
  it('opens, and says the first with file, key and line as the batch command does', () => {
    const text = studyText({ ...study(), radar: { ...study().radar, frequencyHz: 5e10 } })
    expect(openStudyText(text, 's.json', []).trouble).toMatch(
      /^s\.json, radar\.frequencyHz \(line \d+\): frequency is 50 GHz; give a frequency from 30 MHz to 40 GHz\.$/,
    )
    expect(openStudyText(studyText(study()), 's.json', []).trouble).toBeNull()
  })
})

describe('packages', () => {
  it('hold the study and every file it names', async () => {
    const doc = study()
    const files = new Map([
      ['maps/dem.tif', { name: 'maps/dem.tif', blob: new Blob(['heights']) }],
      ['other.tif', { name: 'other.tif', blob: new Blob(['not of this study']) }],
    ])
    const bytes = new Uint8Array(await (await packStudy(doc, files)).arrayBuffer())
    const opened = await openPackage(bytes, 'p.zip')
    expect(opened.doc).toEqual(doc)
    expect(opened.files.map((f) => f.name)).toEqual(['maps/dem.tif'])
    expect(await opened.files[0].blob.text()).toBe('heights')
  })
  it('a file that is no ZIP is refused with a sentence', async () => {
    await expect(openPackage(new Uint8Array([1, 2, 3]), 'p.zip')).rejects.toThrow(/p\.zip: not a whole ZIP/)
  })
  it('are named after the study', () => {
    expect(fileStem({ ...emptyStudy(), name: 'Île du Nord, 2' })).toBe('île-du-nord-2'.normalize('NFKD').replace(/\p{M}/gu, ''))
    expect(fileStem({ ...emptyStudy(), name: '…' })).toBe('study')
  })
})
