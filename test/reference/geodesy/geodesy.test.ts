import { describe, expect, it } from 'vitest'
import {
  crsFromEpsg,
  crsTransform,
  depressionAtAntennaDeg,
  depressionAtTerrainDeg,
  earthDropM,
  elevationAngleDeg,
  floorAtGroundRange,
  floorAtSlantRange,
  geodesicDirect,
  geodesicInverse,
  heightOnRayM,
  horizonDistanceM,
  M_PER_NM,
  MEAN_EARTH_RADIUS_M,
} from '../../../core/index.ts'
import { type Case, expectCase, titleOf } from '../cases.ts'
import cases from './cases.json'

const all = cases as unknown as Case[]
const SPHERE_M = (4 / 3) * MEAN_EARTH_RADIUS_M
const of = (...topics: string[]) => all.filter((c) => topics.includes(c.topic)).map((c) => [titleOf(c), c] as const)

/** Tolerance of a geodesy case for one key, as printed: "0.001 m / 1e-7 deg". These tables carry 10 and more digits, so nothing is added. */
function allowed(c: Case, key: string): number {
  const parts = String(c.tolerance).split('/')
  const angle = /deg|lat|lon/.test(key)
  const part = parts.find((p) => /deg/.test(p) === angle)
  expect(part, `no tolerance for ${key} in "${c.tolerance}"`).toBeDefined()
  return Number(/[\d.]+(?:e-?\d+)?/.exec(part!)![0])
}
function expectGeodesy(c: Case, got: Record<string, number>): void {
  for (const [key, want] of Object.entries(c.expected)) {
    const turn = key.startsWith('azi') ? 360 * Math.round((want! - got[key]) / 360) : 0
    expect(Math.abs(got[key] + turn - want!), `${c.id}: ${key} is ${got[key]}, want ${want}`).toBeLessThanOrEqual(allowed(c, key))
  }
}

describe('geodesy', () => {
  it('has all 25 cases: 4 inverse, 4 direct, 5 UTM, 3 projections, 9 of sight', () => {
    const count = (t: RegExp) => all.filter((c) => t.test(c.topic)).length
    expect([/inverse/, /direct/, /utm/, /projection/, /depression|los|horizon/].map(count)).toEqual([4, 4, 5, 3, 9])
    expect(all).toHaveLength(25)
  })

  it.each(of('geodesy-inverse'))('%s', (_, c) => {
    const x = c.inputs
    const r = geodesicInverse({ lon: x.lon1, lat: x.lat1 }, { lon: x.lon2, lat: x.lat2 })
    expectGeodesy(c, { azi1_deg: r.azimuthDeg, azi2_deg: r.azimuthAtToDeg, s12_m: r.distanceM })
  })

  it.each(of('geodesy-direct'))('%s', (_, c) => {
    const x = c.inputs
    const r = geodesicDirect({ lon: x.lon1, lat: x.lat1 }, x.azi1_deg, x.s12_m)
    expectGeodesy(c, { lat2: r.lat, lon2: r.lon, azi2_deg: r.azimuthDeg })
  })

  it.each(of('geodesy-utm', 'geodesy-projection'))('%s', async (_, c) => {
    const x = c.inputs
    const t = crsTransform(await crsFromEpsg(x.epsg))
    const [east, north] = t.fromLonLat(x.lon, x.lat)
    const northFirst = x.epsg === 3035
    expectGeodesy(c, { easting_m: east, northing_m: north, out1: northFirst ? north : east, out2: northFirst ? east : north })
    const [lon, lat] = t.toLonLat(east, north)
    expect(Math.abs(lon - x.lon), 'back to the longitude it came from').toBeLessThan(1e-8)
    expect(Math.abs(lat - x.lat), 'back to the latitude it came from').toBeLessThan(1e-8)
  })

  it.each(of('depression-angle', 'terrain-los', 'radar-horizon'))('%s', (_, c) => {
    const x = c.inputs
    const got =
      c.topic === 'depression-angle'
        ? { atTerrain_deg: depressionAtTerrainDeg(x.h_m, x.R_m, SPHERE_M), atAntenna_deg: depressionAtAntennaDeg(x.h_m, x.R_m, SPHERE_M) }
        : c.topic === 'radar-horizon'
          ? { d_km: horizonDistanceM(x.h1_m, x.h2_m, SPHERE_M) / 1000 }
          : {
              elevExact_deg: elevationAngleDeg(x.h1_m, x.h2_m, x.groundDist_m, SPHERE_M),
              // the small-angle form is the depression at the antenna with its sign turned
              elevApprox_deg: -depressionAtAntennaDeg(x.h1_m - x.h2_m, x.groundDist_m, SPHERE_M),
              earthBulgeDrop_m: earthDropM(x.groundDist_m, SPHERE_M),
            }
    expect(expectCase(c, got)).toBeGreaterThan(0)
  })
})

describe('coverage floor and ridge (arithmetic, k 4/3, 6 371 000 m)', () => {
  const r = 60 * M_PER_NM
  it('antenna 100 m, 0.50°: 1 796.30 m at 60 NM slant range', () =>
    expect(Math.abs(floorAtSlantRange(100, 0.5, r, SPHERE_M) - 1796.3)).toBeLessThanOrEqual(0.05))
  it('antenna 100 m, 0.50°: 1 796.84 m at 60 NM ground range', () =>
    expect(Math.abs(floorAtGroundRange(100, 0.5, r, SPHERE_M) - 1796.84)).toBeLessThanOrEqual(0.05))
  it('ridge 250 m at 12 km from 50 m: 0.9144°', () =>
    expect(Math.abs(elevationAngleDeg(50, 250, 12_000, SPHERE_M) - 0.9144)).toBeLessThanOrEqual(0.0002))
  it('a ray toward a point passes through it, 1 to 400 km', () => {
    for (const range of [1_000, 12_345, 111_000, 400_000])
      for (const height of [-50, 0, 900, 11_000]) {
        const e = elevationAngleDeg(77, height, range, SPHERE_M)
        expect(Math.abs(heightOnRayM(77, e, range, SPHERE_M) - height)).toBeLessThan(1e-6)
      }
  })
})
