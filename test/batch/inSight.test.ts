import { spawnSync } from 'node:child_process'
import { existsSync, mkdtempSync, readFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { FileSource } from '../../app/batch/fileSource.ts'
import { mapLattice } from '../../app/batch/rasters/mapLattice.ts'
import { NO_PERCENT, sightRaster } from '../../app/batch/rasters/sightRaster.ts'
import { buildGround, finish, type Ground, openTerrain, postingM, readClasses, uniformCode } from '../../core/index.ts'

// in-sight.tif against two other ways to the same answer, on real ground, with a 4/3 earth of 6 378 137 m (GDAL: curvature coefficient 0.75):
// a brute-force line of sight over every crossing, and GDAL's viewshed utility. Cells within one cell of the reference's own boundary are left out.
const data = '../shared/data'
const hasData = existsSync(join(data, 'checks.json'))
const hasGdal = spawnSync('gdal_viewshed', ['--help']).error === undefined
const EARTH = { effectiveEarthFactor: 4 / 3, earthRadiusM: 6_378_137 }

async function groundOf(path: string): Promise<Ground> {
  const source = await FileSource.open(path)
  const { shape, readInto } = await openTerrain(source, {})
  const heightM = new Float32Array(shape.width * shape.height).fill(Number.NaN)
  await readInto({ shape, samples: heightM })
  await source.close()
  return finish(
    buildGround({ serial: 1, shape, heightM, code: null, codes: [uniformCode('farmland', null)], obstacles: [], verticalErrorM: 10 }),
  )
}
/** Per cent of cells off the boundary of `want` that are equal. */
function equalOffBoundary(pct: Uint8Array, want: (cell: number) => boolean, width: number, height: number): number {
  let equal = 0
  let count = 0
  for (let row = 1; row < height - 1; row++)
    for (let col = 1; col < width - 1; col++) {
      const cell = row * width + col
      if (pct[cell] === NO_PERCENT) continue
      let edge = false
      for (let r = -1; r <= 1; r++) for (let c = -1; c <= 1; c++) edge ||= want(cell + r * width + c) !== want(cell)
      if (edge) continue
      count++
      if ((pct[cell] as number) >= 50 === want(cell)) equal++
    }
  return (100 * equal) / count
}
interface Case {
  readonly dem: string
  readonly site: string
  readonly lon: number
  readonly lat: number
}
const cases: Case[] = hasData ? JSON.parse(readFileSync(join(data, 'checks.json'), 'utf8')).cases : []

describe.skipIf(!hasData)(`in sight against brute force${hasData ? '' : ' (skipped: ../shared is not here)'}`, () => {
  it.each(cases)('$dem $site, masts 20 and 50 m: at least 99 % of cells equal', async ({ dem, site, lon, lat }) => {
    const ground = await groundOf(join(data, 'dem', `${dem}.tif`))
    const { width, height } = ground.shape
    const raw = join(mkdtempSync(join(tmpdir(), 'sight-')), 'visible.raw')
    const bands = [20, 50].map((h) => 3 * (Number(site.slice(1)) - 1) + [5, 20, 50].indexOf(h) + 1)
    for (const [n, heightM] of [20, 50].entries()) {
      const wanted = spawnSync('gdal_translate', [
        '-q',
        '-of',
        'ENVI',
        '-b',
        String(bands[n]),
        join(data, 'reference', `${dem}_visible.tif`),
        raw,
      ])
      expect(wanted.status, 'gdal_translate').toBe(0)
      const bits = readFileSync(raw)
      const place = { lon, lat, groundHeightM: null, clearingRadiusM: 50 }
      const { inSightPct } = finish(sightRaster(ground, place, heightM, EARTH, 1e6, ground.shape))
      const equal = equalOffBoundary(inSightPct, (cell) => ((bits[cell] as number) & 1) === 1, width, height)
      console.log(`${dem} ${site} ${heightM} m: ${equal.toFixed(3)} % equal to brute force`)
      expect(equal).toBeGreaterThanOrEqual(99)
    }
  })
})

const gdalCase = cases.find((c) => c.dem === 'jacksboro90')
describe.skipIf(!hasData || !hasGdal)(
  `in sight against GDAL${hasData && hasGdal ? '' : ' (skipped: GDAL or ../shared is not here)'}`,
  () => {
    it('at least 99 % of cells equal to its viewshed utility', async () => {
      const { dem, lon, lat } = gdalCase as Case
      const path = join(data, 'dem', `${dem}.tif`)
      const ground = await groundOf(path)
      const { shape } = ground
      const { gridPosition } = await import('../../core/index.ts')
      const [col, row] = gridPosition(shape).toPixel(lon, lat)
      const x = shape.x0 + Math.round(col) * shape.colX
      const y = shape.y0 + Math.round(row) * shape.rowY
      const out = join(mkdtempSync(join(tmpdir(), 'gdal-')), 'visible.tif')
      const run = spawnSync('gdal_viewshed', ['-q', '-ox', String(x), '-oy', String(y), '-oz', '20', '-md', '0', '-cc', '0.75', path, out])
      expect(run.status).toBe(0)
      const source = await FileSource.open(out)
      const raster = await (await readClasses(source)).readClassesInto(shape)
      await source.close()
      const place = { lon, lat, groundHeightM: null, clearingRadiusM: 50 }
      const { inSightPct } = finish(sightRaster(ground, place, 20, EARTH, 1e6, shape))
      const seen = (cell: number) => (raster.classes[raster.codes[cell] as number] ?? 0) > 0
      const equal = equalOffBoundary(inSightPct, seen, shape.width, shape.height)
      console.log(`${dem} 20 m: ${equal.toFixed(3)} % equal to gdal_viewshed`)
      expect(equal).toBeGreaterThanOrEqual(99)
    })
  },
)

describe('lattice of the rasters', () => {
  const utm = { kind: 'projected', epsg: 32633, definition: 'EPSG:32633', name: 'UTM', metresPerUnit: 1 } as const
  const terrain = { width: 101, height: 79, crs: utm, x0: 500_015, y0: 5_399_985, colX: 30, colY: 0, rowX: 0, rowY: -30 }
  it("is the terrain's own up to a range step of twice its cell", () => {
    expect(mapLattice(terrain, 60)).toBe(terrain)
  })
  it('has cells of half a longer range step from the same corner', () => {
    const shape = mapLattice(terrain, 150)
    const { colM, rowM } = postingM(shape)
    expect(colM).toBeCloseTo(75, 1)
    expect(rowM).toBeCloseTo(75, 1)
    expect([shape.x0 - shape.colX / 2, shape.y0 - shape.rowY / 2]).toEqual([500_000, 5_400_000])
    expect([shape.width, shape.height]).toEqual([Math.ceil((101 * 30) / 75), Math.ceil((79 * 30) / 75)])
  })
})
