import { unzlibSync } from 'fflate'
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

/** The codec of a compression number; `parameters` is what the reader package's decoders ask for. */
export async function codecFor(compression: number, parameters: Record<string, unknown>): Promise<Codec> {
  const own = OWN[compression]
  if (own) return own
  const { getDecoder } = await import('geotiff')
  const decoder = await getDecoder(compression, { ...parameters, predictor: 1 } as unknown as Parameters<typeof getDecoder>[1])
  return async (data) => (await decoder.decode(data)) as ArrayBuffer
}
