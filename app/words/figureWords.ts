import { type LayerId, LOSS_CAUSES, type RoadClass } from '../../core/index.ts'
import {
  formatAngle,
  formatAreaDown,
  formatAreaUp,
  formatBand,
  formatDbDown,
  formatDbUp,
  formatFloor,
  formatHeight,
  formatLossPct,
  formatMargin,
  formatMast,
  formatMetPct,
  formatRange,
  formatRangeUp,
  formatRoad,
  formatScreening,
  NO_VALUE,
  type Quantity,
} from './format.ts'
import { formatDuration } from './formatStated.ts'
import { LOSS_MEANINGS, LOSS_WORDS } from './layers.ts'
import { ROAD_CLASS_WORDS } from './roads.ts'
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

/** Figures of roads are in km. */
function roadsOf(label: string, meaning: string): FigureWords {
  return {
    label,
    meaning: `${meaning}; ${UP}`,
    layer: 'masked',
    format: (km, system) => formatRoad(km === null ? null : km * 1000, system),
  }
}
const ROAD_SEEN = 'Length of road where a vehicle is in sight and its echo over noise is enough for a detection probability of 0.5'
const roadClass = (of: RoadClass): FigureWords => roadsOf(`Roads seen: ${ROAD_CLASS_WORDS[of].toLowerCase()}`, ROAD_SEEN)

/** By the key's tail, as in the summary file; `need_<id>_` and `floor_<range>nm_` are taken off before. */
const PLAIN: Readonly<Record<string, FigureWords>> = {
  site_ground_m: {
    label: 'Ground at the mast',
    meaning: 'As stated for the candidate, else bilinear from the raster',
    layer: 'masked',
    format: formatHeight,
  },
  mast_height_m: {
    label: 'Mast height',
    meaning: 'Electrical centre above the ground at the mast, as the option states it',
    layer: 'masked',
    format: (v) => (v === null ? { value: NO_VALUE, unit: '' } : formatMast(v)),
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
  second_time_around_km2: {
    label: 'Folded clutter',
    meaning: `Ground where clutter of an earlier pulse stands over the noise; ${UP}`,
    layer: 'second-time-around',
    format: formatAreaUp,
  },
  measured_horizon_mean_deg: {
    label: 'Surveyed horizon, mean difference',
    meaning: 'Surveyed less computed screening angle from this mast, mean over the rows of the survey',
    layer: 'masked',
    format: (v) => formatAngle(v),
  },
  measured_horizon_rms_deg: {
    label: 'Surveyed horizon, root mean square',
    meaning: `Surveyed less computed screening angle from this mast, root mean square over the rows of the survey; ${UP}`,
    layer: 'masked',
    format: formatScreening,
  },
  roads_km: roadsOf('Roads within range', 'Length of roads and railways within range'),
  roads_in_sight_km: roadsOf('Roads in sight', 'Length of road where the top of a vehicle is in sight, line of sight only'),
  roads_seen_km: roadsOf('Roads seen', ROAD_SEEN),
  roads_seen_k2_75_km: roadsOf('Roads seen, k = 2.75', `${ROAD_SEEN}, at k = 2.75`),
  roads_unknown_km: roadsOf('Roads on unknown ground', 'Length of road beyond a void or past the edge of the terrain'),
  roads_blind_pct: {
    label: 'Roads seen, in the blind zone',
    meaning: `Share of the roads seen whose radial speed the processing passes by more than 10 dB under its mean; ${UP}`,
    layer: 'masked',
    format: (v) => formatLossPct(v),
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
const floorAt = (nm: string, which: string, lowK: boolean): FigureWords => ({
  label: `Floor at ${nm} NM, ${which}${lowK ? ', k = 1' : ''}`,
  meaning: `Lowest height in sight above sea level at ${nm} NM of ground range, ${FLOOR_SHARE[which] ?? ''}${lowK ? ', at k = 1' : ''}; nominal, ${UP}`,
  layer: 'coverage-floor',
  format: formatFloor,
})
const improvementOn = (about: string): FigureWords => ({
  label: `Suppression of ${about}`,
  meaning: `Improvement factor on clutter of ${about === 'folded' ? 'an earlier pulse' : about}, with the limits of the equipment; ${DOWN}`,
  layer: 'suppression-needed',
  format: (v) => formatDbDown(v),
})
const share = (label: string, meaning: string): FigureWords => ({
  label,
  meaning: `${meaning}; ${DOWN}`,
  layer: 'usable',
  format: (v) => formatMetPct(v),
})
const dbMargin = (label: string, where: string): FigureWords => ({
  label,
  meaning: `Echo over residue and noise less the required ratio, ${where}; ${DOWN}`,
  layer: 'signal-margin',
  format: (v) => formatDbDown(v),
})
const lengthOf = (label: string, meaning: string): FigureWords => ({
  label,
  meaning: `${meaning}; ${UP}`,
  layer: 'cause-of-loss',
  format: formatRangeUp,
})
const shortDb = (pct: string): FigureWords => ({
  label: `Suppression short, ${pct} %`,
  meaning: `Decibels missing at ${pct} % of the places in sight that are strong enough; 0 is enough; ${UP}`,
  layer: 'suppression-needed',
  format: (v) => formatDbUp(v),
})
const LOST: Readonly<Record<string, FigureWords>> = Object.fromEntries(
  LOSS_CAUSES.map((cause): [string, FigureWords] => [
    `lost_${cause.replaceAll('-', '_')}_pct`,
    {
      label: `Lost: ${LOSS_WORDS[cause]}`,
      meaning: `Share of the need that is not usable for this cause. ${LOSS_MEANINGS[cause]}; ${UP}`,
      layer: 'cause-of-loss',
      format: (v) => formatLossPct(v),
    },
  ]),
)
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
  detectable_pct: share('Detectable', 'Share of the need in sight, within range, with echo over noise by the required ratio'),
  usable_pct: share(
    'Usable',
    'Share of the need detectable, with echo over residue and noise by the required ratio; the need is met by it',
  ),
  in_sight_k1_pct: share('In sight, k = 1', 'Share of the need in sight at k = 1'),
  detectable_k1_pct: share('Detectable, k = 1', 'Share of the need detectable at k = 1'),
  usable_k1_pct: share('Usable, k = 1', 'Share of the need usable at k = 1; pass asks for it too'),
  required_ratio_db: {
    label: 'Required ratio',
    meaning: `Echo over noise, or over residue and noise, that one pulse must reach: D₀ and its losses, or as stated; ${UP}`,
    layer: 'signal-margin',
    format: (v) => formatDbUp(v, 'dB', 0.1),
  },
  worst_signal_margin_db: dbMargin('Worst signal margin', 'at the worst place in sight'),
  tenth_signal_margin_db: dbMargin('Signal margin, 10 %', 'exceeded at nine tenths of the places in sight'),
  exponential_difference_m: {
    label: 'Difference to exponential atmosphere',
    meaning: `Height of the ray in reference air that thins out with height over that of the study's k, at the fix, piece or ceiling where it is largest; from memory, ${UP}`,
    layer: 'coverage-floor',
    format: (v, system) => formatBand(v === null ? null : Math.abs(v), system),
  },
  length_m: {
    label: 'Length of the track',
    meaning: `Ground distance along the track; ${DOWN}`,
    layer: 'usable',
    format: formatRange,
  },
  longest_gap_m: lengthOf('Longest gap', 'Longest stretch of the track in a row that is not usable'),
  longest_gap_s: {
    label: 'Longest gap',
    meaning: 'The same at the speed of the need',
    layer: 'cause-of-loss',
    format: (v) => ({ value: v === null ? NO_VALUE : formatDuration(Math.ceil(v)), unit: '' }),
  },
  tangential_m: lengthOf('Tangential', 'Length flown across the beam, where the radial speed is near zero'),
  blind_m: lengthOf('Blind speeds', 'Length flown at other speeds that the processing does not pass'),
  detectable_km2: {
    label: 'Detectable',
    meaning: `Area of the need that is detectable; ${DOWN}`,
    layer: 'usable',
    format: formatAreaDown,
  },
  usable_km2: {
    label: 'Usable',
    meaning: `Area of the need that is usable; ${DOWN}`,
    layer: 'usable',
    format: formatAreaDown,
  },
  cone_of_silence_m: {
    label: 'Cone of silence',
    meaning: `Largest ground range inside which nothing passes because of the elevation pattern, over the levels of the need; ${UP}`,
    layer: 'cause-of-loss',
    format: formatRangeUp,
  },
  suppression_short_90_db: shortDb('90'),
  suppression_short_99_db: shortDb('99'),
  ...LOST,
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
    meaning: `What the radar takes off the clutter of the need’s places together, by its kinds; ${DOWN}`,
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

const atHighK = (words: FigureWords | undefined): FigureWords | undefined =>
  words && { ...words, label: `${words.label}, k = 2.75`, meaning: `${words.meaning}, at k = 2.75` }

/** Words of a figure by its key in the summary; undefined for a key this version does not explain. */
export function figureWords(key: string): FigureWords | undefined {
  const over = /^clutter_over_(\d+)_km2$/.exec(key)
  if (over) return clutterOver(over[1])
  const own = key.replace('_k2_75_', '_')
  if (own !== key && /^(clutter|second_time_around|need_.*_suppression)/.test(key)) return atHighK(figureWords(own))
  const floor = /^floor_(\d+)nm(_k1)?_(best|median|worst)_m$/.exec(key)
  if (floor) return floorAt(floor[1], floor[3], floor[2] !== undefined)
  const road = /^roads_seen_([a-z]+)_km$/.exec(key)
  if (road && road[1] in ROAD_CLASS_WORDS) return roadClass(road[1] as RoadClass)
  const improvement = /^improvement_(.+)_db$/.exec(key)
  if (improvement) return improvementOn(improvement[1])
  const need = needKey(key)
  if (!need) return PLAIN[key]
  const places = /^suppression_needed_(\d+)_db$/.exec(need.of)
  return places ? suppressionNeeded(places[1]) : NEED[need.of]
}

const SUPPRESSION_TAILS = ['suppression_needed_50_db', 'suppression_needed_90_db', 'suppression_needed_99_db']
const HIGH_K_TAILS = [...SUPPRESSION_TAILS, 'suppression_short_km2'].map((tail) => tail.replace(/_(db|km2)$/, '_k2_75_$1'))
const NEED_TAILS = [...Object.keys(NEED), ...SUPPRESSION_TAILS, ...HIGH_K_TAILS]
/** Need and tail of a key such as `need_n1_in_sight_pct`. */
export function needKey(key: string): { needId: string; of: string } | null {
  if (!key.startsWith('need_')) return null
  const of = NEED_TAILS.filter((tail) => key.endsWith(`_${tail}`)).sort((a, b) => b.length - a.length)[0]
  return of === undefined ? null : { needId: key.slice('need_'.length, key.length - of.length - 1), of }
}
