import type { LonLat } from '../geodesy/index.ts'

/** A point or line that stands above the ground. Exactly one of heightM (above ground) and topM (MSL) is a number. */
export interface Obstacle {
  readonly name: string
  /** One position for a point; two or more for a line (every piece blocks). */
  readonly path: readonly LonLat[]
  readonly heightM: number | null
  readonly topM: number | null
  readonly widthM: number
  readonly rcsM2: number | null
  readonly verticalErrorM: number | null
}
export interface Road {
  readonly name: string
  /** OpenStreetMap highway / railway value. */
  readonly highway: string
  readonly maxspeedKmh: number | null
  /** In a tunnel: its vehicles are not seen. */
  readonly tunnel: boolean
  readonly path: readonly LonLat[]
}
