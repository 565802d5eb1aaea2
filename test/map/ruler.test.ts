import { describe, expect, it } from 'vitest'
import { labelPlaces, nextStated, nextStep, signedPct, snapped } from '../../app/map/ruler/rulerGeometry.ts'
import type { Ladder } from '../../core/index.ts'

describe('the mast as a ruler', () => {
  const stated = [10, 20, 35]
  it('takes a stated height when the pointer is near, half metres between', () => {
    expect(snapped(20.4, stated, 15, 44)).toBe(20)
    expect(snapped(20.6, stated, 15, 44)).toBe(20.5)
    expect(snapped(26.3, stated, 15, 44)).toBe(26.5)
    expect(snapped(-3, stated, 15, 44)).toBe(0.5)
    expect(snapped(99, stated, 15, 44)).toBe(44)
  })
  it('steps through the stated heights and stays at their ends', () => {
    expect(nextStated(10, stated, 1)).toBe(20)
    expect(nextStated(26.5, stated, 1)).toBe(35)
    expect(nextStated(26.5, stated, -1)).toBe(20)
    expect(nextStated(35, stated, 1)).toBe(35)
  })
  it('never lets two labels touch, nor one touch the mast, and moves none without need', () => {
    const places = labelPlaces([100, 104, 300, 98], [110], 14, 10, 400)
    const all = [...places, 110].sort((a, b) => a - b)
    for (let n = 1; n < all.length; n++) expect(all[n]! - all[n - 1]!).toBeGreaterThanOrEqual(14)
    expect(places[2]).toBe(300)
    for (const y of places) {
      expect(y).toBeGreaterThanOrEqual(10)
      expect(y).toBeLessThanOrEqual(400)
    }
  })
})

describe('one more step of mast', () => {
  const ladder = {
    heightsM: [10, 20, 30],
    octantPct: [
      [50, 50, null, 50, 50, 50, 50, 50],
      [50.2, 62, null, 50, 45, 50, 50, 53],
      [51, 62, 3, 50, 45, 50, 50, 53],
    ],
  } as unknown as Ladder
  it('tells by octant what it brings, most first, and what it costs; no change is left out', () => {
    expect(nextStep(ladder, 10)).toEqual({
      toM: 20,
      octants: [
        { name: 'NE', pct: 12 },
        { name: 'NW', pct: 3 },
        { name: 'S', pct: -5 },
      ],
    })
    expect([signedPct(12.4), signedPct(-5)]).toEqual(['+12', '−5'])
  })
  it('has nothing to say at the top, between rungs and without a ladder', () => {
    expect(nextStep(ladder, 30)).toBeNull()
    expect(nextStep(ladder, 15)).toBeNull()
    expect(nextStep(null, 10)).toBeNull()
  })
})
