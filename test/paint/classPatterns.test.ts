import { describe, expect, it } from 'vitest'
import {
  CELL,
  CLASS_PATTERNS,
  type ClassPattern,
  classMarkAt,
  classMarkColour,
  classMarkPixels,
  greyOf,
  LOSS_CAUSES,
  layerInfo,
  paintPolar,
  rampHex,
  type View,
} from '../../core/index.ts'

const causes = layerInfo('cause-of-loss')
const rgbOf = (value: number): [number, number, number] => {
  const hex = rampHex(causes.ramp, value, false)
  if (!hex) throw new Error('no colour')
  return [1, 3, 5].map((at) => Number.parseInt(hex.slice(at, at + 2), 16)) as [number, number, number]
}

describe('patterns of classes', () => {
  it('every pattern repeats every 8 pixels and marks its own share of them', () => {
    const shares = CLASS_PATTERNS.map((p) => classMarkPixels(p).length / 64)
    expect(shares).toEqual([0, 0.25, 0.25, 0.125, 0.25, 0.25, 15 / 64, 14 / 64, 0.5, 0.25])
    for (const p of CLASS_PATTERNS)
      for (const [x, y] of [
        [3, 5],
        [0, 7],
      ])
        expect(classMarkAt(p, x + 16, y - 24)).toBe(classMarkAt(p, x, y))
  })
  it('no two patterns are alike', () => {
    const drawn = CLASS_PATTERNS.map((p) => JSON.stringify(classMarkPixels(p)))
    expect(new Set(drawn).size).toBe(CLASS_PATTERNS.length)
  })
  it('every cause has a pattern; two causes that share one are at least 0.3 apart in grey', () => {
    const { patterns } = causes
    expect(patterns?.length).toBe(LOSS_CAUSES.length)
    let shared = 0
    for (let a = 1; a <= LOSS_CAUSES.length; a++)
      for (let b = a + 1; b <= LOSS_CAUSES.length; b++) {
        if (patterns?.[a - 1] !== patterns?.[b - 1]) continue
        shared++
        expect(Math.abs(greyOf(...rgbOf(a)) - greyOf(...rgbOf(b)))).toBeGreaterThan(0.3)
      }
    expect(shared).toBe(2)
  })
  it('marks stand out from their colour in grey', () => {
    for (let v = 1; v <= LOSS_CAUSES.length; v++) {
      const own = rgbOf(v)
      expect(Math.abs(greyOf(...classMarkColour(...own)) - greyOf(...own))).toBeGreaterThan(0.15)
    }
  })
})

describe('classes painted', () => {
  const site = { lon: 0, lat: 0 }
  const grid = { azimuths: 360, ranges: 50, azimuthStepDeg: 1, rangeStepM: 100 }
  const view = (worldX: number): View => ({ width: 64, height: 64, worldX, worldY: 3_000, worldPerPx: 10, night: false })
  const paint = (patterns: readonly ClassPattern[], value: number, at = 0): Uint32Array => {
    const out = new Uint32Array(64 * 64)
    const values = new Float32Array(360 * 50).fill(value)
    const state = new Uint8Array(values.length).fill(CELL.masked)
    paintPolar(grid, site, values, state, causes.ramp, view(at), out, { patterns, hatchMasked: false, opacity: 1 })
    return out
  }
  const named = (v: number): readonly ClassPattern[] =>
    causes.patterns ??
    ((): never => {
      throw new Error(String(v))
    })()
  it('in two colours: the class and its mark, by the share of the pattern', () => {
    for (const cause of ['masked', 'short-range-sensitivity', 'lobing'] as const) {
      const value = LOSS_CAUSES.indexOf(cause) + 1
      const out = paint(named(value), value)
      const counts = new Map<number, number>()
      for (const c of out) counts.set(c, (counts.get(c) ?? 0) + 1)
      expect(counts.size).toBe(2)
      expect([...counts.values()].sort((a, b) => a - b)[0] / out.length).toBe(0.25)
    }
  })
  it('fixed to the world: the same place keeps its mark when the map moves', () => {
    const value = LOSS_CAUSES.indexOf('masked') + 1
    const here = paint(named(value), value)
    const moved = paint(named(value), value, 30)
    for (let y = 0; y < 64; y++) for (let x = 3; x < 64; x++) expect(moved[y * 64 + x - 3]).toBe(here[y * 64 + x])
  })
  it('a plain class is one colour', () => {
    const value = LOSS_CAUSES.indexOf('clutter') + 1
    expect(new Set(paint(named(value), value)).size).toBe(1)
  })
})
