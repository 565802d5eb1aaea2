import { describe, expect, it } from 'vitest'
import {
  effectiveRadiusM,
  elevationAngleDeg,
  floorAtSlantRange,
  geodesicDirect,
  geodesicLine,
  heightOnRayM,
  radiusOfCurvatureM,
  slantRangeM,
} from '../../core/index.ts'

describe('radius of curvature, WGS 84', () => {
  // a²/b at the pole, b²/a along the meridian and a along the parallel at the equator (NIMA TR8350.2)
  it.each([
    [90, 0, 6_399_593.626],
    [90, 77, 6_399_593.626],
    [0, 0, 6_335_439.327],
    [0, 90, 6_378_137],
  ])('latitude %d, azimuth %d', (lat, azimuth, want) => expect(radiusOfCurvatureM(lat, azimuth)).toBeCloseTo(want, 2))
  it('effective radius: factor, stated radius, and flat earth outside 0 < k <= 10', () => {
    expect(effectiveRadiusM({ effectiveEarthFactor: 4 / 3, earthRadiusM: 6_378_137 }, 50, 10)).toBeCloseTo(8_504_182.667, 2)
    expect(effectiveRadiusM({ effectiveEarthFactor: 1, earthRadiusM: null }, 0, 90)).toBeCloseTo(6_378_137, 2)
    for (const k of [0, -2, 10.1]) expect(effectiveRadiusM({ effectiveEarthFactor: k, earthRadiusM: null }, 50, 10)).toBe(Infinity)
  })
})

describe('rays', () => {
  it('a flat earth is the limit of a large one', () => {
    expect(elevationAngleDeg(30, 500, 20_000, Infinity)).toBeCloseTo(elevationAngleDeg(30, 500, 20_000, 1e13), 6)
    expect(heightOnRayM(30, 1, 20_000, Infinity)).toBeCloseTo(heightOnRayM(30, 1, 20_000, 1e13), 2)
    expect(slantRangeM(30, 500, 20_000, Infinity)).toBeCloseTo(slantRangeM(30, 500, 20_000, 1e13), 3)
    expect(floorAtSlantRange(30, 1, 20_000, Infinity)).toBeCloseTo(floorAtSlantRange(30, 1, 20_000, 1e13), 2)
  })
  it('slant range, elevation and floor at slant range close the triangle', () => {
    const r = 8.5e6
    for (const [a, h, d] of [
      [20, 3000, 60_000],
      [1500, -100, 15_000],
      [5, 12_000, 350_000],
    ]) {
      const slant = slantRangeM(a, h, d, r)
      const e = elevationAngleDeg(a, h, d, r)
      expect(floorAtSlantRange(a, e, slant, r)).toBeCloseTo(h, 5)
    }
  })
  it('a prepared line gives the same places as the direct problem, across the antimeridian', () => {
    const from = { lon: 179.8, lat: -16 }
    const line = geodesicLine(from, 75)
    const out = [0, 0]
    for (const d of [0, 1, 2_000, 60_000, 370_000]) {
      const p = geodesicDirect(from, 75, d)
      line.into(d, out)
      expect(out[0]).toBeCloseTo(p.lon, 10)
      expect(out[1]).toBeCloseTo(p.lat, 10)
    }
    expect(line.at(60_000).lon).toBeLessThan(-179)
  })
})
