import { describe, expect, it } from 'vitest'
import { InputError, openTerrain, readClasses } from '../../core/index.ts'
import { makeTiff, sourceOf, type TiffPlan } from '../helpers/tiffMaker.ts'

const base: TiffPlan = { width: 40, height: 30, kind: 'i16', at: (c, r) => c + r }
const text = (s: string): Uint8Array => new TextEncoder().encode(s)
const tiff = (way: Partial<TiffPlan>): Uint8Array => makeTiff({ ...base, ...way })
const keys = (...more: [number, number | string][]): [number, number | string][] => [[1025, 1], ...more]

/** Everything is read, so that damage inside the pixels shows too. */
async function readAll(bytes: Uint8Array, stated: object): Promise<void> {
  const head = await openTerrain(sourceOf(bytes, 'dem.tif'), stated)
  await head.readInto({ shape: head.shape, samples: new Float32Array(head.shape.width * head.shape.height).fill(Number.NaN) })
}
async function complaint(work: Promise<unknown>): Promise<InputError> {
  const e = await work.then(
    () => null,
    (e: unknown) => e,
  )
  expect(e).toBeInstanceOf(InputError)
  return e as InputError
}

const BAD: [string, Uint8Array, string, object?][] = [
  ['empty file', new Uint8Array(0), 'empty-file'],
  ['three bytes', text('II*'), 'not-a-tiff'],
  ['a web page', text('<!DOCTYPE html><html></html>'), 'not-a-tiff'],
  ['header only', tiff({}).slice(0, 8), 'damaged-tiff'],
  ['cut off in the pixels', cutPixels(), 'truncated'],
  ['cut off in the directory', tiff({}).slice(0, -40), 'damaged-tiff'],
  ['2 147 483 647 pixels square', tiff({ overrule: { 256: [2147483647], 257: [2147483647] } }), 'too-large'],
  ['no pixels', tiff({ overrule: { 256: [0] } }), 'damaged-tiff'],
  ['tiles of no size', tiff({ tile: 16, overrule: { 322: [0] } }), 'damaged-tiff'],
  ['more tiles declared than listed', tiff({ tile: 16, overrule: { 256: [900] } }), 'damaged-tiff'],
  ['one strip of 700 MB', tiff({ overrule: { 256: [30000], 257: [12000], 278: [12000] } }), 'block-size'],
  ['LZMA', tiff({ overrule: { 259: [34925] } }), 'compression'],
  ['12-bit samples', tiff({ overrule: { 258: [12] } }), 'sample-type'],
  ['complex samples', tiff({ kind: 'f64', overrule: { 339: [6] } }), 'sample-type'],
  ['no CRS', tiff({ geoKeys: null }), 'no-crs'],
  ['keys without a CRS', tiff({ geoKeys: keys([1024, 1]) }), 'no-crs'],
  ['geocentric', tiff({ geoKeys: keys([1024, 3], [2048, 4978]) }), 'crs-geocentric'],
  ['no georeference', tiff({ pixelScale: null, tiePoint: null }), 'no-georeference'],
  ['ground control points', tiff({ pixelScale: null, tiePoint: [0, 0, 0, 10, 50, 0, 9, 9, 0, 10.1, 49.9, 0] }), 'no-georeference'],
  ['pixel size zero', tiff({ pixelScale: [0, 0, 0] }), 'no-georeference'],
  ['metres taken for degrees', tiff({ pixelScale: [30, 30, 0], tiePoint: [0, 0, 0, 500000, 5400000, 0] }), 'crs-does-not-fit'],
  ['stated CRS unknown', tiff({ geoKeys: null }), 'crs-unknown', { crs: 'EPSG:99999' }],
  ['stated CRS is no CRS', tiff({ geoKeys: null }), 'crs-unknown', { crs: 'somewhere' }],
  ['a datum without a known shift (NAD27)', tiff({ geoKeys: keys([1024, 2], [2048, 4267]) }), 'crs-datum'],
  ['heights above the ellipsoid, by the file', tiff({ geoKeys: keys([1024, 2], [2048, 4979]) }), 'ellipsoidal-heights'],
  ['heights above the ellipsoid, by the study', tiff({}), 'ellipsoidal-heights', { heights: 'ellipsoidal' }],
  ['depths', tiff({ geoKeys: keys([1024, 2], [2048, 4326], [4096, 5715]) }), 'depths'],
  ['unknown height unit', tiff({ gdalMetadata: '<Item name="UNITTYPE" sample="0">fathom</Item>' }), 'height-unit'],
  ['heights coded as colours', tiff({ kind: 'u8', bands: 3, photometric: 2 }), 'not-heights'],
  ['a colour table', tiff({ kind: 'u8', photometric: 3 }), 'not-heights'],
  ['all no data', tiff({ nodata: '-32768', at: () => -32768 }), 'all-void'],
  ['Deflate data that are none', damagedPixels(8), 'damaged-tiff'],
  ['LZW data that are none', damagedPixels(5), 'damaged-tiff'],
]
/** Directory first in the reading order, pixels listed beyond the end of the file. */
function cutPixels(): Uint8Array {
  return tiff({ overrule: { 273: [100_000] } })
}
function damagedPixels(compression: 5 | 8): Uint8Array {
  const bytes = tiff({ compression })
  bytes.fill(0xee, 8, 60)
  return bytes
}

describe('refused with one sentence', () => {
  it.each(BAD)('%s', async (_, bytes, code, stated = {}) => {
    const e = await complaint(readAll(bytes, stated))
    expect(e.code).toBe(code)
    expect(e.message.length).toBeLessThanOrEqual(240)
    expect(e.message).toMatch(/^dem\.tif(, [^:]+)?: .+; .+\.$/)
    expect(e.message).not.toMatch(/\n|undefined|NaN|\[object/)
  })
  it('no CRS names the key that cures it', async () => {
    const e = await complaint(openTerrain(sourceOf(tiff({ geoKeys: null })), { place: 'terrain[2]' }))
    expect(e.place).toBe('terrain[2].crs')
    expect(e.remedy).toContain('terrain[2].crs')
  })
  it('directories in a circle do not hang, the raster is read', async () => {
    const bytes = tiff({})
    const view = new DataView(bytes.buffer)
    const ifd = view.getUint32(4, true)
    view.setUint32(ifd + 2 + view.getUint16(ifd, true) * 12, ifd, true)
    const head = await openTerrain(sourceOf(bytes), {})
    expect(head.shape.width).toBe(40)
  })
  it('a class raster of floats or colours', async () => {
    expect((await complaint(readClasses(sourceOf(tiff({ kind: 'f32' }))))).code).toBe('not-classes')
    expect((await complaint(readClasses(sourceOf(tiff({ kind: 'u8', bands: 3 }))))).code).toBe('not-classes')
  })
})
