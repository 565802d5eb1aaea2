import type { TrialConfirms, TrialKind, TrialRow } from '../../core/index.ts'
import { formatAzimuth, formatPlaceRange, textOf } from './format.ts'
import type { UnitSystem } from './units.ts'

/** What is done in a row of a trial plan. */
export const TRIAL_KIND_WORDS: Readonly<Record<TrialKind, string>> = {
  radial: 'Radial',
  orbit: 'Orbit',
  hold: 'Hold',
  fix: 'Over the fix',
  track: 'Along the track',
  survey: 'Survey on the ground',
}
/** What it would confirm. */
export const TRIAL_CONFIRMS_WORDS: Readonly<Record<TrialConfirms, string>> = {
  floor: 'the coverage floor behind the obstacle',
  signal: 'detection where the signal margin is least',
  horizon: 'the horizon azimuth by azimuth',
  cone: 'the cone of silence',
  fix: 'detection over the fix',
  gap: 'the gap of the track',
  'sight-edge': 'where sight begins or ends',
  obstacle: 'the height of the obstacle that the floor rests on',
}

/** Where a row is flown: `Radial 118.0°, 1.1 to 16.2 NM`. */
export function trialRoute(r: TrialRow, system: UnitSystem): string {
  const kind = TRIAL_KIND_WORDS[r.kind]
  const range = (m: number): string => textOf(formatPlaceRange(m, system))
  const span = r.fromRangeM === null || r.toRangeM === null ? '' : `${formatPlaceRange(r.fromRangeM, system).value} to ${range(r.toRangeM)}`
  if (r.kind === 'radial') return `${kind} ${textOf(formatAzimuth(r.at.azimuthDeg))}, ${span}`
  if (r.kind === 'track') return span === '' ? kind : `${kind}, ${span}`
  if (r.kind !== 'orbit') return r.name === '' ? kind : `${kind} ${r.name}`
  const whole = r.fromAzimuthDeg === null || r.toAzimuthDeg === null || (r.toAzimuthDeg - r.fromAzimuthDeg) % 360 === 0
  const arc = whole ? 'all round' : `${textOf(formatAzimuth(r.fromAzimuthDeg, 1))} to ${textOf(formatAzimuth(r.toAzimuthDeg, 1))}`
  return `${kind} at ${range(r.at.rangeM)}, ${arc}`
}
