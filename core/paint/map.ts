import type { LonLat } from '../geodesy/index.ts'
import type { PolarShape } from '../polar/index.ts'
import type { RasterGrid } from '../raster/index.ts'
import { paintHillshade } from './hillshade.ts'
import { paintPolar } from './polar.ts'
import type { PolarPaint, Ramp, View, WaterCodes } from './types.ts'

/** One layer over the ground. */
export interface MapLayer {
  readonly grid: PolarShape
  readonly site: LonLat
  readonly values: Float32Array
  readonly state: Uint8Array
  readonly ramp: Ramp
  readonly how?: PolarPaint
}
/** The sheet under everything, RGB. */
export const SHEET_RGB = { day: [246, 243, 236], night: [20, 24, 27] } as const

/** Sheet, shaded ground and one layer as one opaque RGBA picture of a view, for print and tests. */
export function paintMap(
  ground: RasterGrid | null,
  layer: MapLayer | null,
  view: View,
  out: Uint32Array,
  water: WaterCodes | null = null,
): void {
  const pixels = view.width * view.height
  if (ground) paintHillshade(ground, view, out, water)
  else out.fill(0, 0, pixels)
  const [r, g, b] = view.night ? SHEET_RGB.night : SHEET_RGB.day
  const sheet = ((255 << 24) | (b << 16) | (g << 8) | r) >>> 0
  for (let n = 0; n < pixels; n++) if (out[n] === 0) out[n] = sheet
  if (!layer) return
  const over = new Uint32Array(pixels)
  paintPolar(layer.grid, layer.site, layer.values, layer.state, layer.ramp, view, over, layer.how)
  layOver(over, out, pixels)
}

/** Straight-alpha `over` on opaque `under`, in place. */
export function layOver(over: Uint32Array, under: Uint32Array, pixels: number): void {
  for (let n = 0; n < pixels; n++) {
    const o = over[n]!
    const alpha = o >>> 24
    if (alpha === 0) continue
    const u = under[n]!
    const mix = (shift: number) => {
      const below = (u >>> shift) & 255
      return below + Math.round(((((o >>> shift) & 255) - below) * alpha) / 255)
    }
    under[n] = ((255 << 24) | (mix(16) << 16) | (mix(8) << 8) | mix(0)) >>> 0
  }
}
