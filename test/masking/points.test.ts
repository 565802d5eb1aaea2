import { readFileSync } from 'node:fs'
import { describe, expect, it } from 'vitest'
import { horizonAt, sightPoint } from '../../core/masking/index.ts'
import { gridPosition } from '../../core/raster/index.ts'
import { buildGround, type Ground } from '../../core/terrain/index.ts'
import { finish } from '../../core/work/index.ts'
import { hasShared, sharedNote, sharedPath } from '../helpers/sharedData.ts'
import { FARMLAND } from '../terrain/grounds.ts'
import { readBands, readDem } from '../terrain/readDem.ts'

// Sight, floor and horizon against a brute-force reference on real terrain (closed-form supremum per bilinear patch, planar distances, 4/3 of 6 378 137 m).
interface Height {
  h: number
  vis: number[]
  min_agl: number[]
  margin: number[]
  hor_deg: (number | null)[]
}
interface Case {
  dem: string
  site: string
  lon: number
  lat: number
  col: number
  row: number
  points: Record<'lon' | 'lat' | 'z' | 'd' | 'az' | 'gaz', number[]>
  heights: Height[]
}
const EARTH = { effectiveEarthFactor: 4 / 3, earthRadiusM: 6_378_137 }
const cases: Case[] = hasShared ? JSON.parse(readFileSync(sharedPath('checks.json'), 'utf8')).cases : []
const grounds = new Map<string, Promise<Ground>>()
const groundOf = (dem: string): Promise<Ground> => {
  let g = grounds.get(dem)
  if (!g) {
    g = readDem(sharedPath(`dem/${dem}.tif`)).then((d) =>
      finish(buildGround({ serial: 1, ...d, code: null, codes: [FARMLAND], obstacles: [], verticalErrorM: 10 })),
    )
    grounds.set(dem, g)
  }
  return g
}
const quantile = (values: number[], p: number): number => {
  const s = [...values].sort((a, b) => a - b)
  return s[Math.min(s.length - 1, Math.floor(p * s.length))]
}
const siteOf = (c: Case) => ({ lon: c.lon, lat: c.lat, groundHeightM: null, clearingRadiusM: 50 })
/** Every value read is a number: a NaN would pass unseen through comparisons. */
const finite = (x: number): number => {
  expect(Number.isFinite(x)).toBe(true)
  return x
}

describe.skipIf(!hasShared)(`against brute force on real terrain${sharedNote}`, () => {
  it('3 600 places: at most 3 wrong and none decisive; floor p95 0.15 m, p99 0.35 m; height to see agrees with sight', async () => {
    let wrong = 0
    let decisiveWrong = 0
    let disagree = 0
    let count = 0
    const floor: number[] = []
    for (const c of cases) {
      const g = await groundOf(c.dem)
      for (const h of c.heights)
        for (let i = 0; i < c.points.lon.length; i++) {
          const p = sightPoint(g, siteOf(c), h.h, EARTH, { lon: c.points.lon[i], lat: c.points.lat[i] })
          const visible = h.vis[i] === 1
          count++
          expect(Math.abs(finite(p.groundM) - c.points.z[i])).toBeLessThan(0.05)
          if (p.inSight !== visible) {
            wrong++
            if ((visible ? h.margin[i] : h.min_agl[i]) > 1) decisiveWrong++
          }
          if (p.inSight !== finite(p.heightToSeeM) <= h.h + 0.002) disagree++
          if (!visible && h.min_agl[i] < 1000) floor.push(Math.abs(finite(p.floorM) - p.groundM - h.min_agl[i]))
        }
    }
    console.log(
      `    sight wrong ${wrong}/${count}; floor error p50 ${quantile(floor, 0.5).toFixed(3)} p95 ${quantile(floor, 0.95).toFixed(3)} p99 ${quantile(floor, 0.99).toFixed(3)} m over ${floor.length}`,
    )
    expect([count, decisiveWrong, disagree]).toEqual([3600, 0, 0])
    expect(wrong).toBeLessThanOrEqual(3)
    expect(quantile(floor, 0.95)).toBeLessThan(0.15)
    expect(quantile(floor, 0.99)).toBeLessThan(0.35)
  })

  it('432 horizons: p90 0.004°, p99 0.008°', async () => {
    const error: number[] = []
    for (const c of cases) {
      const h = c.heights.find((x) => x.h === 20)!
      // the reference counts azimuths from grid north: turn them by the convergence seen at the near points
      const near = c.points.d.map((d, i) => [d, i]).sort((a, b) => a[0] - b[0])
      const convergence = quantile(
        near.slice(0, 20).map(([, i]) => ((c.points.gaz[i] - c.points.az[i] + 540) % 360) - 180),
        0.5,
      )
      const azimuths = h.hor_deg.map((_, i) => (5 * i + convergence + 360) % 360)
      const rows = horizonAt(await groundOf(c.dem), siteOf(c), 20, EARTH, azimuths, 150_000)
      rows.forEach((r, i) => {
        const want = h.hor_deg[i]
        if (want !== null) error.push(Math.abs(finite(r.elevationDeg) - want))
      })
    }
    console.log(
      `    horizon error p50 ${quantile(error, 0.5).toFixed(4)} p90 ${quantile(error, 0.9).toFixed(4)} p99 ${quantile(error, 0.99).toFixed(4)}°`,
    )
    expect(error).toHaveLength(432)
    expect(quantile(error, 0.9)).toBeLessThan(0.004)
    expect(quantile(error, 0.99)).toBeLessThan(0.008)
  })

  it('one post in 211 of the whole rasters: at least 99.5 % equal, 99.9 % off the boundary', async () => {
    for (const dem of ['bigtujunga30', 'jacksboro90']) {
      const g = await groundOf(dem)
      const { width, height } = g.shape
      const { toLonLat } = gridPosition(g.shape)
      const bands = await readBands(sharedPath(`reference/${dem}_visible.tif`))
      for (const c of cases.filter((x) => x.dem === dem))
        for (const [n, heightM] of [5, 20, 50].entries()) {
          const band = bands[3 * (Number(c.site.slice(1)) - 1) + n]
          const visible = (i: number): boolean => (band[i] & 1) === 1
          let all = 0
          let equal = 0
          let inner = 0
          let innerEqual = 0
          for (let i = 0; i < width * height; i += 211) {
            const col = i % width
            const row = Math.floor(i / width)
            if (col === 0 || row === 0 || col === width - 1 || row === height - 1 || i === c.row * width + c.col) continue
            const [lon, lat] = toLonLat(col, row)
            const same = sightPoint(g, siteOf(c), heightM, EARTH, { lon, lat }).inSight === visible(i)
            let boundary = false
            for (const r of [-width, 0, width]) for (const k of [-1, 0, 1]) boundary ||= visible(i + r + k) !== visible(i)
            all++
            if (same) equal++
            if (!boundary) {
              inner++
              if (same) innerEqual++
            }
          }
          const pct = (100 * equal) / all
          const innerPct = (100 * innerEqual) / inner
          console.log(`    ${dem} ${c.site} ${heightM} m: ${pct.toFixed(2)} % equal, ${innerPct.toFixed(3)} % off the boundary`)
          expect(pct).toBeGreaterThan(99.5)
          expect(innerPct).toBeGreaterThan(99.9)
        }
    }
  }, 120_000)
})
