import { describe, expect, it } from 'vitest'
import { checkDoc, isInputError, newStudy, openDraft, parseStudy, type StudyDoc } from '../../core/index.ts'
import { minimal, withValue } from './fixture.ts'

const complaint = (text: string): string => {
  try {
    parseStudy(text, 'moor.json')
  } catch (error) {
    if (!isInputError(error)) throw error
    expect(error.message.length).toBeLessThanOrEqual(240)
    expect(error.message).toMatch(/^moor\.json, .+; .+\.$/)
    return error.message
  }
  return 'accepted'
}
const pretty = (doc: unknown) => JSON.stringify(doc, null, 2)
const need = (over: object) => [{ id: 'n1', kind: 'layer', heightM: 300, ...over }]
const candidates = (...over: object[]) => over.map((o) => ({ ...minimal().candidates[0], ...o }))

/** path set, value, and what the sentence has to hold. */
const refused: [string, unknown, RegExp][] = [
  ['format', 'other', /format is "other"; use "format": "sightfell-study"/],
  ['format', undefined, /format is missing/],
  ['version', 2, /version \(line 3\): version is 2, this program reads version 1; open it with a newer Sightfell/],
  ['version', '1', /version is "1"/],
  ['name', undefined, /name.*is missing/],
  ['radar', undefined, /radar.*is missing/],
  ['candidates', undefined, /candidates.*is missing/],
  ['terrain', {}, /terrain.*found \{\}; give a list/],
  ['terrain[0].file', '', /terrain\[0\]\.file.*empty/],
  ['terrain[0].heights', 'ellipsoidal', /terrain\[0\]\.heights.*ellipsoid.*mean sea level/],
  ['terrain[0].unit', 'feet', /terrain\[0\]\.unit.*"feet"; give one of "m", "ft", "us-ft"/],
  ['terrain[0].verticalErrorM', -1, /height error is -1 m; give a height error from 0 m to 1000 m/],
  ['landCover', { file: 'c.tif', legend: 'custom' }, /landCover\.classes.*custom legend has no classes/],
  [
    'landCover',
    { file: 'c.tif', legend: 'nlcd', classes: { tree: { terrain: 'forest', coverHeightM: 9 } } },
    /class "tree" is not a number/,
  ],
  ['landCover', { file: 'c.tif', legend: 'nlcd', classes: { 41: { terrain: 'wood', coverHeightM: 9 } } }, /"wood"; give one of "rural"/],
  ['uniformTerrain', 'jungle', /uniformTerrain.*"jungle"/],
  ['radar.frequencyHz', 50e9, /radar\.frequencyHz \(line \d+\): frequency is 50 GHz; give a frequency from 30 MHz to 40 GHz/],
  ['radar.frequencyHz', 29e6, /frequency is 29 MHz/],
  ['radar.frequencyHz', '2.75 GHz', /radar\.frequencyHz.*found "2\.75 GHz"; give a frequency from 30 MHz/],
  ['radar.frequencyHz', undefined, /radar\.frequencyHz.*is missing; give a frequency/],
  ['radar.peakPowerW', 0, /peak power is 0 W; give a peak power above 0 W/],
  ['radar.prfHz', [], /radar\.prfHz.*no pulse repetition frequency/],
  ['radar.prfHz', 900, /radar\.prfHz.*found 900; give a list/],
  ['radar.prfHz', [900, 1000], /2 pulse repetition frequencies in mode "single"/],
  ['radar.prfMode', 'pulseStagger', /radar\.prfMode.*two or more/],
  ['radar.compressedPulseWidthS', 2e-6, /compressed pulse 2 µs is longer than the pulse 1\.2 µs/],
  ['radar.noiseBandwidthHz', 4e5, /noise bandwidth times compressed pulse width is 0\.48, outside 0\.5 to 2; .* about 833\.3333 kHz/],
  ['radar.noiseBandwidthHz', 1.7e6, /is 2\.04, outside 0\.5 to 2/],
  ['radar.pulseWidthS', 2e-3, /pulse 2 ms is as long as the pulse interval/],
  ['radar.antenna.gainDbi', undefined, /radar\.antenna\.gainDbi.*is missing; give an antenna gain/],
  ['radar.antenna.azimuthBeamwidthDeg', 0, /azimuth beamwidth is 0 deg/],
  ['radar.antenna.sidelobeDb', -301, /side-lobe level is -301 dB; give an azimuth side-lobe level from -300 dB to 0 dB/],
  ['radar.antenna.elevationPattern', 'table', /elevationTable.*fewer than two rows/],
  [
    'radar.antenna.elevationTable',
    [
      [0, -1],
      [5, -3],
    ],
    /largest value of the elevation table is -1 dB; .*largest value 0/,
  ],
  [
    'radar.antenna.elevationTable',
    [
      [0, 0],
      [0, -3],
    ],
    /elevationTable\[1\].*does not come after/,
  ],
  ['radar.antenna.elevationTable', [[0, 0], [5]], /elevationTable\[1\].*list of two numbers/],
  ['radar.suppression', { kind: 'stated' }, /statedDb.*without a value/],
  ['radar.suppression', { kind: 'canceller', pulses: 6 }, /canceller of 6 pulses; give 1 to 4/],
  ['radar.stc', { kind: 'curve' }, /stc\.curve.*without points/],
  [
    'radar.stc',
    {
      kind: 'curve',
      curve: [
        [0, 40],
        [0, 20],
      ],
    },
    /stc\.curve\[1\].*rising/,
  ],
  ['radar.stc', { kind: 'rtoFourth', maxDb: 40 }, /stc\.cornerM.*is missing/],
  ['needs', need({ id: 'bad id' }), /needs\[0\]\.id.*identifier is "bad id"/],
  ['needs', need({ heightM: undefined }), /needs\[0\]\.heightM.*no height/],
  ['needs', need({ heightM: [500, 300] }), /floor 500 m is not below ceiling 300 m/],
  ['needs', need({ heightM: '300' }), /height is "300"/],
  ['needs', need({ kind: 'fixes' }), /needs\[0\]\.file.*no file/],
  ['needs', need({ swerling: 5 }), /swerling.*found 5; give one of 0, 1, 2, 3, 4/],
  ['needs', need({ pd: 1 }), /detection probability is 1; .*below 1/],
  ['needs', need({ fromRangeM: 9000, toRangeM: 8000 }), /ends at 8000 m, not beyond its start at 9000 m/],
  ['needs', need({ sectorDeg: [40, 40] }), /sector from 40 to 40 deg is empty/],
  ['needs', [...need({}), ...need({})], /needs\[1\]\.id.*already taken by needs\[0\]/],
  [
    'candidates[0].mastHeightsM',
    [10, -5],
    /candidates\[0\]\.mastHeightsM\[1\] \(line \d+\): mast height is -5 m; give a mast height above 0 m/,
  ],
  ['candidates[0].mastHeightsM', [0], /mast height is 0 m/],
  ['candidates[0].mastHeightsM', [], /no mast height/],
  ['candidates[0].mastHeightsM', [10, 10], /10 m is listed twice/],
  ['candidates[0].tiltsDeg', [], /list of tilts is empty/],
  ['candidates[0].id', 'north hill', /identifier is "north hill"; use 1 to 32/],
  ['candidates[0].id', 'x'.repeat(33), /identifier is "x+"/],
  ['candidates[0].lat', 91, /latitude is 91 deg; give a latitude from -90 deg to 90 deg/],
  ['candidates[0].lon', undefined, /candidates\[0\]\.lon.*is missing; give a longitude/],
  ['candidates', candidates({}, { lon: 11 }), /candidates\[1\]\.id.*identifier "A" is already taken by candidates\[0\]/],
  ['run.azimuthStepDeg', 0.5, /azimuth step 0\.5 deg is over a quarter of the 1\.6 deg beam; use 0\.4 deg or less/],
  ['run.rangeStepM', 200, /range step 200 m is over the range gate of 179\.8755 m; use 179\.8 m or less/],
  [
    'run',
    { maxRangeM: 400_000, rangeStepM: 15, azimuthStepDeg: 0.25 },
    /38\.4 million cells .* over the 16 million allowed; use a maxRangeM up to 166666 m/,
  ],
  ['radar.frequencyHZ', 1e9, /radar\.frequencyHZ \(line \d+\): unknown key "frequencyHZ", did you mean "frequencyHz"\?/],
  ['candidates[0].mastHeightM', [10], /unknown key "mastHeightM", did you mean "mastHeightsM"\?/],
  ['radar.antenna.tilt_Deg', 1, /did you mean "tiltDeg"\?/],
  ['atmosphere', { raneRateMmH: 1 }, /did you mean "rainRateMmH"\?/],
]

describe('a study that is refused says where, what and what to do', () => {
  it.each(refused)('%s = %j', (path, value, sentence) => {
    expect(complaint(pretty(withValue(path, value)))).toMatch(sentence)
  })
  it('a misspelt required key is named before the missing one', () => {
    const text = pretty(minimal()).replace('"frequencyHz"', '"frequncyHz"')
    expect(complaint(text)).toContain('did you mean "frequencyHz"?')
  })
  it.each([
    ['{ "format": "sightfell-study",\n  "version": 1,,\n}', /line 2, column 16: a key in double quotes is expected/],
    ['{ "format": "sightfell-study"\n  "version": 1 }', /line 2, column 3: a comma is expected/],
    ['{ "name": "unclosed }', /line 1, column 11: a text in quotes is not closed/],
    ['{ "version": 1', /line 1, column 15: a closing brace } is expected/],
    ['', /line 1, column 1: a value is expected/],
    ['// note\n{}', /JSON has no comments/],
    ['{ "version": 1, }', /key in double quotes|value is expected|trailing/],
    ['<html>', /line 1, column 1: found a word that is not JSON/],
    ['[]', /line 1: this is not a study document/],
    ['{"format":"sightfell-study","version":1,"name":"a","name":"b"}', /name.*given twice/],
  ])('JSON syntax: %j', (text, sentence) => {
    expect(complaint(text)).toMatch(sentence)
  })
})

describe('a study that is taken', () => {
  it('is returned as written, the mark of byte order aside', () => {
    const doc = minimal()
    expect(parseStudy(`\uFEFF${pretty(doc)}`, 'moor.json')).toEqual({ doc, warnings: [] })
  })
  it('keeps unknown keys and warns about each', () => {
    const doc = withValue('radar.serialNumber', 7, withValue('projectOffice', 'north')) as StudyDoc
    const read = parseStudy(pretty(doc), 'moor.json')
    expect(read.doc).toEqual(doc)
    expect(read.warnings).toEqual(['radar.serialNumber: unknown key, kept but not used', 'projectOffice: unknown key, kept but not used'])
  })
  it('keeps keys of models that come later and says so', () => {
    const read = parseStudy(pretty(withValue('radar.scan', 'sector')), 'moor.json')
    expect(read.warnings).toEqual(['radar.scan: kept, not assessed yet'])
  })
  it('accepts a step over a gate shorter than 15 m', () => {
    const short = withValue('run', { rangeStepM: 15, maxRangeM: 30_000 }, withValue('radar.pulseWidthS', 5e-8))
    expect(complaint(pretty(short))).toBe('accepted')
  })
})

describe('a document in progress', () => {
  it('is checked without throwing, every problem at its field', () => {
    const broken = withValue('radar.frequencyHz', 1, withValue('candidates', candidates({}, { mastHeightsM: [-5] })))
    expect(checkDoc(broken).problems.map((p) => [p.path, p.message])).toEqual([
      ['radar.frequencyHz', 'frequency is 1 Hz; give a frequency from 30 MHz to 40 GHz.'],
      ['candidates[1].mastHeightsM[0]', 'mast height is -5 m; give a mast height above 0 m and up to 1000 m.'],
    ])
  })
  it.each([[null], [3], ['text'], [[]], [{}], [{ format: 'sightfell-study', version: 1, radar: null, candidates: 'x', terrain: [null] }]])(
    'has problems, never an exception: %j',
    (value) => {
      expect(checkDoc(value).problems.length).toBeGreaterThan(0)
    },
  )
  it('a new study has none', () => {
    expect(checkDoc(newStudy('Empty'))).toEqual({ problems: [], warnings: [] })
  })
  it('opens with its problems, and is refused only where it is no study of ours', () => {
    expect(openDraft(pretty(withValue('radar.frequencyHz', 1)), 'moor.json').problems).toHaveLength(1)
    expect(() => openDraft(pretty(withValue('version', 9)), 'moor.json')).toThrow(/version is 9/)
  })
})
