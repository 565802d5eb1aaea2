import { MEASURED_GAP_DEG, type MeasuredHorizonFigure } from '../../core/index.ts'
import type { HorizonInput } from './horizonChart.ts'

/** A surveyed horizon as the horizon chart draws it: elevations as this antenna would see the surveyed obstacles. */
export const measuredPoints = (figure: MeasuredHorizonFigure | null | undefined): NonNullable<HorizonInput['measured']> | null =>
  figure && figure.rows.length > 0
    ? { points: figure.rows.map((r) => ({ azimuthDeg: r.azimuthDeg, elevationDeg: r.correctedDeg })), gapDeg: MEASURED_GAP_DEG }
    : null
