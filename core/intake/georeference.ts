import { InputError, isInputError } from '../errors/index.ts'
import { type Crs, crsFromGeoKeys, crsFromText } from '../geodesy/index.ts'
import { type GridShape, gridPosition } from '../raster/index.ts'
import type { TiffImage } from './tiffImage.ts'

/** The CRS and affine placement of a TIFF; `place` is where the study names the file, e.g. 'terrain[0]'. A stated CRS outranks the file's. */
export async function shapeOf(image: TiffImage, stated: string | null, place: string): Promise<GridShape> {
  const affine = affineOf(image)
  const crs = await crsOf(image, stated, place)
  const shape: GridShape = { width: image.width, height: image.height, crs, ...affine }
  const p = gridPosition(shape)
  for (const [col, row] of [
    [0, 0],
    [image.width - 1, 0],
    [0, image.height - 1],
    [image.width - 1, image.height - 1],
  ]) {
    const [lon, lat] = p.toLonLat(col, row)
    if (!Number.isFinite(lon) || !(Math.abs(lat) <= 90))
      throw new InputError({
        code: 'crs-does-not-fit',
        file: image.file,
        place: `${place}.crs`,
        found: `pixel ${col}, ${row} has no place on the earth under ${crs.name}`,
        remedy: stated ? 'state the CRS the raster is really in' : 'correct the georeference of the raster',
      })
  }
  return shape
}

async function crsOf(image: TiffImage, stated: string | null, place: string): Promise<Crs> {
  const keys = image.tags.geoKeys
  const bare =
    !keys || !['ProjectedCSTypeGeoKey', 'GeographicTypeGeoKey', 'ProjCoordTransGeoKey', 'GeogEllipsoidGeoKey'].some((k) => k in keys)
  if (!stated && bare)
    throw new InputError({
      code: 'no-crs',
      file: image.file,
      place: `${place}.crs`,
      found: 'the raster has no coordinate reference system',
      remedy: `state ${place}.crs, for example "EPSG:32633"`,
    })
  try {
    return stated ? await crsFromText(stated) : await crsFromGeoKeys(keys!)
  } catch (e) {
    if (!isInputError(e)) throw e
    throw new InputError({ code: e.code, file: image.file, place: `${place}.crs`, found: e.found, remedy: e.remedy })
  }
}

type Affine = Pick<GridShape, 'x0' | 'y0' | 'colX' | 'colY' | 'rowX' | 'rowY'>

/** Position of pixel centres: GeoTIFF 1.1, tie point and scale or a transformation matrix; PixelIsPoint puts the tie on the pixel's centre. */
function affineOf(image: TiffImage): Affine {
  const { pixelScale, tiePoints, transformation, geoKeys } = image.tags
  const half = geoKeys?.GTRasterTypeGeoKey === 2 ? 0 : 0.5
  const fault = (found: string): InputError =>
    new InputError({
      code: 'no-georeference',
      file: image.file,
      found,
      remedy: 'give a raster with a tie point and pixel size (for example from its world file)',
    })
  let corner: Affine
  if (transformation && transformation.length >= 16) {
    const m = transformation
    corner = { x0: m[3], y0: m[7], colX: m[0], colY: m[4], rowX: m[1], rowY: m[5] }
  } else if (pixelScale && pixelScale.length >= 2 && tiePoints && tiePoints.length >= 6) {
    const [sx, sy] = pixelScale
    const [i, j, , x, y] = tiePoints
    corner = { x0: x - i * sx, y0: y + j * sy, colX: sx, colY: 0, rowX: 0, rowY: -sy }
  } else if (tiePoints && tiePoints.length > 6) throw fault('the raster is placed by ground control points only')
  else throw fault('the raster has no georeference')
  const { x0, y0, colX, colY, rowX, rowY } = corner
  const det = colX * rowY - rowX * colY
  if (![x0, y0, det].every(Number.isFinite) || det === 0) throw fault('the pixel size of the raster is zero or no number')
  return { ...corner, x0: x0 + half * (colX + rowX), y0: y0 + half * (colY + rowY) }
}
