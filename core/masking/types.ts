import type { Held } from '../polar/index.ts'

export interface HorizonRow {
  readonly azimuthDeg: number
  /** Elevation of the horizon at the antenna, deg; exact effective-earth geometry. */
  readonly elevationDeg: number
  /** Ground range to, height (m MSL) and place of the controlling point. */
  readonly rangeM: number
  readonly heightM: number
  readonly lon: number
  readonly lat: number
  /** 'terrain', 'cover', the obstacle's name, or 'at least: edge of terrain'. */
  readonly obstacle: string
}
/** Per candidate: what does not depend on mast height except heightToSeeM, which holds for every height. */
export interface SiteCells extends Held {
  readonly kind: 'site'
  /** Ground at the cell centre, m MSL; NaN unknown. */
  readonly groundM: Float32Array
  /** Ground code at the cell centre (index into Ground.codes), 255 = unknown. */
  readonly code: Uint8Array
  /** Relief at the cell centre, a value of RELIEF. */
  readonly relief: Uint8Array
  /** Terrain slope along the ray (rising away from the radar is positive), per mille. */
  readonly slopePermille: Int16Array
  /** Lowest electrical centre above the site's ground that brings the cell centre's surface into sight, m; NaN unknown. */
  readonly heightToSeeM: Float32Array
  /** Site ground height used, m MSL. */
  readonly siteGroundM: number
  /** Effective earth radius used per azimuth, m. */
  readonly effectiveRadiusM: Float64Array
}
export interface SightCells extends Held {
  readonly kind: 'sight'
  readonly heightM: number
  readonly state: Uint8Array
  /** Fraction of the cell's ground in sight × 65535; 0 only if nothing is seen. */
  readonly inSight: Uint16Array
  /** Coverage floor at the cell centre, m MSL; NaN unknown. */
  readonly floorM: Float32Array
  /** Error band of the floor, m. */
  readonly floorBandM: Float32Array
  /** One row per azimuth. */
  readonly horizon: readonly HorizonRow[]
}
