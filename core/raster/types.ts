import type { Crs } from '../geodesy/index.ts'

export interface GridShape {
  readonly width: number
  readonly height: number
  readonly crs: Crs
  /** CRS position of the CENTRE of pixel (0,0) and of one step right / down; area or point is settled in intake. */
  readonly x0: number
  readonly y0: number
  readonly colX: number
  readonly colY: number
  readonly rowX: number
  readonly rowY: number
}
/** samples[row * width + col]; NaN = void. */
export interface RasterGrid<A extends Float32Array | Uint8Array = Float32Array> extends GridShape {
  readonly samples: A
}
