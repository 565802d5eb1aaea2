import { describe, expect, it } from 'vitest'
import { formatExposure } from '../../app/words/index.ts'
import { type ExposureLimit, exposureOf, publicLimits, type RadarInput, type StudyDoc, settle } from '../../core/index.ts'

/** 750 kW, 1 µs at up to 2 300 Hz: 1 725 W on average; 45.5 dBi. Arithmetic. */
const radarOf = (antenna: Partial<StudyDoc['radar']['antenna']> = {}, radar: Partial<StudyDoc['radar']> = {}): RadarInput =>
  settle({
    format: 'sightfell-study',
    version: 1,
    name: 'Exposure',
    terrain: [],
    needs: [],
    candidates: [],
    radar: {
      frequencyHz: 5.6e9,
      peakPowerW: 750e3,
      pulseWidthS: 1e-6,
      prfHz: [1000, 2300],
      prfMode: 'dwellStagger',
      rotationRpm: 6,
      antenna: {
        gainDbi: 45.5,
        azimuthBeamwidthDeg: 1,
        elevationBeamwidthDeg: 1,
        elevationPattern: 'gaussian',
        tiltDeg: 0.5,
        apertureWidthM: 4,
        apertureHeightM: 4,
        ...antenna,
      },
      ...radar,
    },
  }).radar
const level = (limitWm2: number): ExposureLimit => ({ limitWm2, name: 'chosen', source: '', basis: 'by hand' })

describe('keep-clear distance of a radar', () => {
  it('factor 1, far field: 697.9 and 312.1 m, printed 698 and 313 (arithmetic)', () => {
    const of = (w: number) => exposureOf(radarOf(), 0.5, 20, { reflectionFactor: 1, limits: [level(w)] })!
    expect(of(10).averagePowerW).toBeCloseTo(1725, 6)
    expect(Math.abs(of(10).farFieldFormulaM - 697.9)).toBeLessThanOrEqual(0.5)
    expect(Math.abs(of(50).farFieldFormulaM - 312.1)).toBeLessThanOrEqual(0.5)
    expect([of(10), of(50)].map((x) => formatExposure(x.farFieldFormulaM).value)).toEqual(['698', '313'])
  })
  it('takes reflection factor 4 and the lower public limit, named with its basis, unless stated', () => {
    const x = exposureOf(radarOf(), 0.5, 20)!
    expect(x.reflectionFactor).toBe(4)
    expect(x.farFieldFormulaM).toBeCloseTo(2 * exposureOf(radarOf(), 0.5, 20, { reflectionFactor: 1 })!.farFieldFormulaM, 6)
    expect(x.limit).toMatchObject({ limitWm2: 10, basis: 'from memory', source: 'ICNIRP 2020, Table 5' })
    expect(publicLimits(5.6e9).map((l) => l.limitWm2)).toEqual([10, 40])
  })
  it('is the larger of far and near field, and gives no rotating value inside 0.6 D²/λ', () => {
    const small = exposureOf(radarOf({}, { peakPowerW: 7_500 }), 0.5, 20)!
    expect(small.stoppedM).toBeGreaterThanOrEqual(small.farFieldFormulaM)
    expect(small.rotatingM).toBeNull()
    expect(small.rotatingNot).toBe('inside 0.6 D²/λ')
    const weakAperture = exposureOf(radarOf({ apertureWidthM: 1, apertureHeightM: 1 }), 0.5, 20)!
    expect(weakAperture.rotatingM).toBeCloseTo(weakAperture.farFieldFormulaM / Math.sqrt(360), 6)
    expect(exposureOf({ ...radarOf(), rotationRpm: 0 }, 0.5, 20)).toMatchObject({
      rotatingM: null,
      rotatingNot: 'the antenna does not turn',
    })
  })
  it('says where the lower half-power edge passes at that distance', () => {
    const x = exposureOf(radarOf(), 0.5, 20)!
    expect(x.lowerEdgeDeg).toBeCloseTo(0, 1)
    const down = exposureOf(radarOf(), -1, 20)!
    expect(down.lowerEdgeAboveGroundM).toBeCloseTo(20 + down.stoppedM * Math.tan((down.lowerEdgeDeg! * Math.PI) / 180), 9)
    expect(down.lowerEdgeAboveGroundM).toBeLessThan(0)
  })
  it('is not given where an aperture side is not stated', () => {
    expect(exposureOf(radarOf({ apertureHeightM: null }), 0.5, 20)).toBeNull()
  })
})
