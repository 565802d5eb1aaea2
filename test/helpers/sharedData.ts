import { existsSync } from 'node:fs'
import { open, stat } from 'node:fs/promises'
import { basename, resolve } from 'node:path'
import type { ByteSource } from '../../core/index.ts'

/** Real rasters live beside the checkout and are never copied in. */
const SHARED = resolve(import.meta.dirname, '../../../shared/data')
export const hasShared = existsSync(SHARED)
/** For test titles: says why a test is skipped. */
export const sharedNote = hasShared ? '' : ' (skipped: ../shared/data is not here)'
export const sharedPath = (name: string): string => resolve(SHARED, name)

/** A file on disk as a ByteSource, opened for each read: nothing is left open. */
export async function fileSource(path: string): Promise<ByteSource> {
  return {
    name: basename(path),
    size: (await stat(path)).size,
    async read(offset, length) {
      const handle = await open(path, 'r')
      try {
        const bytes = new Uint8Array(length)
        const { bytesRead } = await handle.read(bytes, 0, length, offset)
        return bytes.buffer.slice(0, bytesRead)
      } finally {
        await handle.close()
      }
    },
  }
}
