import type { BeforeAfter, SectorChange } from '../../core/index.ts'
import { formatAzimuth, formatNumber, formatPlaceRange, NO_VALUE, type Quantity, textOf } from './format.ts'
import type { UnitSystem } from './units.ts'

/** Words of the section that sets one option against another, or against itself without an obstacle. */
export const CHANGE_WORDS = {
  title: 'Before and after',
  hint: 'Choose another mast, or an obstacle to leave out, and read what changes',
  before: 'Before',
  after: 'After',
  show: 'Show what changes',
  working: 'Working it out',
  nothing: 'Nothing changes',
  sectors: 'Horizon, sectors that change by more than 0.02°',
  noSectors: 'No sector of the horizon changes by more than 0.02°',
  fixes: 'Fixes affected',
  noFixes: 'No fix is affected',
  needs: 'Needs',
  ground: 'Ground, clutter and floors',
  without: (name: string) => `without ${name}`,
} as const

/** `61 → 96 %`; one number where it stays the same at the face. */
export function pairWords(pair: BeforeAfter, format: (v: number | null) => Quantity): string {
  const [a, b] = [format(pair.before), format(pair.after)]
  if (a.value === b.value) return textOf(b)
  return `${a.value === NO_VALUE ? NO_VALUE : a.value} → ${textOf(b)}`
}
/** `azimuth 087.6° to 092.4°, up to 0.62° higher, Quay crane at 1.2 km`. */
export function sectorWords(s: SectorChange, system: UnitSystem): string {
  const where =
    s.toDeg - s.fromDeg === 360 ? 'all round' : `azimuth ${textOf(formatAzimuth(s.fromDeg))} to ${textOf(formatAzimuth(s.toDeg))}`
  const by = `${formatNumber(Math.abs(s.mostDeg), 2)}°`
  const way = s.mostDeg > 0 ? 'higher' : 'lower'
  const is = s.mostDeg > 0 ? 'behind' : 'then'
  const range = Number.isFinite(s.rangeM) ? ` at ${textOf(formatPlaceRange(s.rangeM, system))}` : ''
  return `${where}, up to ${by} ${way}, ${is} ${s.obstacle}${range}`
}
