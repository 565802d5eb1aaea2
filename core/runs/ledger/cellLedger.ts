import { clutterAtPoint, type FoldedCells, foldedClutter, type PointClutter, type PointOptions } from '../../clutter/index.ts'
import { improvementDb } from '../../doppler/index.ts'
import { depressionAtTerrainDeg, earthDropM, effectiveRadiusM, geodesicDirect, type LonLat, slantRangeM } from '../../geodesy/index.ts'
import { type SightPoint, sightPoint, sweep } from '../../masking/index.ts'
import { isAreaNeed, isLowK } from '../../merit/index.ts'
import { cellAt, polarShape } from '../../polar/index.ts'
import type { SettledStudy } from '../../study/index.ts'
import { type Ground, siteGround } from '../../terrain/index.ts'
import { finish } from '../../work/index.ts'
import { candidateOf, earthOf, lowEarthOf, mayFold, siteOf, suppressionOf } from '../optionParts.ts'
import type { CellLedger, LedgerLine, OptionRef } from '../types.ts'
import { GEOMETRY, ledgerLine } from './line.ts'
import { needLines } from './needLines.ts'

/** Options of the clutter kernels, side-lobe terms and folded clutter of the option where they are at hand. */
export interface LedgerOptions extends PointOptions {
  readonly folded?: FoldedCells
}

/**
 * Every step behind the numbers of one place for one option. Lines of a result (`of`) that start, add or subtract sum to it; `info` lines
 * give what went in. The place is evaluated on its own ray and range. `options` are those of the clutter kernels (`clutterOptions`) and, where
 * they are at hand, the side-lobe terms of the option, which otherwise take a sweep of their own.
 */
export function cellLedger(ground: Ground, study: SettledStudy, option: OptionRef, at: LonLat, options: LedgerOptions = {}): CellLedger {
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
    const suppression = suppressionOf(study, ground)
    // Where kinds of clutter differ the residue comes from the sums themselves.
    const { sideLobeCnrDb, sideLobeResidueDb, folded: heldFolded, ...rest } = options
    const asked: PointOptions =
      suppression.uniformDb !== null || options.improvementDb
        ? options
        : { ...rest, improvementDb: improvementDb(suppression, ground.codes) }
    const grid = polarShape(study.run)
    const folded = heldFolded ?? foldedOf(ground, study, option, options)
    const clutterOf = (place: LonLat): PointClutter =>
      clutterAtPoint(ground, site, option.heightM, earth, study.radar, option.tiltDeg, grid, place, asked)
    const clutter = clutterOf(at)
    lines.push(...clutterInfo(clutter), ...clutter.lines)
    results.clutter_strength_db = clutter.strengthDb
    results.clutter_rcs_dbsm = clutter.rcsDbsm
    results.clutter_to_noise_db = clutter.cnrDb
    const antennaM = siteM + option.heightM
    const parts = {
      study,
      suppression,
      tiltDeg: option.tiltDeg,
      antennaM,
      sight,
      radiusM: radius,
      ground,
      site,
      mastM: option.heightM,
      lowSight: isLowK(earth.effectiveEarthFactor) ? null : sightPoint(ground, site, option.heightM, lowEarthOf(study), at),
      clutterAt: (slantM: number) => {
        // A target shares the gate of the ground at its own slant range.
        const shift = Math.round((slantM - slantRangeM(antennaM, sight.groundM, sight.rangeM, radius)) / grid.rangeStepM)
        const rangeM = Math.max(grid.rangeStepM / 2, sight.rangeM + shift * grid.rangeStepM)
        const there = shift === 0 ? clutter : clutterOf(geodesicDirect(site, sight.azimuthDeg, rangeM))
        const residueDb = suppression.uniformDb === null || there.cnrDb === null ? there.residueDb : there.cnrDb - suppression.uniformDb
        const cell = folded ? cellAt(grid, sight.azimuthDeg, rangeM) : -1
        return {
          clutter: there,
          residueDb,
          foldedRatio: folded && cell >= 0 ? folded.ratio[cell] : 0,
          rangeM: shift === 0 ? sight.rangeM : rangeM,
        }
      },
    }
    for (const need of study.needs.filter(isAreaNeed)) {
      const target = needLines(need, parts)
      lines.push(...target.lines)
      Object.assign(results, target.results)
    }
  }
  return { at: { ...at, azimuthDeg: sight.azimuthDeg, rangeM: sight.rangeM }, option, lines, results }
}

/** Clutter from beyond the unambiguous range, by a sweep of its own; null where no ground lies there. */
function foldedOf(ground: Ground, study: SettledStudy, option: OptionRef, options: PointOptions): FoldedCells | null {
  const site = siteOf(candidateOf(study, option.candidate))
  if (!mayFold(study, ground, site)) return null
  const earth = earthOf(study)
  const near = finish(sweep(ground, site, [option.heightM], polarShape(study.run), earth, { heightToSee: false })).site
  return finish(foldedClutter(ground, site, option.heightM, earth, study.radar, option.tiltDeg, near, study.foldRangeM, options))
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
    info(
      'controlling_range',
      'Range of the controlling obstacle',
      Number.isFinite(s.controlling.rangeM) ? s.controlling.rangeM : null,
      'm',
    ),
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
  const model = c.rowName === 'sea' ? 'Sea clutter' : 'Low-angle land clutter'
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
