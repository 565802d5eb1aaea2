import type { RequiredRatio } from '../../detection/index.ts'

export interface PlaceRef {
  readonly lon: number
  readonly lat: number
  readonly azimuthDeg: number
  readonly rangeM: number
  /** Controlling obstacle toward the place: 'terrain', 'cover' or a name. */
  readonly obstacle: string
}

/**
 * Why a place is not usable, the first that applies; from short-range sensitivity on the first that, taken away alone, makes it pass. A null of the
 * two rays comes before those, at the end of the list so that numbers of causes stay.
 */
export const LOSS_CAUSES = [
  'unknown',
  'out-of-range',
  'masked',
  'marginal',
  'short-range-sensitivity',
  'above-beam',
  'below-beam',
  'clutter',
  'blind-speed',
  'too-weak',
  'several',
  'lobing',
] as const
export type LossCause = (typeof LOSS_CAUSES)[number]
/** Cause of a number as `NeedCells.cause` and the layer hold it: 1 + index in LOSS_CAUSES; null for 0 and NaN. */
export const lossCauseAt = (code: number): LossCause | null => LOSS_CAUSES[code - 1] ?? null
export const lossCode = (cause: LossCause): number => LOSS_CAUSES.indexOf(cause) + 1

export interface LossFigure {
  readonly cause: LossCause
  readonly pct: number
  /** In the unit of the need's measure: km², number of fixes, km. */
  readonly amount: number
}
/** Three shares of a need, each inside the one before, %. */
export interface NestedPct {
  readonly inSightPct: number
  readonly detectablePct: number
  readonly usablePct: number
}
export interface SuppressionFigure {
  /** Needed at 50 / 90 / 99 % of the places in sight with S/N over the required ratio, dB; null when there are none. */
  readonly p50Db: number | null
  readonly p90Db: number | null
  readonly p99Db: number | null
  /** What the radar has over the places of the need: ΣC/Σ(C/I), dB. */
  readonly availableDb: number
  /** Area where more is needed than available, km², and by how many dB at 90 and 99 % of the same places; 0 = enough. */
  readonly shortKm2: number
  readonly shortP90Db: number | null
  readonly shortP99Db: number | null
  readonly maskedPct: number
  readonly tooWeakPct: number
}
/** How far the ratio of echo to noise and residue stands over the required one, dB, over places in sight; null when there are none. */
export interface SignalFigure {
  readonly worstDb: number | null
  readonly tenthDb: number | null
  readonly worst: PlaceRef | null
}
/** Largest ground range inside which nothing passes at a level because of the pattern, m; null = no range passes, or the level is not above the antenna. */
export interface ConeFigure {
  readonly levelM: number
  readonly radiusM: number | null
}

/** One fix, or one piece of a track, on its own ray. Nulls where the ground is unknown. */
export interface FixFigure {
  readonly name: string
  readonly lon: number
  readonly lat: number
  readonly azimuthDeg: number
  readonly rangeM: number
  readonly slantRangeM: number | null
  /** Height of the target and coverage floor, m MSL and above the ground there. */
  readonly altM: number | null
  readonly altAglM: number | null
  readonly floorM: number | null
  readonly floorAglM: number | null
  readonly floorBandM: number | null
  /** altM − floorM. */
  readonly marginM: number | null
  readonly visible: 'yes' | 'no' | 'marginal' | 'unknown'
  readonly snrDb: number | null
  readonly signalMarginDb: number | null
  readonly pd: number | null
  readonly detectable: boolean
  readonly usable: boolean
  /** The same at k = 1; null where that was not worked out. */
  readonly visibleLowK: FixFigure['visible'] | null
  readonly detectableLowK: boolean | null
  readonly usableLowK: boolean | null
  readonly cause: LossCause | null
  /** Controlling obstacle and its range, m. */
  readonly obstacle: string
  readonly obstacleRangeM: number | null
}
export interface TrackPiece extends FixFigure {
  /** Distance along the track to its middle, and its length, m. */
  readonly alongM: number
  readonly lengthM: number
  /** Toward the radar negative; null without a speed. */
  readonly radialSpeedMs: number | null
  /** Response of the processing to that speed over its mean, dB; 0 where suppression is stated or none. */
  readonly responseDb: number
  readonly tangential: boolean
  readonly blind: boolean
}
/** Pieces in a row with the same outcome. */
export interface TrackSegment {
  readonly fromM: number
  readonly toM: number
  readonly cause: LossCause | null
  readonly tangential: boolean
  readonly blind: boolean
  readonly fromRangeM: number
  readonly toRangeM: number
  readonly fromAltM: number | null
  readonly toAltM: number | null
}
/** Where a target on the track comes into sight or leaves it, to about ten metres along it. */
export interface TrackPlace {
  readonly alongM: number
  readonly lon: number
  readonly lat: number
  readonly rangeM: number
  readonly altM: number
  readonly floorM: number
}
export interface TrackFigure {
  readonly lengthM: number
  readonly pieces: readonly TrackPiece[]
  readonly segments: readonly TrackSegment[]
  /** Longest stretch that is not usable. */
  readonly longestGapM: number
  readonly longestGapS: number | null
  /** Length flown across the beam, and at other blind speeds; 0 without a speed. */
  readonly tangentialM: number
  readonly blindM: number
  /** Null where the track begins, or ends, in sight, or never is. */
  readonly seenFrom: TrackPlace | null
  readonly lostAt: TrackPlace | null
}

/** Difference of a ray in the reference exponential air to one at the study's k, m (positive: it comes out higher), at a range and height, m MSL. */
export interface ExponentialFigure {
  readonly differenceM: number
  readonly rangeM: number
  readonly heightM: number
}

/** One need against one option. Percentages are of the need's area, fixes or length. */
export interface NeedFigure extends NestedPct {
  readonly needId: string
  readonly name: string
  readonly must: boolean
  readonly measure: 'area' | 'fixes' | 'length'
  /** km², number of fixes, km. */
  readonly amount: number
  /** 0 unless the measure is area, as all areas below. */
  readonly areaKm2: number
  /** Share that must be met, %, as the need states it. */
  readonly requiredPct: number
  readonly inSightKm2: number
  readonly detectableKm2: number
  readonly usableKm2: number
  /** The same shares at k = 1; null where that was not worked out. */
  readonly atLowK: (NestedPct & { readonly k: number }) | null
  /** Usable over the required share at the study's own k. */
  readonly met: boolean
  /** Met at the study's k and at k = 1; null while k = 1 is not worked out. */
  readonly passes: boolean | null
  readonly required: RequiredRatio
  readonly marginalKm2: number
  readonly unknownKm2: number
  /** Ground that stands above the level, left out of both, km². */
  readonly groundAboveKm2: number
  /** Height margin: worst place and 10 % level, m. */
  readonly worstMarginM: number | null
  readonly tenthMarginM: number | null
  readonly worst: PlaceRef | null
  readonly signal: SignalFigure
  /** Largest first; they add up to what is not usable. */
  readonly losses: readonly LossFigure[]
  readonly coneOfSilence: readonly ConeFigure[]
  readonly suppression: SuppressionFigure
  /** Worst first; null for other kinds of need. */
  readonly fixes: readonly FixFigure[] | null
  readonly track: TrackFigure | null
  /** Where a constant k is most off; null where there is no such place. */
  readonly exponential: ExponentialFigure | null
  /** Set when the need cannot be assessed; says why in a clause. */
  readonly notAssessed: string | null
}
