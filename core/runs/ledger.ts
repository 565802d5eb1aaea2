import { depressionAtTerrainDeg, earthDropM, effectiveRadiusM, type LonLat } from '../geodesy/index.ts'
import { type SightPoint, sightPoint } from '../masking/index.ts'
import type { SettledStudy } from '../study/index.ts'
import { type Ground, siteGround } from '../terrain/index.ts'
import { candidateOf, earthOf, siteOf } from './engine.ts'
import type { CellLedger, LedgerLine, OptionRef } from './types.ts'

type Line = Omit<LedgerLine, 'mark' | 'source'> & Partial<Pick<LedgerLine, 'mark' | 'source'>>
export const ledgerLine = (line: Line): LedgerLine => ({ source: '', mark: '', ...line })

const GEOMETRY = 'Straight ray over the effective earth'

/**
 * Every step behind the numbers of one place for one option. Lines of a result (`of`) that start, add or subtract sum to it; `info` lines
 * give what went in. The place is evaluated on its own ray and range.
 */
export function cellLedger(ground: Ground, study: SettledStudy, option: OptionRef, at: LonLat): CellLedger {
  const site = siteOf(candidateOf(study, option.candidate))
  const earth = earthOf(study)
  const sight = sightPoint(ground, site, option.heightM, earth, at)
  const siteM = siteGround(ground, site)
  const lines: LedgerLine[] = []
  const results: Record<string, number | null> = {}
  lines.push(...placeLines(sight, siteM, option.heightM))
  if (sight.unknown) {
    lines.push(
      ledgerLine({
        key: 'unknown',
        label: 'Unknown ground',
        value: sight.unknown === 'void' ? 'beyond a void' : 'edge of terrain',
        unit: '',
        op: 'info',
        model: GEOMETRY,
      }),
    )
  } else {
    const radius = effectiveRadiusM(earth, site.lat, sight.azimuthDeg)
    lines.push(...floorLines(sight, siteM + option.heightM, radius))
    results.coverage_floor_m = sight.floorM
    results.height_to_see_m = sight.heightToSeeM
    results.depression_deg = depressionAtTerrainDeg(siteM + option.heightM - sight.groundM, sight.rangeM, radius)
  }
  return { at: { ...at, azimuthDeg: sight.azimuthDeg, rangeM: sight.rangeM }, option, lines, results }
}

function placeLines(s: SightPoint, siteM: number, mastM: number): LedgerLine[] {
  const info = (key: string, label: string, value: number | string | null, unit: string): LedgerLine =>
    ledgerLine({ key, label, value, unit, op: 'info', model: GEOMETRY })
  return [
    info('azimuth', 'Azimuth, true', s.azimuthDeg, 'deg'),
    info('ground_range', 'Ground range', s.rangeM, 'm'),
    info('site_ground', 'Ground at the mast, MSL', siteM, 'm'),
    info('mast_height', 'Mast height', mastM, 'm'),
    info('ground', 'Ground at the place, MSL', Number.isFinite(s.groundM) ? s.groundM : null, 'm'),
    info('surface', 'Surface with cover and obstacles, MSL', Number.isFinite(s.surfaceM) ? s.surfaceM : null, 'm'),
    info('in_sight', 'In sight', s.unknown ? 'unknown' : s.inSight ? 'yes' : s.marginal ? 'marginal' : 'no', ''),
    info('controlling', 'Controlling obstacle', s.controlling.obstacle, ''),
    info('controlling_range', 'Range of the controlling obstacle', s.controlling.rangeM, 'm'),
  ]
}

/** Coverage floor: electrical centre, rise of the horizon ray, drop of the earth below it. */
function floorLines(s: SightPoint, antennaM: number, radiusM: number): LedgerLine[] {
  const drop = Number.isFinite(radiusM) ? earthDropM(s.rangeM, radiusM) : 0
  const of = 'coverage_floor_m'
  const line = (key: string, label: string, value: number, op: LedgerLine['op']): LedgerLine =>
    ledgerLine({ key, label, value, unit: 'm', op, model: GEOMETRY, of })
  return [
    line('electrical_centre', 'Electrical centre, MSL', antennaM, 'start'),
    line('earth_drop', 'Earth falls away below the ray, r²/2ka', drop, 'add'),
    line('ray_rise', 'Rise along the horizon ray, or up to the surface at the place', s.floorM - antennaM - drop, 'add'),
    ledgerLine({
      key: 'floor_band',
      label: 'Error band of the floor (90 %)',
      value: s.floorBandM,
      unit: 'm',
      op: 'info',
      model: GEOMETRY,
      of,
    }),
  ]
}
