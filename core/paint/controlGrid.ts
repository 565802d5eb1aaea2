import { latFromWorldY, lonFromWorldX } from './mercator.ts'
import type { View } from './types.ts'

/** Two smooth functions of place, known exactly at the corners of square tiles of a view and bilinear between. */
export interface ControlGrid {
  /** Side of a tile, px. */
  readonly stepPx: number
  readonly columns: number
  readonly rows: number
  /** Node (i, j) at pixel corner (i * stepPx, j * stepPx); index j * (columns + 1) + i. */
  readonly a: Float64Array
  readonly b: Float64Array
}

/** Fills a control grid: `place(lonDeg, latDeg, out)` writes its two values to out[0], out[1]. Longitudes are not wrapped. */
export function controlGrid(v: View, stepPx: number, place: (lonDeg: number, latDeg: number, out: Float64Array) => void): ControlGrid {
  const columns = Math.max(1, Math.ceil(v.width / stepPx))
  const rows = Math.max(1, Math.ceil(v.height / stepPx))
  const a = new Float64Array((columns + 1) * (rows + 1))
  const b = new Float64Array(a.length)
  const out = new Float64Array(2)
  for (let j = 0, n = 0; j <= rows; j++) {
    const lat = latFromWorldY(v.worldY - j * stepPx * v.worldPerPx)
    for (let i = 0; i <= columns; i++, n++) {
      place(lonFromWorldX(v.worldX + i * stepPx * v.worldPerPx), lat, out)
      a[n] = out[0]!
      b[n] = out[1]!
    }
  }
  return { stepPx, columns, rows, a, b }
}

/** Largest tile side, px, whose bilinear error stays under `errorM`. Curvature of a map projection: about tan(latitude) / earth radius, at least 0.3 / earth radius. */
export function tileSidePx(groundPerPxM: number, latDeg: number, errorM: number): number {
  const curve = Math.max(0.3, Math.abs(Math.tan((latDeg * Math.PI) / 180))) / 6_371_000
  const side = Math.sqrt((8 * errorM) / curve) / groundPerPxM
  return side >= 128 ? 128 : side >= 64 ? 64 : side >= 32 ? 32 : 16
}
