import { describe, expect, it } from 'vitest'
import {
  geodesicInverse,
  lonLatAtPixel,
  makeDifferenceRamp,
  type PolarShape,
  paintDifference,
  rampHex,
  type View,
  worldXFromLon,
  worldYFromLat,
} from '../../core/index.ts'

const west = { lon: 12.3, lat: 51.2 }
const east = { lon: 12.42, lat: 51.22 }
const grid: PolarShape = { azimuths: 360, ranges: 100, azimuthStepDeg: 1, rangeStepM: 150 }
const view: View = {
  width: 240,
  height: 180,
  worldX: worldXFromLon(12.36) - 120 * 260,
  worldY: worldYFromLat(51.21) + 90 * 260,
  worldPerPx: 260,
  night: false,
}
/** Ramp whose colour number is the difference itself plus 128. */
const counting = {
  ...makeDifferenceRamp([-128, 0, 127], 'high'),
  rgba: Uint32Array.from({ length: 256 }, (_, n) => (0xff000000 | n) >>> 0),
}
const byRange = (factor: number) => Float32Array.from({ length: 36_000 }, (_, n) => factor * (n % 100))

describe('difference of two layers', () => {
  it('is a − b of the cells a pixel lies in, each in its own grid', () => {
    const out = new Uint32Array(view.width * view.height)
    paintDifference(
      { grid, site: west, values: byRange(1), outside: Number.NaN },
      { grid, site: east, values: byRange(1), outside: Number.NaN },
      1,
      counting,
      view,
      out,
      1,
    )
    let checked = 0
    let bare = 0
    for (let py = 2; py < view.height; py += 5)
      for (let px = 3; px < view.width; px += 7) {
        const at = lonLatAtPixel(view, px + 0.5, py + 0.5)
        const [a, b] = [west, east].map((s) => geodesicInverse(s, at).distanceM / grid.rangeStepM) as [number, number]
        const shown = out[py * view.width + px]!
        if (a >= 101 || b >= 101) {
          expect(shown).toBe(0)
          bare++
          continue
        }
        const clear = (v: number) => Math.abs(v - Math.round(v)) > 0.25 && v < 99
        const off = Math.floor(a) - Math.floor(b)
        if (!clear(a) || !clear(b)) continue
        if (off === 0) expect(shown).toBe(0)
        else expect((shown & 255) - 128).toBe(off)
        checked++
      }
    expect(checked).toBeGreaterThan(100)
    expect(bare).toBeGreaterThan(10)
  })
  it('beyond the range of one of them its stated value stands', () => {
    const out = new Uint32Array(view.width * view.height)
    const values = new Float32Array(36_000).fill(30)
    paintDifference({ grid, site: west, values, outside: 0 }, { grid, site: east, values, outside: 0 }, 1, counting, view, out, 1)
    const at = (lon: number, lat: number) => {
      const px = Math.floor((worldXFromLon(lon) - view.worldX) / view.worldPerPx)
      const py = Math.floor((view.worldY - worldYFromLat(lat)) / view.worldPerPx)
      return out[py * view.width + px]!
    }
    expect((at(12.15, 51.19) & 255) - 128).toBe(30)
    expect((at(12.57, 51.23) & 255) - 128).toBe(-30)
    expect(at(12.36, 51.21)).toBe(0)
  })
  it('a place unknown to one of them stays bare', () => {
    const out = new Uint32Array(view.width * view.height)
    const values = new Float32Array(36_000).fill(Number.NaN)
    paintDifference({ grid, site: west, values, outside: 0 }, { grid, site: west, values: byRange(1), outside: 0 }, 1, counting, view, out)
    expect(out.every((p) => p === 0)).toBe(true)
  })
})

describe('ramp of differences', () => {
  const warmth = (hex: string) => Number.parseInt(hex.slice(1, 3), 16) - Number.parseInt(hex.slice(5, 7), 16)
  it('is warm at the end named and cool at the other, in both themes', () => {
    for (const night of [false, true]) {
      const high = makeDifferenceRamp([-30, 0, 30], 'high')
      expect(warmth(rampHex(high, 25, night)!)).toBeGreaterThan(40)
      expect(warmth(rampHex(high, -25, night)!)).toBeLessThan(-40)
      const low = makeDifferenceRamp([-30, 0, 30], 'low')
      expect(warmth(rampHex(low, -25, night)!)).toBeGreaterThan(40)
      expect(Math.abs(warmth(rampHex(high, 0, night)!))).toBeLessThan(16)
    }
  })
})
