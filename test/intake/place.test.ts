import { describe, expect, it } from 'vitest'
import { cornersOf, crsFromEpsg, type GridShape, gridPosition, openTerrain, postingM, readClasses } from '../../core/index.ts'
import { makeTiff, sourceOf, type TiffPlan } from '../helpers/tiffMaker.ts'

const base: TiffPlan = { width: 60, height: 50, kind: 'f32', at: (c, r) => 2 * c + 3 * r, tile: 16 }
const open = (way: Partial<TiffPlan>, stated = {}) => openTerrain(sourceOf(makeTiff({ ...base, ...way })), stated)
const KEYS = { area: [1025, 1], point: [1025, 2] } as const
const projected = (code: number, raster: readonly [number, number] = KEYS.area) => [[1024, 1], raster, [3072, code]] as const

describe('where a raster lies', () => {
  it('area: the tie is the corner of the first pixel; point: its centre', async () => {
    const area = (await open({})).shape
    expect([area.x0, area.y0]).toEqual([10.0005, 49.9995])
    const point = (await open({ geoKeys: [[1024, 2], KEYS.point, [2048, 4326]] })).shape
    expect([point.x0, point.y0]).toEqual([10, 50])
  })
  it('a tie inside the raster', async () => {
    const { x0, y0 } = (await open({ tiePoint: [10, 20, 0, 10, 50, 0] })).shape
    expect(x0).toBeCloseTo(10 - 0.01 + 0.0005, 12)
    expect(y0).toBeCloseTo(50 + 0.02 - 0.0005, 12)
  })
  it('a rotated transformation', async () => {
    const m = [20, 5, 0, 400_000, 5, -20, 0, 5_500_000, 0, 0, 0, 0, 0, 0, 0, 1]
    const { shape } = await open({ transformation: m, geoKeys: projected(32632) })
    expect([shape.x0, shape.y0]).toEqual([400_012.5, 5_499_992.5])
    const p = gridPosition(shape)
    const [lon, lat] = p.toLonLat(31, 17)
    const [col, row] = p.toPixel(lon, lat)
    expect(col).toBeCloseTo(31, 6)
    expect(row).toBeCloseTo(17, 6)
  })
  it('a stated CRS outranks the file', async () => {
    const { shape } = await open({ pixelScale: [90, 90, 0], tiePoint: [0, 0, 0, 500_000, 5_400_000, 0] }, { crs: 'EPSG:32633' })
    expect(shape.crs.epsg).toBe(32633)
    expect(cornersOf(shape)[0].lon).toBeCloseTo(15, 9)
    expect(postingM(shape).meanM).toBeCloseTo(90 / 0.9996, 1)
  })
})

describe('onto another grid', () => {
  const target = async (over: Partial<GridShape>): Promise<GridShape> => ({
    width: 30,
    height: 20,
    crs: await crsFromEpsg(32632),
    x0: 572_000,
    y0: 5_538_000,
    colX: 60,
    colY: 0,
    rowX: 0,
    rowY: -60,
    ...over,
  })
  const filled = (shape: GridShape): Float32Array => new Float32Array(shape.width * shape.height).fill(Number.NaN)

  it('bilinear at the exact place of every cell', async () => {
    const head = await open({})
    const shape = await target({})
    const samples = filled(shape)
    await head.readInto({ shape, samples })
    const to = gridPosition(shape)
    const from = gridPosition(head.shape)
    let seen = 0
    for (let row = 0; row < 20; row++)
      for (let col = 0; col < 30; col++) {
        const [lon, lat] = to.toLonLat(col, row)
        const [c, r] = from.toPixel(lon, lat)
        const inside = c >= 0 && r >= 0 && c <= 59 && r <= 49
        const v = samples[row * 30 + col]
        if (inside) {
          // the plane is exact; 0.001 pixel of place is 5 mm here
          expect(Math.abs(v - (2 * c + 3 * r))).toBeLessThan(0.006)
          seen++
        }
      }
    expect(seen).toBeGreaterThan(300)
  })
  it('the same lattice, shifted by whole pixels, is copied', async () => {
    const head = await open({})
    const s = head.shape
    const shape = { ...s, width: 20, height: 10, x0: s.x0 + 45 * s.colX, y0: s.y0 - 5 * Math.abs(s.rowY) }
    const samples = filled(shape)
    await head.readInto({ shape, samples })
    expect(samples[0]).toBe(2 * 45 + 3 * 5)
    expect(samples[14]).toBe(2 * 59 + 3 * 5)
    expect(samples[15]).toBeNaN()
  })
  it('a second file fills only what the first left void, without a seam between neighbours', async () => {
    const west = await open({ at: () => 100 })
    const east = await open({ at: () => 200, tiePoint: [0, 0, 0, 10.06, 50, 0] })
    const shape = { ...west.shape, width: 120, x0: west.shape.x0 + 0.0003 }
    const samples = filled(shape)
    await west.readInto({ shape, samples })
    await east.readInto({ shape, samples })
    const row = samples.slice(120, 240)
    expect(row.findIndex(Number.isNaN)).toBe(-1)
    expect([row[0], row[59], row[60], row[119]]).toEqual([100, 100, 200, 200])
  })
  it('across the antimeridian as one piece', async () => {
    const head = await open({ tiePoint: [0, 0, 0, 179.97, 50, 0] })
    const p = gridPosition(head.shape)
    expect(p.toPixel(-179.9805, 49.9995)[0]).toBeCloseTo(49, 6)
    expect(p.toLonLat(49, 0)[0]).toBeCloseTo(-179.9805, 9)
  })
  it('classes by the nearest cell; unknown outside and where no data', async () => {
    const at = (c: number, r: number): number => (c === 5 ? 0 : r < 25 ? 312 : 512)
    const head = await readClasses(sourceOf(makeTiff({ ...base, kind: 'u16', at, nodata: '0' })))
    const s = head.shape
    const shape = { ...s, width: 35, height: 26, x0: s.x0 - 2 * s.colX, y0: s.y0, colX: 2 * s.colX, rowY: 2 * s.rowY }
    const { codes, classes } = await head.readClassesInto(shape)
    expect([...classes].sort()).toEqual([312, 512])
    const classAt = (col: number, row: number): number | undefined => classes[codes[row * 35 + col]]
    expect(classAt(0, 0)).toBeUndefined()
    expect(classAt(1, 0)).toBe(312)
    expect(classAt(1, 13)).toBe(512)
    expect(codes[25 * 35 + 1]).toBe(255)
    const odd = await head.readClassesInto({ ...s, width: 8, height: 1 })
    expect([...odd.codes]).toEqual([0, 0, 0, 0, 0, 255, 0, 0])
  })
})
