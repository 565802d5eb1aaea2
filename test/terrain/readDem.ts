// Reads a GeoTIFF for tests straight through the decoding library, so that these tests do not lean on intake.
import { readFileSync } from 'node:fs'
import { fromArrayBuffer } from 'geotiff'
import { crsFromEpsg } from '../../core/geodesy/index.ts'
import type { GridShape } from '../../core/raster/index.ts'

export async function readDem(path: string): Promise<{ shape: GridShape; heightM: Float32Array }> {
  const file = readFileSync(path)
  const tiff = await fromArrayBuffer(file.buffer.slice(file.byteOffset, file.byteOffset + file.byteLength) as ArrayBuffer)
  const image = await tiff.getImage()
  const keys = image.getGeoKeys()
  const code = keys?.ProjectedCSTypeGeoKey ?? keys?.GeographicTypeGeoKey
  const [x, y] = image.getOrigin()
  const [dx, dy] = image.getResolution()
  const samples = (await image.readRasters({ samples: [0] }))[0] as unknown as ArrayLike<number>
  const nodata = image.getGDALNoData()
  const heightM = Float32Array.from({ length: samples.length }, (_, i) => (samples[i] === nodata ? Number.NaN : samples[i]))
  const half = image.pixelIsArea() ? 0.5 : 0
  return {
    shape: {
      width: image.getWidth(),
      height: image.getHeight(),
      crs: await crsFromEpsg(code as number),
      x0: x + half * dx,
      y0: y + half * dy,
      colX: dx,
      colY: 0,
      rowX: 0,
      rowY: dy,
    },
    heightM,
  }
}
/** Every band of a raster, for the reference rasters. */
export async function readBands(path: string): Promise<ArrayLike<number>[]> {
  const file = readFileSync(path)
  const tiff = await fromArrayBuffer(file.buffer.slice(file.byteOffset, file.byteOffset + file.byteLength) as ArrayBuffer)
  return (await (await tiff.getImage()).readRasters()) as unknown as ArrayLike<number>[]
}
