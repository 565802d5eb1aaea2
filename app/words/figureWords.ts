import type { LayerId } from '../../core/index.ts'
import {
  formatAreaDown,
  formatAreaUp,
  formatDbDown,
  formatDbUp,
  formatFloor,
  formatHeight,
  formatLossPct,
  formatMargin,
  formatMetPct,
  formatScreening,
  type Quantity,
} from './format.ts'
import type { UnitSystem } from './units.ts'

/** What a figure of merit is called, what it means, and which map layer shows where it comes from. */
export interface FigureWords {
  readonly label: string
  /** One sentence without a full stop: what it is and which way it is rounded. */
  readonly meaning: string
  readonly layer: LayerId
  format(value: number | null, system: UnitSystem): Quantity
}

const UP = 'rounded up'
const DOWN = 'rounded down'

/** By the key's tail, as in the summary file; `need_<id>_` and `floor_<range>nm_` are taken off before. */
const PLAIN: Readonly<Record<string, FigureWords>> = {
  site_ground_m: {
    label: 'Ground at the mast',
    meaning: 'As stated for the candidate, else bilinear from the raster',
    layer: 'masked',
    format: formatHeight,
  },
  antenna_m: {
    label: 'Electrical centre',
    meaning: 'Ground at the mast plus mast height, above sea level',
    layer: 'masked',
    format: formatHeight,
  },
  ground_in_sight_km2: {
    label: 'Ground in sight',
    meaning: `Area of ground within range whose surface is in sight, line of sight only; cells partly in sight count with their share; ${DOWN}`,
    layer: 'masked',
    format: formatAreaDown,
  },
  masked_km2: {
    label: 'Masked',
    meaning: `Area of known ground within range that is not in sight; ${UP}`,
    layer: 'masked',
    format: formatAreaUp,
  },
  unknown_km2: {
    label: 'Unknown',
    meaning: `Area within range beyond a void or past the edge of the terrain: never in sight, never free of clutter; ${UP}`,
    layer: 'masked',
    format: formatAreaUp,
  },
  horizon_median_deg: {
    label: 'Horizon, median',
    meaning: `Screening angle that half of all azimuths stay at or under; ${UP}`,
    layer: 'masked',
    format: formatScreening,
  },
  horizon_p90_deg: {
    label: 'Horizon, 90 % below',
    meaning: `Screening angle that nine azimuths of ten stay at or under; ${UP}`,
    layer: 'masked',
    format: formatScreening,
  },
  horizon_highest_deg: {
    label: 'Horizon, highest',
    meaning: `Highest screening angle of any azimuth; ${UP}`,
    layer: 'masked',
    format: formatScreening,
  },
  clutter_to_noise_peak_db: {
    label: 'C/N, highest',
    meaning: `Highest mean clutter-to-noise of any resolution cell, one pulse, before suppression; ${UP}`,
    layer: 'clutter-to-noise',
    format: (v) => formatDbUp(v),
  },
}
const clutterOver = (level: string): FigureWords => ({
  label: `C/N over ${level} dB`,
  meaning: `Ground in sight whose mean clutter stands more than ${level} dB above noise, one pulse, before suppression; ${UP}`,
  layer: 'clutter-to-noise',
  format: formatAreaUp,
})
const FLOOR_SHARE: Readonly<Record<string, string>> = {
  best: 'on the best azimuth',
  median: 'on the median azimuth',
  worst: 'on the worst azimuth',
}
const floorAt = (nm: string, which: string): FigureWords => ({
  label: `Floor at ${nm} NM, ${which}`,
  meaning: `Lowest height in sight above sea level at ${nm} NM of ground range, ${FLOOR_SHARE[which] ?? ''}; nominal, ${UP}`,
  layer: 'coverage-floor',
  format: formatFloor,
})
const NEED: Readonly<Record<string, FigureWords>> = {
  area_km2: {
    label: 'Area',
    meaning: 'Area of the need: its ranges and sector around the candidate',
    layer: 'coverage-floor',
    format: formatAreaUp,
  },
  in_sight_pct: {
    label: 'In sight',
    meaning: `Share of the need’s area whose height is in sight, line of sight only; unknown ground counts against it; ${DOWN}`,
    layer: 'coverage-floor',
    format: (v) => formatMetPct(v),
  },
  in_sight_km2: {
    label: 'In sight',
    meaning: `Area of the need whose height is in sight, line of sight only; ${DOWN}`,
    layer: 'coverage-floor',
    format: formatAreaDown,
  },
  marginal_km2: {
    label: 'Marginal',
    meaning: `Area of the need whose height lies inside the error band of the coverage floor; ${UP}`,
    layer: 'coverage-floor',
    format: formatAreaUp,
  },
  unknown_km2: {
    label: 'Unknown',
    meaning: `Area of the need beyond a void or past the edge of the terrain; ${UP}`,
    layer: 'coverage-floor',
    format: formatAreaUp,
  },
  ground_above_km2: {
    label: 'Ground above the level',
    meaning: `Area whose ground stands above the height of the need, left out of it; ${UP}`,
    layer: 'coverage-floor',
    format: formatAreaUp,
  },
  worst_margin_m: {
    label: 'Worst margin',
    meaning: `Height of the need less the coverage floor, at the worst place of the need; ${DOWN}`,
    layer: 'coverage-floor',
    format: formatMargin,
  },
  tenth_margin_m: {
    label: 'Margin, 10 %',
    meaning: `Height of the need less the coverage floor that nine tenths of the area exceed; ${DOWN}`,
    layer: 'coverage-floor',
    format: formatMargin,
  },
  suppression_available_db: {
    label: 'Suppression available',
    meaning: `Improvement factor as stated for the radar; ${DOWN}`,
    layer: 'suppression-needed',
    format: (v) => formatDbDown(v),
  },
  suppression_short_km2: {
    label: 'Suppression short',
    meaning: `Area of the need where more suppression is needed than is available; ${UP}`,
    layer: 'suppression-needed',
    format: formatAreaUp,
  },
  too_weak_pct: {
    label: 'Too weak',
    meaning: `Share of the need in sight where the echo is under the required ratio even without clutter; ${UP}`,
    layer: 'suppression-needed',
    format: (v) => formatLossPct(v),
  },
}
const suppressionNeeded = (share: string): FigureWords => ({
  label: `Suppression needed, ${share} %`,
  meaning: `Improvement factor that serves ${share} % of the places of the need which are in sight and strong enough; ${UP}`,
  layer: 'suppression-needed',
  format: (v) => formatDbUp(v),
})

/** Words of a figure by its key in the summary; undefined for a key this version does not explain. */
export function figureWords(key: string): FigureWords | undefined {
  const over = /^clutter_over_(\d+)_km2$/.exec(key)
  if (over) return clutterOver(over[1])
  const floor = /^floor_(\d+)nm_(best|median|worst)_m$/.exec(key)
  if (floor) return floorAt(floor[1], floor[2])
  const need = needKey(key)
  if (!need) return PLAIN[key]
  const share = /^suppression_needed_(\d+)_db$/.exec(need.of)
  return share ? suppressionNeeded(share[1]) : NEED[need.of]
}

const NEED_TAILS = [...Object.keys(NEED), 'suppression_needed_50_db', 'suppression_needed_90_db', 'suppression_needed_99_db']
/** Need and tail of a key such as `need_n1_in_sight_pct`. */
export function needKey(key: string): { needId: string; of: string } | null {
  if (!key.startsWith('need_')) return null
  const of = NEED_TAILS.filter((tail) => key.endsWith(`_${tail}`)).sort((a, b) => b.length - a.length)[0]
  return of === undefined ? null : { needId: key.slice('need_'.length, key.length - of.length - 1), of }
}
