import { unzlibSync } from 'fflate'
import { lercMask, voidInvalid } from './lercMask.ts'
import { decodeLzw } from './tiffBlocks.ts'

/** Undoes the compression of one strip or tile. `expected` is the size of the decoded bytes. */
export type Codec = (data: ArrayBuffer, expected: number) => Promise<ArrayBuffer> | ArrayBuffer

const OWN: Readonly<Record<number, Codec>> = {
  1: (data) => data,
  5: (data, expected) => decodeLzw(new Uint8Array(data), expected),
  8: inflate,
  32946: inflate,
}
function inflate(data: ArrayBuffer, expected: number): ArrayBuffer {
  const out = new Uint8Array(expected)
  const got = unzlibSync(new Uint8Array(data), { out })
  return got.byteLength === expected ? (got.buffer as ArrayBuffer) : (got.slice().buffer as ArrayBuffer)
}
/** TIFF compression numbers the reader package decodes: PackBits, LERC, Zstandard. */
const PACKAGE = new Set([32773, 34887, 50000])
const NAMES: Readonly<Record<number, string>> = {
  2: 'CCITT',
  3: 'CCITT fax',
  4: 'CCITT fax',
  6: 'JPEG',
  7: 'JPEG',
  34712: 'JPEG 2000',
  34892: 'lossy JPEG',
  34925: 'LZMA',
  50001: 'WebP',
  50002: 'JPEG XL',
}

export const compressionName = (compression: number): string => NAMES[compression] ?? `method ${compression}`
export const isReadable = (compression: number): boolean => compression in OWN || PACKAGE.has(compression)

const LERC = 34887
const ZSTD = 50000
/** What the reader package's decoders and the LERC codec need to know of the file. */
export interface CodecParameters {
  readonly tileWidth: number
  readonly tileHeight: number
  readonly planarConfiguration: number
  readonly bitsPerSample: readonly number[]
  readonly float: boolean
  /** LERC version and the compression around it: 0 none, 1 Deflate, 2 Zstandard. */
  readonly LercParameters?: readonly number[]
}

/** The codec of a compression number. */
export async function codecFor(compression: number, parameters: CodecParameters): Promise<Codec> {
  const own = OWN[compression]
  if (own) return own
  return compression === LERC ? lercCodec(parameters) : packageCodec(compression, parameters)
}

async function packageCodec(compression: number, parameters: CodecParameters): Promise<Codec> {
  const { getDecoder } = await import('geotiff')
  const decoder = await getDecoder(compression, { ...parameters, predictor: 1 } as unknown as Parameters<typeof getDecoder>[1])
  return async (data) => (await decoder.decode(data)) as ArrayBuffer
}

async function lercCodec(parameters: CodecParameters): Promise<Codec> {
  const [version, around] = parameters.LercParameters ?? [4, 0]
  const bare = await packageCodec(LERC, { ...parameters, LercParameters: [version, 0] })
  const unwrap: Codec | null =
    around === 1 ? (data) => unzlibSync(new Uint8Array(data)).slice().buffer : around === 2 ? await packageCodec(ZSTD, parameters) : null
  const perPixel = parameters.planarConfiguration === 2 ? 1 : parameters.bitsPerSample.length
  return async (data, expected) => {
    const blob = unwrap ? await unwrap(data, expected) : data
    const out = await bare(blob, expected)
    const mask = parameters.float ? lercMask(blob) : null
    if (mask) voidInvalid(out, mask, parameters.bitsPerSample[0] / 8, perPixel)
    return out
  }
}
