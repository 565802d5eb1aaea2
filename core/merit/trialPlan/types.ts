import type { LonLat } from '../../geodesy/index.ts'

/** How a row of a trial plan is carried out: along a radial, around an orbit, holding over a place, over a fix, along a track, or on the ground. */
export const TRIAL_KINDS = ['radial', 'orbit', 'hold', 'fix', 'track', 'survey'] as const
export type TrialKind = (typeof TRIAL_KINDS)[number]
/** What a row would confirm. */
export type TrialConfirms = 'floor' | 'signal' | 'horizon' | 'cone' | 'fix' | 'gap' | 'sight-edge' | 'obstacle'
/** What is predicted at the place and altitude of a row. */
export type TrialPrediction = 'usable' | 'detectable' | 'in sight' | 'marginal' | 'masked' | 'unknown'

/** One thing to fly or measure. Heights are m MSL, ranges ground range from the radar, azimuths degrees true. */
export interface TrialRow {
  readonly kind: TrialKind
  readonly confirms: TrialConfirms
  readonly needId: string
  readonly needName: string
  /** Name of the fix; '' elsewhere. */
  readonly name: string
  /** The place the row is made for: its worst margin, the fix, the edge of sight, or the obstacle. */
  readonly at: LonLat & { readonly azimuthDeg: number; readonly rangeM: number }
  /** Along a radial or track; null elsewhere. */
  readonly fromRangeM: number | null
  readonly toRangeM: number | null
  /** Of an orbit, clockwise; null elsewhere. */
  readonly fromAzimuthDeg: number | null
  readonly toAzimuthDeg: number | null
  /** Altitude to fly, or top of the obstacle to measure; null where unknown. */
  readonly altitudeM: number | null
  /** Coverage floor there, its error band, and the altitude less the floor. */
  readonly floorM: number | null
  readonly floorBandM: number | null
  readonly marginM: number | null
  readonly signalMarginDb: number | null
  /** null for a survey. */
  readonly predicted: TrialPrediction | null
  /** Controlling obstacle toward the place: 'terrain', 'cover' or a name. */
  readonly obstacle: string
  readonly obstacleRangeM: number | null
}
