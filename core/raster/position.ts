import { type CrsTransform, crsTransform, geodesicInverse, type LonLat, WGS84_A_M } from '../geodesy/index.ts'
import type { GridShape } from './types.ts'

export interface GridPosition {
  /** Pixel position of a place; pixel centres are integers. NaN where the CRS has no image of it. */
  toPixel(lon: number, lat: number): [number, number]
  toLonLat(col: number, row: number): [number, number]
}

/** x of the CRS repeats after this much: 360° for geographic axes, the equator for Web Mercator; 0 where it does not. */
const periodX = (shape: GridShape): number => {
  if (shape.crs.kind === 'geographic') return 360
  return shape.crs.definition === 'EPSG:3857' ? 2 * Math.PI * WGS84_A_M : 0
}

/**
 * Functions between WGS 84 degrees and pixels of a raster, rotated grids included. Where x repeats (longitude), the turn nearest the raster's middle is
 * taken, so a raster across the antimeridian is one piece. Throws a plain Error when the projection library is needed and not loaded (loadCrs).
 */
export function gridPosition(shape: GridShape): GridPosition {
  const t: CrsTransform = crsTransform(shape.crs)
  const geographic = shape.crs.definition === 'EPSG:4326'
  const { x0, y0, colX, colY, rowX, rowY } = shape
  const det = colX * rowY - rowX * colY
  const a = rowY / det
  const b = -rowX / det
  const c = -colY / det
  const d = colX / det
  const period = periodX(shape)
  const midX = x0 + (colX * (shape.width - 1) + rowX * (shape.height - 1)) / 2
  return {
    toPixel(lon, lat) {
      let x = lon
      let y = lat
      if (!geographic) [x, y] = t.fromLonLat(lon, lat)
      if (period > 0) x += period * Math.round((midX - x) / period)
      const dx = x - x0
      const dy = y - y0
      return [a * dx + b * dy, c * dx + d * dy]
    },
    toLonLat: (col, row) => t.toLonLat(x0 + col * colX + row * rowX, y0 + col * colY + row * rowY),
  }
}

/** Geodesic length of one column step and one row step at mid-raster, m, and their geometric mean. */
export function postingM(shape: GridShape): { colM: number; rowM: number; meanM: number } {
  const p = gridPosition(shape)
  const col = (shape.width - 1) / 2
  const row = (shape.height - 1) / 2
  const length = (dc: number, dr: number): number =>
    geodesicInverse(lonLat(p.toLonLat(col - dc, row - dr)), lonLat(p.toLonLat(col + dc, row + dr))).distanceM
  const colM = length(0.5, 0)
  const rowM = length(0, 0.5)
  return { colM, rowM, meanM: Math.sqrt(colM * rowM) }
}
const lonLat = ([lon, lat]: [number, number]): LonLat => ({ lon, lat })

/** The four outer corners of a raster's pixels, clockwise from the first pixel, degrees. */
export function cornersOf(shape: GridShape): LonLat[] {
  const p = gridPosition(shape)
  const right = shape.width - 0.5
  const low = shape.height - 0.5
  return [lonLat(p.toLonLat(-0.5, -0.5)), lonLat(p.toLonLat(right, -0.5)), lonLat(p.toLonLat(right, low)), lonLat(p.toLonLat(-0.5, low))]
}
