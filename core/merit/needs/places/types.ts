import type { LonLat } from '../../../geodesy/index.ts'

/** Height of a fix or of a corner of a track: above sea level or above the ground there, m. */
export interface NeedPlace extends LonLat {
  readonly name: string
  readonly altM: number
  readonly above: 'sea' | 'ground'
}
/** One ring of a polygon; rings of one feature make its outline and its holes. */
export interface PolygonRing {
  readonly feature: number
  readonly path: readonly LonLat[]
}
/** What the file of a need holds. */
export interface NeedPlaces {
  readonly needId: string
  readonly kind: 'fixes' | 'track' | 'polygon'
  /** Fixes, or the corners of a track in order; empty for a polygon. */
  readonly places: readonly NeedPlace[]
  /** Rings of a polygon; empty otherwise. */
  readonly rings: readonly PolygonRing[]
}
