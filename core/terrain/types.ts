import type { GroundCode } from '../landcover/index.ts'
import type { Obstacle, Road } from '../obstacles/index.ts'
import type { GridShape, RasterGrid } from '../raster/index.ts'
import type { Survey, SurveyUse } from './survey/types.ts'

export const RELIEF = { low: 0, high: 1, mountains: 2, unknown: 255 } as const
export type Relief = (typeof RELIEF)[keyof typeof RELIEF]

/** What every ray runs over. The arrays may lie on a SharedArrayBuffer. */
export interface Ground {
  readonly serial: number
  readonly shape: GridShape
  /** m MSL, NaN = void; shape.width * shape.height. */
  readonly heightM: Float32Array
  /** Index into `codes` per post, or null when the terrain is uniform (codes[0]). */
  readonly code: Uint8Array | null
  readonly codes: readonly GroundCode[]
  /** One value of RELIEF per block of the raster. */
  readonly relief: RasterGrid<Uint8Array>
  readonly obstacles: readonly Obstacle[]
  /** Roads and railways, whose vehicles may be seen; they mask nothing. */
  readonly roads: readonly Road[]
  /** Horizons surveyed at candidates. */
  readonly surveys: readonly Survey[]
  /** 90 % linear error of the heights, m. */
  readonly verticalErrorM: number
  /** Mean posting at mid-raster, m. */
  readonly postingM: number
}
/** A candidate's place as the kernels need it. */
export interface Site {
  readonly lon: number
  readonly lat: number
  /** Stated ground height, m MSL; null = bilinear ground of the raster. */
  readonly groundHeightM: number | null
  readonly clearingRadiusM: number
  /** The surveyed horizon it takes as obstacles; absent = none. */
  readonly survey?: SurveyUse
}
/** Where the numbers of one entry of a RayTrack lie: entry k starts at TRACK.stride * k. */
export const TRACK = { stride: 3, distM: 0, heightM: 1, bendPerM: 2 } as const
/**
 * Scratch of one ray, filled again for each azimuth; never leaves the kernel. All mast heights read the same track. One entry per crossing: ground range
 * from the site (m), height (m MSL) and the quadratic term of the height between this crossing and the next (1/m), side by side for the hot loops.
 */
export interface RayTrack {
  count: number
  readonly ground: Float64Array
  /** Ground + cover + obstacles; the same array where there is neither. */
  readonly surface: Float64Array
  /** Where the ray stopped being known: crossed a void or left the raster, m; Infinity if neither. */
  unknownFromM: number
  unknownWhy: 'void' | 'edge' | null
}
