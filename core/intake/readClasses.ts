import { InputError } from '../errors/index.ts'
import type { GridShape } from '../raster/index.ts'
import { shapeOf } from './georeference.ts'
import { noDataOf, type Progress } from './openTerrain.ts'
import { openTiff, type TiffImage } from './tiffImage.ts'
import type { ByteSource } from './types.ts'
import { patchesOf, SourcePositions } from './warp.ts'

/** Code of cells the class raster does not know. */
export const NO_CLASS = 255
/** Class numbers on a ground grid: classes[codes[i]], or unknown where codes[i] is NO_CLASS. */
export interface ClassRaster {
  readonly codes: Uint8Array
  readonly classes: readonly number[]
}
/** A class raster (land cover) opened. */
export interface ClassHead {
  readonly name: string
  readonly shape: GridShape
  readonly nodata: number | null
  readonly describe: string
  /** Class of the nearest pixel for every cell of `target`; blocks of the file are decoded as needed, never all at once. Throws InputError for damaged data. */
  readClassesInto(target: GridShape, onProgress?: Progress): Promise<ClassRaster>
}

/**
 * Opens a GeoTIFF of class numbers without decoding it; `place` names it in the study. Throws InputError as openTerrain does, and for samples that are no
 * whole numbers.
 */
export async function readClasses(source: ByteSource, crs: string | null = null, place = 'landCover'): Promise<ClassHead> {
  const image = await openTiff(source)
  if (image.sampleType.startsWith('Float') || image.bands >= 3)
    throw new InputError({
      code: 'not-classes',
      file: image.file,
      place: `${place}.file`,
      found: image.bands >= 3 ? 'a colour picture, not class numbers' : `${image.sampleType} samples, not class numbers`,
      remedy: 'give a raster with one band of whole class numbers',
    })
  const shape = await shapeOf(image, crs, place)
  const nodata = noDataOf(image)
  return {
    name: source.name,
    shape,
    nodata,
    describe: `${image.width} × ${image.height} ${image.sampleType}, ${shape.crs.name}, nearest cell`,
    readClassesInto: (target, onProgress) => fill(image, shape, nodata, target, onProgress ?? (() => {})),
  }
}

async function fill(
  image: TiffImage,
  shape: GridShape,
  nodata: number | null,
  target: GridShape,
  onProgress: Progress,
): Promise<ClassRaster> {
  const codes = new Uint8Array(target.width * target.height).fill(NO_CLASS)
  const classes: number[] = []
  const codeOf = new Map<number, number>()
  const code = (value: number): number => {
    if (value === nodata) return NO_CLASS
    const known = codeOf.get(value)
    if (known !== undefined) return known
    if (classes.length >= NO_CLASS)
      throw new InputError({
        code: 'not-classes',
        file: image.file,
        found: 'more than 254 different classes',
        remedy: 'give a land cover raster',
      })
    codeOf.set(value, classes.length)
    return classes.push(value) - 1
  }
  const { blockWidth, blockHeight } = image
  const across = Math.ceil(image.width / blockWidth)
  const blocks = blockCache(image, across)
  const positions = new SourcePositions(shape, target)
  const patches = [...patchesOf(target, blockWidth >= image.width)]
  const at = new Int32Array(positions.col.length)
  const owner = new Int32Array(positions.col.length)
  for (let n = 0; n < patches.length; n++) {
    const { col, row, width, height } = patches[n]
    positions.fill(col, row, width, height)
    const wanted = new Set<number>()
    for (let i = 0; i < width * height; i++) {
      const c = Math.round(positions.col[i])
      const r = Math.round(positions.row[i])
      owner[i] = -1
      if (!(c >= 0 && r >= 0 && c < image.width && r < image.height)) continue
      const bc = Math.floor(c / blockWidth)
      const br = Math.floor(r / blockHeight)
      owner[i] = br * across + bc
      at[i] = (r - br * blockHeight) * blockWidth + c - bc * blockWidth
      wanted.add(owner[i])
    }
    for (const key of wanted) {
      const block = await blocks(key)
      if (!block) continue
      const { samples, stride } = block
      for (let i = 0; i < width * height; i++) {
        if (owner[i] !== key) continue
        const r = Math.floor(i / width)
        codes[(row + r) * target.width + col + i - r * width] = code(samples[at[i] * stride])
      }
    }
    if (n % 16 === 15) onProgress(n + 1, patches.length)
  }
  onProgress(patches.length, patches.length)
  return { codes, classes }
}

type Block = Awaited<ReturnType<TiffImage['block']>>
const HELD_BYTES = 64e6

/** Blocks decoded last, up to 64 MB of them. */
function blockCache(image: TiffImage, across: number): (key: number) => Promise<Block> {
  const held = new Map<number, Block>()
  let bytes = 0
  return async (key) => {
    const found = held.get(key)
    if (found !== undefined) {
      held.delete(key)
      held.set(key, found)
      return found
    }
    const block = await image.block(key % across, Math.floor(key / across))
    held.set(key, block)
    bytes += block?.samples.byteLength ?? 0
    for (const [old, b] of held) {
      if (bytes <= HELD_BYTES || old === key) break
      held.delete(old)
      bytes -= b?.samples.byteLength ?? 0
    }
    return block
  }
}
