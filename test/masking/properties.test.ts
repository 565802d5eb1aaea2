import { describe, expect, it } from 'vitest'
import { effectiveRadiusM, geodesicInverse, type LonLat } from '../../core/geodesy/index.ts'
import { floorBand, horizonAt, sightAlong, sightPoint, topSight } from '../../core/masking/index.ts'
import { bilinear } from '../../core/raster/index.ts'
import type { Ground } from '../../core/terrain/index.ts'
import { FLAT_EARTH, FOUR_THIRDS, geographicShape, groundOn, placeAt, seeded, siteAt, utmShape } from '../terrain/grounds.ts'

const roughGround = async (size: number, seed: number, amplitudeM = 120): Promise<Ground> => {
  const random = seeded(seed)
  const phases = Array.from({ length: 8 }, () => 6.28 * random())
  return groundOn(await utmShape(size, size, 30), (c, r) => {
    let z = 0
    for (let k = 0; k < 8; k++) z += Math.abs(Math.sin(c / (3 + 5 * k) + phases[k]) * Math.cos(r / (4 + 4 * k) + phases[7 - k])) / (k + 1)
    return amplitudeM * z + 3 * random()
  })
}
const somewhere = (g: Ground, random: () => number): LonLat =>
  placeAt(g, 2 + random() * (g.shape.width - 5), 2 + random() * (g.shape.height - 5))

describe('sight', () => {
  it('agrees with walking along the line in 4 000 steps, on random ground and a flat earth', async () => {
    const random = seeded(11)
    let seen = 0
    let hidden = 0
    for (let n = 0; n < 400; n++) {
      const g = n % 50 === 0 ? await roughGround(40, n) : (last as Ground)
      last = g
      const grid = { width: 40, height: 40, samples: g.heightM }
      const [c0, r0, c1, r1] = Array.from({ length: 4 }, () => 1 + 37 * random())
      const heightM = 2 + 30 * random()
      const site = siteAt(g, c0, r0)
      const p = sightPoint(g, site, heightM, FLAT_EARTH, placeAt(g, c1, r1))
      // floor by brute force: the plane is conformal enough over 1 km to walk straight in pixels
      const antenna = bilinear(grid, c0, r0) + heightM
      const slopeAt = (f: number): number => (bilinear(grid, c0 + f * (c1 - c0), r0 + f * (r1 - r0)) - antenna) / f
      let best = 1
      for (let k = 1; k < 4000; k++) if (slopeAt(k / 4000) > slopeAt(best / 4000)) best = k
      let steepest = slopeAt(best / 4000)
      for (let k = -500; k <= 500; k++) steepest = Math.max(steepest, slopeAt(Math.min(1, (best + k / 500) / 4000)))
      const depth = antenna + steepest - bilinear(grid, c1, r1)
      // the last step before the place is part of the walk: seen places come out a little below 0
      if (p.inSight) {
        seen++
        expect(depth).toBeLessThan(0.05)
      } else {
        hidden++
        expect(depth).toBeGreaterThan(-0.05)
        expect(Math.abs(p.floorM - (antenna + steepest))).toBeLessThan(0.02)
      }
    }
    expect(Math.min(seen, hidden)).toBeGreaterThan(40)
  })

  it('is never lost by raising the mast, and begins at the height to see', async () => {
    const g = await roughGround(160, 5)
    const random = seeded(21)
    for (let n = 0; n < 300; n++) {
      const site = { ...somewhere(g, random), groundHeightM: null, clearingRadiusM: 0 }
      const at = somewhere(g, random)
      let before = false
      let floor = Number.POSITIVE_INFINITY
      for (const h of [1, 3, 8, 20, 45, 90, 200]) {
        const p = sightPoint(g, site, h, FOUR_THIRDS, at)
        expect(before && !p.inSight).toBe(false)
        expect(p.floorM).toBeLessThanOrEqual(floor + 1e-6)
        expect(p.inSight).toBe(h >= p.heightToSeeM)
        before = p.inSight
        floor = p.floorM
      }
      const { heightToSeeM } = sightPoint(g, site, 20, FOUR_THIRDS, at)
      if (heightToSeeM > 0.01) {
        expect(sightPoint(g, site, heightToSeeM * 1.0001 + 1e-3, FOUR_THIRDS, at).inSight).toBe(true)
        expect(sightPoint(g, site, heightToSeeM * 0.9999 - 1e-3, FOUR_THIRDS, at).inSight).toBe(false)
      }
    }
  })

  it('of a top over a place begins at the mast whose floor there comes down to it, at each k', async () => {
    const g = await roughGround(160, 7)
    const random = seeded(43)
    const low = { ...FOUR_THIRDS, effectiveEarthFactor: 1 }
    let compared = 0
    for (let n = 0; n < 200; n++) {
      const site = { ...somewhere(g, random), groundHeightM: null, clearingRadiusM: 0 }
      const at = somewhere(g, random)
      const { topM, lowestMastM } = topSight(g, site, [FOUR_THIRDS, low], at, 5)
      lowestMastM.forEach((mastM, e) => {
        if (!(mastM > 0.1)) return
        compared++
        const floorM = (h: number): number => sightPoint(g, site, h, e === 0 ? FOUR_THIRDS : low, at).floorM
        expect(floorM(mastM + 0.01)).toBeLessThanOrEqual(topM)
        expect(floorM(mastM - 0.01)).toBeGreaterThan(topM)
      })
    }
    expect(compared).toBeGreaterThan(100)
  })

  it('is mutual: from a to a point h above b as from b to a point h above a', async () => {
    const g = await roughGround(160, 9)
    const random = seeded(31)
    let compared = 0
    for (let n = 0; n < 400; n++) {
      const [a, b] = [somewhere(g, random), somewhere(g, random)]
      const h = 5 + 40 * random()
      const over = (from: LonLat, to: LonLat): number => {
        const p = sightPoint(g, { ...from, groundHeightM: null, clearingRadiusM: 0 }, h, FOUR_THIRDS, to)
        return p.floorM - p.groundM - h
      }
      const there = over(a, b)
      const back = over(b, a)
      // the two rays share the geodesic but for rounding: leave out grazing ones
      if (Math.abs(there) < 0.1 || Math.abs(back) < 0.1) continue
      compared++
      expect(there > 0).toBe(back > 0)
    }
    expect(compared).toBeGreaterThan(350)
  })

  it.each([
    ['UTM 30 m', () => utmShape(1500, 9, 30)],
    ['UTM 90 m', () => utmShape(600, 9, 90)],
    ['geographic 3", 55° S', async () => geographicShape(900, 9, -60, -55, 1 / 1200, 1 / 1200)],
  ])('over flat ground ends within one cell of √(2ka·h): %s', async (_name, make) => {
    for (const base of [0, 1200, -380])
      for (const h of [5, 20, 50]) {
        const g = groundOn(await make(), () => base)
        const site = siteAt(g, 2, 4)
        const at = (col: number): LonLat => placeAt(g, col, 4)
        const { azimuthDeg, distanceM } = geodesicInverse(site, at(3))
        let low = 3
        let high = g.shape.width - 2
        const sees = (col: number): boolean => sightPoint(g, site, h, FOUR_THIRDS, at(col)).inSight
        expect(sees(high)).toBe(false)
        while (high - low > 1e-3) {
          const mid = (low + high) / 2
          if (sees(mid)) low = mid
          else high = mid
        }
        const end = geodesicInverse(site, at(low)).distanceM
        const want = Math.sqrt(2 * effectiveRadiusM(FOUR_THIRDS, site.lat, azimuthDeg) * h)
        expect(Math.abs(end - want)).toBeLessThan(distanceM)
      }
  })

  it('counts ground at most half a millimetre under the line as seen only beside what hides it', async () => {
    const g = groundOn(await utmShape(1500, 9, 30), () => 0)
    const site = siteAt(g, 2, 4)
    const want = Math.sqrt(2 * effectiveRadiusM(FOUR_THIRDS, site.lat, 90) * 20)
    const step = geodesicInverse(site, placeAt(g, 3, 4)).distanceM
    const beyond = sightPoint(g, site, 20, FOUR_THIRDS, placeAt(g, 2 + (want + 60) / step, 4))
    expect(beyond.inSight).toBe(false)
    expect(beyond.floorM - beyond.groundM).toBeLessThan(0.0005)
  })
})

describe('floor and its band', () => {
  it('follow the error of what hides and of the antenna', async () => {
    expect(floorBand(20_000, 10_000, 5, 10)).toBeCloseTo(Math.hypot(10, 10), 9)
    expect(floorBand(500, 500, 7, 10)).toBe(7)
    const shape = await utmShape(300, 21, 30)
    const wall = (verticalErrorM: number | null) =>
      groundOn(shape, () => 0, {
        obstacles: [
          {
            name: 'Silo',
            path: [placeAt(bare, 110, 10)],
            heightM: 50,
            topM: null,
            widthM: 30,
            rcsM2: null,
            verticalErrorM,
          },
        ],
      })
    const bare = groundOn(shape, () => 0)
    const site = siteAt(bare, 10, 10)
    const at = placeAt(bare, 210, 10)
    const p = sightPoint(wall(2), site, 20, FOUR_THIRDS, at)
    expect(p.controlling.obstacle).toBe('Silo')
    expect(p.inSight).toBe(false)
    // top 50 m at half the range, antenna 20 m: the floor at the range is near 80 m, less the bulge of the earth between
    const r = geodesicInverse(site, at).distanceM
    expect(p.floorM).toBeCloseTo(80 + (r * r) / 4 / effectiveRadiusM(FOUR_THIRDS, site.lat, 90), 1)
    expect(p.floorBandM).toBeCloseTo(Math.hypot(2 * 2, 10), 2)
    expect(sightPoint(wall(null), site, 20, FOUR_THIRDS, at).floorBandM).toBeCloseTo(Math.hypot(2 * 10, 10), 2)
    const seen = sightPoint(wall(2), site, 20, FOUR_THIRDS, placeAt(bare, 60, 10))
    expect([seen.inSight, seen.floorM, seen.marginal]).toEqual([true, 0, false])
    const [row] = horizonAt(wall(2), site, 20, FOUR_THIRDS, [geodesicInverse(site, placeAt(bare, 110, 10)).azimuthDeg], 5000)
    expect(row.obstacle).toBe('Silo')
    expect(row.heightM).toBeCloseTo(50, 2)
    expect(geodesicInverse({ lon: row.lon, lat: row.lat }, placeAt(bare, 110, 10)).distanceM).toBeLessThan(0.1)
  })
  it('call ground masked by less than the band marginal', async () => {
    const g = groundOn(await utmShape(200, 9, 30), (col) => (col === 60 ? 12 : 0), { verticalErrorM: 3 })
    const site = siteAt(g, 10, 4)
    // line at 105 posts: 20 − 8·1.9 = 4.8 m above the ground; band √[(3·1.9)² + (3·0.9)²] = 6.3 m
    const behind = sightPoint(g, site, 20, FLAT_EARTH, placeAt(g, 105, 4))
    expect([behind.inSight, behind.marginal]).toEqual([false, true])
    expect(
      sightPoint(
        groundOn(g.shape, (col) => (col === 60 ? 40 : 0), { verticalErrorM: 3 }),
        site,
        20,
        FLAT_EARTH,
        placeAt(g, 70, 4),
      ).marginal,
    ).toBe(false)
  })
})

describe('unknown ground', () => {
  it('is neither seen nor masked: beyond a void, off the terrain, and the horizon there is "at least"', async () => {
    const g = groundOn(await utmShape(120, 21, 30), (col, row) => (col === 60 && row === 10 ? Number.NaN : 5))
    const site = siteAt(g, 10, 10)
    const beyond = sightPoint(g, site, 50, FOUR_THIRDS, placeAt(g, 80, 10))
    expect([beyond.unknown, beyond.inSight, beyond.floorM, beyond.heightToSeeM]).toEqual(['void', false, Number.NaN, Number.NaN])
    const off = sightPoint(g, site, 50, FOUR_THIRDS, placeAt(g, -30, 10))
    expect([off.unknown, off.groundM]).toEqual(['edge', Number.NaN])
    const { azimuthDeg } = geodesicInverse(site, placeAt(g, 80, 10))
    const [east, west, near] = horizonAt(g, site, 50, FOUR_THIRDS, [azimuthDeg, azimuthDeg + 180, azimuthDeg + 20], 3000)
    expect([east.obstacle, west.obstacle]).toEqual(['at least: void in terrain', 'at least: edge of terrain'])
    expect(near.elevationDeg).toBeLessThan(0)
    const along = sightAlong(g, site, 50, FOUR_THIRDS, azimuthDeg, 3000)
    expect(along.unknownWhy).toBe('void')
    expect([...along.inSight.slice(-2)]).toEqual([2, 2])
    expect(along.distM.at(-1)).toBe(3000)
    expect([...along.inSight.slice(0, -2)].every((s) => s === 1)).toBe(true)
  })
})
let last: Ground | null = null
