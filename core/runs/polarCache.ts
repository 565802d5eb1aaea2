import type { ClutterCells, FoldedCells } from '../clutter/index.ts'
import type { SightCells, SiteCells } from '../masking/index.ts'
import type { LowKCells } from '../merit/index.ts'

type Cells = SiteCells | SightCells | ClutterCells | FoldedCells | LowKCells
const LIMIT_BYTES = 256 * 2 ** 20

/** Polar grids by key, bounded in bytes; the least recently used go first, but never one named in `keep`. */
export class PolarCache {
  private readonly entries = new Map<string, Cells>()
  private bytes = 0
  constructor(private readonly limitBytes = LIMIT_BYTES) {}

  get<T extends Cells>(key: string): T | undefined {
    const found = this.entries.get(key)
    if (!found) return undefined
    this.entries.delete(key)
    this.entries.set(key, found)
    return found as T
  }

  has(key: string): boolean {
    return this.entries.has(key)
  }

  put(key: string, cells: Cells, keep: ReadonlySet<string>): void {
    this.drop(key)
    this.entries.set(key, cells)
    this.bytes += bytesOf(cells)
    for (const old of [...this.entries.keys()]) {
      if (this.bytes <= this.limitBytes) break
      if (old !== key && !keep.has(old)) this.drop(old)
    }
  }

  clear(): void {
    this.entries.clear()
    this.bytes = 0
  }

  private drop(key: string): void {
    const found = this.entries.get(key)
    if (!found) return
    this.bytes -= bytesOf(found)
    this.entries.delete(key)
  }
}

/** Arrays that stand for two fields are counted once. */
function bytesOf(cells: Cells): number {
  const buffers = new Set<ArrayBufferLike>()
  for (const v of Object.values(cells)) if (ArrayBuffer.isView(v)) buffers.add(v.buffer)
  let sum = 0
  for (const b of buffers) sum += b.byteLength
  return sum
}
