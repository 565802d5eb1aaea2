/** The only way bytes come in: Blob.slice in the page's intake worker, fs in the batch command. */
export interface ByteSource {
  readonly name: string
  readonly size: number
  read(offset: number, length: number): Promise<ArrayBuffer>
}
