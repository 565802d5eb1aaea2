import type { ClutterCells, FoldedCells, LandTable } from '../clutter/index.ts'
import type { SuppressionBy } from '../doppler/index.ts'
import type { Earth } from '../geodesy/index.ts'
import type { SightCells, SiteCells } from '../masking/index.ts'
import type { Held } from '../polar/index.ts'
import type { RadarInput } from '../radar/index.ts'
import type { SettledStudy } from '../study/index.ts'
import type { Ground, Site, SurveyUse } from '../terrain/index.ts'
import { fromDb, toDb } from '../units/index.ts'
import type { NeedPlaces } from './needs/places/types.ts'
import type { FloorFigure } from './types.ts'

/** The smaller effective-earth factor at which cover is worked out as well: a need passes only at both. */
export const LOW_K = 1
/** Is a study's own factor no larger than that, so that cover needs no other? */
export const isLowK = (k: number): boolean => k > 0 && k <= LOW_K

/** Cover of one mast height at the smaller k. */
export interface LowKCells extends Held {
  readonly kind: 'lowK'
  readonly heightM: number
  readonly k: number
  /** Lowest height that clears the coverage floor by its error band, m MSL; NaN unknown. */
  readonly clearM: Float32Array
  readonly floors: readonly FloorFigure[]
  readonly earth: Earth
  /** Mean effective radius over the azimuths, m. */
  readonly meanRadiusM: number
}

/** Everything known about one option (candidate × mast height × tilt): what figures and layers are read from. */
export interface OptionCells {
  readonly ground: Ground
  readonly place: Site
  readonly earth: Earth
  readonly radar: RadarInput
  readonly atmosphere: SettledStudy['atmosphere']
  /** The study's own land table; null for the built-in one. */
  readonly landTable: LandTable | null
  readonly heightM: number
  readonly tiltDeg: number
  readonly site: SiteCells
  readonly mask: SightCells
  readonly clutter: ClutterCells
  /** What suppression does to each kind of clutter. `clutter.residueDb` holds it only where kinds differ: read it through `residueOf`. */
  readonly suppression: SuppressionBy
  /** Clutter from beyond the unambiguous range, which `clutter` leaves out; null where none can fold in, or it is not worked out. */
  readonly folded: FoldedCells | null
  /** Null where cover at the smaller k is not worked out. */
  readonly lowK: LowKCells | null
  /** What the files of needs hold. */
  readonly places: readonly NeedPlaces[]
  /** The survey at the candidate, and whether results take it as the higher of both; absent = none. */
  readonly survey?: SurveyUse & { readonly used: boolean }
  /** Radar cross-section of a vehicle, m²; absent = 30. */
  readonly vehicleRcsM2?: number
}

/** Electrical centre, m MSL. */
export const antennaM = (o: Pick<OptionCells, 'site' | 'heightM'>): number => o.site.siteGroundM + o.heightM

/** Mean effective earth radius over the azimuths of a site, m: for angles and slant ranges of targets, where 0.3 % of bulge is under a metre. */
export function meanEffectiveRadiusM(site: SiteCells): number {
  let sum = 0
  for (const r of site.effectiveRadiusM) sum += r
  return sum / site.effectiveRadiusM.length
}

/** Clutter and residue over noise by cell, dB, before STC, with what folds in from earlier pulses; NaN where there is none. */
export interface ResidueCells {
  readonly cnrDb: Float32Array
  /** Residue: `left[cell]` less `lessDb`. */
  readonly left: Float32Array
  readonly lessDb: number
  /** Folded clutter over noise, ratio, and what suppression leaves of it, ratio; null = none. */
  readonly folded: Float32Array | null
  readonly foldedLeft: number
  /** How far spiky clutter raises the threshold of an area, dB; null = it does not. */
  readonly riseDb: Float32Array | null
}
export function residueOf(o: Pick<OptionCells, 'clutter' | 'suppression' | 'folded'>, riseDb: Float32Array | null): ResidueCells {
  const { uniformDb, rows } = o.suppression
  const foldedDb = rows.find((r) => r.about === 'folded')?.improvementDb ?? 0
  return {
    cnrDb: o.clutter.cnrDb,
    ...(uniformDb === null ? { left: o.clutter.residueDb, lessDb: 0 } : { left: o.clutter.cnrDb, lessDb: uniformDb }),
    folded: o.folded?.ratio ?? null,
    foldedLeft: fromDb(-foldedDb),
    riseDb,
  }
}
/** Two levels over noise added, dB; NaN stands for nothing, `ratio` > 0. */
export const plusRatioDb = (db: number, ratio: number): number => toDb((Number.isNaN(db) ? 0 : fromDb(db)) + ratio)
