import type { ClutterLevels, SecondTimeAround } from '../clutter/index.ts'
import type { SuppressionBy } from '../doppler/index.ts'
import type { HorizonRow } from '../masking/index.ts'
import type { MeasuredHorizonFigure } from './measured/measuredFigure.ts'
import type { NeedFigure } from './needs/needTypes.ts'
import type { RoadsFigure } from './roads/types.ts'
import type { TrialRow } from './trialPlan/types.ts'

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
/** Clutter of one option at k = 2.75, where more ground comes into sight. */
export interface HighKFigure {
  readonly k: number
  readonly clutterOverKm2: Figures['clutterOverKm2']
  readonly cnrPeakDb: number | null
  /** null where no earlier pulse can fold in. */
  readonly secondTimeAroundKm2: number | null
  /** Suppression needed at 50, 90 and 99 % of the places of each layer or polygon need, dB, and the area where it is short. */
  readonly suppression: readonly {
    readonly needId: string
    readonly name: string
    readonly p50Db: number | null
    readonly p90Db: number | null
    readonly p99Db: number | null
    readonly shortKm2: number
  }[]
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
  /** The smaller k that cover is also worked out at, and its floors; null where that was not done. */
  readonly lowK: number | null
  readonly floorsLowK: readonly FloorFigure[] | null
  /** What suppression does to each kind of clutter. */
  readonly suppressionBy: SuppressionBy
  readonly rings: readonly RingFigure[]
  readonly ringWidthM: number
  /** Area with C/N over 0, 20, 40, 60 dB. */
  readonly clutterOverKm2: { readonly over0: number; readonly over20: number; readonly over40: number; readonly over60: number }
  readonly cnrPeakDb: number | null
  /** C/N by ring of 5 NM and octant: mean, levels that 90 and 99 % of the ground stays under, share over 40 dB; STC not taken off. */
  readonly clutterLevels: ClutterLevels
  /** Ground where clutter of an earlier pulse stands over the noise; where terrain ends sooner than it is looked for, how far it was. */
  readonly secondTimeAround: SecondTimeAround
  readonly needs: readonly NeedFigure[]
  /** Clutter at k = 2.75; null until it is worked out, after all figures at the study's own k, and where that k is no smaller. */
  readonly atHighK: HighKFigure | null
  /** Roads whose vehicles are seen; null where the study has no roads. */
  readonly roads: RoadsFigure | null
  /** What a trial should fly and a survey measure, from the worst margins of the needs. */
  readonly trialPlan: readonly TrialRow[]
  /** The horizon surveyed at the candidate beside the computed one; null where there is none. */
  readonly measuredHorizon: MeasuredHorizonFigure | null
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
  /** First need's area that is usable, %; 0 when there is none. */
  readonly usablePct: readonly number[]
  /** Area of all needs where suppression is short, km². */
  readonly shortKm2: readonly number[]
  /**
   * By octant about N, NE, E … (± 22.5°, true), per height: share of the area of the first need of an area that is usable, of known ground in sight
   * where there is none, %; null where the octant has nothing of it.
   */
  readonly octantPct: readonly (readonly (number | null)[])[]
  /** Every interval of the ladder in which a need is met at the study's k and at k = 1; a taller mast can lose one. */
  readonly needMet: readonly {
    readonly needId: string
    readonly name: string
    readonly intervals: readonly (readonly [fromM: number, toM: number])[]
  }[]
  /** Lowest height of the ladder at which each need is met; null = not within the ladder. */
  readonly needMetAtM: readonly { readonly needId: string; readonly name: string; readonly heightM: number | null }[]
}
export * from './needs/needTypes.ts'
