import { type FileHandle, open } from 'node:fs/promises'
import { basename } from 'node:path'
import { type ByteSource, InputError } from '../../core/index.ts'

/** What the system says about a file, in plain words. */
export function fileFault(error: unknown, path: string, place?: string): InputError {
  const code = (error as { code?: string }).code
  const found =
    code === 'ENOENT'
      ? 'there is no such file'
      : code === 'EACCES' || code === 'EPERM'
        ? 'the file may not be read'
        : code === 'EISDIR'
          ? 'this is a folder, not a file'
          : `the file cannot be read (${code ?? 'unknown reason'})`
  return new InputError({
    code: 'file',
    file: basename(path),
    ...(place === undefined ? {} : { place }),
    found,
    remedy: place?.startsWith('--') ? 'give the name of a readable file' : 'give the name of a readable file, relative to the study file',
  })
}

/** Bytes of a file on disk, read in pieces. Close it when done. */
export class FileSource implements ByteSource {
  readonly name: string
  readonly size: number
  readonly #handle: FileHandle
  private constructor(path: string, size: number, handle: FileHandle) {
    this.name = basename(path)
    this.size = size
    this.#handle = handle
  }
  /** @param place key path of the file's name in the study @throws InputError where it cannot be opened */
  static async open(path: string, place?: string): Promise<FileSource> {
    try {
      const handle = await open(path, 'r')
      const info = await handle.stat()
      if (!info.isDirectory()) return new FileSource(path, info.size, handle)
      await handle.close()
      throw Object.assign(new Error('folder'), { code: 'EISDIR' })
    } catch (error) {
      throw fileFault(error, path, place)
    }
  }
  async read(offset: number, length: number): Promise<ArrayBuffer> {
    const wanted = Math.max(0, Math.min(length, this.size - offset))
    const bytes = new Uint8Array(wanted)
    let done = 0
    while (done < wanted) {
      const { bytesRead } = await this.#handle.read(bytes, done, wanted - done, offset + done)
      if (bytesRead === 0) break
      done += bytesRead
    }
    return done === wanted ? bytes.buffer : bytes.slice(0, done).buffer
  }
  close(): Promise<void> {
    return this.#handle.close()
  }
}
