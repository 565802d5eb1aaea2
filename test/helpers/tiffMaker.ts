// A tiny TIFF encoder for tests: every way of storing that intake claims to read, without leaning on the code under test.
import { deflateSync } from 'node:zlib'
import type { ByteSource } from '../../core/index.ts'

type Numbers = readonly number[]
type Kind = 'u8' | 'i16' | 'u16' | 'i32' | 'f32' | 'f64'
const BYTES: Record<Kind, number> = { u8: 1, i16: 2, u16: 2, i32: 4, f32: 4, f64: 8 }
const FORMAT: Record<Kind, number> = { u8: 1, i16: 2, u16: 1, i32: 2, f32: 3, f64: 3 }

export interface TiffPlan {
  width: number
  height: number
  kind: Kind
  /** Sample of band 1 (and further bands) at a pixel. */
  at(col: number, row: number, band: number): number
  bands?: number
  bigEndian?: boolean
  bigTiff?: boolean
  tile?: number
  rowsPerStrip?: number
  planar?: 1 | 2
  /** 1 none, 5 LZW, 8 Deflate. */
  compression?: 1 | 5 | 8
  predictor?: 1 | 2 | 3
  /** Blocks left unwritten, by number. */
  sparse?: Numbers
  pixelScale?: Numbers | null
  tiePoint?: Numbers | null
  transformation?: Numbers
  /** Key number and value, short or text. */
  geoKeys?: readonly (readonly [number, number | string])[] | null
  nodata?: string
  gdalMetadata?: string
  photometric?: number
  extraSamples?: Numbers
  /** Changes tags at the end: for broken files. */
  overrule?: Record<number, Numbers>
}

const WGS84_KEYS = [
  [1024, 2],
  [1025, 1],
  [2048, 4326],
] as const

export function makeTiff(plan: TiffPlan): Uint8Array<ArrayBuffer> {
  const { width, height, kind, bands = 1, planar = 1, compression = 1, predictor = 1, bigTiff = false } = plan
  const little = !plan.bigEndian
  const size = BYTES[kind]
  const blockW = plan.tile ?? width
  const blockH = plan.tile ?? plan.rowsPerStrip ?? height
  const stride = planar === 2 ? 1 : bands
  const blocks: Uint8Array[] = []
  for (let band = 0; band < (planar === 2 ? bands : 1); band++)
    for (let top = 0; top < height; top += blockH)
      for (let left = 0; left < width; left += blockW) {
        const rows = plan.tile ? blockH : Math.min(blockH, height - top)
        const v: number[] = []
        for (let r = 0; r < rows; r++)
          for (let c = 0; c < blockW; c++)
            for (let b = 0; b < stride; b++)
              v.push(plan.at(Math.min(left + c, width - 1), Math.min(top + r, height - 1), planar === 2 ? band : b))
        const raw = encodeBlock(v, blockW * stride, stride, kind, predictor, little)
        blocks.push(plan.sparse?.includes(blocks.length) ? new Uint8Array(0) : compress(raw, compression))
      }
  const tags = new Map<number, { type: number; values: Numbers | string }>()
  const short = (tag: number, ...values: number[]) => tags.set(tag, { type: 3, values })
  const long = (tag: number, ...values: number[]) => tags.set(tag, { type: bigTiff ? 16 : 4, values })
  long(256, width)
  long(257, height)
  short(258, ...Array(bands).fill(size * 8))
  short(259, compression)
  short(262, plan.photometric ?? 1)
  short(277, bands)
  short(284, planar)
  if (predictor > 1) short(317, predictor)
  if (plan.extraSamples) short(338, ...plan.extraSamples)
  short(339, ...Array(bands).fill(FORMAT[kind]))
  if (plan.tile) {
    short(322, blockW)
    short(323, blockH)
  } else long(278, blockH)
  const head = bigTiff ? 16 : 8
  let at = head
  long(plan.tile ? 324 : 273, ...blocks.map((b) => (b.length ? (at += b.length) - b.length : 0)))
  long(plan.tile ? 325 : 279, ...blocks.map((b) => b.length))
  const doubles = (tag: number, values: Numbers | null | undefined) => values && tags.set(tag, { type: 12, values })
  doubles(33550, plan.transformation ? null : plan.pixelScale === undefined ? [0.001, 0.001, 0] : plan.pixelScale)
  doubles(33922, plan.transformation ? null : plan.tiePoint === undefined ? [0, 0, 0, 10, 50, 0] : plan.tiePoint)
  doubles(34264, plan.transformation)
  const keys = plan.geoKeys === undefined ? WGS84_KEYS : plan.geoKeys
  if (keys) {
    const texts = keys.filter((k) => typeof k[1] === 'string').map((k) => `${k[1]}|`)
    let offset = 0
    const directory = keys.flatMap(([id, value]) => {
      if (typeof value === 'number') return [id, 0, 1, value]
      const entry = [id, 34737, value.length + 1, offset]
      offset += value.length + 1
      return entry
    })
    short(34735, 1, 1, 0, keys.length, ...directory)
    if (texts.length) tags.set(34737, { type: 2, values: texts.join('') })
  }
  if (plan.gdalMetadata) tags.set(42112, { type: 2, values: plan.gdalMetadata })
  if (plan.nodata) tags.set(42113, { type: 2, values: plan.nodata })
  for (const [tag, values] of Object.entries(plan.overrule ?? {})) tags.set(+tag, { type: tags.get(+tag)?.type ?? 4, values })
  return assemble(blocks, tags, little, bigTiff, at)
}

function encodeBlock(v: number[], rowSamples: number, stride: number, kind: Kind, predictor: number, little: boolean): Uint8Array {
  const size = BYTES[kind]
  const put = (view: DataView, at: number, x: number, le: boolean): void => {
    if (kind === 'f32') view.setFloat32(at, x, le)
    else if (kind === 'f64') view.setFloat64(at, x, le)
    else if (size === 1) view.setUint8(at, x)
    else if (size === 2) view.setUint16(at, x, le)
    else view.setUint32(at, x, le)
  }
  const out = new Uint8Array(v.length * size)
  const view = new DataView(out.buffer)
  const differenced = predictor === 2 ? v.map((x, i) => (i % rowSamples < stride ? x : x - v[i - stride])) : v
  if (predictor < 3) {
    for (const [i, x] of differenced.entries()) put(view, i * size, x, little)
    return out
  }
  // floating-point predictor: byte planes of the big-endian samples, most significant first, then byte differences
  for (let row = 0; row < v.length; row += rowSamples) {
    const rowBytes = rowSamples * size
    const plain = new DataView(new ArrayBuffer(rowBytes))
    for (let i = 0; i < rowSamples; i++) put(plain, i * size, v[row + i], false)
    const planes = new Uint8Array(rowBytes)
    for (let i = 0; i < rowSamples; i++) for (let p = 0; p < size; p++) planes[p * rowSamples + i] = plain.getUint8(i * size + p)
    for (let i = 0; i < rowBytes; i++) out[row * size + i] = i < stride ? planes[i] : planes[i] - planes[i - stride]
  }
  return out
}

function compress(raw: Uint8Array, compression: number): Uint8Array {
  if (compression === 8) return deflateSync(raw)
  return compression === 5 ? lzw(raw) : raw
}
/** LZW with a table (TIFF 6.0, section 13). */
function lzw(data: Uint8Array): Uint8Array {
  const out: number[] = []
  let bits = 9
  let buffer = 0
  let held = 0
  const emit = (code: number): void => {
    buffer = (buffer << bits) | code
    held += bits
    while (held >= 8) out.push((buffer >> (held -= 8)) & 255)
    buffer &= (1 << held) - 1
  }
  let table = new Map<string, number>()
  let next = 258
  emit(256)
  let run = ''
  const codeOf = (s: string): number => (s.length === 1 ? s.charCodeAt(0) : table.get(s)!)
  for (const byte of data) {
    const c = String.fromCharCode(byte)
    if (run === '' || table.has(run + c)) {
      run += c
      continue
    }
    emit(codeOf(run))
    table.set(run + c, next++)
    run = c
    if (next === 4095) {
      emit(256)
      table = new Map()
      next = 258
      bits = 9
    } else if (next === 1 << bits) bits++
  }
  emit(codeOf(run))
  if (next + 1 === 1 << bits) bits++
  emit(257)
  if (held > 0) out.push((buffer << (8 - held)) & 255)
  return Uint8Array.from(out)
}

function assemble(
  blocks: Uint8Array[],
  tags: Map<number, { type: number; values: Numbers | string }>,
  le: boolean,
  big: boolean,
  afterBlocks: number,
): Uint8Array<ArrayBuffer> {
  const TYPE_BYTES: Record<number, number> = { 2: 1, 3: 2, 4: 4, 12: 8, 16: 8 }
  const entries = [...tags].sort((a, b) => a[0] - b[0])
  const pointer = big ? 8 : 4
  const entryBytes = big ? 20 : 12
  const ifd = afterBlocks + (afterBlocks % 2)
  let spill = ifd + (big ? 8 : 2) + entries.length * entryBytes + pointer
  const lengthOf = (e: { type: number; values: Numbers | string }): number =>
    TYPE_BYTES[e.type] * (typeof e.values === 'string' ? e.values.length + 1 : e.values.length)
  const total = spill + entries.reduce((sum, [, e]) => sum + (lengthOf(e) > pointer ? lengthOf(e) + 8 : 0), 0)
  const out = new Uint8Array(total)
  const view = new DataView(out.buffer)
  view.setUint16(0, le ? 0x4949 : 0x4d4d)
  view.setUint16(2, big ? 43 : 42, le)
  if (big) {
    view.setUint16(4, 8, le)
    view.setBigUint64(8, BigInt(ifd), le)
    view.setBigUint64(ifd, BigInt(entries.length), le)
  } else {
    view.setUint32(4, ifd, le)
    view.setUint16(ifd, entries.length, le)
  }
  let at = big ? 16 : 8
  for (const b of blocks) {
    out.set(b, at)
    at += b.length
  }
  entries.forEach(([tag, e], i) => {
    const place = ifd + (big ? 8 : 2) + i * entryBytes
    const count = typeof e.values === 'string' ? e.values.length + 1 : e.values.length
    view.setUint16(place, tag, le)
    view.setUint16(place + 2, e.type, le)
    if (big) view.setBigUint64(place + 4, BigInt(count), le)
    else view.setUint32(place + 4, count, le)
    let to = place + (big ? 12 : 8)
    if (lengthOf(e) > pointer) {
      if (big) view.setBigUint64(to, BigInt(spill), le)
      else view.setUint32(to, spill, le)
      to = spill
      spill += lengthOf(e) + (lengthOf(e) % 2)
    }
    const values = typeof e.values === 'string' ? [...e.values].map((c) => c.charCodeAt(0)) : e.values
    values.forEach((v, n) => {
      if (e.type === 2) view.setUint8(to + n, v)
      else if (e.type === 3) view.setUint16(to + 2 * n, v, le)
      else if (e.type === 4) view.setUint32(to + 4 * n, v, le)
      else if (e.type === 12) view.setFloat64(to + 8 * n, v, le)
      else view.setBigUint64(to + 8 * n, BigInt(v), le)
    })
  })
  return out
}

/** Bytes in memory as a ByteSource; counts what is read. */
export function sourceOf(bytes: Uint8Array, name = 'made.tif'): ByteSource & { reads: number } {
  return {
    name,
    size: bytes.length,
    reads: 0,
    async read(offset, length) {
      this.reads++
      return bytes.slice(offset, offset + length).buffer as ArrayBuffer
    },
  }
}
