import { exponentialDifferenceM, twoWayLossParts } from '../../atmosphere/index.ts'
import { type PointClutter, percentileOverMeanDb, suppressionNeededDb } from '../../clutter/index.ts'
import { weibullThresholdDb } from '../../detection/index.ts'
import type { SuppressionBy } from '../../doppler/index.ts'
import { elevationAngleDeg, slantRangeM } from '../../geodesy/index.ts'
import type { SightPoint } from '../../masking/index.ts'
import {
  aboveNoiseDb,
  echoAt,
  type Lobe,
  lobeAt,
  lobeModel,
  pdOf,
  plusRatioDb,
  receiverLinearRangeDb,
  type TargetSignal,
  targetSignal,
  twoWayEdgeLossDb,
} from '../../merit/index.ts'
import { compressionGainDb, noiseDbw, targetPolarisationLossDb } from '../../radar/index.ts'
import type { SettledNeed, SettledStudy } from '../../study/index.ts'
import type { Ground, Site } from '../../terrain/index.ts'
import { fromDb, RAD_PER_DEG, toDb, wavelengthM } from '../../units/index.ts'
import { earthOf } from '../optionParts.ts'
import type { LedgerLine } from '../types.ts'
import { GEOMETRY, ledgerLine, sumOf } from './line.ts'

const EQUATION = ['Radar equation', 'Skolnik, Introduction to Radar Systems'] as const
const DETECTION = ['Detection of pulses in noise', 'Marcum and Swerling, exact mathematics'] as const
const GAUSSIAN_BEAM = ['Beam-shape loss', 'Barton, mathematics of a Gaussian beam'] as const
const STATED = ['As the study states it', ''] as const
const EDGE = ['Knife edge near the mask', 'Recommendation ITU-R P.526, from memory'] as const
const TWO_RAY = [
  'Two rays off water or level open ground',
  'Kerr, Propagation of Short Radio Waves, 1951; ground constants and roughness from memory',
] as const
const AIR = ['Ray in exponential air, N₀ 315, 7.35 km', 'Snell’s law, mathematics; reference air after ITU-R P.453, from memory'] as const
const GAS = ['Gas loss', 'Recommendation ITU-R P.676-12'] as const
const RAIN = ['Rain loss', 'Recommendation ITU-R P.838-3'] as const
const RESIDUE = ['Suppression by kind of clutter', '1/I = 1/I_spectral + 1/I_stability + 1/I_quantisation'] as const
const FOLDED = ['Folded clutter', 'ground beyond c/2f at its apparent range'] as const
const AREA_CFAR = ['Area CFAR in Weibull clutter', 'mathematics of a single sample'] as const
const NEEDED = ['Suppression needed', '(C/N) / [(S/N)/D₀ − 1], mathematics'] as const
const RECEIVER = ['Linear range of the receiver', '6.02 dB per bit less 6'] as const
const MARGIN = ['Signal margin', 'S/(C/I + N) less the required ratio'] as const
type Model = readonly [model: string, source: string]

/** One place as the lines of a need read it. */
export interface NeedPlaceParts {
  readonly study: SettledStudy
  readonly suppression: SuppressionBy
  readonly tiltDeg: number
  readonly antennaM: number
  readonly sight: SightPoint
  readonly radiusM: number
  /** What the reflected ray is traced over. */
  readonly ground: Ground
  readonly site: Site
  readonly mastM: number
  /** Sight at the smaller k; null where cover is not worked out there. */
  readonly lowSight: SightPoint | null
  /** Clutter of the resolution cell at a slant range on this azimuth. */
  clutterAt(slantM: number): {
    readonly clutter: PointClutter
    readonly residueDb: number | null
    /** Folded clutter over noise, ratio; 0 = none. */
    readonly foldedRatio: number
    readonly rangeM: number
  }
}

const lobeOf = (p: NeedPlaceParts, signal: TargetSignal, targetM: number, slantM: number): Lobe | null => {
  const model = lobeModel(p.ground, p.study.radar, p.study.atmosphere)
  const place = {
    ground: p.ground,
    place: p.site,
    heightM: p.mastM,
    antennaM: p.antennaM,
    earth: earthOf(p.study),
    raysEarth: earthOf(p.study),
    rangeStepM: p.study.run.rangeStepM,
  }
  return model && lobeAt(model, place, signal, p.sight, targetM, slantM)
}

/** The target of a need over this place, at its lowest level above the ground: from height margin to probability of detection. */
export function needLines(need: SettledNeed, p: NeedPlaceParts): { lines: LedgerLine[]; results: Record<string, number | null> } {
  const { sight } = p
  const levels = need.levelsM.map((h) => (need.heightAbove === 'sea' ? h : sight.groundM + h)).filter((h) => h >= sight.groundM)
  if (levels.length === 0) return { lines: [], results: {} }
  const lines: LedgerLine[] = []
  const results: Record<string, number | null> = {}
  const resultKey = (tail: string): string => `need_${need.id}_${tail}`
  const put = (
    of: string,
    op: LedgerLine['op'],
    key: string,
    label: string,
    value: number | string | null,
    unit: string,
    [model, source]: Model,
    mark: LedgerLine['mark'] = '',
  ) => lines.push(ledgerLine({ key: `${need.id}_${key}`, label: `${need.name}: ${label}`, value, unit, op, model, source, mark, of }))
  const finish = (of: string): number => (results[of] = sumOf(lines, of))
  const geometry: Model = [GEOMETRY, '']

  const targetM = levels[0]
  const margin = resultKey('height_margin_m')
  put(margin, 'start', 'target_height', 'target, MSL', targetM, 'm', geometry)
  put(margin, 'subtract', 'floor', 'coverage floor, MSL', sight.floorM, 'm', geometry)
  const marginM = finish(margin)
  if (p.lowSight && p.lowSight.unknown === null) {
    const low = resultKey('height_margin_k1_m')
    put(low, 'start', 'target_height_k1', 'target, MSL', targetM, 'm', geometry)
    put(low, 'subtract', 'floor_k1', 'coverage floor at k = 1, MSL', p.lowSight.floorM, 'm', geometry)
    finish(low)
  }

  const ratio = resultKey('required_ratio_db')
  const { required } = need
  if (required.by === 'stated') put(ratio, 'start', 'required_ratio', 'required ratio, all losses in it', required.ratioDb, 'dB', STATED)
  else {
    put(
      ratio,
      'start',
      'd0',
      `D₀ for Pd ${required.pd}, Pfa ${required.pfa}, Swerling ${required.swerling}`,
      required.d0Db,
      'dB',
      DETECTION,
    )
    put(ratio, 'add', 'beam_shape', 'beam-shape loss', required.beamShapeDb, 'dB', GAUSSIAN_BEAM)
    put(ratio, 'add', 'straddle', 'straddling loss', required.straddleDb, 'dB', STATED)
    put(ratio, 'add', 'cfar', 'loss of the adaptive threshold', required.cfarDb, 'dB', DETECTION)
    put(ratio, 'info', 'hits', 'pulses in the half-power beam', required.hits, '', ['Hits per scan', 'θ·PRF/(6·rpm)'])
    put(ratio, 'info', 'pulses', 'pulses that count in integration', required.pulses, '', ['Share of independent pulses', 'from memory'])
  }
  finish(ratio)

  const slantM = slantRangeM(p.antennaM, targetM, sight.rangeM, p.radiusM)
  const elevationDeg = elevationAngleDeg(p.antennaM, targetM, sight.rangeM, p.radiusM)
  const signal = targetSignal(p.study.radar, p.study.atmosphere, p.tiltDeg, need.rcsM2, slantM * 1.5 + 50_000)
  const echo = echoAt(signal, p.antennaM, targetM, sight.rangeM, slantM, Math.tan(elevationDeg * RAD_PER_DEG))
  const { radar } = echo.segment
  const snr = resultKey('signal_to_noise_db')
  const loss = signal.loss ? twoWayLossParts(signal.loss, p.antennaM, targetM, sight.rangeM, slantM) : { gasDb: 0, rainDb: 0 }
  const edgeDb = twoWayEdgeLossDb(marginM, sight.rangeM, sight.controlling.rangeM, wavelengthM(radar.frequencyHz))
  put(snr, 'info', 'target_elevation', 'elevation of the target', elevationDeg, 'deg', geometry)
  const airM = Number.isFinite(p.radiusM)
    ? exponentialDifferenceM(p.antennaM, targetM, sight.rangeM, p.radiusM / p.study.atmosphere.effectiveEarthFactor, p.radiusM)
    : Number.NaN
  if (Number.isFinite(airM))
    put(snr, 'info', 'exponential', 'difference to exponential atmosphere, height of the ray', airM, 'm', AIR, 'from memory')
  put(snr, 'info', 'target_slant_range', 'slant range of the target', slantM, 'm', geometry)
  if (echo.segment.beams !== '') put(snr, 'info', 'beams', 'beams in use', echo.segment.beams, '', STATED)
  const pattern: Model = ['Elevation pattern', 'Gaussian beam, cosecant-squared or table']
  put(snr, 'start', 'peak_power', 'peak power', toDb(radar.peakPowerW), 'dBW', EQUATION)
  const gainDb = radar.antenna.gainDbi + (radar.receiveAntenna ?? radar.antenna).gainDbi
  put(snr, 'add', 'antenna_gain', 'antenna gain, both ways', gainDb, 'dB', EQUATION)
  put(snr, 'add', 'wavelength', 'wavelength squared', 20 * Math.log10(wavelengthM(radar.frequencyHz)), 'dB m²', EQUATION)
  put(snr, 'add', 'compression', 'pulse compression τ/τc', compressionGainDb(radar), 'dB', EQUATION)
  put(snr, 'add', 'rcs', 'RCS', toDb(need.rcsM2), 'dBsm', EQUATION)
  put(snr, 'add', 'elevation_gain', 'elevation pattern, both ways', echo.gainDb, 'dB', pattern)
  put(snr, 'subtract', 'spreading', '(4π)³', 30 * Math.log10(4 * Math.PI), 'dB', EQUATION)
  put(snr, 'subtract', 'slant_range', 'slant range to the fourth power', 40 * Math.log10(slantM), 'dB m⁴', EQUATION)
  put(snr, 'subtract', 'noise', 'receiver noise kT₀BFn', noiseDbw(radar), 'dBW', EQUATION)
  put(snr, 'subtract', 'system_loss', 'system losses', radar.systemLossDb, 'dB', EQUATION)
  put(snr, 'subtract', 'polarisation', 'circular polarisation', targetPolarisationLossDb(radar), 'dB', STATED)
  put(snr, 'subtract', 'gas', 'gas, both ways', loss.gasDb, 'dB', GAS)
  put(snr, 'subtract', 'rain', 'rain, both ways', loss.rainDb, 'dB', RAIN)
  put(snr, 'subtract', 'edge', 'close over the mask, both ways', edgeDb, 'dB', EDGE, edgeDb > 0 ? 'from memory' : '')
  const lobe = edgeDb === 0 && marginM >= 0 ? lobeOf(p, signal, targetM, slantM) : null
  if (lobe) {
    const mark = lobe.outside ? 'outside model' : 'from memory'
    put(
      snr,
      'info',
      'lobe_range',
      `reflection point on ${lobe.surface === 'water' ? 'water' : 'open ground'}, ground range`,
      lobe.rangeM,
      'm',
      TWO_RAY,
    )
    put(snr, 'info', 'lobe_grazing', 'grazing angle there', lobe.grazingDeg, 'deg', TWO_RAY, lobe.outside ? 'outside model' : '')
    put(snr, 'info', 'lobe_factor', 'F⁴ of direct and reflected ray; a gain is not counted', lobe.factorDb, 'dB', TWO_RAY, mark)
    put(snr, 'subtract', 'lobing', 'direct and reflected ray together, both ways', Math.max(0, -lobe.factorDb), 'dB', TWO_RAY, mark)
  }
  put(snr, 'subtract', 'stc', 'short-range sensitivity', echo.stcDb, 'dB', STATED)
  const snrDb = finish(snr)

  const { clutter, residueDb, foldedRatio, rangeM } = p.clutterAt(slantM)
  const noiseGainDb = toDb(p.suppression.noiseGain)
  const foldedDb = p.suppression.rows.find((r) => r.about === 'folded')?.improvementDb ?? 0
  const plus = (db: number | null, ratio: number): number | null => (ratio > 0 ? plusRatioDb(db ?? Number.NaN, ratio) : db)
  const beforeDb = plus(clutter.cnrDb, foldedRatio)
  const afterDb = plus(residueDb, foldedRatio * fromDb(-foldedDb))
  const cnrDb = beforeDb === null ? null : beforeDb - echo.stcDb
  const limitDb = receiverLinearRangeDb(p.study.radar)
  const overloaded =
    limitDb !== null && cnrDb !== null && cnrDb + (clutter.spread === null ? 0 : percentileOverMeanDb(clutter.spread, 0.99)) > limitDb
  const left = overloaded ? beforeDb : afterDb
  const riseDb =
    p.study.radar.detector === 'areaCfar' && clutter.spread !== null
      ? Math.max(0, weibullThresholdDb(Math.max(1, clutter.spread), required.pfa).extraDb)
      : 0
  const residue = resultKey('residue_to_noise_db')
  if (rangeM !== sight.rangeM)
    put(residue, 'info', 'clutter_range', 'ground range of the clutter in the gate of the target', rangeM, 'm', geometry)
  if (beforeDb !== null && left !== null) {
    put(residue, 'start', 'clutter_to_noise', 'C/N of the resolution cell', clutter.cnrDb ?? beforeDb, 'dB', [
      'Clutter-to-noise',
      'lines of clutter_to_noise_db',
    ])
    put(residue, 'add', 'folded', 'clutter of an earlier pulse on top', clutter.cnrDb === null ? 0 : beforeDb - clutter.cnrDb, 'dB', FOLDED)
    put(residue, 'subtract', 'improvement', 'improvement factor over the kinds in the cell', beforeDb - left, 'dB', RESIDUE)
    put(residue, 'add', 'threshold_rise', 'threshold over spiky clutter, against noise-like', riseDb, 'dB', AREA_CFAR)
    put(residue, 'subtract', 'residue_stc', 'short-range sensitivity', echo.stcDb, 'dB', STATED)
    finish(residue)
  } else results[residue] = null
  for (const row of p.suppression.rows) {
    const mark = p.suppression.kind === 'stated' ? 'by hand' : row.spectralDb !== null && row.about !== 'discrete' ? 'from memory' : ''
    put(residue, 'info', `improvement_${row.about}`, `improvement factor of ${row.about}`, row.improvementDb, 'dB', RESIDUE, mark)
  }
  if (overloaded)
    put(residue, 'info', 'receiver', 'receiver limits: 99 % of clutter over its linear range, nothing suppressed', limitDb, 'dB', RECEIVER)

  const needed = resultKey('suppression_needed_db')
  const spikyDb = cnrDb === null ? null : cnrDb + riseDb
  const wanted = suppressionNeededDb(spikyDb ?? Number.NaN, snrDb, required.ratioDb, noiseGainDb)
  results[needed] = Number.isFinite(wanted) ? wanted : null
  if (wanted > 0 && spikyDb !== null) {
    put(needed, 'start', 'needed_clutter', 'C/N after short-range sensitivity', spikyDb, 'dB', NEEDED)
    put(needed, 'subtract', 'room', 'room over noise, (S/N)/D₀ − 1', spikyDb - wanted, 'dB', NEEDED)
  }

  const over = resultKey('signal_margin_db')
  const above = aboveNoiseDb((results[residue] ?? Number.NaN) + noiseGainDb)
  put(over, 'start', 'margin_signal', 'S/N after short-range sensitivity', snrDb, 'dB', MARGIN)
  put(over, 'add', 'noise_gain', 'gain of a filter over noise', noiseGainDb, 'dB', MARGIN)
  put(over, 'subtract', 'residue_and_noise', 'residue and noise over noise alone', above, 'dB', MARGIN)
  put(over, 'subtract', 'margin_ratio', 'required ratio', required.ratioDb, 'dB', MARGIN)
  const overDb = finish(over)
  const inSight = marginM >= sight.floorBandM
  results[resultKey('probability_of_detection')] = inSight && echo.heard ? pdOf(required)(overDb) : 0
  const word = !echo.heard ? 'out of range' : !inSight ? (marginM > -sight.floorBandM ? 'marginal' : 'masked') : null
  const detectable = snrDb + noiseGainDb >= required.ratioDb
  put(over, 'info', 'outcome', 'outcome', word ?? (!detectable ? 'in sight' : overDb < 0 ? 'detectable' : 'usable'), '', MARGIN)
  return { lines, results }
}
