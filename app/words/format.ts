import { faceNorth, MAGNETIC } from './north.ts'
import { decimalsOf, type Rounding, roundDown, roundTo, roundUp } from './rounding.ts'
import { toFace, type UnitKind, type UnitSystem, unitOf } from './units.ts'

/** A number ready for the face. The unit is apart so that it can be set in lighter ink. */
export interface Quantity {
  readonly value: string
  readonly unit: string
}
/** Narrow no-break space: between digit groups, and between number and unit. */
export const THIN = '\u202f'
/** Stands where there is no number; a word beside it says why. */
export const NO_VALUE = '–'
const NONE: Quantity = { value: NO_VALUE, unit: '' }
const ATTACHED = new Set(['°', '″', '′', MAGNETIC])

/** `1 234 ft`, `0.62°`, `–`. */
export function textOf(q: Quantity): string {
  return q.unit === '' ? q.value : q.value + (ATTACHED.has(q.unit) ? '' : THIN) + q.unit
}

/** Plain number: thin groups of three, true minus, fixed decimals. */
export function formatNumber(x: number, decimals = 0): string {
  if (!Number.isFinite(x)) return NO_VALUE
  const [whole, part] = Math.abs(x).toFixed(decimals).split('.')
  const grouped = whole.replace(/\B(?=(\d{3})+$)/g, THIN)
  const digits = part === undefined ? grouped : `${grouped}.${part}`
  return x < 0 && /[1-9]/.test(digits) ? `−${digits}` : digits
}

function quantity(x: number | null | undefined, step: number, way: Rounding, unit: string): Quantity {
  if (x === null || x === undefined || !Number.isFinite(x)) return NONE
  return { value: formatNumber(roundTo(x, step, way), decimalsOf(step)), unit }
}
function faced(kind: UnitKind, x: number | null | undefined, system: UnitSystem, step: number, way: Rounding): Quantity {
  return quantity(x === null || x === undefined ? x : toFace(kind, x, system), step, way, unitOf(kind, system))
}
type Maybe = number | null | undefined

/** Coverage floor, m MSL; UP: to 100 ft from 1 000 ft (10 ft below that), or to 1 m. */
export function formatFloor(m: Maybe, system: UnitSystem): Quantity {
  return faced('height', m, system, floorStep(m, system), 'up')
}
const floorStep = (m: Maybe, system: UnitSystem): number => (system === 'metric' ? 1 : (m ?? 0) >= 304.8 ? 100 : 10)
/** Step in which a floor of this height is printed, m. */
export const floorStepM = (m: number, system: UnitSystem): number => floorStep(m, system) * (system === 'metric' ? 1 : 0.3048)
/** Ground or antenna height, m; nearest 1 ft or 1 m. Say MSL or above ground beside it. */
export function formatHeight(m: Maybe, system: UnitSystem): Quantity {
  return faced('height', m, system, 1, 'nearest')
}
/** Electrical centre above ground: metres in both systems, to 0.1 m where the study has tenths. */
export function formatMast(m: number): Quantity {
  return { value: formatNumber(m, Number.isInteger(m) ? 0 : 1), unit: 'm' }
}
/** Lowest mast height that brings a cell into sight, m above ground; UP to 0.1 m (mast heights stay in metres). */
export function formatHeightToSee(m: Maybe): Quantity {
  return quantity(m, 0.1, 'up', 'm')
}
/** Error band, m; UP to 1 ft or 1 m, at least 1. */
export function formatBand(m: Maybe, system: UnitSystem): Quantity {
  return faced('height', m, system, 1, 'up')
}
/** Height margin over the floor, m; DOWN to 1 ft or 1 m. */
export function formatMargin(m: Maybe, system: UnitSystem): Quantity {
  return faced('height', m, system, 1, 'down')
}
/** A range reached (instrumented, detection), m; DOWN to 0.1 NM or 0.1 km. */
export function formatRange(m: Maybe, system: UnitSystem): Quantity {
  return faced('range', m, system, 0.1, 'down')
}
/** Where something stands (controlling obstacle, pointer), m; nearest 0.1 NM or 0.1 km, 10 m steps inside 1 km. */
export function formatPlaceRange(m: Maybe, system: UnitSystem): Quantity {
  return faced('range', m, system, (m ?? 0) < 1000 ? 0.01 : 0.1, 'nearest')
}
/** Cone of silence, minimum range, keep-clear distance, m; UP to 0.1 NM or 0.1 km. */
export function formatRangeUp(m: Maybe, system: UnitSystem): Quantity {
  return faced('range', m, system, 0.1, 'up')
}
/** Exposure distance, m; UP to 1 m in both systems. */
export function formatExposure(m: Maybe): Quantity {
  return quantity(m, 1, 'up', 'm')
}
/** Road length in the beam, m; UP to 0.1 NM or 0.1 km. */
export function formatRoad(m: Maybe, system: UnitSystem): Quantity {
  return faced('range', m, system, 0.1, 'up')
}
/** Area of what counts against a site (clutter, masked, short, unknown, folded), km²; UP to 1, to 0.1 under 10. */
export function formatAreaUp(km2: Maybe, system: UnitSystem): Quantity {
  return km2 === 0 ? noArea(system) : faced('area', km2, system, areaStep(km2, system), 'up')
}
/** Area of what counts for a site (in sight of a need), km²; DOWN to 1, to 0.1 under 10; below the first step `< 0.1`. */
export function formatAreaDown(km2: Maybe, system: UnitSystem): Quantity {
  if (km2 === 0) return noArea(system)
  const q = faced('area', km2, system, areaStep(km2, system), 'down')
  return (km2 ?? 0) > 0 && q.value === '0.0' ? { value: '< 0.1', unit: q.unit } : q
}
/** Area as information, km²; nearest 1, or 0.1 under 10. */
export function formatArea(km2: Maybe, system: UnitSystem): Quantity {
  return km2 === 0 ? noArea(system) : faced('area', km2, system, areaStep(km2, system), 'nearest')
}
/** Exactly none reads `0`, not `0.0`. */
const noArea = (system: UnitSystem): Quantity => ({ value: '0', unit: unitOf('area', system) })
const areaStep = (km2: Maybe, system: UnitSystem): number => (toFace('area', km2 ?? 0, system) < 10 ? 0.1 : 1)

/** C/N, clutter strength and RCS, suppression needed, in dB, dBsm…; UP to 1 dB (or the step given). */
export function formatDbUp(db: Maybe, unit: 'dB' | 'dBsm' = 'dB', step = 1): Quantity {
  return quantity(db, step, 'up', unit)
}
/** Suppression available, signal margin, S/N, dB; DOWN to 1 dB (or the step given). */
export function formatDbDown(db: Maybe, unit: 'dB' | 'dBsm' = 'dB', step = 1): Quantity {
  return quantity(db, step, 'down', unit)
}
/** A stated setting in dB or dBi, as it was entered, at most one decimal. */
export function formatSetting(x: Maybe, unit: string, decimals = 1): Quantity {
  if (x === null || x === undefined || !Number.isFinite(x)) return NONE
  const shown = formatNumber(x, decimals)
  return { value: decimals > 0 ? shown.replace(/\.?0+$/, '') : shown, unit }
}
/** Screening angle or horizon elevation, deg; UP to 0.01°. */
export function formatScreening(deg: Maybe): Quantity {
  return quantity(deg, 0.01, 'up', '°')
}
/** Depression or grazing angle, tilt, deg; nearest 0.01° (or the step given). */
export function formatAngle(deg: Maybe, step = 0.01): Quantity {
  return quantity(deg, step, 'nearest', '°')
}
/** Azimuth from true north, deg, as the face's north has it (see `setFaceNorth`); nearest 0.1°, three digits before the point, 360 prints as 000. */
export function formatAzimuth(deg: Maybe, step = 0.1): Quantity {
  if (deg === null || deg === undefined || !Number.isFinite(deg)) return NONE
  const shown = deg - (faceNorth()?.valueDeg ?? 0)
  const wrapped = roundTo(((shown % 360) + 360) % 360, step, 'nearest') % 360
  const [whole, part] = wrapped.toFixed(decimalsOf(step)).split('.')
  return { value: whole.padStart(3, '0') + (part === undefined ? '' : `.${part}`), unit: faceNorth() ? MAGNETIC : '°' }
}
/** Share of a need met or in sight, %; DOWN to 1 (or the step given); `0` and `100` only when exact, else `< 1`. */
export function formatMetPct(pct: Maybe, step = 1): Quantity {
  if (pct === null || pct === undefined || !Number.isFinite(pct)) return NONE
  const d = decimalsOf(step)
  if (pct <= 0 || pct >= 100) return { value: formatNumber(pct <= 0 ? 0 : 100), unit: '%' }
  const shown = Math.min(100 - step, roundDown(pct, step))
  return { value: shown <= 0 ? `< ${formatNumber(step, d)}` : formatNumber(shown, d), unit: '%' }
}
/** Share lost, masked or unknown, %; UP to 1 (or the step given); `0` and `100` only when exact, else `> 99`. */
export function formatLossPct(pct: Maybe, step = 1): Quantity {
  if (pct === null || pct === undefined || !Number.isFinite(pct)) return NONE
  const d = decimalsOf(step)
  if (pct <= 0 || pct >= 100) return { value: formatNumber(pct <= 0 ? 0 : 100), unit: '%' }
  const shown = Math.max(step, roundUp(pct, step))
  return { value: shown >= 100 ? `> ${formatNumber(100 - step, d)}` : formatNumber(shown, d), unit: '%' }
}
/** Probability of detection; DOWN to 0.01; 0.00 and 1.00 only when exact. */
export function formatPd(pd: Maybe): Quantity {
  if (pd === null || pd === undefined || !Number.isFinite(pd)) return NONE
  if (pd <= 0 || pd >= 1) return { value: pd <= 0 ? '0' : '1', unit: '' }
  const shown = roundDown(pd, 0.01)
  return { value: shown <= 0 ? '< 0.01' : shown.toFixed(2), unit: '' }
}
/** In the nautical system, the metric value in brackets after it: `2 400 ft (730 m)`. For the memo. */
export function withMetric(format: (system: UnitSystem) => Quantity, system: UnitSystem): string {
  const shown = textOf(format(system))
  return system === 'metric' || shown === NO_VALUE ? shown : `${shown} (${textOf(format('metric'))})`
}
