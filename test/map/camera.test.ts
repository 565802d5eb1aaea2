import fc from 'fast-check'
import { describe, expect, it } from 'vitest'
import { covers, fitted, paintView, panned, placement, resized, zoomed } from '../../app/map/camera.ts'
import { pixelAtLonLat, type View, worldXFromLon, worldYFromLat } from '../../core/paint/index.ts'

const view: View = { width: 800, height: 600, worldX: worldXFromLon(10), worldY: worldYFromLat(50), worldPerPx: 100, night: false }

describe('the map camera', () => {
  it('keeps the place under the pointer when it zooms', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.2, max: 5, noNaN: true }),
        fc.integer({ min: 0, max: 800 }),
        fc.integer({ min: 0, max: 600 }),
        (factor, px, py) => {
          const to = zoomed(view, factor, px, py)
          expect(to.worldX + px * to.worldPerPx).toBeCloseTo(view.worldX + px * view.worldPerPx, 4)
          expect(to.worldY - py * to.worldPerPx).toBeCloseTo(view.worldY - py * view.worldPerPx, 4)
        },
      ),
    )
  })
  it('moves the ground with the hand, and back', () => {
    const there = panned(view, 30, -20)
    expect(there.worldX).toBeCloseTo(view.worldX - 3000, 6)
    expect(there.worldY).toBeCloseTo(view.worldY - 2000, 6)
    expect(panned(there, -30, 20).worldX).toBeCloseTo(view.worldX, 6)
  })
  it('keeps its middle on another size', () => {
    const to = resized(view, 400, 700)
    expect(to.worldX + 200 * 100).toBeCloseTo(view.worldX + 400 * 100, 6)
    expect(to.worldY - 350 * 100).toBeCloseTo(view.worldY - 300 * 100, 6)
  })
  it('fits places whole, right of what covers its left edge, across the antimeridian too', () => {
    const places = [
      { lon: 179.5, lat: -20 },
      { lon: -179.5, lat: -21 },
    ]
    for (const inset of [0, 300]) {
      const to = fitted(view, places, 20, inset)
      for (const p of places) {
        const [px, py] = pixelAtLonLat(to, p)
        expect(px).toBeGreaterThan(inset + 19)
        expect(px).toBeLessThan(781)
        expect(py).toBeGreaterThan(19)
        expect(py).toBeLessThan(581)
      }
    }
  })
  it('paints device pixels up to a budget, with a margin where that has room', () => {
    const plain = paintView(view, 1, 1_500_000, 96)
    expect(plain.width).toBe(992)
    expect(plain.worldPerPx).toBeCloseTo(100, 9)
    expect(covers(plain, view)).toBe(true)
    expect(placement(plain, view)).toMatchObject({ x: -96, y: -96 })
    const dense = paintView(view, 3, 1_500_000, 96)
    expect(dense.width * dense.height).toBeLessThanOrEqual(1_501_000)
    expect(covers(dense, view)).toBe(true)
    expect(covers(plain, panned(view, 90, -90))).toBe(true)
    expect(covers(plain, panned(view, 100, 0))).toBe(false)
    expect(covers(plain, zoomed(view, 0.5, 0, 0))).toBe(false)
  })
})
