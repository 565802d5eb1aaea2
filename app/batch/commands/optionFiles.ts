import { writeFileSync } from 'node:fs'
import { join } from 'node:path'
import {
  type Figures,
  type LonLat,
  type MeasuredHorizonFigure,
  type OptionCells,
  ROAD_CLASSES,
  type RoadLines,
  type RoadsFigure,
  roadLines,
  type TrialRow,
} from '../../../core/index.ts'
import { TRIAL_CONFIRMS_WORDS } from '../../words/index.ts'
import { csvLine, csvNumber } from '../csv.ts'

/** Files of one option beside its rasters, in its folder of height and tilt. */
export function writeOptionFiles(tiltDir: string, cells: OptionCells, figures: Figures): void {
  writeFileSync(join(tiltDir, 'trial-plan.csv'), trialPlanCsv(figures.trialPlan))
  if (cells.ground.roads.length > 0) writeFileSync(join(tiltDir, 'roads-seen.geojson'), roadsGeoJson(roadLines(cells)))
}

/** Files of one mast height: a surveyed horizon beside the computed one. */
export function writeHeightFiles(heightDir: string, figures: Figures): void {
  const { measuredHorizon } = figures
  if (measuredHorizon) writeFileSync(join(heightDir, 'horizon-difference.csv'), differenceCsv(measuredHorizon))
}

const DIFFERENCE_COLUMNS = [
  'azimuth_deg',
  'range_m',
  'measured_deg',
  'instrument_height_m',
  'method',
  'corrected_deg',
  'computed_deg',
  'difference_deg',
  'computed_range_m',
  'computed_obstacle',
  'used',
] as const
/** Rows of a surveyed horizon: as measured, from the mast, computed, and the difference. */
export const differenceCsv = (m: MeasuredHorizonFigure): string =>
  [
    csvLine(DIFFERENCE_COLUMNS),
    ...m.rows.map((r) =>
      csvLine([
        csvNumber(r.azimuthDeg, 4),
        csvNumber(r.rangeM, 3),
        csvNumber(r.measuredDeg, 5),
        csvNumber(r.instrumentHeightM, 3),
        r.method,
        csvNumber(r.correctedDeg, 5),
        csvNumber(r.computedDeg, 5),
        csvNumber(r.differenceDeg, 5),
        csvNumber(r.computedRangeM, 3),
        r.computedObstacle,
        m.used ? '1' : '0',
      ]),
    ),
  ].join('')

/** Roads within range as GeoJSON lines, `seen` true or false. */
export function roadsGeoJson({ seen, hidden }: RoadLines): string {
  const feature = (line: readonly LonLat[], isSeen: boolean): string => {
    const coordinates = line.map((p) => [Number(p.lon.toFixed(7)), Number(p.lat.toFixed(7))])
    return JSON.stringify({ type: 'Feature', properties: { seen: isSeen }, geometry: { type: 'LineString', coordinates } })
  }
  const features = [...seen.map((l) => feature(l, true)), ...hidden.map((l) => feature(l, false))]
  return `{"type":"FeatureCollection","features":[\n${features.join(',\n')}\n]}\n`
}

const TRIAL_COLUMNS = [
  'row',
  'kind',
  'need',
  'name',
  'azimuth_deg',
  'range_m',
  'lon',
  'lat',
  'from_range_m',
  'to_range_m',
  'from_azimuth_deg',
  'to_azimuth_deg',
  'altitude_m_msl',
  'floor_m_msl',
  'floor_band_m',
  'margin_m',
  'signal_margin_db',
  'predicted',
  'behind',
  'behind_range_m',
  'confirms',
] as const
/** A trial plan as CSV, one row per thing to fly or measure; the header alone where no need is assessed. */
export const trialPlanCsv = (rows: readonly TrialRow[]): string =>
  [
    csvLine(TRIAL_COLUMNS),
    ...rows.map((r, n) =>
      csvLine([
        String(n + 1),
        r.kind,
        r.needId,
        r.name,
        csvNumber(r.at.azimuthDeg, 4),
        csvNumber(r.at.rangeM, 3),
        csvNumber(r.at.lon, 8),
        csvNumber(r.at.lat, 8),
        csvNumber(r.fromRangeM, 3),
        csvNumber(r.toRangeM, 3),
        csvNumber(r.fromAzimuthDeg, 4),
        csvNumber(r.toAzimuthDeg, 4),
        csvNumber(r.altitudeM, 3),
        csvNumber(r.floorM, 3),
        csvNumber(r.floorBandM, 3),
        csvNumber(r.marginM, 3),
        csvNumber(r.signalMarginDb, 3),
        r.predicted ?? '',
        r.obstacle,
        csvNumber(r.obstacleRangeM, 3),
        TRIAL_CONFIRMS_WORDS[r.confirms],
      ]),
    ),
  ].join('')

const km = (m: number): number => m / 1000
/** Roads of an option for summary.json: by class and ring, km, and by radial speed, km per 5 m/s. */
export function roadsSummary(r: RoadsFigure) {
  return {
    vehicle_rcs_m2: r.rcsM2,
    required_ratio_db: r.requiredRatioDb,
    within_range_km: km(r.lengthM),
    in_sight_km: km(r.inSightM),
    seen_km: km(r.seenM),
    in_tunnel_km: km(r.tunnelM),
    unknown_km: km(r.unknownM),
    blind_zone_km: r.blindM === null ? null : km(r.blindM),
    at_k: r.atHighK && { k: r.atHighK.k, in_sight_km: km(r.atHighK.inSightM), seen_km: km(r.atHighK.seenM) },
    classes: r.classes.map((c) => ({
      class: c.roadClass,
      within_range_km: km(c.lengthM),
      in_sight_km: km(c.inSightM),
      seen_km: km(c.seenM),
    })),
    rings: r.rings.map((ring) => ({
      from_m: ring.fromM,
      to_m: ring.toM,
      within_range_km: km(ring.lengthM),
      in_sight_km: km(ring.inSightM),
      seen_km: km(ring.seenM),
      seen_by_class_km: Object.fromEntries(r.classes.map((c) => [c.roadClass, km(ring.seenByClassM[ROAD_CLASSES.indexOf(c.roadClass)])])),
    })),
    radial_speeds: r.speeds.map((s) => ({ from_ms: s.fromMs, to_ms: s.toMs, seen_km: km(s.seenM) })),
  }
}
