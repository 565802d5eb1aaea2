import { describe, expect, it } from 'vitest'
import { suppressionNeededDb } from '../../core/clutter/index.ts'
import { gateLengthM, minimumRangeM, signalToNoiseDb, stcDb, targetSignalToNoiseDb } from '../../core/radar/index.ts'
import { sBandRadar, testRadar } from './testRadar.ts'

describe('radar equation', () => {
  it('falls with the fourth power of range and rises with RCS', () => {
    const r = sBandRadar()
    const at = (rcsM2: number, slantRangeM: number) => signalToNoiseDb(r, { rcsM2, slantRangeM })
    expect(at(1, 10_000) - at(1, 100_000)).toBeCloseTo(40, 9)
    expect(at(10, 50_000) - at(1, 50_000)).toBeCloseTo(10, 9)
  })
  it('compression gains τ/τc; gate follows the compressed pulse, minimum range the transmitted one', () => {
    const plain = testRadar()
    const long = testRadar({ pulseWidthS: 50e-6, compressedPulseWidthS: 1e-6 })
    const echo = { rcsM2: 1, slantRangeM: 30_000 }
    expect(signalToNoiseDb(long, echo) - signalToNoiseDb(plain, echo)).toBeCloseTo(16.9897, 4)
    expect(gateLengthM(long)).toBeCloseTo(149.896, 3)
    expect(minimumRangeM(long)).toBeCloseTo(7494.81, 2)
  })
  it('a target at a height takes the pattern both ways and slant range', () => {
    const r = testRadar({ antenna: { elevationPattern: 'gaussian', elevationBeamwidthDeg: 4 } })
    const place = { antennaM: 100, targetM: 3100, groundRangeM: 40_000, effRadiusM: (4 / 3) * 6_371_000 }
    const elevationDeg = 4.1568 // atan2 on the effective sphere
    const onPeak = targetSignalToNoiseDb(r, 1, place, elevationDeg)
    expect(onPeak).toBeCloseTo(signalToNoiseDb(r, { rcsM2: 1, slantRangeM: 40_120 }), 2)
    expect(targetSignalToNoiseDb(r, 1, place, elevationDeg - 2) - onPeak).toBeCloseTo(-6.02, 1)
    const cut = testRadar({ antenna: { elevationPattern: 'cosecant-squared', elevationBeamwidthDeg: 2, cosecantLimitDeg: 4 } })
    expect(targetSignalToNoiseDb(cut, 1, place)).toBe(Number.NEGATIVE_INFINITY)
  })
})

describe('short-range sensitivity', () => {
  it('is linear in dB between points, held inward, nothing beyond the last', () => {
    const stc = {
      kind: 'curve',
      curve: [
        [1000, 40],
        [5000, 20],
        [20_000, 0],
      ],
      cornerM: 0,
      maxDb: 0,
    } as const
    const r = testRadar({ stc })
    expect([0, 1000, 3000, 12_500, 20_000, 20_001].map((x) => stcDb(r, x))).toEqual([40, 40, 30, 10, 0, 0])
    const jump = testRadar({
      stc: {
        ...stc,
        curve: [
          [0, 30],
          [8000, 30],
        ],
      },
    })
    expect([stcDb(jump, 8000), stcDb(jump, 8001)]).toEqual([30, 0])
  })
  it('undoes R⁴ inside a corner up to its most', () => {
    const r = testRadar({ stc: { kind: 'rtoFourth', curve: [], cornerM: 20_000, maxDb: 50 } })
    expect(stcDb(r, 10_000)).toBeCloseTo(12.041, 3)
    expect([stcDb(r, 100), stcDb(r, 20_000), stcDb(r, 0)]).toEqual([50, 0, 50])
  })
  it('is nothing without one', () => expect(stcDb(testRadar(), 100)).toBe(0))
})

describe('suppression needed', () => {
  it('is not defined where the target is too weak, and nothing where there is no clutter or little', () => {
    expect(suppressionNeededDb(40, 13, 13)).toBeNaN()
    expect(suppressionNeededDb(40, Number.NEGATIVE_INFINITY, 13)).toBeNaN()
    expect(suppressionNeededDb(Number.NaN, 20, 13)).toBe(0)
    expect(suppressionNeededDb(-10, 20, 13)).toBe(0)
  })
  it('leaves S/(C/I + N) at D₀ exactly', () => {
    for (const [cnr, snr, d0] of [
      [60, 20, 13.2],
      [30, 40, 10],
      [45, 13.5, 13],
    ]) {
      const i = suppressionNeededDb(cnr, snr, d0)
      expect(snr - 10 * Math.log10(10 ** ((cnr - i) / 10) + 1)).toBeCloseTo(d0, 9)
    }
  })
})
