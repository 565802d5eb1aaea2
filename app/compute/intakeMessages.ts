import { type ByteSource, type Complaint, type FileDoor, type GroundRead, type GroundRequest, InputError } from '../../core/index.ts'

export interface IntakeAsk {
  readonly request: GroundRequest
  /** Files by the name the study uses. */
  readonly files: ReadonlyMap<string, Blob>
}
export type IntakeTell =
  | { readonly kind: 'progress'; readonly doing: string; readonly done: number; readonly total: number }
  | { readonly kind: 'read'; readonly read: GroundRead }
  | { readonly kind: 'refused'; readonly complaint: Complaint }
  | { readonly kind: 'fault'; readonly message: string }

const last = (name: string): string => name.slice(name.lastIndexOf('/') + 1)

/** Bytes of the files given to the page. */
export function doorOf(files: ReadonlyMap<string, Blob>): FileDoor {
  const find = (name: string, place: string): Blob => {
    const blob = files.get(name)
    if (!blob)
      throw new InputError({
        code: 'missing-file',
        file: last(name),
        place,
        found: 'the file is not here',
        remedy: 'drop it onto the page',
      })
    return blob
  }
  return {
    bytes: async (name, place) => new BlobSource(last(name), find(name, place)),
    text: (name, place) => find(name, place).text(),
  }
}

class BlobSource implements ByteSource {
  readonly size: number
  constructor(
    readonly name: string,
    private readonly blob: Blob,
  ) {
    this.size = blob.size
  }
  read(offset: number, length: number): Promise<ArrayBuffer> {
    return this.blob.slice(offset, Math.min(this.size, offset + length)).arrayBuffer()
  }
}
