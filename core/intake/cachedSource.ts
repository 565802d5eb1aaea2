import { InputError } from '../errors/index.ts'
import type { ByteSource } from './types.ts'

const BLOCK = 1 << 20
const HELD_BLOCKS = 24

/** Reads of a file through a small cache of 1 MiB blocks, so that thousands of short strips do not become thousands of reads. */
export interface CachedSource {
  bytes(offset: number, length: number): Promise<ArrayBuffer>
  /** The interface the TIFF reader asks for. */
  fetch(slices: readonly { offset: number; length: number }[]): Promise<ArrayBuffer[]>
}

/** A ByteSource with read-ahead. A read that begins beyond the end gives an InputError; one that runs past it is cut short. */
export function cachedSource(source: ByteSource): CachedSource {
  const blocks = new Map<number, Promise<ArrayBuffer>>()
  const block = (index: number): Promise<ArrayBuffer> => {
    let held = blocks.get(index)
    if (held) blocks.delete(index)
    else {
      held = source.read(index * BLOCK, Math.min(BLOCK, source.size - index * BLOCK))
      if (blocks.size >= HELD_BLOCKS) blocks.delete(blocks.keys().next().value as number)
    }
    blocks.set(index, held)
    return held
  }
  const bytes = async (offset: number, length: number): Promise<ArrayBuffer> => {
    if (!(offset >= 0 && offset < source.size) || !(length >= 0))
      throw new InputError({
        code: 'damaged-tiff',
        file: source.name,
        found: `the file is cut off: byte ${offset} is needed, it ends at ${source.size}`,
        remedy: 'get the file again',
      })
    const end = Math.min(offset + length, source.size)
    const first = Math.floor(offset / BLOCK)
    const last = Math.floor((end - 1) / BLOCK)
    if (last - first > 3) return source.read(offset, end - offset)
    if (first === last) return (await block(first)).slice(offset - first * BLOCK, end - first * BLOCK)
    const out = new Uint8Array(end - offset)
    for (let i = first; i <= last; i++) {
      const from = Math.max(offset, i * BLOCK)
      const part = new Uint8Array(await block(i), from - i * BLOCK, Math.min(end, (i + 1) * BLOCK) - from)
      out.set(part, from - offset)
    }
    return out.buffer
  }
  return { bytes, fetch: (slices) => Promise.all(slices.map((s) => bytes(s.offset, s.length))) }
}
