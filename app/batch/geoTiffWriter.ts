import { promisify } from 'node:util'
import { deflate } from 'node:zlib'
import type { GridShape } from '../../core/index.ts'
import { geoKeysOf } from './rasters/geoKeys.ts'

const squeeze = promisify(deflate)

/** A single-band raster to be written. */
export interface GeoTiffLayer {
  readonly shape: GridShape
  /** row * width + col. Bytes, or floats with NaN for no data. */
  readonly samples: Float32Array | Uint8Array
  /** What stands for no data: NaN for floats, a byte value, or null for none. */
  readonly nodata: number | null
  /** Name of the band: 'coverage floor'. */
  readonly description: string
  /** Unit of the values, '' for none. */
  readonly unit: string
  /** Further metadata by name: vertical datum, study, option. Names are letters, digits and _. */
  readonly metadata?: Readonly<Record<string, string>>
}

const STRIP_BYTES = 1 << 18
const TYPE = { byte: 1, ascii: 2, short: 3, long: 4, double: 12 } as const
const SIZE: Readonly<Record<number, number>> = { 1: 1, 2: 1, 3: 2, 4: 4, 12: 8 }
interface Tag {
  readonly tag: number
  readonly type: number
  readonly values: readonly number[] | string
}

const escapeXml = (text: string): string =>
  text.replace(/[&<>"]/g, (c) => ({ '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' })[c] ?? c)

/** Values of named items are escaped twice: that is how the readers of this tag take them. */
function metadataXml(layer: GeoTiffLayer): string {
  const items = [`<Item name="DESCRIPTION" sample="0" role="description">${escapeXml(layer.description)}</Item>`]
  if (layer.unit !== '') items.push(`<Item name="UNITTYPE" sample="0" role="unittype">${escapeXml(layer.unit)}</Item>`)
  for (const [name, value] of Object.entries(layer.metadata ?? {})) items.push(`<Item name="${name}">${escapeXml(escapeXml(value))}</Item>`)
  return `<GDALMetadata>\n  ${items.join('\n  ')}\n</GDALMetadata>`
}

/** Bytes of rows [from, to): as they are, or for floats split into byte planes and differenced (TIFF predictor 3). */
function stripBytes(samples: Float32Array | Uint8Array, width: number, from: number, to: number): Uint8Array {
  if (samples instanceof Uint8Array) return samples.subarray(from * width, to * width)
  const out = new Uint8Array((to - from) * width * 4)
  const bytes = new Uint8Array(samples.buffer, samples.byteOffset + from * width * 4, out.length)
  for (let row = 0; row < to - from; row++) {
    const at = row * width * 4
    for (let i = 0; i < width; i++)
      for (let plane = 0; plane < 4; plane++) out[at + plane * width + i] = bytes[at + i * 4 + 3 - plane] as number
    for (let i = width * 4 - 1; i > 0; i--) out[at + i] = (out[at + i] as number) - (out[at + i - 1] as number)
  }
  return out
}

function placeTags(shape: GridShape): Tag[] {
  const { x0, y0, colX, colY, rowX, rowY } = shape
  const left = x0 - (colX + rowX) / 2
  const top = y0 - (colY + rowY) / 2
  if (colY === 0 && rowX === 0 && colX > 0 && rowY < 0)
    return [
      { tag: 33550, type: TYPE.double, values: [colX, -rowY, 0] },
      { tag: 33922, type: TYPE.double, values: [0, 0, 0, left, top, 0] },
    ]
  return [{ tag: 34264, type: TYPE.double, values: [colX, rowX, 0, left, colY, rowY, 0, top, 0, 0, 0, 0, 0, 0, 0, 1] }]
}

/**
 * A Deflate-compressed, stripped GeoTIFF (little-endian, pixel is area) of one band, Byte or Float32.
 * CRS by EPSG code, else by user-defined keys; unit, description and metadata in the form GDAL reads (TIFF tags 42112 and 42113).
 * Source: TIFF 6.0, Adobe technical notes on Deflate and the floating-point predictor, OGC GeoTIFF 1.1.
 */
export async function encodeGeoTiff(layer: GeoTiffLayer): Promise<Uint8Array> {
  const { shape, samples } = layer
  const { width, height } = shape
  if (samples.length !== width * height) throw new Error(`${samples.length} samples for ${width} x ${height} cells`)
  const isFloat = samples instanceof Float32Array
  const rows = Math.max(1, Math.floor(STRIP_BYTES / (width * (isFloat ? 4 : 1))))
  const count = Math.ceil(height / rows)
  const strips: Uint8Array[] = []
  for (let first = 0; first < count; first += 8)
    strips.push(
      ...(await Promise.all(
        Array.from({ length: Math.min(8, count - first) }, (_, n) =>
          squeeze(stripBytes(samples, width, (first + n) * rows, Math.min(height, (first + n + 1) * rows)), { level: 4 }),
        ),
      )),
    )
  const geo = geoKeysOf(shape.crs)
  const tags: Tag[] = [
    { tag: 256, type: TYPE.long, values: [width] },
    { tag: 257, type: TYPE.long, values: [height] },
    { tag: 258, type: TYPE.short, values: [isFloat ? 32 : 8] },
    { tag: 259, type: TYPE.short, values: [8] },
    { tag: 262, type: TYPE.short, values: [1] },
    { tag: 273, type: TYPE.long, values: strips.map(() => 0) },
    { tag: 277, type: TYPE.short, values: [1] },
    { tag: 278, type: TYPE.long, values: [rows] },
    { tag: 279, type: TYPE.long, values: strips.map((s) => s.length) },
    { tag: 284, type: TYPE.short, values: [1] },
    { tag: 317, type: TYPE.short, values: [isFloat ? 3 : 1] },
    { tag: 339, type: TYPE.short, values: [isFloat ? 3 : 1] },
    ...placeTags(shape),
    { tag: 34735, type: TYPE.short, values: geo.directory },
    ...(geo.doubles.length > 0 ? [{ tag: 34736, type: TYPE.double, values: geo.doubles }] : []),
    { tag: 34737, type: TYPE.ascii, values: geo.ascii },
    { tag: 42112, type: TYPE.ascii, values: metadataXml(layer) },
    ...(layer.nodata === null ? [] : [{ tag: 42113, type: TYPE.ascii, values: Number.isNaN(layer.nodata) ? 'nan' : String(layer.nodata) }]),
  ]
  return assemble(tags, strips)
}

/** Header, one directory, the values that do not fit in it, then the strips. */
function assemble(tags: readonly Tag[], strips: readonly Uint8Array[]): Uint8Array {
  const encoded = tags.map((t) => ({ ...t, bytes: tagBytes(t) }))
  let at = 8 + 2 + 12 * tags.length + 4
  const places = encoded.map(({ bytes }) => {
    if (bytes.length <= 4) return 0
    const place = at
    at += bytes.length + (bytes.length & 1)
    return place
  })
  const offsets = strips.map((s) => {
    const place = at
    at += s.length + (s.length & 1)
    return place
  })
  if (at > 0xffff_ffff) throw new Error('raster over 4 GB')
  const out = new Uint8Array(at)
  const view = new DataView(out.buffer)
  out.set([0x49, 0x49, 42, 0, 8, 0, 0, 0])
  view.setUint16(8, tags.length, true)
  encoded.forEach((t, i) => {
    const bytes = t.tag === 273 ? tagBytes({ ...t, values: offsets }) : t.bytes
    const entry = 10 + 12 * i
    view.setUint16(entry, t.tag, true)
    view.setUint16(entry + 2, t.type, true)
    view.setUint32(entry + 4, bytes.length / (SIZE[t.type] as number), true)
    const place = places[i] as number
    if (place > 0) view.setUint32(entry + 8, place, true)
    out.set(bytes, place > 0 ? place : entry + 8)
  })
  strips.forEach((s, i) => {
    out.set(s, offsets[i])
  })
  return out
}

function tagBytes(t: Tag): Uint8Array {
  if (typeof t.values === 'string') return new TextEncoder().encode(`${t.values}\0`)
  const out = new Uint8Array(t.values.length * (SIZE[t.type] as number))
  const view = new DataView(out.buffer)
  t.values.forEach((v, i) => {
    if (t.type === TYPE.short) view.setUint16(i * 2, v, true)
    else if (t.type === TYPE.long) view.setUint32(i * 4, v, true)
    else view.setFloat64(i * 8, v, true)
  })
  return out
}
