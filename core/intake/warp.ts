import { type GridShape, gridPosition } from '../raster/index.ts'

/** Target cells per side of a patch whose source positions are interpolated. */
const PATCH = 64
/** Allowed error of an interpolated source position, pixels. */
const TOLERANCE = 0.001

/**
 * Source pixel positions for a rectangle of target cells: nine places (corners, middles, centre) are transformed exactly, the rest is biquadratic between
 * them where that holds to 0.001 pixel at four places between, else every cell is transformed. `col`, `row` are filled row by row.
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
    const w = Math.max(1, width - 1)
    const h = Math.max(1, height - 1)
    const exact = (u: number, v: number): [number, number] => this.#at(col0 + u * w, row0 + v * h)
    // along each of three columns u = 0, ½, 1: a parabola in v through three exact places
    const columns = [0, 0.5, 1].map((u) => [exact(u, 0), exact(u, 0.5), exact(u, 1)])
    const alongRow = (v: number, axis: 0 | 1): Parabola =>
      parabola(columns.map(([a, b, c]) => valueAt(parabola([a[axis], b[axis], c[axis]]), v)))
    const holds = [0.25, 0.75].every((v) => {
      const c = alongRow(v, 0)
      const r = alongRow(v, 1)
      return [0.25, 0.75].every((u) => {
        const place = exact(u, v)
        return Math.abs(place[0] - valueAt(c, u)) < TOLERANCE && Math.abs(place[1] - valueAt(r, u)) < TOLERANCE
      })
    })
    for (let r = 0, i = 0; r < height; r++) {
      const c = alongRow(r / h, 0)
      const d = alongRow(r / h, 1)
      for (let q = 0; q < width; q++, i++) {
        if (holds) {
          this.col[i] = valueAt(c, q / w)
          this.row[i] = valueAt(d, q / w)
        } else [this.col[i], this.row[i]] = this.#at(col0 + q, row0 + r)
      }
    }
  }
}
/** a + b t + c t². */
type Parabola = readonly [number, number, number]
/** Through values at t = 0, ½, 1. */
const parabola = ([a, b, c]: readonly number[]): Parabola => [a, 4 * b - 3 * a - c, 2 * a + 2 * c - 4 * b]
const valueAt = (p: Parabola, t: number): number => p[0] + t * (p[1] + t * p[2])

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
