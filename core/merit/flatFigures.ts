import { M_PER_NM } from '../units/index.ts'
import type { RoadsFigure } from './roads/types.ts'
import type { Figures, FloorFigure, NeedFigure } from './types.ts'

/** Every figure of an option by a plain name that ends in its unit, for the summary file. */
export function flatFigures(f: Omit<Figures, 'flat'>): Record<string, number | null> {
  const flat: Record<string, number | null> = {
    site_ground_m: f.siteGroundM,
    antenna_m: f.antennaM,
    ground_in_sight_km2: f.groundInSightKm2,
    masked_km2: f.maskedKm2,
    unknown_km2: f.unknownKm2,
    horizon_median_deg: f.horizon.medianDeg,
    horizon_p90_deg: f.horizon.p90Deg,
    horizon_highest_deg: f.horizon.highest?.elevationDeg ?? null,
    clutter_over_0_km2: f.clutterOverKm2.over0,
    clutter_over_20_km2: f.clutterOverKm2.over20,
    clutter_over_40_km2: f.clutterOverKm2.over40,
    clutter_over_60_km2: f.clutterOverKm2.over60,
    clutter_to_noise_peak_db: f.cnrPeakDb,
    clutter_to_noise_mean_db: f.clutterLevels.whole.meanDb,
    clutter_to_noise_90_db: f.clutterLevels.whole.p90Db,
    clutter_to_noise_99_db: f.clutterLevels.whole.p99Db,
    second_time_around_km2: f.secondTimeAround.km2,
    second_time_around_evaluated_m: f.secondTimeAround.notEvaluatedBeyondM,
    ...(f.measuredHorizon
      ? { measured_horizon_mean_deg: f.measuredHorizon.meanDeg, measured_horizon_rms_deg: f.measuredHorizon.rmsDeg }
      : {}),
  }
  const floors = (list: readonly FloorFigure[], tail: string): void => {
    for (const floor of list) {
      const nm = Math.round(floor.rangeM / M_PER_NM)
      flat[`floor_${nm}nm${tail}_best_m`] = floor.bestM
      flat[`floor_${nm}nm${tail}_median_m`] = floor.medianM
      flat[`floor_${nm}nm${tail}_worst_m`] = floor.worstM
    }
  }
  floors(f.floors, '')
  if (f.floorsLowK) floors(f.floorsLowK, '_k1')
  for (const row of f.suppressionBy.rows) flat[`improvement_${row.about}_db`] = row.improvementDb
  Object.assign(flat, flatRoads(f.roads))
  for (const need of f.needs) for (const [key, value] of Object.entries(flatNeed(need))) flat[`need_${need.needId}_${key}`] = value
  return flat
}

function flatRoads(r: RoadsFigure | null): Record<string, number | null> {
  if (!r) return {}
  const pct = (m: number | null): number | null => (m === null ? null : r.seenM > 0 ? (100 * m) / r.seenM : 0)
  return {
    roads_km: r.lengthM / 1000,
    roads_in_sight_km: r.inSightM / 1000,
    roads_seen_km: r.seenM / 1000,
    roads_seen_k2_75_km: r.atHighK === null ? null : r.atHighK.seenM / 1000,
    ...Object.fromEntries(r.classes.map((c) => [`roads_seen_${c.roadClass}_km`, c.seenM / 1000])),
    roads_unknown_km: r.unknownM / 1000,
    roads_blind_pct: pct(r.blindM),
  }
}

function flatNeed(n: NeedFigure): Record<string, number | null> {
  if (n.notAssessed) return {}
  const shares = {
    in_sight_pct: n.inSightPct,
    detectable_pct: n.detectablePct,
    usable_pct: n.usablePct,
    in_sight_k1_pct: n.atLowK?.inSightPct ?? null,
    detectable_k1_pct: n.atLowK?.detectablePct ?? null,
    usable_k1_pct: n.atLowK?.usablePct ?? null,
    required_ratio_db: n.required.ratioDb,
    worst_margin_m: n.worstMarginM,
    tenth_margin_m: n.tenthMarginM,
    worst_signal_margin_db: n.signal.worstDb,
    tenth_signal_margin_db: n.signal.tenthDb,
    exponential_difference_m: n.exponential?.differenceM ?? null,
    ...Object.fromEntries(n.losses.map((l) => [`lost_${l.cause.replaceAll('-', '_')}_pct`, l.pct])),
  }
  if (n.measure !== 'area')
    return {
      ...shares,
      ...(n.track
        ? {
            length_m: n.track.lengthM,
            longest_gap_m: n.track.longestGapM,
            longest_gap_s: n.track.longestGapS,
            tangential_m: n.track.tangentialM,
            blind_m: n.track.blindM,
          }
        : {}),
    }
  const radii = n.coneOfSilence.flatMap((c) => (c.radiusM === null ? [] : [c.radiusM]))
  return {
    ...shares,
    area_km2: n.areaKm2,
    in_sight_km2: n.inSightKm2,
    detectable_km2: n.detectableKm2,
    usable_km2: n.usableKm2,
    marginal_km2: n.marginalKm2,
    unknown_km2: n.unknownKm2,
    ground_above_km2: n.groundAboveKm2,
    cone_of_silence_m: radii.length > 0 ? Math.max(...radii) : null,
    suppression_needed_50_db: n.suppression.p50Db,
    suppression_needed_90_db: n.suppression.p90Db,
    suppression_needed_99_db: n.suppression.p99Db,
    suppression_available_db: n.suppression.availableDb,
    suppression_short_km2: n.suppression.shortKm2,
    suppression_short_90_db: n.suppression.shortP90Db,
    suppression_short_99_db: n.suppression.shortP99Db,
    too_weak_pct: n.suppression.tooWeakPct,
  }
}
