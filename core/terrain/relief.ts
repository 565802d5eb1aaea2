import { type GridShape, postingM, type RasterGrid } from '../raster/index.ts'
import { DEG_PER_RAD } from '../units/index.ts'
import type { Work } from '../work/index.ts'
import { type Ground, RELIEF } from './types.ts'

// Relief of the land-clutter tables, from the raster and never entered. Slopes over 2 degrees are high relief (Billingsley, Low-Angle Radar Land
// Clutter, 2002, §5.4.3); block size, disc and the 300 m of mountains are our own engineering choice, listed with the defaults.

const BLOCK_M = 250
const DISC_M = 1000
const HIGH_SLOPE_DEG = 2
const MOUNTAINS_M = 300
const LEAST_SHARE = 0.25
/** Above this posting relief is still given, and marked by those who use it. */
export const COARSEST_RELIEF_POSTING_M = 500

/** Posts per relief block, per axis: the smallest multiple of the posting that is at least 250 m (metres at mid-raster). */
export function reliefBlock(shape: GridShape): { cols: number; rows: number; colM: number; rowM: number } {
  const p = postingM(shape)
  const cols = Math.max(1, Math.ceil(BLOCK_M / p.colM - 1e-9))
  const rows = Math.max(1, Math.ceil(BLOCK_M / p.rowM - 1e-9))
  return { cols, rows, colM: cols * p.colM, rowM: rows * p.rowM }
}

/**
 * Relief per block of the raster: heights without cover averaged in blocks, slope by central differences of blocks (one-sided at an
 * edge), relief slope = mean slope within 1 km, at least 2° = high, high with over 300 m between blocks within 1 km = mountains. A block needs 25 %
 * of its posts within the raster, a disc 25 % of its blocks, else unknown.
 */
export function* buildRelief(shape: GridShape, heightM: Float32Array): Work<RasterGrid<Uint8Array>> {
  const { cols, rows, colM, rowM } = reliefBlock(shape)
  const width = Math.ceil(shape.width / cols)
  const height = Math.ceil(shape.height / rows)
  const steps = 2 * height
  const mean = new Float32Array(width * height).fill(Number.NaN)
  const sum = new Float64Array(width)
  const count = new Int32Array(width)
  for (let by = 0; by < height; by++) {
    sum.fill(0)
    count.fill(0)
    for (let row = by * rows; row < Math.min((by + 1) * rows, shape.height); row++) {
      let at = row * shape.width
      for (let bx = 0; bx < width; bx++) {
        let s = 0
        let n = 0
        for (const end = row * shape.width + Math.min((bx + 1) * cols, shape.width); at < end; at++) {
          const z = heightM[at]
          if (!Number.isNaN(z)) {
            s += z
            n++
          }
        }
        sum[bx] += s
        count[bx] += n
      }
    }
    const tall = Math.min(rows, shape.height - by * rows)
    for (let bx = 0; bx < width; bx++) {
      const least = LEAST_SHARE * tall * Math.min(cols, shape.width - bx * cols)
      if (count[bx] >= least) mean[by * width + bx] = sum[bx] / count[bx]
    }
    yield { done: by + 1, total: steps }
  }
  const slope = slopeDeg(mean, middlesM(width, cols, shape.width, colM / cols), middlesM(height, rows, shape.height, rowM / rows))
  const samples = new Uint8Array(width * height).fill(RELIEF.unknown)
  const disc = discSpans(colM, rowM)
  for (let by = 0; by < height; by++) {
    for (let bx = 0; bx < width; bx++) samples[by * width + bx] = reliefOfDisc(mean, slope, width, height, bx, by, disc)
    yield { done: height + by + 1, total: steps }
  }
  const c = (cols - 1) / 2
  const r = (rows - 1) / 2
  return {
    width,
    height,
    crs: shape.crs,
    x0: shape.x0 + c * shape.colX + r * shape.rowX,
    y0: shape.y0 + c * shape.colY + r * shape.rowY,
    colX: shape.colX * cols,
    colY: shape.colY * cols,
    rowX: shape.rowX * rows,
    rowY: shape.rowY * rows,
    samples,
  }
}

/** Middles of the blocks along one axis, m; the last block may hold fewer posts. */
const middlesM = (blocks: number, posts: number, size: number, postM: number): Float64Array =>
  Float64Array.from({ length: blocks }, (_, b) => (b * posts + (Math.min(posts, size - b * posts) - 1) / 2) * postM)

/** Slope of the block means, degrees; NaN where the block or both neighbours of an axis are unknown. */
function slopeDeg(mean: Float32Array, xM: Float64Array, yM: Float64Array): Float32Array {
  const width = xM.length
  const height = yM.length
  const out = new Float32Array(mean.length)
  const known = (bx: number, by: number): number => (bx >= 0 && by >= 0 && bx < width && by < height ? mean[by * width + bx] : Number.NaN)
  const rise = (before: number, here: number, after: number, at: Float64Array, b: number): number => {
    if (!Number.isNaN(before + after)) return (after - before) / (at[b + 1] - at[b - 1])
    if (!Number.isNaN(after)) return (after - here) / (at[b + 1] - at[b])
    return (here - before) / (at[b] - at[b - 1])
  }
  for (let by = 0; by < height; by++)
    for (let bx = 0; bx < width; bx++) {
      const here = mean[by * width + bx]
      const dx = width === 1 ? 0 : rise(known(bx - 1, by), here, known(bx + 1, by), xM, bx)
      const dy = height === 1 ? 0 : rise(known(bx, by - 1), here, known(bx, by + 1), yM, by)
      out[by * width + bx] = Math.atan(Math.sqrt(dx * dx + dy * dy)) * DEG_PER_RAD
    }
  return out
}

interface Disc {
  /** Half width in blocks of each block row of the disc, from -reach to +reach. */
  readonly half: Int32Array
  readonly reach: number
  readonly blocks: number
}
function discSpans(colM: number, rowM: number): Disc {
  const reach = Math.floor(DISC_M / rowM)
  const half = new Int32Array(2 * reach + 1)
  let blocks = 0
  for (let k = -reach; k <= reach; k++) {
    half[k + reach] = Math.floor(Math.sqrt(DISC_M * DISC_M - k * k * rowM * rowM) / colM)
    blocks += 2 * half[k + reach] + 1
  }
  return { half, reach, blocks }
}

function reliefOfDisc(mean: Float32Array, slope: Float32Array, width: number, height: number, bx: number, by: number, disc: Disc): number {
  let known = 0
  let slopes = 0
  let sum = 0
  let low = Number.POSITIVE_INFINITY
  let high = Number.NEGATIVE_INFINITY
  for (let y = Math.max(0, by - disc.reach); y <= Math.min(height - 1, by + disc.reach); y++) {
    const half = disc.half[y - by + disc.reach]
    const end = y * width + Math.min(width - 1, bx + half)
    for (let at = y * width + Math.max(0, bx - half); at <= end; at++) {
      const z = mean[at]
      if (Number.isNaN(z)) continue
      known++
      if (z < low) low = z
      if (z > high) high = z
      const s = slope[at]
      if (!Number.isNaN(s)) {
        slopes++
        sum += s
      }
    }
  }
  if (known < LEAST_SHARE * disc.blocks || slopes === 0) return RELIEF.unknown
  if (sum / slopes < HIGH_SLOPE_DEG) return RELIEF.low
  return high - low > MOUNTAINS_M ? RELIEF.mountains : RELIEF.high
}

/** Posts per relief block of a built ground. */
export function reliefBlockOf(g: Ground): { cols: number; rows: number } {
  const { shape, relief } = g
  return {
    cols: Math.round(Math.hypot(relief.colX, relief.colY) / Math.hypot(shape.colX, shape.colY)),
    rows: Math.round(Math.hypot(relief.rowX, relief.rowY) / Math.hypot(shape.rowX, shape.rowY)),
  }
}
/** Relief at a pixel position of the ground: that of the block that holds its nearest post; RELIEF.unknown outside. */
export function reliefAt(g: Ground, col: number, row: number): number {
  const c = Math.round(col)
  const r = Math.round(row)
  if (!(c >= 0 && r >= 0 && c < g.shape.width && r < g.shape.height)) return RELIEF.unknown
  const b = reliefBlockOf(g)
  return g.relief.samples[Math.floor(r / b.rows) * g.relief.width + Math.floor(c / b.cols)]
}
