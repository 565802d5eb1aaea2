import { InputError } from '../errors/index.ts'
import { type CachedSource, cachedSource } from './cachedSource.ts'
import { type Samples, samplesOf } from './tiffBlocks.ts'
import { type Codec, codecFor, compressionName, isReadable } from './tiffCodecs.ts'
import { inspectTiff } from './tiffGuard.ts'
import type { ByteSource } from './types.ts'

/** Larger than this no raster is opened: 1.5 thousand million pixels. */
const MOST_PIXELS = 1.5e9
/** Largest decoded strip or tile, bytes. */
const MOST_BLOCK_BYTES = 640e6

/** First image of a TIFF, band 1, read strip by strip or tile by tile. */
export interface TiffImage {
  readonly file: string
  readonly width: number
  readonly height: number
  readonly blockWidth: number
  readonly blockHeight: number
  readonly bands: number
  readonly sampleType: string
  readonly compression: string
  /** Band 2 is transparency: 0 there means no data. */
  readonly alphaBand: number | null
  readonly photometric: number
  readonly hasMask: boolean
  readonly tags: TiffTags
  /** Samples of one block with all interleaved bands, `stride` per pixel; null where the block was never written (no data). */
  block(col: number, row: number, band?: number): Promise<{ samples: Samples; stride: number } | null>
}
/** The tags that place the raster and say what its numbers are. */
export interface TiffTags {
  readonly pixelScale: readonly number[] | null
  readonly tiePoints: readonly number[] | null
  readonly transformation: readonly number[] | null
  readonly geoKeys: Readonly<Record<string, unknown>> | null
  readonly gdalMetadata: string
  readonly gdalNoData: string
}

const fault = (code: string, file: string, found: string, remedy: string): InputError => new InputError({ code, file, found, remedy })

/** Opens the first image. Throws InputError for what is no TIFF, cut off, of absurd size, or stored in a way that is not read. */
export async function openTiff(source: ByteSource): Promise<TiffImage> {
  const guard = await inspectTiff(source)
  const cached = cachedSource(source)
  const { GeoTIFF } = await import('geotiff')
  try {
    const tiff = await GeoTIFF.fromSource(cached as unknown as Parameters<typeof GeoTIFF.fromSource>[0])
    const image = await tiff.getImage(0)
    return await imageOf(source, cached, image.fileDirectory as unknown as Fields, guard)
  } catch (e) {
    if (e instanceof InputError) throw e
    throw fault('damaged-tiff', source.name, `the TIFF cannot be read (${plain(e)})`, 'rewrite it as a plain GeoTIFF')
  }
}
export const plain = (e: unknown): string => (e instanceof Error ? e.message : String(e)).replace(/\s+/g, ' ').slice(0, 80)

interface Fields {
  loadValue(tag: string | number): Promise<unknown>
  hasTag(tag: string | number): boolean
  parseGeoKeyDirectory(): Record<string, unknown> | null
}
const numbers = (v: unknown): number[] | null =>
  typeof v === 'number' ? [v] : v && typeof v === 'object' && 'length' in v ? Array.from(v as ArrayLike<number | bigint>, Number) : null
const text = (v: unknown): string => (typeof v === 'string' ? v.replace(/\0+$/, '') : '')

async function imageOf(
  source: ByteSource,
  cached: CachedSource,
  fields: Fields,
  guard: { littleEndian: boolean; hasMask: boolean },
): Promise<TiffImage> {
  const file = source.name
  const one = async (tag: string, otherwise: number): Promise<number> => numbers(await fields.loadValue(tag))?.[0] ?? otherwise
  const width = await one('ImageWidth', 0)
  const height = await one('ImageLength', 0)
  if (!(width > 0 && height > 0))
    throw fault('damaged-tiff', file, `the raster is ${width} × ${height} pixels`, 'give a raster that holds pixels')
  if (width * height > MOST_PIXELS)
    throw fault(
      'too-large',
      file,
      `the raster declares ${width} × ${height} pixels, more than 1 500 million`,
      'cut it to the area of interest',
    )
  const bands = await one('SamplesPerPixel', 1)
  const bits = numbers(await fields.loadValue('BitsPerSample')) ?? [1]
  const format = numbers(await fields.loadValue('SampleFormat'))?.[0] ?? 1
  const bytesPerSample = bits[0] / 8
  const readableType = format === 3 ? bits[0] === 32 || bits[0] === 64 : (format === 1 || format === 2) && [8, 16, 32].includes(bits[0])
  if (!readableType || bits.some((b) => b !== bits[0]))
    throw fault('sample-type', file, `samples of ${bits[0]} bits (format ${format}) are not read`, 'convert to Int16 or Float32')
  const compression = await one('Compression', 1)
  if (!isReadable(compression))
    throw fault(
      'compression',
      file,
      `compression ${compressionName(compression)} is not read`,
      'rewrite with Deflate, LZW, ZSTD, LERC or none',
    )
  const planar = await one('PlanarConfiguration', 1)
  const tiled = fields.hasTag('TileOffsets')
  const blockWidth = tiled ? await one('TileWidth', 0) : width
  const blockHeight = tiled ? await one('TileLength', 0) : Math.min(height, await one('RowsPerStrip', height))
  if (!(blockWidth > 0 && blockHeight > 0))
    throw fault('damaged-tiff', file, 'tiles or strips have no size', 'rewrite it as a plain GeoTIFF')
  const across = Math.ceil(width / blockWidth)
  const perBand = across * Math.ceil(height / blockHeight)
  const offsets = numbers(await fields.loadValue(tiled ? 'TileOffsets' : 'StripOffsets')) ?? []
  const counts = numbers(await fields.loadValue(tiled ? 'TileByteCounts' : 'StripByteCounts')) ?? []
  const wanted = planar === 2 ? perBand * bands : perBand
  if (offsets.length < wanted || counts.length < wanted)
    throw fault(
      'damaged-tiff',
      file,
      `${wanted} tiles or strips are declared, ${Math.min(offsets.length, counts.length)} listed`,
      'get the file again',
    )
  const end = offsets.reduce((far, at, i) => (i < wanted && counts[i] > 0 ? Math.max(far, at + counts[i]) : far), 0)
  if (end > source.size)
    throw fault(
      'truncated',
      file,
      `the file is cut off: pixels reach to byte ${end}, the file ends at ${source.size}`,
      'get the file again',
    )
  const stride = planar === 2 ? 1 : bands
  const blockBytes = blockWidth * blockHeight * stride * bytesPerSample
  if (blockBytes > MOST_BLOCK_BYTES)
    throw fault(
      'block-size',
      file,
      `one strip or tile holds ${Math.round(blockBytes / 1e6)} MB`,
      'rewrite the raster in tiles of 256 or 512 pixels',
    )
  const extra = numbers(await fields.loadValue('ExtraSamples')) ?? []
  const alphaAt = extra.findIndex((kind) => kind === 1 || kind === 2)
  let geoKeys: Record<string, unknown> | null = null
  try {
    geoKeys = fields.parseGeoKeyDirectory()
  } catch {
    throw fault('damaged-tiff', file, 'its georeference keys are damaged', 'state terrain[0].crs or rewrite the file')
  }
  const layout = {
    width: blockWidth,
    stride,
    bytesPerSample,
    format: format as 1 | 2 | 3,
    predictor: await one('Predictor', 1),
    littleEndian: guard.littleEndian,
  }
  let codec: Codec | null = null
  const parameters = {
    tileWidth: blockWidth,
    tileHeight: blockHeight,
    planarConfiguration: planar,
    bitsPerSample: bits,
    float: format === 3,
    LercParameters: numbers(await fields.loadValue('LercParameters')) ?? undefined,
  }
  return {
    file,
    width,
    height,
    blockWidth,
    blockHeight,
    bands,
    sampleType: `${format === 1 ? 'UInt' : format === 2 ? 'Int' : 'Float'}${bits[0]}`,
    compression: compression === 1 ? 'no compression' : compressionName(compression),
    alphaBand: alphaAt >= 0 ? bands - extra.length + alphaAt : null,
    photometric: await one('PhotometricInterpretation', 1),
    hasMask: guard.hasMask,
    tags: {
      pixelScale: numbers(await fields.loadValue('ModelPixelScale')),
      tiePoints: numbers(await fields.loadValue('ModelTiepoint')),
      transformation: numbers(await fields.loadValue('ModelTransformation')),
      geoKeys,
      gdalMetadata: text(await fields.loadValue('GDAL_METADATA')),
      gdalNoData: text(await fields.loadValue('GDAL_NODATA')),
    },
    async block(col, row, band = 0) {
      const i = row * across + col + (planar === 2 ? band * perBand : 0)
      if (!(counts[i] > 0)) return null
      const rows = tiled ? blockHeight : Math.min(blockHeight, height - row * blockHeight)
      const expected = blockWidth * rows * stride * bytesPerSample
      try {
        codec ??= await codecFor(compression, parameters)
        const bytes = await codec(await cached.bytes(offsets[i], counts[i]), expected)
        if (bytes.byteLength < expected) throw new Error(`${bytes.byteLength} of ${expected} bytes`)
        return { samples: samplesOf(bytes, layout), stride }
      } catch (e) {
        if (e instanceof InputError) throw e
        throw new InputError({
          code: 'damaged-tiff',
          file,
          place: `pixel ${col * blockWidth}, ${row * blockHeight}`,
          found: `${tiled ? 'tile' : 'strip'} cannot be decoded (${plain(e)})`,
          remedy: 'get the file again',
        })
      }
    },
  }
}
