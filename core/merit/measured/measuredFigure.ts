import { effectiveRadiusM, elevationAngleDeg } from '../../geodesy/index.ts'
import { horizonAt } from '../../masking/index.ts'
import { type Survey, surveyedTopM } from '../../terrain/index.ts'
import { antennaM, type OptionCells } from '../optionCells.ts'

/** One azimuth of a surveyed horizon against the computed one, from one mast. */
export interface MeasuredRow {
  readonly azimuthDeg: number
  /** As surveyed, from the instrument, deg. */
  readonly measuredDeg: number
  readonly rangeM: number
  readonly instrumentHeightM: number
  readonly method: string
  /** Elevation of the same obstacle from the electrical centre of the option, deg. */
  readonly correctedDeg: number
  /** Of raster, cover and obstacles alone, on the row's own ray, deg; null where not even the ground at the mast is known. */
  readonly computedDeg: number | null
  /** Corrected less computed, deg. */
  readonly differenceDeg: number | null
  /** What controls the computed horizon, and where. */
  readonly computedRangeM: number | null
  readonly computedObstacle: string
}
/** A surveyed horizon against the computed one. Differences are corrected less computed, deg; null where none is known. */
export interface MeasuredHorizonFigure {
  /** Taken as the higher of both in all results of the option. */
  readonly used: boolean
  readonly file: string
  /** By rising azimuth. */
  readonly rows: readonly MeasuredRow[]
  readonly meanDeg: number | null
  readonly rmsDeg: number | null
  /** The row that differs most. */
  readonly worst: MeasuredRow | null
}

const found = new WeakMap<object, { survey: Survey; figure: MeasuredHorizonFigure }>()

/**
 * The horizon surveyed at an option's candidate beside the computed one, each row on its own ray; null where there is no survey. The obstacle of each row is a
 * height at its range (study's k), so that its elevation from the mast differs from that at the instrument; the computed horizon leaves the survey out.
 */
export function measuredHorizonFigure(o: OptionCells): MeasuredHorizonFigure | null {
  const survey = o.survey ? o.ground.surveys.find((s) => s.candidate === o.survey?.candidate) : undefined
  if (!o.survey || !survey) return null
  const held = found.get(o.mask)
  if (held?.survey === survey) return held.figure
  const figure = figureOf(o, survey, o.survey)
  found.set(o.mask, { survey, figure })
  return figure
}

function figureOf(o: OptionCells, survey: Survey, use: NonNullable<OptionCells['survey']>): MeasuredHorizonFigure {
  const { survey: _taken, ...bare } = o.place
  const { ranges, rangeStepM } = o.site.grid
  const computed = horizonAt(
    o.ground,
    bare,
    o.heightM,
    o.earth,
    survey.rows.map((r) => r.azimuthDeg),
    ranges * rangeStepM,
  )
  const rows = survey.rows.map((row, n): MeasuredRow => {
    const { elevationDeg, rangeM, obstacle } = computed[n]
    const known = Number.isFinite(elevationDeg)
    const topM = surveyedTopM(row, o.site.siteGroundM, effectiveRadiusM(use.earth, o.place.lat, row.azimuthDeg))
    const correctedDeg = elevationAngleDeg(antennaM(o), topM, row.rangeM, effectiveRadiusM(o.earth, o.place.lat, row.azimuthDeg))
    return {
      azimuthDeg: row.azimuthDeg,
      measuredDeg: row.elevationDeg,
      rangeM: row.rangeM,
      instrumentHeightM: row.instrumentHeightM,
      method: row.method,
      correctedDeg,
      computedDeg: known ? elevationDeg : null,
      differenceDeg: known ? correctedDeg - elevationDeg : null,
      computedRangeM: known ? rangeM : null,
      computedObstacle: obstacle,
    }
  })
  const apart = rows.flatMap((r) => (r.differenceDeg === null ? [] : [r.differenceDeg]))
  const mean = (of: readonly number[]): number | null => (of.length > 0 ? of.reduce((s, x) => s + x, 0) / of.length : null)
  const square = mean(apart.map((x) => x * x))
  return {
    used: use.used,
    file: survey.file,
    rows,
    meanDeg: mean(apart),
    rmsDeg: square === null ? null : Math.sqrt(square),
    worst: rows.reduce<MeasuredRow | null>(
      (most, r) => (r.differenceDeg !== null && Math.abs(r.differenceDeg) > Math.abs(most?.differenceDeg ?? 0) ? r : most),
      null,
    ),
  }
}
