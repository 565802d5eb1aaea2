import { geodesicInverse } from '../geodesy/index.ts'
import { sightPoint } from '../masking/index.ts'
import type { SettledNeed } from '../study/index.ts'
import { floorFigures, groundSums, RING_WIDTH_M } from './groundFigures.ts'
import { cellsOfNeed, needFigure } from './needFigure.ts'
import { antennaM, type OptionCells } from './optionCells.ts'
import { percentile } from './percentile.ts'
import type { Figures, NeedFigure } from './types.ts'

/** Figures of merit of one option. `marks` are the words that must stand beside its clutter figures. */
export function optionFigures(o: OptionCells, needs: readonly SettledNeed[], marks: Figures['marks']): Figures {
  const sums = groundSums(o)
  const elevations = o.mask.horizon.map((h) => h.elevationDeg)
  const highest = o.mask.horizon.reduce<Figures['horizon']['highest']>(
    (best, row) => (Number.isFinite(row.elevationDeg) && (!best || row.elevationDeg > best.elevationDeg) ? row : best),
    null,
  )
  const needFigures = needs.map((need) => needFigure(o, need, cellsOfNeed(o, need)))
  const figures: Omit<Figures, 'flat'> = {
    siteGroundM: o.site.siteGroundM,
    antennaM: antennaM(o),
    groundInSightKm2: sums.inSightKm2,
    maskedKm2: sums.maskedKm2,
    unknownKm2: sums.unknownKm2,
    horizon: { medianDeg: percentile(elevations, 0.5), p90Deg: percentile(elevations, 0.9), highest, rows: o.mask.horizon },
    floors: floorFigures(o),
    rings: sums.rings,
    ringWidthM: RING_WIDTH_M,
    clutterOverKm2: sums.over,
    cnrPeakDb: sums.peakDb,
    needs: needFigures,
    obstaclesInSight: obstaclesInSight(o),
    marks,
  }
  return { ...figures, flat: flatten(figures) }
}

/** Names of the obstacles whose top is in sight, each on its own ray, nearest first. */
function obstaclesInSight(o: OptionCells): string[] {
  const longest = o.site.grid.ranges * o.site.grid.rangeStepM
  const seen: { name: string; rangeM: number }[] = []
  for (const obstacle of o.ground.obstacles) {
    const at = obstacle.path[0]
    if (!at) continue
    const { distanceM } = geodesicInverse(o.place, at)
    if (distanceM > longest || distanceM < 1) continue
    // the surface at the obstacle's own place is its top
    if (sightPoint(o.ground, o.place, o.heightM, o.earth, at).inSight) seen.push({ name: obstacle.name, rangeM: distanceM })
  }
  return seen.sort((a, b) => a.rangeM - b.rangeM).map((s) => s.name)
}

function flatten(f: Omit<Figures, 'flat'>): Record<string, number | null> {
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
  }
  for (const floor of f.floors) {
    const nm = Math.round(floor.rangeM / 1852)
    flat[`floor_${nm}nm_best_m`] = floor.bestM
    flat[`floor_${nm}nm_median_m`] = floor.medianM
    flat[`floor_${nm}nm_worst_m`] = floor.worstM
  }
  for (const need of f.needs) for (const [key, value] of Object.entries(needFlat(need))) flat[`need_${need.needId}_${key}`] = value
  return flat
}

const needFlat = (n: NeedFigure): Record<string, number | null> =>
  n.notAssessed
    ? {}
    : {
        area_km2: n.areaKm2,
        in_sight_pct: n.inSightPct,
        in_sight_km2: n.inSightKm2,
        marginal_km2: n.marginalKm2,
        unknown_km2: n.unknownKm2,
        ground_above_km2: n.groundAboveKm2,
        worst_margin_m: n.worstMarginM,
        tenth_margin_m: n.tenthMarginM,
        suppression_needed_50_db: n.suppression.p50Db,
        suppression_needed_90_db: n.suppression.p90Db,
        suppression_needed_99_db: n.suppression.p99Db,
        suppression_available_db: n.suppression.availableDb,
        suppression_short_km2: n.suppression.shortKm2,
        too_weak_pct: n.suppression.tooWeakPct,
      }
