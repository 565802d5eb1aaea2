import { type GridShape, geodesicInverse, gridPosition, type LonLat, postingM, RAD_PER_DEG } from '../../../core/index.ts'

/** A terrain cell this much finer than asked for still counts as equal. */
const EQUAL = 0.01

/**
 * Lattice of the rasters of a run: the terrain's own where its cell is at least half a range step, else the same corner, axes and CRS with cells of
 * half a range step.
 */
export function mapLattice(terrain: GridShape, rangeStepM: number): GridShape {
  const { colM, rowM } = postingM(terrain)
  const wanted = rangeStepM / 2
  if (Math.max(colM, rowM) >= wanted * (1 - EQUAL)) return terrain
  const across = wanted / colM
  const down = wanted / rowM
  const { x0, y0, colX, colY, rowX, rowY } = terrain
  return {
    crs: terrain.crs,
    width: Math.ceil(terrain.width / across - 1e-9),
    height: Math.ceil(terrain.height / down - 1e-9),
    x0: x0 + ((across - 1) * colX + (down - 1) * rowX) / 2,
    y0: y0 + ((across - 1) * colY + (down - 1) * rowY) / 2,
    colX: colX * across,
    colY: colY * across,
    rowX: rowX * down,
    rowY: rowY * down,
  }
}

/** Side of a block within which positions are bilinear between exact corners, cells. 1 km blocks are right to a millimetre. */
const BLOCK = 32

/**
 * Calls `visit` with east and north of every cell centre of a lattice as seen from the site: ground range × sine and cosine of the true azimuth (WGS 84
 * geodesics), m. Cells without an image are left out.
 */
export function eachFromSite(shape: GridShape, site: LonLat, visit: (cell: number, eastM: number, northM: number) => void): void {
  const position = gridPosition(shape)
  const exact = (col: number, row: number): [number, number] => {
    const [lon, lat] = position.toLonLat(col, row)
    const { azimuthDeg, distanceM } = geodesicInverse(site, { lon, lat })
    return [distanceM * Math.sin(azimuthDeg * RAD_PER_DEG), distanceM * Math.cos(azimuthDeg * RAD_PER_DEG)]
  }
  const across = Math.ceil(shape.width / BLOCK)
  let top = Array.from({ length: across + 1 }, (_, c) => exact(c * BLOCK, 0))
  for (let row = 0; row < shape.height; row += BLOCK) {
    const low = Array.from({ length: across + 1 }, (_, c) => exact(c * BLOCK, row + BLOCK))
    for (let b = 0; b < across; b++) {
      const [a, r, s, t] = [top[b], top[b + 1], low[b], low[b + 1]] as [number, number][] as [
        [number, number],
        [number, number],
        [number, number],
        [number, number],
      ]
      const width = Math.min(BLOCK, shape.width - b * BLOCK)
      const height = Math.min(BLOCK, shape.height - row)
      for (let dr = 0; dr < height; dr++) {
        const v = dr / BLOCK
        for (let dc = 0; dc < width; dc++) {
          const u = dc / BLOCK
          const east = (a[0] * (1 - u) + r[0] * u) * (1 - v) + (s[0] * (1 - u) + t[0] * u) * v
          const north = (a[1] * (1 - u) + r[1] * u) * (1 - v) + (s[1] * (1 - u) + t[1] * u) * v
          visit((row + dr) * shape.width + b * BLOCK + dc, east, north)
        }
      }
    }
    top = low
  }
}
