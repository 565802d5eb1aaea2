import type { Earth } from '../../geodesy/index.ts'

/** One row of a surveyed horizon. */
export interface SurveyRow {
  /** Degrees true. */
  readonly azimuthDeg: number
  /** Elevation of the obstacle's top above the horizontal at the instrument, deg. */
  readonly elevationDeg: number
  /** Ground range to the obstacle, m. */
  readonly rangeM: number
  /** Instrument above the ground at the candidate, m. */
  readonly instrumentHeightM: number
  readonly method: string
  /** 90 % error of the elevation, deg. */
  readonly errorDeg: number
}
/** The horizon surveyed at one candidate; rows by rising azimuth. */
export interface Survey {
  readonly candidate: string
  readonly file: string
  readonly rows: readonly SurveyRow[]
}
/** A survey that a site takes into its horizon, and the earth its angles are turned into heights with. */
export interface SurveyUse {
  readonly candidate: string
  readonly earth: Earth
}
/** Rows no further apart than this are joined, deg; further apart the ground between them is not surveyed. */
export const MEASURED_GAP_DEG = 5
/** How far a row holds to a side on which no other is near, deg. */
export const MEASURED_ALONE_DEG = 0.5
/** 90 % error of an elevation where the survey states none, deg. Our own engineering choice. */
export const DEFAULT_SURVEY_ERROR_DEG = 0.05
