import { effectiveRadiusM, elevationAngleDeg, heightOnRayM } from '../../geodesy/index.ts'
import { RAD_PER_DEG, wrap360 } from '../../units/index.ts'
import { siteGround } from '../buildGround.ts'
import type { Ground, Site } from '../types.ts'
import { MEASURED_ALONE_DEG, MEASURED_GAP_DEG, type SurveyRow } from './types.ts'

/** What a survey found in one ray: an obstacle at a range, with its top (m MSL) and the 90 % error of that, m. */
export interface SurveyPoint {
  readonly distM: number
  readonly topM: number
  readonly errorM: number
}
/** The survey that a site takes into its horizon, as heights along each azimuth; null where it takes none. */
export interface SurveyLine {
  /** null where nothing was surveyed. */
  at(azimuthDeg: number): SurveyPoint | null
}

/** Top of the obstacle of one row, m MSL: its elevation from the instrument, at its range, on the effective sphere. */
export const surveyedTopM = (row: SurveyRow, groundM: number, radiusM: number): number =>
  heightOnRayM(groundM + row.instrumentHeightM, row.elevationDeg, row.rangeM, radiusM)

/**
 * A surveyed horizon as an obstacle per azimuth. Each row is a height at its range: seen from a mast of any height it stands where it stands. Between rows at
 * most 5° apart the elevation is linear, both taken to the instrument of the nearer row through their own ranges, at the range of the nearer row; further
 * apart a row holds to 0.5° on that side.
 */
export function surveyLine(g: Ground, site: Site): SurveyLine | null {
  const { survey } = site
  const rows = survey && g.surveys.find((s) => s.candidate === survey.candidate)?.rows
  if (!survey || !rows || rows.length === 0) return null
  const groundM = siteGround(g, site)
  if (!Number.isFinite(groundM)) return null
  const radius = (azimuthDeg: number): number => effectiveRadiusM(survey.earth, site.lat, azimuthDeg)
  const tops = rows.map((r) => surveyedTopM(r, groundM, radius(r.azimuthDeg)))
  const point = (row: SurveyRow, elevationDeg: number, radiusM: number): SurveyPoint => ({
    distM: row.rangeM,
    topM: heightOnRayM(groundM + row.instrumentHeightM, elevationDeg, row.rangeM, radiusM),
    errorM: row.rangeM * Math.tan(row.errorDeg * RAD_PER_DEG),
  })
  return {
    at(azimuthDeg) {
      const az = wrap360(azimuthDeg)
      let next = rows.findIndex((r) => r.azimuthDeg >= az)
      if (next < 0) next = 0
      const before = (next + rows.length - 1) % rows.length
      const toNext = wrap360(rows[next].azimuthDeg - az)
      const toBefore = wrap360(az - rows[before].azimuthDeg)
      const near = toNext <= toBefore ? next : before
      const radiusM = radius(az)
      const row = rows[near]
      if (rows.length > 1 && toNext + toBefore <= MEASURED_GAP_DEG) {
        const share = toBefore / (toNext + toBefore)
        const from = (i: number): number => elevationAngleDeg(groundM + row.instrumentHeightM, tops[i], rows[i].rangeM, radiusM)
        return point(row, from(before) + share * (from(next) - from(before)), radiusM)
      }
      return Math.min(toNext, toBefore) <= MEASURED_ALONE_DEG ? point(row, row.elevationDeg, radiusM) : null
    },
  }
}
