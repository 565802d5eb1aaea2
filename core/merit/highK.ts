import { secondTimeAround } from '../clutter/index.ts'
import type { Earth } from '../geodesy/index.ts'
import type { SettledNeed } from '../study/index.ts'
import type { Work } from '../work/index.ts'
import { groundSums } from './groundFigures.ts'
import { isAreaNeed, needFigure } from './needs/needFigure.ts'
import type { OptionCells } from './optionCells.ts'
import { HIGH_K } from './roads/types.ts'
import type { Figures, HighKFigure } from './types.ts'

/** Is clutter of an earth worked out at k = 2.75 too? Not where its own factor is no smaller, nor for a ducting sensitivity. */
export const hasHighK = (earth: Pick<Earth, 'effectiveEarthFactor'>): boolean =>
  earth.effectiveEarthFactor > 0 && earth.effectiveEarthFactor < HIGH_K

/** Clutter figures of an option whose cells are those of k = 2.75: areas, folded area, suppression needed over each need of layer or polygon. */
export function* highKFigure(o: OptionCells, needs: readonly SettledNeed[]): Work<HighKFigure> {
  const { over, peakDb } = groundSums(o)
  const suppression: HighKFigure['suppression'][number][] = []
  for (const need of needs.filter(isAreaNeed)) {
    const f = yield* needFigure(o, need)
    if (f.notAssessed !== null) continue
    const { p50Db, p90Db, p99Db, shortKm2 } = f.suppression
    suppression.push({ needId: need.id, name: f.name, p50Db, p90Db, p99Db, shortKm2 })
  }
  return {
    k: o.earth.effectiveEarthFactor,
    clutterOverKm2: over,
    cnrPeakDb: peakDb,
    secondTimeAroundKm2: o.folded ? secondTimeAround(o.folded, o.place.lat).km2 : null,
    suppression,
  }
}

/** Figures with those of k = 2.75 beside them. */
export const withHighK = (f: Figures, atHighK: HighKFigure): Figures => ({ ...f, atHighK, flat: { ...f.flat, ...flatHighK(atHighK) } })

/** By plain names as in `flatFigures`. */
function flatHighK(h: HighKFigure): Record<string, number | null> {
  const flat: Record<string, number | null> = {
    clutter_over_0_k2_75_km2: h.clutterOverKm2.over0,
    clutter_over_20_k2_75_km2: h.clutterOverKm2.over20,
    clutter_over_40_k2_75_km2: h.clutterOverKm2.over40,
    clutter_over_60_k2_75_km2: h.clutterOverKm2.over60,
    clutter_to_noise_peak_k2_75_db: h.cnrPeakDb,
    second_time_around_k2_75_km2: h.secondTimeAroundKm2,
  }
  for (const s of h.suppression) {
    flat[`need_${s.needId}_suppression_needed_50_k2_75_db`] = s.p50Db
    flat[`need_${s.needId}_suppression_needed_90_k2_75_db`] = s.p90Db
    flat[`need_${s.needId}_suppression_needed_99_k2_75_db`] = s.p99Db
    flat[`need_${s.needId}_suppression_short_k2_75_km2`] = s.shortKm2
  }
  return flat
}
