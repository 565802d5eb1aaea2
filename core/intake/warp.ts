import { type GridShape, gridPosition } from '../raster/index.ts'

/** Target cells per side of a patch whose source positions are interpolated. */
const PATCH = 64
/** Allowed error of an interpolated source position, pixels. */
const TOLERANCE = 0.02

/**
 * Source pixel positions for a rectangle of target cells: the corners and centre are transformed exactly, the rest is bilinear between them where that is
 * within 0.02 pixel at the centre and the middles of the sides, else every cell is transformed. `col`, `row` are filled row by row.
 */
export class SourcePositions {
  readonly col = new Float64Array(PATCH * PATCH)
  readonly row = new Float64Array(PATCH * PATCH)
  readonly #toPixel: (lon: number, lat: number) => [number, number]
  readonly #toLonLat: (col: number, row: number) => [number, number]
  constructor(source: GridShape, target: GridShape) {
    this.#toPixel = gridPosition(source).toPixel
    this.#toLonLat = gridPosition(target).toLonLat
  }
  #at(col: number, row: number): [number, number] {
    const [lon, lat] = this.#toLonLat(col, row)
    return this.#toPixel(lon, lat)
  }
  /** Fills the positions of target cells [col0, col0+width) × [row0, row0+height), width and height at most PATCH. */
  fill(col0: number, row0: number, width: number, height: number): void {
    const w = width - 1
    const h = height - 1
    const a = this.#at(col0, row0)
    const b = this.#at(col0 + w, row0)
    const c = this.#at(col0, row0 + h)
    const d = this.#at(col0 + w, row0 + h)
    const mix = (k: 0 | 1, u: number, v: number): number => (a[k] * (1 - u) + b[k] * u) * (1 - v) + (c[k] * (1 - u) + d[k] * u) * v
    const straight = [
      [0.5, 0],
      [0, 0.5],
      [0.5, 0.5],
      [1, 0.5],
      [0.5, 1],
    ].every(([u, v]) => {
      const exact = this.#at(col0 + u * w, row0 + v * h)
      return Math.abs(exact[0] - mix(0, u, v)) < TOLERANCE && Math.abs(exact[1] - mix(1, u, v)) < TOLERANCE
    })
    for (let r = 0, i = 0; r < height; r++)
      for (let q = 0; q < width; q++, i++) {
        if (straight) {
          const u = w > 0 ? q / w : 0
          const v = h > 0 ? r / h : 0
          this.col[i] = mix(0, u, v)
          this.row[i] = mix(1, u, v)
        } else [this.col[i], this.row[i]] = this.#at(col0 + q, row0 + r)
      }
  }
}

export interface Tile {
  readonly col: number
  readonly row: number
  readonly width: number
  readonly height: number
}
/** Patches visited together, cells per side: keeps the file's tiles in the cache. */
const GROUP = 512
/** The patches of a target raster; row by row for a file of full-width strips, else in square groups. */
export function* patchesOf(target: GridShape, stripped: boolean): Iterable<Tile> {
  const group = stripped ? Math.max(target.width, 1) : GROUP
  for (let top = 0; top < target.height; top += GROUP)
    for (let left = 0; left < target.width; left += group)
      for (let row = top; row < Math.min(top + GROUP, target.height); row += PATCH)
        for (let col = left; col < Math.min(left + group, target.width); col += PATCH)
          yield {
            col,
            row,
            width: Math.min(PATCH, left + group - col, target.width - col),
            height: Math.min(PATCH, target.height - row),
          }
}
