import type { TiffImage } from './tiffImage.ts'

/** How samples of a file become values: band 1 scaled, NaN for no data. */
export interface Valuer {
  readonly scale: number
  readonly offset: number
  /** Samples outside these are no data. */
  readonly lowest: number
  readonly highest: number
  /** Single samples that are no data; unused places hold NaN. */
  readonly voids: readonly [number, number, number]
}
/** A rectangle of pixels with their values, row by row. */
export interface Patch {
  readonly col: number
  readonly row: number
  readonly width: number
  readonly height: number
  readonly values: Float32Array
}

/** Decoded blocks kept, bytes. */
const HELD_BYTES = 96e6

/** Reads values of any window, holding the blocks decoded last so that neighbouring windows do not decode twice. */
export function blockWindow(
  image: TiffImage,
  valuer: Valuer,
): { read(col: number, row: number, width: number, height: number): Promise<Patch> } {
  const held = new Map<number, Promise<Float32Array | null>>()
  const { blockWidth, blockHeight } = image
  const across = Math.ceil(image.width / blockWidth)
  const most = Math.max(2, Math.floor(HELD_BYTES / (4 * blockWidth * blockHeight)))
  const block = (bc: number, br: number): Promise<Float32Array | null> => {
    const key = br * across + bc
    let found = held.get(key)
    if (found) held.delete(key)
    else {
      found = blockValues(image, valuer, bc, br)
      if (held.size >= most) held.delete(held.keys().next().value as number)
    }
    held.set(key, found)
    return found
  }
  return {
    async read(col, row, width, height) {
      const values = new Float32Array(width * height).fill(Number.NaN)
      const toRow = Math.min(image.height, row + height)
      const toCol = Math.min(image.width, col + width)
      for (let br = Math.floor(Math.max(0, row) / blockHeight); br * blockHeight < toRow; br++)
        for (let bc = Math.floor(Math.max(0, col) / blockWidth); bc * blockWidth < toCol; bc++) {
          const samples = await block(bc, br)
          if (!samples) continue
          const left = Math.max(col, bc * blockWidth, 0)
          const right = Math.min(toCol, (bc + 1) * blockWidth)
          const low = Math.min(toRow, (br + 1) * blockHeight)
          for (let r = Math.max(row, br * blockHeight, 0); r < low; r++) {
            const from = (r - br * blockHeight) * blockWidth - bc * blockWidth
            values.set(samples.subarray(from + left, from + right), (r - row) * width + left - col)
          }
        }
      return { col, row, width, height, values }
    },
  }
}

/** Values of one whole block, `blockWidth` per row; null where it was never written. */
export async function blockValues(image: TiffImage, valuer: Valuer, bc: number, br: number): Promise<Float32Array | null> {
  const found = await image.block(bc, br)
  if (!found) return null
  const { samples, stride } = found
  const n = Math.floor(samples.length / stride)
  const out = new Float32Array(n)
  const { scale, offset, lowest, highest } = valuer
  const [void1, void2, void3] = valuer.voids
  for (let i = 0, at = 0; i < n; i++, at += stride) {
    const v = samples[at]
    out[i] = v >= lowest && v <= highest && v !== void1 && v !== void2 && v !== void3 ? v * scale + offset : Number.NaN
  }
  if (image.alphaBand !== null) {
    const alpha = stride > 1 ? found : await image.block(bc, br, image.alphaBand)
    if (alpha) {
      const shift = alpha.stride > 1 ? image.alphaBand : 0
      for (let i = 0; i < n; i++) if (alpha.samples[i * alpha.stride + shift] === 0) out[i] = Number.NaN
    }
  }
  return out
}
