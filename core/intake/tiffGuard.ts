import { InputError } from '../errors/index.ts'
import type { ByteSource } from './types.ts'

/** One entry of a TIFF directory, not yet read. */
interface Entry {
  readonly tag: number
  readonly count: number
  readonly bytes: number
  /** Where its values begin in the file. */
  readonly at: number
}
/** What the first directory says, checked against the length of the file before anything is allocated. */
export interface Directory {
  readonly littleEndian: boolean
  readonly entries: ReadonlyMap<number, Entry>
  /** Does a later directory hold the transparency mask of the first image? */
  readonly hasMask: boolean
}

const TYPE_BYTES: Readonly<Record<number, number>> = {
  1: 1,
  2: 1,
  3: 2,
  4: 4,
  5: 8,
  6: 1,
  7: 1,
  8: 2,
  9: 4,
  10: 8,
  11: 4,
  12: 8,
  13: 4,
  16: 8,
  17: 8,
  18: 8,
}
const LONGEST_CHAIN = 64
const NEW_SUBFILE_TYPE = 254

const damaged = (file: string, found: string): InputError =>
  new InputError({ code: 'damaged-tiff', file, found, remedy: 'get the file again or rewrite it as a GeoTIFF' })

/**
 * Walks the directories of a TIFF without trusting them: entries must lie inside the file, chains are followed at most 64 long and never in a circle.
 * Throws InputError if this is no TIFF, or it is cut off.
 */
export async function inspectTiff(source: ByteSource): Promise<Directory> {
  const file = source.name
  if (source.size === 0) throw new InputError({ code: 'empty-file', file, found: 'the file is empty', remedy: 'give a GeoTIFF file' })
  const head = new DataView(await source.read(0, Math.min(16, source.size)))
  const order = head.byteLength >= 8 ? head.getUint16(0) : 0
  const littleEndian = order === 0x4949
  const magic = littleEndian || order === 0x4d4d ? head.getUint16(2, littleEndian) : 0
  if ((magic !== 42 && magic !== 43) || (magic === 43 && head.byteLength < 16))
    throw new InputError({
      code: 'not-a-tiff',
      file,
      found: `not a TIFF (starts with "${printable(head)}")`,
      remedy: 'give a GeoTIFF file (.tif)',
    })
  const big = magic === 43
  let offset = big ? Number(head.getBigUint64(8, littleEndian)) : head.getUint32(4, littleEndian)
  let first: Map<number, Entry> | null = null
  let hasMask = false
  const seen = new Set<number>()
  for (let i = 0; i < LONGEST_CHAIN && offset !== 0 && !seen.has(offset); i++) {
    seen.add(offset)
    const directory = await readDirectory(source, offset, littleEndian, big).catch((e: unknown) => {
      if (first) return null
      throw e
    })
    if (!directory) break
    if (!first) first = directory.entries
    else if (await isMask(source, directory.entries.get(NEW_SUBFILE_TYPE), littleEndian)) hasMask = true
    offset = directory.next
  }
  if (!first) throw damaged(file, 'the TIFF has no image directory')
  return { littleEndian, entries: first, hasMask }
}

/** A full-size transparency mask: bit 2 set, bit 0 (reduced resolution) clear. */
async function isMask(source: ByteSource, entry: Entry | undefined, littleEndian: boolean): Promise<boolean> {
  if (!entry || entry.bytes < 4) return false
  const kind = new DataView(await source.read(entry.at, 4)).getUint32(0, littleEndian)
  return (kind & 5) === 4
}

async function readDirectory(
  source: ByteSource,
  offset: number,
  littleEndian: boolean,
  big: boolean,
): Promise<{ entries: Map<number, Entry>; next: number }> {
  const countBytes = big ? 8 : 2
  const entryBytes = big ? 20 : 12
  const pointerBytes = big ? 8 : 4
  const cut = (): InputError =>
    damaged(source.name, `the file is cut off: its directory at byte ${offset} lies beyond the end (${source.size})`)
  if (!(offset >= 8 && offset + countBytes <= source.size)) throw cut()
  const counted = new DataView(await source.read(offset, countBytes))
  const n = big ? Number(counted.getBigUint64(0, littleEndian)) : counted.getUint16(0, littleEndian)
  const bytes = n * entryBytes + pointerBytes
  if (n > 4096 || offset + countBytes + n * entryBytes > source.size) throw cut()
  const start = offset + countBytes
  const view = new DataView(await source.read(start, Math.min(bytes, source.size - start)))
  const entries = new Map<number, Entry>()
  for (let i = 0; i < n; i++) {
    const at = i * entryBytes
    const tag = view.getUint16(at, littleEndian)
    const size = TYPE_BYTES[view.getUint16(at + 2, littleEndian)] ?? 0
    const count = big ? Number(view.getBigUint64(at + 4, littleEndian)) : view.getUint32(at + 4, littleEndian)
    const valueAt = at + (big ? 12 : 8)
    const length = size * count
    const inline = length <= pointerBytes
    const place = inline ? start + valueAt : big ? Number(view.getBigUint64(valueAt, littleEndian)) : view.getUint32(valueAt, littleEndian)
    if (!inline && place + length > source.size)
      throw damaged(source.name, `the file is cut off: tag ${tag} ends at byte ${place + length}, the file at ${source.size}`)
    entries.set(tag, { tag, count, bytes: length, at: place })
  }
  const nextAt = n * entryBytes
  const next =
    view.byteLength >= nextAt + pointerBytes
      ? big
        ? Number(view.getBigUint64(nextAt, littleEndian))
        : view.getUint32(nextAt, littleEndian)
      : 0
  return { entries, next }
}

function printable(head: DataView): string {
  let out = ''
  for (let i = 0; i < Math.min(8, head.byteLength); i++) {
    const c = head.getUint8(i)
    out += c >= 32 && c < 127 ? String.fromCharCode(c) : '.'
  }
  return out
}
