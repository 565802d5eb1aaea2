/** Fixed colours of one quantity. Values map to 256 colours between `low` and `high`. */
export interface Ramp {
  /** Labelled stops, in the quantity's own unit. */
  readonly stops: readonly number[]
  /** 256 colours, 0xAABBGGRR (little-endian RGBA). */
  readonly rgba: Uint32Array
  readonly low: number
  readonly high: number
  /** Below `low`: leave the ground bare, or hold the first colour. */
  readonly below: 'bare' | 'hold'
}
/** A window on the map: web mercator metres, north up. worldX, worldY = top-left corner of pixel (0, 0). */
export interface View {
  readonly width: number
  readonly height: number
  readonly worldX: number
  readonly worldY: number
  readonly worldPerPx: number
  readonly night: boolean
}
