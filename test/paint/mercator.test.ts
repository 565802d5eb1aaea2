import { describe, expect, it } from 'vitest'
import { groundPerWorld, lonLatAtPixel, pixelAtLonLat, viewOfBox, worldXFromLon, worldYFromLat } from '../../core/paint/index.ts'

describe('web mercator (EPSG:3857, IOGP guidance note 7-2)', () => {
  it('gives the published example: 24°22′54.433″ N 100°20′00.000″ W', () => {
    const lat = 24 + 22 / 60 + 54.433 / 3600
    expect(worldXFromLon(-(100 + 20 / 60))).toBeCloseTo(-11169055.58, 1)
    expect(worldYFromLat(lat)).toBeCloseTo(2800000, 0)
  })
  it('returns to where it came from, across the antimeridian too', () => {
    const x = worldXFromLon(179.9)
    const view = { width: 800, height: 600, worldX: x, worldY: worldYFromLat(-40), worldPerPx: 100, night: false }
    for (const at of [
      { lon: 179.95, lat: -40.1 },
      { lon: -179.8, lat: -40.3 },
    ]) {
      const [px, py] = pixelAtLonLat(view, at)
      expect(px).toBeGreaterThan(0)
      expect(px).toBeLessThan(800)
      const back = lonLatAtPixel(view, px, py)
      expect(back.lon).toBeCloseTo(at.lon, 9)
      expect(back.lat).toBeCloseTo(at.lat, 9)
    }
  })
  it('fits a box whole and keeps it in the middle', () => {
    const view = viewOfBox({ west: 0, south: 0, east: 1000, north: 4000 }, { width: 500, height: 440 }, 20, false)
    expect(view.worldPerPx).toBeCloseTo(10, 9)
    expect(view.worldX + 250 * view.worldPerPx).toBeCloseTo(500, 9)
    expect(view.worldY - 220 * view.worldPerPx).toBeCloseTo(2000, 9)
  })
  it('shrinks with the cosine of latitude', () => expect(groundPerWorld(60)).toBeCloseTo(0.5, 12))
})
