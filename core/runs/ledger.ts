import { elevationGain } from '../antenna/index.ts'
import { clutterAtPoint, type PointClutter, type PointOptions, suppressionNeededDb } from '../clutter/index.ts'
import { depressionAtTerrainDeg, earthDropM, effectiveRadiusM, elevationAngleDeg, type LonLat, slantRangeM } from '../geodesy/index.ts'
import { type SightPoint, sightPoint } from '../masking/index.ts'
import { polarShape } from '../polar/index.ts'
import { type RadarInput, radarConstantDb, stcDb } from '../radar/index.ts'
import type { SettledNeed, SettledStudy } from '../study/index.ts'
import { type Ground, siteGround } from '../terrain/index.ts'
import { toDb } from '../units/index.ts'
import { candidateOf, earthOf, siteOf } from './optionParts.ts'
import type { CellLedger, LedgerLine, OptionRef } from './types.ts'

type Line = Omit<LedgerLine, 'mark' | 'source'> & Partial<Pick<LedgerLine, 'mark' | 'source'>>
export const ledgerLine = (line: Line): LedgerLine => ({ source: '', mark: '', ...line })

const GEOMETRY = 'Straight ray over the effective earth'

/**
 * Every step behind the numbers of one place for one option. Lines of a result (`of`) that start, add or subtract sum to it; `info` lines
 * give what went in. The place is evaluated on its own ray and range. `options` carries the study's own land table and, where it is at hand,
 * the side-lobe term of the option, which otherwise takes a sweep of its own.
 */
export function cellLedger(ground: Ground, study: SettledStudy, option: OptionRef, at: LonLat, options: PointOptions = {}): CellLedger {
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
    const clutter = clutterAtPoint(ground, site, option.heightM, earth, study.radar, option.tiltDeg, polarShape(study.run), at, options)
    lines.push(...clutterInfo(clutter), ...clutter.lines)
    results.clutter_strength_db = clutter.strengthDb
    results.clutter_rcs_dbsm = clutter.rcsDbsm
    results.clutter_to_noise_db = clutter.cnrDb
    for (const need of study.needs.filter((n) => n.kind === 'layer')) {
      const target = needLines(study.radar, need, { option, siteM, sight, radiusM: radius, cnrDb: clutter.cnrDb })
      lines.push(...target.lines)
      Object.assign(results, target.results)
    }
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

/** What the clutter figures rest on: row, marks, cell. */
function clutterInfo(c: PointClutter): LedgerLine[] {
  const model = 'Low-angle land clutter'
  const info = (key: string, label: string, value: number | string | null, unit: string, mark: LedgerLine['mark'] = ''): LedgerLine =>
    ledgerLine({ key, label, value, unit, op: 'info', model, mark })
  return [
    info('slant_range', 'Slant range', c.slantRangeM, 'm'),
    info('table_row', 'Row of the land table', c.rowName, ''),
    info('strength', 'Mean clutter strength σ°F⁴ of the place', c.strengthDb, 'dB'),
    info('spread', 'Weibull spread a_w at the cell area', c.spread, ''),
    ...c.notes.map((n, i) => info(`note_${i + 1}`, n.about, n.mark, '', n.mark)),
  ]
}

interface TargetPlace {
  readonly option: OptionRef
  readonly siteM: number
  readonly sight: SightPoint
  readonly radiusM: number
  readonly cnrDb: number | null
}

/** The target of a layer need over this place, at its lowest level above the ground: height margin, S/N and suppression needed. */
function needLines(radar: RadarInput, need: SettledNeed, p: TargetPlace): { lines: LedgerLine[]; results: Record<string, number | null> } {
  const { sight, siteM, option, radiusM } = p
  const levels = need.levelsM.map((h) => (need.heightAbove === 'sea' ? h : sight.groundM + h)).filter((h) => h >= sight.groundM)
  if (levels.length === 0) return { lines: [], results: {} }
  const targetM = levels[0]
  const antennaM = siteM + option.heightM
  const slantM = slantRangeM(antennaM, targetM, sight.rangeM, radiusM)
  const elevationDeg = elevationAngleDeg(antennaM, targetM, sight.rangeM, radiusM)
  const gain = elevationGain(radar.antenna, elevationDeg, option.tiltDeg)
  const id = need.id
  const margin = `need_${id}_height_margin_m`
  const snr = `need_${id}_signal_to_noise_db`
  const line = (
    of: string,
    op: LedgerLine['op'],
    key: string,
    label: string,
    value: number | null,
    unit: string,
    model: string,
  ): LedgerLine => ledgerLine({ key: `${id}_${key}`, label: `${need.name}: ${label}`, value, unit, op, model, of })
  const lines = [
    line(margin, 'start', 'target_height', 'target, MSL', targetM, 'm', GEOMETRY),
    line(margin, 'subtract', 'floor', 'coverage floor, MSL', sight.floorM, 'm', GEOMETRY),
    line(snr, 'info', 'target_elevation', 'elevation of the target', elevationDeg, 'deg', GEOMETRY),
  ]
  const results: Record<string, number | null> = { [margin]: targetM - sight.floorM }
  if (!(gain > 0)) return { lines, results: { ...results, [snr]: null } }
  const terms: [LedgerLine['op'], string, string, number, string][] = [
    ['start', 'radar_constant', 'echo-to-noise of 1 m² at 1 m on the beam peak', radarConstantDb(radar), 'dB'],
    ['add', 'rcs', 'RCS', toDb(need.rcsM2), 'dBsm'],
    ['add', 'elevation_gain', 'elevation pattern, both ways', 2 * toDb(gain), 'dB'],
    ['subtract', 'slant_range', 'slant range to the fourth power', 40 * Math.log10(slantM), 'dB m⁴'],
    ['subtract', 'stc', 'short-range sensitivity', stcDb(radar, slantM), 'dB'],
  ]
  for (const [op, key, label, value, unit] of terms) lines.push(line(snr, op, key, label, value, unit, 'Radar equation'))
  const snrDb = terms.reduce((sum, [op, , , value]) => sum + (op === 'subtract' ? -value : value), 0)
  results[snr] = snrDb
  const required = need.requiredRatioDb
  const needed = `need_${id}_suppression_needed_db`
  const suppression = suppressionNeededDb((p.cnrDb ?? Number.NaN) - stcDb(radar, slantM), snrDb, required)
  results[needed] = Number.isFinite(suppression) ? suppression : null
  const ratio = line(needed, 'info', 'required_ratio', 'required ratio D₀', required, 'dB', 'Suppression needed')
  lines.push(need.requiredRatioMark ? { ...ratio, mark: need.requiredRatioMark } : ratio)
  if (suppression > 0 && p.cnrDb !== null) {
    const cnr = p.cnrDb - stcDb(radar, slantM)
    lines.push(line(needed, 'start', 'clutter_to_noise', 'C/N after short-range sensitivity', cnr, 'dB', 'Suppression needed'))
    lines.push(line(needed, 'subtract', 'room', 'room over noise, (S/N)/D₀ − 1', cnr - suppression, 'dB', 'Suppression needed'))
  }
  return { lines, results }
}
