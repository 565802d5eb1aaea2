import { describe, expect, it } from 'vitest'
import { canonicalJson, checkStudy, optionsOf, requiredSnrDb, type StudyDoc, settle } from '../../core/index.ts'
import { minimal, withValue } from './fixture.ts'

const settled = (path?: string, value?: unknown) => settle((path === undefined ? minimal() : withValue(path, value)) as StudyDoc)

describe('defaults', () => {
  it('every one used is listed with its unit', () => {
    const used = Object.fromEntries(settled().defaults.map((d) => [d.path, d.unit === '' ? d.value : `${d.value} ${d.unit}`]))
    expect(used).toMatchObject({
      'terrain[0].heights': 'orthometric',
      'terrain[0].verticalErrorM': '10 m',
      uniformTerrain: 'rural',
      'radar.compressedPulseWidthS': '0.0000012 s',
      'radar.antenna.elevationPattern': 'gaussian',
      'radar.antenna.sidelobeDb': '-28 dB',
      'radar.antenna.elevationSidelobeDb': '-30 dB',
      'radar.suppression.kind': 'none',
      'radar.stc.kind': 'none',
      'radar.prfMode': 'single',
      'atmosphere.gas': 'none',
      'candidates[0].clearingRadiusM': '50 m',
      'run.azimuthStepDeg': '0.25 deg',
    })
  })
  it('what is stated is not listed', () => {
    const paths = settled('radar.antenna.sidelobeDb', -35).defaults.map((d) => d.path)
    expect(paths).not.toContain('radar.antenna.sidelobeDb')
    expect(settled('uniformTerrain', 'open').uniformTerrainMark).toBeNull()
    expect(settled().uniformTerrainMark).toBe('default')
  })
  it('noise bandwidth is one over the compressed pulse', () => {
    expect(settled().radar.noiseBandwidthHz * 1.2e-6).toBeCloseTo(1, 12)
  })
  it('instrumented range: stated, else the range of the grid, else c/(2·PRF)', () => {
    expect(settled('radar.instrumentedRangeM', 80_000).radar.instrumentedRangeM).toBe(80_000)
    expect(settled('run.maxRangeM', 50_000).radar.instrumentedRangeM).toBe(50_000)
    expect(settled().radar.instrumentedRangeM).toBeCloseTo(299_792_458 / 1800, 6)
    expect(settled('radar.instrumentedRangeM', 80_000).run.maxRangeM).toBe(80_000)
  })
  it.each([
    [1.6, 0.25],
    [1, 0.25],
    [0.7, 360 / 2058],
    [0.9, 0.225],
  ])('azimuth step of a %d° beam divides the circle and is a quarter beam at most: %d°', (beamwidth, step) => {
    expect(settled('radar.antenna.azimuthBeamwidthDeg', beamwidth).run.azimuthStepDeg).toBeCloseTo(step, 12)
  })
  it('range step: half a gate, not under 15 m, doubled until the grid has 16 million cells', () => {
    expect(settled().run.rangeStepM).toBeCloseTo((299_792_458 * 1.2e-6) / 4, 9)
    const short = withValue('radar.pulseWidthS', 5e-8, withValue('run.maxRangeM', 60_000)) as StudyDoc
    expect(settle(short).run.rangeStepM).toBe(15)
    const long = withValue('radar.pulseWidthS', 5e-8, withValue('run.maxRangeM', 400_000)) as StudyDoc
    expect(settle(long).run.rangeStepM).toBe(60)
  })
  it("tilts absent or null are the antenna's own", () => {
    const doc = withValue('radar.antenna.tiltDeg', 1.5, withValue('candidates[0].tiltsDeg', null)) as StudyDoc
    expect(settle(doc).candidates[0]?.tiltsDeg).toEqual([1.5])
  })
})

describe('needs', () => {
  const need = (over: object) => settled('needs', [{ id: 'n', kind: 'layer', heightM: 300, ...over }]).needs[0]!
  it('required ratio null or absent is worked out from Pd, Pfa, case and pulses with its losses; stated overrides', () => {
    // 1.6 deg at 900 Hz and 10 rpm: 24 pulses in the beam, all of them counted without a canceller
    const d0 = requiredSnrDb(0.8, 1e-6, 24, 1)
    for (const n of [need({}), need({ requiredRatioDb: null })]) {
      expect(n.requiredRatioBy).toBe('detection')
      expect(n.required.pulses).toBeCloseTo(24, 9)
      expect(n.requiredRatioDb).toBeCloseTo(d0 + 1.24 + 1, 9)
    }
    expect(need({ requiredRatioDb: 15 })).toMatchObject({ requiredRatioDb: 15, requiredRatioBy: 'stated' })
  })
  it('a band of heights is tested at floor, ceiling and three between', () => {
    expect(need({ heightM: [100, 500] }).levelsM).toEqual([100, 200, 300, 400, 500])
  })
  it('a need of fixes, track or polygon keeps its file, speed and pressure setting', () => {
    const study = settled('needs', [{ id: 'n', name: 'Route', kind: 'track', file: 'route.csv', speedMs: 70, qnhHpa: 1013 }])
    expect(study.needs[0]).toMatchObject({ kind: 'track', levelsM: [], file: 'route.csv', speedMs: 70, qnhHpa: 1013 })
  })
})

describe('settle', () => {
  it('refuses a document with a problem', () => {
    expect(() => settled('candidates[0].mastHeightsM', [-5])).toThrow(/candidates\[0\]\.mastHeightsM\[0\]: mast height is -5 m/)
  })
  it('lists every option: candidate × height × tilt', () => {
    expect(optionsOf(settled('candidates[0].tiltsDeg', [0, 2]))).toEqual([
      { candidate: 'A', heightM: 10, tiltDeg: 0 },
      { candidate: 'A', heightM: 10, tiltDeg: 2 },
      { candidate: 'A', heightM: 20, tiltDeg: 0 },
      { candidate: 'A', heightM: 20, tiltDeg: 2 },
    ])
  })
  it('a gain that the beams cannot give is remarked on: 41 253 square degrees of sphere', () => {
    const remarks = checkStudy(settled('radar.antenna.gainDbi', 40))
    expect(remarks.some((r) => r.includes('gainDbi'))).toBe(true)
    expect(checkStudy(settled()).some((r) => r.includes('gainDbi'))).toBe(false)
  })
})

describe('canonicalJson', () => {
  it('is the same for equal values in any order of keys', () => {
    expect(canonicalJson({ b: [1, { d: -0, c: undefined }], a: 'x' })).toBe('{"a":"x","b":[1,{"d":0}]}')
    expect(canonicalJson({ a: 'x', b: [1, { d: 0 }] })).toBe('{"a":"x","b":[1,{"d":0}]}')
  })
  it('refuses what JSON cannot hold', () => {
    expect(() => canonicalJson({ a: Number.NaN })).toThrow(RangeError)
  })
})
