import { spawnSync } from 'node:child_process'
import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { afterAll, describe, expect, it } from 'vitest'
import { cornersOf, crsFromEpsg, type GridShape, gridPosition, InputError, openTerrain, readClasses, subShape } from '../../core/index.ts'
import { fileSource, hasShared, sharedNote, sharedPath } from '../helpers/sharedData.ts'

const hasGdal = spawnSync('gdalinfo', ['--version']).status === 0
const note = `${sharedNote}${hasGdal ? '' : ' (skipped: GDAL is not installed here)'}`
const folder = mkdtempSync(join(tmpdir(), 'rasters-'))
afterAll(() => rmSync(folder, { recursive: true }))

const filled = (s: GridShape): Float32Array => new Float32Array(s.width * s.height).fill(Number.NaN)
async function readWhole(path: string, stated = {}) {
  const head = await openTerrain(await fileSource(path), stated)
  const samples = filled(head.shape)
  await head.readInto({ shape: head.shape, samples })
  return { ...head, samples }
}
/** Band 1 as GDAL reads it, raw numbers. */
function gdalValues(path: string, n: number): Float64Array {
  const out = join(folder, 'band.bin')
  expect(spawnSync('gdal_translate', ['-q', '-b', '1', '-ot', 'Float64', '-of', 'ENVI', path, out]).status).toBe(0)
  const bytes = readFileSync(out)
  return new Float64Array(bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + 8 * n))
}
function gdalCorners(path: string): [number, number][] {
  const info = JSON.parse(spawnSync('gdalinfo', ['-json', path], { encoding: 'utf8' }).stdout)
  const [ul, ll, lr, ur] = info.wgs84Extent.coordinates[0]
  return [ul, ur, lr, ll]
}

/** What may not be read, and why. */
const REFUSED: Record<string, string> = {
  'bad_empty.tif': 'empty-file',
  'bad_header_only.tif': 'damaged-tiff',
  'bad_html.tif': 'not-a-tiff',
  'bad_huge_size.tif': 'too-large',
  'bad_truncated_lzw.tif': 'truncated',
  'j_int16_lzma.tif': 'compression',
  'j_no_crs.tif': 'no-crs',
  'j_no_georef.tif': 'no-georeference',
  'mrgeo_small.tif': 'no-georeference',
  'rgbify_elev_rgb.tif': 'not-heights',
  'esa_worldcover_2021_N00E006.tif': 'not-heights',
  'zion_nlcd2011.tif': 'not-heights',
}
const METRES: Record<string, number> = { m: 1, ft: 0.3048, 'us-ft': 1200 / 3937 }
const files = hasShared
  ? ['dem', 'formats', 'raw'].flatMap((d) =>
      readdirSync(sharedPath(d))
        .filter((f) => f.endsWith('.tif'))
        .map((f) => [f, join(sharedPath(d), f)] as const),
    )
  : [['(no rasters)', ''] as const]

describe.skipIf(!hasShared || !hasGdal)(`every raster is read as GDAL reads it, or refused${note}`, () => {
  it.each(files)('%s', async (name, path) => {
    const why = REFUSED[name]
    if (why) {
      const e = await readWhole(path).then(
        () => null,
        (e: unknown) => e,
      )
      expect(e).toBeInstanceOf(InputError)
      expect((e as InputError).code).toBe(why)
      expect((e as InputError).message).toContain(name)
      expect((e as InputError).message.length).toBeLessThanOrEqual(240)
      return
    }
    const { shape, unit, nodata, samples } = await readWhole(path)
    const corners = cornersOf(shape)
    gdalCorners(path).forEach(([lon, lat], i) => {
      const turn = 360 * Math.round((lon - corners[i].lon) / 360)
      expect(Math.abs(corners[i].lon + turn - lon)).toBeLessThan(2e-7)
      expect(Math.abs(corners[i].lat - lat)).toBeLessThan(2e-7)
    })
    const alpha = name === 'b_cog_int16_lzw_webmercator.tif'
    const gdal = gdalValues(path, samples.length)
    let worst = 0
    let voidsDiffer = 0
    for (let i = 0; i < samples.length; i++) {
      const isVoid = Number.isNaN(gdal[i]) || gdal[i] === nodata || (alpha && gdal[i] === 0)
      if (isVoid !== Number.isNaN(samples[i])) voidsDiffer++
      else if (!isVoid) worst = Math.max(worst, Math.abs(samples[i] - gdal[i] * METRES[unit]))
    }
    expect(voidsDiffer).toBe(0)
    expect(worst).toBeLessThan(2e-4) // Float32 of metres
  })
  it('j_no_crs.tif with the CRS stated is j_f32_deflate_pred3.tif', async () => {
    const stated = await readWhole(sharedPath('formats/j_no_crs.tif'), { crs: 'EPSG:32616' })
    const own = await readWhole(sharedPath('formats/j_f32_deflate_pred3.tif'))
    expect(stated.shape).toMatchObject({ x0: own.shape.x0, y0: own.shape.y0, crs: { definition: own.shape.crs.definition } })
    expect(stated.samples).toEqual(own.samples)
  })
})

describe.skipIf(!hasShared)(`the same ground in other clothes${sharedNote}`, () => {
  // feet and feet, degrees and NaN, web mercator with a transparent edge: all made from the UTM raster of 30 m
  it.each([
    ['b_stateplane_ftus_compound.tif', 1.5],
    ['b_geographic_nan.tif', 1.6],
    ['b_cog_int16_lzw_webmercator.tif', 1.2],
  ])('%s lies on the UTM raster: mean within 0.05 m', async (name, rms) => {
    const utm = await readWhole(sharedPath('formats/b_cog_deflate.tif'))
    const other = await openTerrain(await fileSource(sharedPath(`formats/${name}`)), {})
    const samples = filled(utm.shape)
    await other.readInto({ shape: utm.shape, samples })
    let n = 0
    let sum = 0
    let squares = 0
    samples.forEach((v, i) => {
      if (Number.isNaN(v)) return
      n++
      sum += v - utm.samples[i]
      squares += (v - utm.samples[i]) ** 2
    })
    expect(n / samples.length).toBeGreaterThan(0.99)
    expect(Math.abs(sum / n)).toBeLessThan(0.05)
    // twice resampled in mountains; half a pixel or a wrong foot would be 5 m and more
    expect(Math.sqrt(squares / n)).toBeLessThan(rms)
  })
})

describe.skipIf(!hasShared || !hasGdal)(`land cover by the nearest cell, as GDAL finds it${note}`, () => {
  async function compare(file: string, target: GridShape): Promise<{ compared: number; differ: number; classes: readonly number[] }> {
    const head = await readClasses(await fileSource(file))
    const { codes, classes } = await head.readClassesInto(target)
    const p = gridPosition(target)
    const asked: string[] = []
    const got: number[] = []
    for (let i = 0; i < 400; i++) {
      const col = (i * 7919) % target.width
      const row = (i * 104_729) % target.height
      asked.push(p.toLonLat(col, row).join(' '))
      got.push(classes[codes[row * target.width + col]] ?? head.nodata ?? -1)
    }
    const out = spawnSync('gdallocationinfo', ['-valonly', '-wgs84', file], { input: asked.join('\n'), encoding: 'utf8' }).stdout
    const gdal = out.trim().split('\n').map(Number)
    expect(gdal).toHaveLength(asked.length)
    return { compared: gdal.length, differ: gdal.filter((v, i) => v !== got[i]).length, classes }
  }
  it('NLCD in UTM onto a geographic terrain', async () => {
    const { shape } = await openTerrain(await fileSource(sharedPath('raw/zion_srtm.tif')), {})
    const inner = subShape(shape, { col: 60, row: 60, width: 300, height: 300 })
    const r = await compare(sharedPath('raw/zion_nlcd2011.tif'), inner)
    expect(r.classes.length).toBeGreaterThan(8)
    expect(r.differ).toBe(0)
  })
  it('36 000 × 36 000 WorldCover onto a UTM ground of 30 m, a window of it, in bounded memory', async () => {
    const crs = await crsFromEpsg(32632)
    // an island in this tile: 0.2 N, 6.6 E
    const target = { width: 1500, height: 1500, crs, x0: 210_000, y0: 45_000, colX: 30, colY: 0, rowX: 0, rowY: -30 }
    const before = process.memoryUsage().rss
    const r = await compare(sharedPath('raw/esa_worldcover_2021_N00E006.tif'), target)
    expect(r.classes).toEqual(expect.arrayContaining([10, 80]))
    expect(r.differ).toBe(0)
    expect((process.memoryUsage().rss - before) / 1e6).toBeLessThan(400)
  })
})
