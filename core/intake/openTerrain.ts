import { InputError } from '../errors/index.ts'
import { bilinear, type GridShape, sameLattice } from '../raster/index.ts'
import { blockValues, blockWindow, type Valuer } from './blockWindow.ts'
import { shapeOf } from './georeference.ts'
import { gdalItem, type HeightUnit, heightUnitOf, METRES_PER } from './heightUnit.ts'
import { openTiff, type TiffImage } from './tiffImage.ts'
import type { ByteSource } from './types.ts'
import { patchesOf, SourcePositions } from './warp.ts'

/** What the study states about a terrain file. `place` names it there; default 'terrain[0]'. */
export interface StatedTerrain {
  readonly crs?: string | null
  readonly unit?: HeightUnit | null
  readonly heights?: string
  readonly place?: string
}
/** A terrain file opened: where it lies and what it holds, nothing decoded yet. */
export interface TerrainHead {
  readonly name: string
  readonly shape: GridShape
  readonly unit: HeightUnit
  readonly nodata: number | null
  readonly sampleType: string
  /** One line for the memo and the ground panel. */
  readonly describe: string
  /**
   * Fills the cells of `target` that are NaN with heights in metres: copied where the lattices agree, else bilinear; cells this file does not know stay
   * NaN. Fill the target with NaN first and read the finest file first. Throws InputError for damaged data and when the file holds no height there at all.
   */
  readInto(target: { readonly shape: GridShape; readonly samples: Float32Array }, onProgress?: Progress): Promise<void>
}
export type Progress = (done: number, total: number) => void

/** Samples taken as no data where the file declares none. */
const CUSTOMARY_VOIDS = [-9999, -32767, -32768] as const
/** No height on earth, m: outside this a sample is no data, declared or not. */
const LOWEST_M = -12_000
const HIGHEST_M = 9_000

/**
 * Opens a GeoTIFF of heights without decoding it. Throws InputError: not a TIFF, cut off, no CRS, no georeference, colour picture, depths or heights above
 * the ellipsoid, unknown unit or compression, absurd size.
 */
export async function openTerrain(source: ByteSource, stated: StatedTerrain): Promise<TerrainHead> {
  const place = stated.place ?? 'terrain[0]'
  const image = await openTiff(source)
  refusePictures(image)
  const unit = heightUnitOf(image, stated.unit ?? null, stated.heights, place)
  const shape = await shapeOf(image, stated.crs ?? null, place)
  const nodata = noDataOf(image)
  if (image.hasMask && nodata === null)
    throw new InputError({
      code: 'mask',
      file: image.file,
      found: 'the raster marks its voids in a separate mask',
      remedy: 'rewrite it with a no-data value',
    })
  const valuer = heightValuer(image, nodata, METRES_PER[unit])
  const size = `${image.width} × ${image.height}`
  const words = [
    `${size} ${image.sampleType}`,
    shape.crs.name,
    unit === 'm' ? 'metres' : unit === 'ft' ? 'feet' : 'US survey feet',
    nodata === null ? 'no no-data value declared' : `no data ${nodata}`,
    ...(image.bands > 1 ? [`band 1 of ${image.bands}`] : []),
    ...(valuer.scale === METRES_PER[unit] && valuer.offset === 0 ? [] : ["scale and offset of the file's metadata applied"]),
  ]
  return {
    name: source.name,
    shape,
    unit,
    nodata,
    sampleType: image.sampleType,
    describe: words.join(', '),
    async readInto(target, onProgress) {
      const found = await fill(image, shape, valuer, target, onProgress ?? (() => {}))
      if (found.read > 0 && found.valid === 0)
        throw new InputError({
          code: 'all-void',
          file: image.file,
          found: `all ${found.read} cells read are no data`,
          remedy: 'give a raster that has heights around the candidates',
        })
    },
  }
}

function refusePictures(image: TiffImage): void {
  const bytes = image.sampleType === 'UInt8'
  const found =
    bytes && image.bands >= 3
      ? 'three bands of bytes: a colour picture, or heights coded as colours'
      : image.photometric === 3
        ? 'a colour table: classes or a picture, not heights'
        : null
  if (found)
    throw new InputError({ code: 'not-heights', file: image.file, found, remedy: 'give heights in one band of numbers (Int16 or Float32)' })
}

/** Declared no-data value, NaN included; null where none is declared or it is no number. */
export function noDataOf(image: TiffImage): number | null {
  const words = image.tags.gdalNoData.trim()
  const v = words === '' ? Number.NaN : Number(words)
  return Number.isNaN(v) && !/^[-+]?nan/i.test(words) ? null : v
}

function heightValuer(image: TiffImage, nodata: number | null, metresPerUnit: number): Valuer {
  const number = (name: string, otherwise: number): number => {
    const v = Number(gdalItem(image.tags.gdalMetadata, name) ?? otherwise)
    return Number.isFinite(v) ? v : otherwise
  }
  const scale = number('SCALE', 1) * metresPerUnit
  const offset = number('OFFSET', 0) * metresPerUnit
  const low = (LOWEST_M - offset) / scale
  const high = (HIGHEST_M - offset) / scale
  return {
    scale,
    offset,
    lowest: Math.min(low, high),
    highest: Math.max(low, high),
    // the text of a Float32 no-data value is rarely the exact number
    voids: nodata === null ? CUSTOMARY_VOIDS : [nodata, Math.fround(nodata), Number.NaN],
  }
}

interface Found {
  read: number
  valid: number
}

async function fill(
  image: TiffImage,
  shape: GridShape,
  valuer: Valuer,
  target: { readonly shape: GridShape; readonly samples: Float32Array },
  onProgress: Progress,
): Promise<Found> {
  const shift = sameLattice(shape, target.shape)
  return shift ? copy(image, valuer, target, shift, onProgress) : resample(image, shape, valuer, target, onProgress)
}

/** Same lattice: block by block straight into the target; `shift` is the target's first cell in the file. */
async function copy(
  image: TiffImage,
  valuer: Valuer,
  target: { readonly shape: GridShape; readonly samples: Float32Array },
  shift: { col: number; row: number },
  onProgress: Progress,
): Promise<Found> {
  const { width, height } = target.shape
  const { blockWidth, blockHeight } = image
  const fromCol = Math.max(0, shift.col)
  const fromRow = Math.max(0, shift.row)
  const toCol = Math.min(image.width, shift.col + width)
  const toRow = Math.min(image.height, shift.row + height)
  const found = { read: 0, valid: 0 }
  if (fromCol >= toCol || fromRow >= toRow) return found
  const rows = Math.ceil(toRow / blockHeight)
  const firstRow = Math.floor(fromRow / blockHeight)
  for (let br = firstRow; br < rows; br++) {
    for (let bc = Math.floor(fromCol / blockWidth); bc * blockWidth < toCol; bc++) {
      const values = await blockValues(image, valuer, bc, br)
      const left = Math.max(fromCol, bc * blockWidth)
      const right = Math.min(toCol, (bc + 1) * blockWidth)
      const top = Math.max(fromRow, br * blockHeight)
      const low = Math.min(toRow, (br + 1) * blockHeight)
      found.read += (right - left) * (low - top)
      if (!values) continue
      for (let r = top; r < low; r++) {
        let from = (r - br * blockHeight) * blockWidth + left - bc * blockWidth
        let to = (r - shift.row) * width + left - shift.col
        for (let c = left; c < right; c++, from++, to++) {
          const v = values[from]
          if (Number.isNaN(v)) continue
          found.valid++
          if (Number.isNaN(target.samples[to])) target.samples[to] = v
        }
      }
    }
    onProgress(br - firstRow + 1, rows - firstRow)
  }
  return found
}

/** Any other lattice: bilinear at the target's cell centres, out to the outer edge of the file's pixels. */
async function resample(
  image: TiffImage,
  shape: GridShape,
  valuer: Valuer,
  target: { readonly shape: GridShape; readonly samples: Float32Array },
  onProgress: Progress,
): Promise<Found> {
  const positions = new SourcePositions(shape, target.shape)
  const window = blockWindow(image, valuer)
  const found = { read: 0, valid: 0 }
  const lastCol = image.width - 1
  const lastRow = image.height - 1
  const patches = [...patchesOf(target.shape, image.blockWidth >= image.width)]
  for (let n = 0; n < patches.length; n++) {
    const { col, row, width, height } = patches[n]
    positions.fill(col, row, width, height)
    let left = Number.POSITIVE_INFINITY
    let top = Number.POSITIVE_INFINITY
    let right = Number.NEGATIVE_INFINITY
    let low = Number.NEGATIVE_INFINITY
    for (let i = 0; i < width * height; i++) {
      const c = positions.col[i]
      const r = positions.row[i]
      if (!(c >= -0.5 && r >= -0.5 && c <= lastCol + 0.5 && r <= lastRow + 0.5)) {
        positions.col[i] = Number.NaN
        continue
      }
      const inCol = (positions.col[i] = Math.min(Math.max(c, 0), lastCol))
      const inRow = (positions.row[i] = Math.min(Math.max(r, 0), lastRow))
      if (inCol < left) left = inCol
      if (inCol > right) right = inCol
      if (inRow < top) top = inRow
      if (inRow > low) low = inRow
    }
    if (left <= right) {
      const c0 = Math.floor(left)
      const r0 = Math.floor(top)
      const patch = await window.read(
        c0,
        r0,
        Math.min(lastCol, Math.floor(right) + 1) - c0 + 1,
        Math.min(lastRow, Math.floor(low) + 1) - r0 + 1,
      )
      const grid = { width: patch.width, height: patch.height, samples: patch.values }
      for (let r = 0, i = 0; r < height; r++)
        for (let c = 0; c < width; c++, i++) {
          if (Number.isNaN(positions.col[i])) continue
          found.read++
          const v = bilinear(grid, positions.col[i] - c0, positions.row[i] - r0)
          if (Number.isNaN(v)) continue
          found.valid++
          const to = (row + r) * target.shape.width + col + c
          if (Number.isNaN(target.samples[to])) target.samples[to] = v
        }
    }
    if (n % 16 === 15) onProgress(n + 1, patches.length)
  }
  onProgress(patches.length, patches.length)
  return found
}
