import type { HorizonRow } from '../masking/index.ts'

export interface PlaceRef {
  readonly lon: number
  readonly lat: number
  readonly azimuthDeg: number
  readonly rangeM: number
  /** Controlling obstacle toward the place: 'terrain', 'cover' or a name. */
  readonly obstacle: string
}
/** Lowest height covered at one ground range, over all azimuths, m MSL. null where nothing is known. */
export interface FloorFigure {
  readonly rangeM: number
  readonly bestM: number | null
  readonly medianM: number | null
  readonly worstM: number | null
  readonly worstAzimuthDeg: number | null
  readonly worstBandM: number | null
}
/** Ground and clutter of one range ring. */
export interface RingFigure {
  readonly fromM: number
  readonly toM: number
  readonly groundKm2: number
  readonly inSightKm2: number
  readonly unknownKm2: number
  /** Power mean of C/N over ground in sight, dB; null when none. */
  readonly cnrMeanDb: number | null
  readonly cnrMaxDb: number | null
}
export interface SuppressionFigure {
  /** Needed at 50 / 90 / 99 % of the places in sight with S/N > D0, dB; null when there are none. */
  readonly p50Db: number | null
  readonly p90Db: number | null
  readonly p99Db: number | null
  readonly availableDb: number
  /** Area where more is needed than available, km². */
  readonly shortKm2: number
  readonly maskedPct: number
  readonly tooWeakPct: number
}
/** A layer need against one option. Percentages of the need's area. */
export interface NeedFigure {
  readonly needId: string
  readonly name: string
  readonly must: boolean
  readonly areaKm2: number
  /** Share that must be met, %, as the need states it. */
  readonly requiredPct: number
  readonly inSightPct: number
  readonly inSightKm2: number
  readonly marginalKm2: number
  readonly unknownKm2: number
  /** Ground that stands above the level, left out of both, km². */
  readonly groundAboveKm2: number
  /** Height margin: worst place and 10 % level, m. */
  readonly worstMarginM: number | null
  readonly tenthMarginM: number | null
  readonly worst: PlaceRef | null
  readonly suppression: SuppressionFigure
  /** Set when this kind of need is not assessed yet; says so in a clause. */
  readonly notAssessed: string | null
}
export interface Figures {
  readonly siteGroundM: number
  readonly antennaM: number
  readonly groundInSightKm2: number
  readonly maskedKm2: number
  readonly unknownKm2: number
  readonly horizon: {
    readonly medianDeg: number | null
    readonly p90Deg: number | null
    readonly highest: HorizonRow | null
    /** Every fourth degree or so, for charts and the memo: one row per azimuth of the grid. */
    readonly rows: readonly HorizonRow[]
  }
  readonly floors: readonly FloorFigure[]
  readonly rings: readonly RingFigure[]
  readonly ringWidthM: number
  /** Area with C/N over 0, 20, 40, 60 dB. */
  readonly clutterOverKm2: { readonly over0: number; readonly over20: number; readonly over40: number; readonly over60: number }
  readonly cnrPeakDb: number | null
  readonly needs: readonly NeedFigure[]
  /** Names of obstacles in sight. */
  readonly obstaclesInSight: readonly string[]
  readonly marks: readonly { readonly mark: string; readonly about: string }[]
  /** Flat copy for summary.json: names end in _km2, _db, _deg, _pct or _m. */
  readonly flat: Readonly<Record<string, number | null>>
}
/** Results against mast height for one candidate: the ruler's two strips. */
export interface Ladder {
  readonly heightsM: readonly number[]
  /** First need's area in sight, %; ground in sight, %, when there is no layer need. */
  readonly inSightPct: readonly number[]
  /** Ground with C/N over 40 dB, km². */
  readonly over40Km2: readonly number[]
  /** Lowest height of the ladder from which the required share of each layer need is in sight; null = not within the ladder. */
  readonly needMetAtM: readonly { readonly needId: string; readonly name: string; readonly heightM: number | null }[]
}
