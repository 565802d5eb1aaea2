import { describe, expect, it } from 'vitest'
import { makeRamp, oklabOfHex, RAMP_STOPS, type RampFamily, rampHex } from '../../core/paint/index.ts'

const hexOf = (c: number) => `#${[c & 255, (c >>> 8) & 255, (c >>> 16) & 255].map((v) => v.toString(16).padStart(2, '0')).join('')}`

describe('ramps', () => {
  for (const family of Object.keys(RAMP_STOPS) as RampFamily[])
    it(`${family}: lightness falls on paper and rises at night, every step, in Oklab`, () => {
      const ramp = makeRamp(family, [0, 70], 'bare')
      for (const [colours, sign] of [
        [ramp.rgba, -1],
        [ramp.rgbaNight!, 1],
      ] as const) {
        const light = Array.from(colours, (c) => oklabOfHex(hexOf(c))[0])
        // half of one 8-bit step is the rounding of the table itself
        for (let n = 1; n < 256; n++) expect(sign * (light[n]! - light[n - 1]!)).toBeGreaterThan(-0.0025)
        for (let n = 16; n < 256; n += 16) expect(sign * (light[n]! - light[n - 16]!)).toBeGreaterThan(0.012)
      }
    })
  it('labelled stops carry the drawn colours exactly', () => {
    const ramp = makeRamp('warm', [0, 10, 20, 30, 40, 50, 60, 70], 'bare')
    for (let k = 0; k < 8; k++) {
      const got = oklabOfHex(rampHex(ramp, 10 * k, false)!)
      const want = oklabOfHex(RAMP_STOPS.warm.day[k]!)
      expect(Math.hypot(got[0] - want[0], got[1] - want[1], got[2] - want[2])).toBeLessThan(0.006)
    }
  })
  it('leaves ground bare below the ramp, or holds the first colour', () => {
    expect(rampHex(makeRamp('warm', [0, 70], 'bare'), -0.1, false)).toBeNull()
    expect(rampHex(makeRamp('cool', [0, 70], 'hold'), -0.1, false)).toBe(RAMP_STOPS.cool.day[0])
    expect(rampHex(makeRamp('warm', [0, 70], 'bare'), 99, false)).toBe(RAMP_STOPS.warm.day[7])
    expect(rampHex(makeRamp('warm', [0, 70], 'bare'), Number.NaN, false)).toBeNull()
  })
})
