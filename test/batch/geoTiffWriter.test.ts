import { spawnSync } from 'node:child_process'
import { mkdtempSync, readFileSync, writeFileSync } from 'node:fs'
import { tmpdir } from 'node:os'
import { join } from 'node:path'
import { describe, expect, it } from 'vitest'
import { encodeGeoTiff, type GeoTiffLayer } from '../../app/batch/geoTiffWriter.ts'
import type { Crs, GridShape } from '../../core/index.ts'

const gdal = spawnSync('gdalinfo', ['--version'], { encoding: 'utf8' })
const hasGdal = gdal.status === 0
const dir = mkdtempSync(join(tmpdir(), 'tiff-'))
const utm33: Crs = { kind: 'projected', epsg: 32633, definition: 'EPSG:32633', name: 'WGS 84 / UTM zone 33N', metresPerUnit: 1 }
const shape = (crs: Crs, over: Partial<GridShape> = {}): GridShape => ({
  width: 300,
  height: 250,
  crs,
  x0: 400_015,
  y0: 5_399_985,
  colX: 30,
  colY: 0,
  rowX: 0,
  rowY: -30,
  ...over,
})
const floats = (s: GridShape) =>
  Float32Array.from({ length: s.width * s.height }, (_, i) => (i % 17 === 0 ? Number.NaN : Math.sin(i) * 500))
const layer = (s: GridShape, over: Partial<GeoTiffLayer> = {}): GeoTiffLayer => ({
  shape: s,
  samples: floats(s),
  nodata: Number.NaN,
  description: 'coverage floor',
  unit: 'm',
  metadata: { VERTICAL_DATUM: 'mean sea level & <up>' },
  ...over,
})
interface Info {
  geoTransform: number[]
  coordinateSystem: { wkt: string }
  metadata: { '': Record<string, string>; IMAGE_STRUCTURE: Record<string, string> }
  bands: Record<string, unknown>[]
}
async function written(l: GeoTiffLayer, name: string): Promise<{ path: string; info: Info }> {
  const path = join(dir, `${name}.tif`)
  writeFileSync(path, await encodeGeoTiff(l))
  const run = spawnSync('gdalinfo', ['-json', path], { encoding: 'utf8' })
  expect(run.stderr).toBe('')
  return { path, info: JSON.parse(run.stdout) }
}
/** The samples as GDAL reads them. */
function raw(path: string, type: 'Float32' | 'Byte'): Float32Array | Uint8Array {
  const out = `${path}.raw`
  const run = spawnSync('gdal_translate', ['-q', '-of', 'ENVI', '-ot', type, path, out], { encoding: 'utf8' })
  expect(run.status).toBe(0)
  const bytes = readFileSync(out)
  return type === 'Byte' ? new Uint8Array(bytes) : new Float32Array(bytes.buffer.slice(bytes.byteOffset, bytes.byteOffset + bytes.length))
}

describe.skipIf(!hasGdal)(`GeoTIFF as GDAL reads it${hasGdal ? '' : ' (skipped: GDAL is not installed here)'}`, () => {
  it('floats come back bit by bit, with place, unit, datum and NaN as no data', async () => {
    const l = layer(shape(utm33))
    const { path, info } = await written(l, 'float')
    expect(info.geoTransform).toEqual([400_000, 30, 0, 5_400_000, 0, -30])
    expect(info.coordinateSystem.wkt).toContain('ID["EPSG",32633]]')
    expect(info.metadata['']).toMatchObject({ AREA_OR_POINT: 'Area', VERTICAL_DATUM: 'mean sea level & <up>' })
    expect(info.metadata.IMAGE_STRUCTURE.COMPRESSION).toBe('DEFLATE')
    expect(info.bands[0]).toMatchObject({ type: 'Float32', unit: 'm', description: 'coverage floor', noDataValue: 'NaN' })
    expect(raw(path, 'Float32')).toEqual(l.samples)
  })
  it('bytes come back, 255 is no data', async () => {
    const s = shape(utm33)
    const samples = Uint8Array.from({ length: s.width * s.height }, (_, i) => (i % 7 === 0 ? 255 : i % 101))
    const { path, info } = await written(layer(s, { samples, nodata: 255, unit: '%' }), 'byte')
    expect(info.bands[0]).toMatchObject({ type: 'Byte', unit: '%', noDataValue: 255 })
    expect(raw(path, 'Byte')).toEqual(samples)
  })
  it('a turned grid keeps its turn', async () => {
    const { info } = await written(layer(shape(utm33, { colX: 26, colY: 15, rowX: 15, rowY: -26 })), 'turned')
    expect(info.geoTransform).toEqual([400_015 - 20.5, 26, 15, 5_399_985 + 5.5, 15, -26])
  })
  it('geographic degrees', async () => {
    const wgs: Crs = { kind: 'geographic', epsg: 4326, definition: 'EPSG:4326', name: 'WGS 84', metresPerUnit: 1 }
    const { info } = await written(layer(shape(wgs, { x0: -30, y0: 40, colX: 1 / 1200, rowY: -1 / 1200 })), 'geo')
    expect(info.coordinateSystem.wkt).toContain('ID["EPSG",4326]]')
  })
  // The CRS as GDAL finds it in the file must have the parameters it finds in the definition itself.
  it.each([
    [
      '+proj=tmerc +lat_0=49 +lon_0=-2 +k=0.9996012717 +x_0=400000 +y_0=-100000 +ellps=airy +towgs84=446.448,-125.157,542.06,0.15,0.247,0.842,-20.489 +units=m',
    ],
    ['+proj=lcc +lat_1=35.5 +lat_2=34 +lat_0=33.5 +lon_0=-118 +x_0=2000000 +y_0=500000 +datum=NAD83 +units=us-ft', 1200 / 3937],
    ['+proj=lcc +lat_1=46.5 +lat_0=46.5 +lon_0=3 +k_0=0.99987742 +x_0=600000 +y_0=2200000 +datum=WGS84'],
    ['+proj=laea +lat_0=52 +lon_0=10 +x_0=4321000 +y_0=3210000 +ellps=GRS80'],
    ['+proj=aea +lat_1=29.5 +lat_2=45.5 +lat_0=23 +lon_0=-96 +x_0=0 +y_0=0 +datum=NAD83'],
    ['+proj=aeqd +lat_0=40 +lon_0=20 +x_0=1000 +y_0=2000 +datum=WGS84'],
    ['+proj=stere +lat_0=90 +lat_ts=70 +lon_0=-45 +x_0=0 +y_0=0 +datum=WGS84'],
    [
      '+proj=sterea +lat_0=52.156160556 +lon_0=5.387638889 +k=0.9999079 +x_0=155000 +y_0=463000 +ellps=bessel +towgs84=565.4171,50.3319,465.5524,1.9342,-1.6677,9.1019,4.0725',
    ],
    ['+proj=utm +zone=33 +south +datum=WGS84'],
    ['+proj=merc +lat_ts=40 +lon_0=10 +x_0=0 +y_0=0 +datum=WGS84'],
  ] as [string, number?][])('user-defined CRS %s', async (definition, metresPerUnit = 1) => {
    const crs: Crs = { kind: 'projected', epsg: null, definition, name: 'site grid', metresPerUnit }
    const { path } = await written(layer(shape(crs)), `user${definition.length}`)
    const parameters = (srs: string) => {
      const text = spawnSync('gdalsrsinfo', ['-o', 'proj4', srs], { encoding: 'utf8' }).stdout
      return Object.fromEntries(
        [...text.matchAll(/\+(\w+)=?(\S*)/g)].map(([, name, v]) => [
          name,
          v === '' || Number.isNaN(Number(v)) ? v : Number(Number(v).toFixed(6)),
        ]),
      )
    }
    const want = parameters(definition)
    expect(Object.keys(want).length).toBeGreaterThan(3)
    expect(parameters(path)).toEqual(want)
  })
})
