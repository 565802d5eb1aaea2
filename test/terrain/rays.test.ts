import { describe, expect, it } from 'vitest'
import { geodesicDirect, geodesicInverse } from '../../core/geodesy/index.ts'
import type { Obstacle } from '../../core/obstacles/index.ts'
import { bilinear, type GridShape, gridPosition } from '../../core/raster/index.ts'
import { groundAt, makeTracer, siteGround, type Tracer } from '../../core/terrain/index.ts'
import { FARMLAND, FOREST, geographicShape, groundOn, placeAt, seeded, siteAt, utmShape } from './grounds.ts'

const entries = (t: Tracer, track = t.track.surface): [number, number, number][] =>
  Array.from({ length: t.track.count }, (_, k) => [track[3 * k], track[3 * k + 1], track[3 * k + 2]])

describe('rays in pixels', () => {
  const random = seeded(7)
  const shapes: [string, () => Promise<GridShape>][] = [
    ['UTM 30 m', () => utmShape(2400, 2400, 30)],
    ['geographic 3", 60° N', async () => geographicShape(2000, 2000, 20, 60, 1 / 1200, 1 / 1200)],
    ['geographic across the antimeridian, 17° S', async () => geographicShape(1500, 1500, 180, -17, 1 / 1200, 1 / 1200)],
    ['geographic 74° N', async () => geographicShape(3000, 1500, 20, 74, 1 / 1200, 1 / 1200)],
    ['UTM 1 m', () => utmShape(2000, 2000, 1)],
  ]
  it.each(shapes)('%s: within 0.1 pixel of the geodesic everywhere, fan or single', async (_name, make) => {
    const g = groundOn(await make(), () => 0)
    const { toPixel } = gridPosition(g.shape)
    const site = siteAt(g, 0.47 * g.shape.width, 0.52 * g.shape.height)
    const reach = 0.45 * g.postingM * g.shape.height
    const fan = makeTracer(g, site, reach, { fanStepDeg: 0.25 })
    const single = makeTracer(g, site, reach)
    let worst = 0
    let places = 0
    for (let i = 0; i < 60; i++) {
      const azimuthDeg = 360 * random()
      fan.trace(azimuthDeg)
      single.trace(azimuthDeg)
      for (let k = 0; k < 20; k++) {
        const d = reach * 0.98 * random()
        const p = geodesicDirect(site, azimuthDeg, d)
        const want = toPixel(p.lon, p.lat)
        if (want[0] < 1 || want[1] < 1 || want[0] > g.shape.width - 2 || want[1] > g.shape.height - 2) continue
        places++
        for (const t of [fan, single]) {
          const got = t.pixelAt(d)
          worst = Math.max(worst, Math.hypot(got[0] - want[0], got[1] - want[1]))
        }
      }
    }
    expect(worst).toBeLessThan(0.1)
    expect(places).toBeGreaterThan(600)
    console.log(`    worst distance from the geodesic ${worst.toFixed(5)} pixel`)
  })

  it('visit every line between posts, with the bilinear height there and between', async () => {
    const noise = seeded(3)
    const g = groundOn(await utmShape(220, 180, 30), () => 100 * noise())
    const grid = { width: g.shape.width, height: g.shape.height, samples: g.heightM }
    const site = siteAt(g, 101.3, 88.6)
    const t = makeTracer(g, site, 2500)
    for (let i = 0; i < 200; i++) {
      t.trace(360 * random())
      const rows = entries(t)
      let crossed = 0
      for (let k = 0; k < rows.length; k++) {
        const [s, z, q] = rows[k]
        const [col, row] = t.pixelAt(s)
        expect(z).toBeCloseTo(bilinear(grid, col, row), 6)
        if (Math.abs(col - Math.round(col)) < 1e-7 || Math.abs(row - Math.round(row)) < 1e-7) crossed++
        if (k + 1 === rows.length) continue
        const [s1, z1] = rows[k + 1]
        const u = 0.37 * (s1 - s)
        const [c, r] = t.pixelAt(s + u)
        const between = s1 > s ? z + u * ((z1 - z) / (s1 - s) + q * (u - (s1 - s))) : z
        expect(between).toBeCloseTo(bilinear(grid, c, r), 5)
      }
      const [c0, r0] = t.pixelAt(0)
      const [c1, r1] = t.pixelAt(2500)
      expect(crossed).toBe(Math.abs(Math.floor(c1) - Math.floor(c0)) + Math.abs(Math.floor(r1) - Math.floor(r0)))
    }
  })

  it('end at the last line of posts, or before a patch with a void', async () => {
    const g = groundOn(await utmShape(60, 60, 30), (col, row) => (col === 40 && row === 30 ? Number.NaN : 10))
    const site = siteAt(g, 30, 30)
    const t = makeTracer(g, site, 5000)
    const { azimuthDeg, distanceM } = geodesicInverse(site, placeAt(g, 39, 30))
    t.trace(azimuthDeg)
    expect(t.track.unknownWhy).toBe('void')
    expect(t.track.unknownFromM).toBeCloseTo(distanceM, 2)
    const north = geodesicInverse(site, placeAt(g, 30, 0))
    t.trace(north.azimuthDeg)
    expect(t.track.unknownWhy).toBe('edge')
    expect(t.track.unknownFromM).toBeCloseTo(north.distanceM, 2)
    const near = makeTracer(g, site, 250)
    near.trace(azimuthDeg)
    expect([near.track.unknownWhy, near.track.unknownFromM]).toEqual([null, Number.POSITIVE_INFINITY])
  })
  it('start unknown over a void and outside the raster', async () => {
    const g = groundOn(await utmShape(20, 20, 30), (col, row) => (col === 10 && row === 10 ? Number.NaN : 10))
    for (const site of [siteAt(g, 10.4, 10.4), siteAt(g, -3, 5)]) {
      const t = makeTracer(g, site, 1000)
      t.trace(45)
      expect(t.track.unknownFromM).toBe(0)
      expect(siteGround(g, site)).toBeNaN()
    }
    expect(groundAt(g, 0, 0)).toBeNaN()
  })
})

describe('surface', () => {
  it('carries cover added at posts, bilinear between, and none inside the clearing', async () => {
    const shape = await utmShape(60, 60, 30)
    const code = Uint8Array.from({ length: 3600 }, (_, i) => (i % 60 > 20 ? 1 : 0))
    const g = groundOn(shape, () => 100, { code, codes: [FARMLAND, FOREST] })
    const site = siteAt(g, 30, 30, { clearingRadiusM: 100 })
    const t = makeTracer(g, site, 600)
    const { azimuthDeg } = geodesicInverse(site, placeAt(g, 12, 30))
    t.trace(azimuthDeg)
    const heightAt = (d: number): number => {
      const rows = entries(t)
      const k = rows.findIndex(([s]) => s >= d - 1e-6)
      return rows[k][1]
    }
    // posts 27..33 lie within 100 m; forest from 26 down to 21; farmland from 20 on
    const scale = geodesicInverse(site, placeAt(g, 29, 30)).distanceM
    expect([1, 2, 3].map((n) => heightAt(n * scale))).toEqual([100, 100, 100])
    expect([4, 5, 9].map((n) => heightAt(n * scale))).toEqual([115, 115, 115])
    expect([10, 15].map((n) => heightAt(n * scale))).toEqual([100, 100])
    expect(entries(t, t.track.ground).every(([, z]) => z === 100)).toBe(true)
  })

  const mast = (over: Partial<Obstacle> & Pick<Obstacle, 'path'>): Obstacle => ({
    name: 'mast',
    heightM: 60,
    topM: null,
    widthM: 40,
    rcsM2: null,
    verticalErrorM: null,
    ...over,
  })
  it('has a point obstacle on every ray inside its angular width, and on one at least', async () => {
    const shape = await utmShape(200, 200, 30)
    const bare = groundOn(shape, () => 10)
    const at = placeAt(bare, 140, 100)
    const site = siteAt(bare, 100, 100)
    const { azimuthDeg, distanceM } = geodesicInverse(site, at)
    const top = (widthM: number, off: number, fanStepDeg?: number): number => {
      const g = groundOn(shape, () => 10, { obstacles: [mast({ path: [at], widthM })] })
      const t = makeTracer(g, site, 2000, { fanStepDeg })
      t.trace(azimuthDeg + off)
      return Math.max(...entries(t).map(([, z]) => z))
    }
    const halfDeg = (Math.atan(20 / distanceM) * 180) / Math.PI
    expect(top(40, 0.9 * halfDeg)).toBe(70)
    expect(top(40, 1.1 * halfDeg)).toBe(10)
    expect(top(0, 0)).toBe(70)
    expect(top(0, 0.1)).toBe(10)
    expect(top(0, 0.1, 0.25)).toBe(70)
    expect(top(0, 0.2, 0.25)).toBe(10)
  })
  it('has a line obstacle where the ray crosses it, at its height above the ground there or its stated top', async () => {
    const shape = await utmShape(200, 200, 30)
    const bare = groundOn(shape, (col) => col)
    const path = [placeAt(bare, 150, 60), placeAt(bare, 150, 140)]
    const site = siteAt(bare, 100, 100)
    for (const [over, want] of [
      [{ heightM: 20 }, 170],
      [{ heightM: null, topM: 180 }, 180],
    ] as const) {
      const t = makeTracer(
        groundOn(shape, (col) => col, { obstacles: [mast({ path, ...over })] }),
        site,
        2400,
      )
      t.trace(geodesicInverse(site, placeAt(bare, 150, 110)).azimuthDeg)
      const { distanceM } = geodesicInverse(site, placeAt(bare, 150, 110))
      const near = entries(t).filter(([d]) => Math.abs(d - distanceM) < 1)
      expect(Math.max(...near.map(([, z]) => z))).toBeCloseTo(want, 1)
      t.trace(geodesicInverse(site, placeAt(bare, 150, 150)).azimuthDeg)
      expect(entries(t).every(([, z], k) => z === t.track.ground[3 * k + 1])).toBe(true)
    }
  })
})
