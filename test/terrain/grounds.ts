// Small grounds for tests: a projected grid with square posts, or a geographic one.
import { crsFromEpsg, WGS84 } from '../../core/geodesy/index.ts'
import type { GroundCode } from '../../core/landcover/index.ts'
import type { Obstacle } from '../../core/obstacles/index.ts'
import { type GridShape, gridPosition } from '../../core/raster/index.ts'
import { buildGround, type Ground, type Site } from '../../core/terrain/index.ts'
import { finish } from '../../core/work/index.ts'

export const FARMLAND: GroundCode = { terrain: 'farmland', coverHeightM: 0, sourceClass: null, mark: null }
export const FOREST: GroundCode = { terrain: 'forest', coverHeightM: 15, sourceClass: 10, mark: null }
export const FLAT_EARTH = { effectiveEarthFactor: 0, earthRadiusM: null }
export const FOUR_THIRDS = { effectiveEarthFactor: 4 / 3, earthRadiusM: null }

export interface Extras {
  readonly code?: Uint8Array
  readonly codes?: readonly GroundCode[]
  readonly obstacles?: readonly Obstacle[]
  readonly verticalErrorM?: number
}
export function groundOn(shape: GridShape, height: (col: number, row: number) => number, extras: Extras = {}): Ground {
  const heightM = Float32Array.from({ length: shape.width * shape.height }, (_, i) => height(i % shape.width, Math.floor(i / shape.width)))
  const { code = null, codes = [FARMLAND], obstacles = [], verticalErrorM = 10 } = extras
  return finish(buildGround({ serial: 1, shape, heightM, code, codes, obstacles, verticalErrorM }))
}
/** UTM 33N grid around 15° E, 48° N. */
export async function utmShape(width: number, height: number, postM: number): Promise<GridShape> {
  return {
    width,
    height,
    crs: await crsFromEpsg(32633),
    x0: 500_000 - (width * postM) / 2,
    y0: 5_316_000 + (height * postM) / 2,
    colX: postM,
    colY: 0,
    rowX: 0,
    rowY: -postM,
  }
}
/** Geographic grid whose middle lies at a place; steps in degrees. */
export const geographicShape = (width: number, height: number, lon: number, lat: number, stepLon: number, stepLat: number): GridShape => ({
  width,
  height,
  crs: WGS84,
  x0: lon - (stepLon * (width - 1)) / 2,
  y0: lat + (stepLat * (height - 1)) / 2,
  colX: stepLon,
  colY: 0,
  rowX: 0,
  rowY: -stepLat,
})
export function siteAt(g: Ground, col: number, row: number, over: Partial<Site> = {}): Site {
  const [lon, lat] = gridPosition(g.shape).toLonLat(col, row)
  return { lon, lat, groundHeightM: null, clearingRadiusM: 0, ...over }
}
export const placeAt = (g: Ground, col: number, row: number): { lon: number; lat: number } => {
  const [lon, lat] = gridPosition(g.shape).toLonLat(col, row)
  return { lon, lat }
}
/** Numbers that look random and are the same every time (mulberry32). */
export function seeded(seed: number): () => number {
  let a = seed
  return () => {
    a = (a + 0x6d2b79f5) | 0
    let t = Math.imul(a ^ (a >>> 15), 1 | a)
    t = (t + Math.imul(t ^ (t >>> 7), 61 | t)) ^ t
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296
  }
}
