import type { RasterGrid } from './types.ts'

/** Positions this near outside the outermost pixel centres count as on them (rounding of projections), pixels. */
const SLACK = 1e-6

/** Bilinear value at a pixel position; NaN outside the pixel centres and where a post that has weight is void. */
export function bilinear(grid: Pick<RasterGrid<Float32Array>, 'width' | 'height' | 'samples'>, col: number, row: number): number {
  const { width, height, samples } = grid
  if (!(col >= -SLACK && row >= -SLACK && col <= width - 1 + SLACK && row <= height - 1 + SLACK)) return Number.NaN
  const x = Math.min(Math.max(col, 0), width - 1)
  const y = Math.min(Math.max(row, 0), height - 1)
  const c = Math.floor(x)
  const r = Math.floor(y)
  const fx = x - c
  const fy = y - r
  const at = r * width + c
  const top = fx === 0 ? samples[at] : samples[at] * (1 - fx) + samples[at + 1] * fx
  if (fy === 0) return top
  const below = at + width
  const low = fx === 0 ? samples[below] : samples[below] * (1 - fx) + samples[below + 1] * fx
  return top * (1 - fy) + low * fy
}

/** Value of the pixel that holds a position; `outside` beyond the raster's edge. */
export function nearest(
  grid: { width: number; height: number; samples: ArrayLike<number> },
  col: number,
  row: number,
  outside: number,
): number {
  const c = Math.round(col)
  const r = Math.round(row)
  return c >= 0 && r >= 0 && c < grid.width && r < grid.height ? grid.samples[r * grid.width + c] : outside
}
