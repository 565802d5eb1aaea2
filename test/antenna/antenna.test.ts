import { describe, expect, it } from 'vitest'
import {
  azimuthKernel,
  checkElevationPattern,
  clutterGainTable,
  elevationGain,
  elevationGainForClutter,
  twoWayGain,
} from '../../core/antenna/index.ts'
import { RAD_PER_DEG, toDb } from '../../core/units/index.ts'
import { testRadar } from '../radar/testRadar.ts'

type Antenna = Parameters<typeof elevationGain>[0]
const antenna = (over: Partial<Antenna>): Antenna => testRadar({ antenna: over }).antenna

describe('elevation pattern', () => {
  it('a Gaussian beam is 1 on the tilt and half at half a beamwidth', () => {
    const a = antenna({ elevationPattern: 'gaussian', elevationBeamwidthDeg: 4, tiltDeg: 2 })
    expect([elevationGain(a, 2), elevationGain(a, 0), elevationGain(a, 4)]).toEqual([1, 0.5, 0.5])
    expect(elevationGain(a, 7, 7)).toBe(1)
  })
  it('cosecant squared joins the beam at its upper half-power point and ends at its limit', () => {
    const a = antenna({ elevationPattern: 'cosecant-squared', elevationBeamwidthDeg: 4, cosecantLimitDeg: 30, tiltDeg: 2 })
    expect(elevationGain(a, 4)).toBeCloseTo(0.5, 12)
    expect(elevationGain(a, 4.0001)).toBeCloseTo(0.5, 4)
    const ratio = elevationGain(a, 20) / elevationGain(a, 10)
    expect(ratio).toBeCloseTo((Math.sin(10 * RAD_PER_DEG) / Math.sin(20 * RAD_PER_DEG)) ** 2, 9)
    expect(elevationGain(a, 30)).toBeGreaterThan(0)
    expect(elevationGain(a, 30.01)).toBe(0)
  })
  it('a table is linear in dB between rows, relative to the tilt, and nothing outside', () => {
    const a = antenna({
      elevationTable: [
        [-5, -13],
        [0, 0],
        [2.5, -3],
      ],
      tiltDeg: 1,
    })
    expect(toDb(elevationGain(a, 1 + 1.25))).toBeCloseTo(-1.5, 9)
    expect(toDb(elevationGain(a, -4))).toBeCloseTo(-13, 9)
    expect([elevationGain(a, -4.01), elevationGain(a, 3.51)]).toEqual([0, 0])
  })
  it('the side-lobe floor is for clutter only', () => {
    const a = antenna({ elevationPattern: 'gaussian', elevationBeamwidthDeg: 2, elevationSidelobeDb: -30 })
    expect(toDb(elevationGainForClutter(a, 20))).toBeCloseTo(-30, 9)
    expect(toDb(elevationGain(a, 20))).toBeLessThan(-1000)
    expect(elevationGainForClutter(a, 0.5)).toBe(elevationGain(a, 0.5))
  })
  it.each<[string, [number, number][], RegExp]>([
    [
      'its largest value is not 0',
      [
        [-1, -3],
        [0, -0.5],
      ],
      /largest value at -0\.5 dB/,
    ],
    [
      'angles do not rise',
      [
        [0, 0],
        [0, -3],
      ],
      /elevationTable\[1\]: angle 0 does not rise/,
    ],
    ['it has one row', [[0, 0]], /1 row/],
  ])('a table is refused when %s', (_, elevationTable, message) =>
    expect(() => checkElevationPattern(antenna({ elevationTable }), 'study.json')).toThrow(message),
  )
})

describe('tables of the hot loop', () => {
  it.each<[string, Partial<Antenna>]>([
    ['Gaussian 1°', { elevationPattern: 'gaussian', elevationBeamwidthDeg: 1, tiltDeg: 0.4 }],
    ['Gaussian 20°', { elevationPattern: 'gaussian', elevationBeamwidthDeg: 20, tiltDeg: -3 }],
    ['cosecant', { elevationPattern: 'cosecant-squared', elevationBeamwidthDeg: 4.8, cosecantLimitDeg: 30, tiltDeg: 2 }],
    [
      'table',
      {
        elevationTable: [
          [-5, -13],
          [-2.5, -3],
          [0, 0],
          [2.5, -3],
          [40, -25],
        ],
        tiltDeg: 1,
      },
    ],
  ])('two-way gain of a %s pattern by tangent is right to 0.02 dB', (_, over) => {
    const a = antenna(over)
    const t = clutterGainTable(a)
    let compared = 0
    for (let e = -50.003; e < 28; e += 0.0173) {
      const exact = 2 * toDb(elevationGainForClutter(a, e))
      // a pattern that drops off an edge is smeared over one entry
      const step = Math.abs(2 * toDb(elevationGainForClutter(a, e + 0.03)) - 2 * toDb(elevationGainForClutter(a, e - 0.03)))
      if (step > 3) continue
      expect(Math.abs(toDb(twoWayGain(t, Math.tan(e * RAD_PER_DEG))) - exact), `${e}°`).toBeLessThan(0.02)
      compared++
    }
    expect(compared).toBeGreaterThan(4000)
  })
  it('uses another tilt without another antenna', () => {
    const a = antenna({ elevationPattern: 'gaussian', elevationBeamwidthDeg: 3 })
    expect(twoWayGain(clutterGainTable(a, 5), Math.tan(5 * RAD_PER_DEG))).toBeCloseTo(1, 5)
  })
})

describe('azimuth kernel', () => {
  it.each([
    [1.6, 0.25, 19],
    [1.3, 0.25, 15],
    [2, 0.5, 13],
    [0.4, 0.1, 13],
  ])('beam %f°, step %f°: %i weights, two-way Gaussian, summing to the beamwidth', (beam, step, count) => {
    const w = azimuthKernel(beam, step)
    expect(w).toHaveLength(count)
    expect(w.reduce((s, x) => s + x, 0)).toBeCloseTo(beam * RAD_PER_DEG, 12)
    const half = (count - 1) / 2
    for (let n = 0; n <= half; n++) {
      expect(w[half + n]).toBe(w[half - n])
      expect(toDb(w[half + n] / w[half])).toBeCloseTo(-24.0824 * ((n * step) / beam) ** 2, 3)
    }
  })
  it('never laps the circle', () => expect(azimuthKernel(120, 10).length).toBeLessThanOrEqual(36))
})
