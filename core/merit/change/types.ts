import type { FixFigure, NeedFigure } from '../types.ts'

/** One number before and after; null where it is not known. */
export interface BeforeAfter {
  readonly before: number | null
  readonly after: number | null
}
export interface NeedChange {
  readonly needId: string
  readonly name: string
  readonly must: boolean
  readonly measure: NeedFigure['measure']
  readonly met: { readonly before: Pick<NeedFigure, 'met' | 'passes'>; readonly after: Pick<NeedFigure, 'met' | 'passes'> }
  readonly inSightPct: BeforeAfter
  readonly detectablePct: BeforeAfter
  readonly usablePct: BeforeAfter
  readonly worstMarginM: BeforeAfter
  readonly worstSignalDb: BeforeAfter
  /** Area that becomes usable and that stops being so, km²; null where the need is none of an area or the two do not stand at one place. */
  readonly gainedKm2: number | null
  readonly lostKm2: number | null
}
/** A fix whose floor, sight or use changes. */
export interface FixChange {
  readonly needId: string
  readonly name: string
  readonly azimuthDeg: number
  readonly rangeM: number
  readonly before: FixFigure
  readonly after: FixFigure
  /** Height lost under the fix: floor after less floor before, m; negative = gained. */
  readonly floorRiseM: number | null
}
/** A run of azimuths over which the horizon stands higher (new screening) or lower than before. */
export interface SectorChange {
  /** Clockwise from `fromDeg` to `toDeg`, deg true; 0 to 360 where it goes all round. */
  readonly fromDeg: number
  readonly toDeg: number
  /** Largest change in it, deg, rise positive, and where. */
  readonly mostDeg: number
  readonly atDeg: number
  /** What the horizon is there afterwards, and its range, m. */
  readonly obstacle: string
  readonly rangeM: number
}
export interface FloorChange {
  readonly rangeM: number
  readonly worstM: BeforeAfter
  readonly medianM: BeforeAfter
}
/** What a changed obstacle, or another mast, makes of an option. */
export interface Change {
  readonly needs: readonly NeedChange[]
  /** Fixes and only those that change, largest loss first. */
  readonly fixes: readonly FixChange[]
  readonly risen: readonly SectorChange[]
  readonly fallen: readonly SectorChange[]
  readonly floors: readonly FloorChange[]
  readonly groundInSightKm2: BeforeAfter
  readonly clutterOver40Km2: BeforeAfter
  /** Ground where clutter over noise comes to be, or grows by 3 dB and more, and the other way, km²; null where the two do not stand at one place. */
  readonly clutterMoreKm2: number | null
  readonly clutterLessKm2: number | null
  /** Spacing of the nulls of two rays over a level surface, λ/2h, deg. */
  readonly nullSpacingDeg: BeforeAfter
}
