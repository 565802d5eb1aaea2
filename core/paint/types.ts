import type { ClassPattern } from './classPatterns.ts'

/** Fixed colours of one quantity. Values map to 256 colours between `low` and `high`. */
export interface Ramp {
  /** Labelled stops, in the quantity's own unit. */
  readonly stops: readonly number[]
  /** 256 colours, 0xAABBGGRR (little-endian RGBA). */
  readonly rgba: Uint32Array
  /** The same for the night theme; absent = the day colours serve. */
  readonly rgbaNight?: Uint32Array
  readonly low: number
  readonly high: number
  /** Below `low`: leave the ground bare, or hold the first colour. */
  readonly below: 'bare' | 'hold'
}
/** A window on the map: web mercator metres (EPSG:3857, y grows northward), north up. worldX, worldY = top-left corner of pixel (0, 0). */
export interface View {
  readonly width: number
  readonly height: number
  readonly worldX: number
  readonly worldY: number
  readonly worldPerPx: number
  readonly night: boolean
}
/** How a polar layer is laid over the ground. */
export interface PolarPaint {
  /** Of the value colours, 0..1; default 0.86. */
  readonly opacity?: number
  /** Draw masked and marginal cells hatched and dotted; default true. Unknown cells are always hatched. */
  readonly hatchMasked?: boolean
  /** Interpolate values (never states) between valid cells where a cell is over 3 px; default false. For dB layers. */
  readonly smooth?: boolean
  /** The values are classes, numbered from 1, and each has its pattern; absent: plain colours. Never smooth. */
  readonly patterns?: readonly ClassPattern[]
}
/** Where the ground raster is water, when land cover says so. */
export interface WaterCodes {
  /** One byte per post, as large as the raster. */
  readonly code: Uint8Array
  /** 256 entries, 1 = water. */
  readonly isWater: Uint8Array
}
