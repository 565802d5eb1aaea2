import type { DefaultUsed } from '../../../core/index.ts'
import {
  declinationWords,
  faceNorth,
  faceValue,
  formatAngle,
  formatBand,
  formatBandwidth,
  formatFrequency,
  formatK,
  formatNumber,
  formatPfa,
  formatPower,
  formatPulse,
  formatRange,
  formatSetting,
  labelOf,
  northWords,
  tied,
  withMetric,
} from '../../words/index.ts'
import { value } from './cells.ts'
import type { Block, Cell, MemoInput } from './types.ts'

/** Files, settings of the radar, models chosen, and every default that stands in for something not stated. */
export function dataBlocks(input: MemoInput): Block[] {
  const { study } = input
  const blocks: Block[] = [
    {
      kind: 'table',
      id: 'files',
      title: 'Files',
      columns: [
        { head: 'File', keep: true },
        { head: 'What it is', width: 'fill' },
        { head: 'SHA-256', width: 172 },
      ],
      rows: input.files.map((f): Cell[] => [f.name, f.describe, { text: shaLines(f.sha256), light: true }]),
    },
    { kind: 'list', items: assumptions(input) },
    {
      kind: 'beside',
      leftPt: 232,
      left: [pairs('radar', `Radar: ${study.radar.name}`, radarRows(input))],
      right: [pairs('antenna', 'Antenna, suppression and grid', antennaRows(input))],
    },
  ]
  if (study.origins.length > 0)
    blocks.push({
      kind: 'table',
      id: 'origins',
      title: 'Values taken from a template, and where they come from',
      columns: [
        { head: 'Value', width: 110 },
        { head: '', align: 'right' },
        { head: 'Origin', width: 'fill' },
      ],
      rows: study.origins.map((o): Cell[] => [originLabel(o.path, study), value(faceValue(o.path, o.value, input.system)), tied(o.origin)]),
    })
  if (study.defaults.length > 0)
    blocks.push({
      kind: 'table',
      id: 'defaults',
      title: 'Defaults used',
      dense: true,
      columns: [
        { head: 'Key of the study', width: 'fill' },
        { head: 'Value taken', align: 'right' },
        { head: 'Key of the study', width: 'fill' },
        { head: 'Value taken', align: 'right' },
      ],
      rows: inTwo(study.defaults),
    })
  else blocks.push({ kind: 'paragraph', text: 'No default was used: everything is stated in the study.' })
  if (input.warnings && input.warnings.length > 0) blocks.push({ kind: 'caution', texts: input.warnings })
  return blocks
}
/** `Gain`; of a need with its name: `Vectoring area: Pd`. */
function originLabel(path: string, study: MemoInput['study']): string {
  const at = /^needs\[(\d+)\]/.exec(path)
  return at ? `${study.needs[Number(at[1])].name}: ${labelOf(path)}` : labelOf(path)
}
/** 64 hex digits break badly: two lines of 32. */
const shaLines = (sha: string | null): string => (sha === null ? 'not taken' : `${sha.slice(0, 32)}\n${sha.slice(32)}`)

function assumptions(input: MemoInput): string[] {
  const { study, system } = input
  const { effectiveEarthFactor: k, earthRadiusM } = study.atmosphere
  const radius =
    earthRadiusM === null
      ? 'times the radius of curvature along each azimuth (WGS 84)'
      : `times a sphere of ${formatNumber(earthRadiusM)}\u202fm`
  const flat = k <= 0 || k > 10
  const errors = [...new Set(study.terrain.map((t) => withMetric((s) => formatBand(t.verticalErrorM, s), system)))].join(', ')
  const cover =
    study.landCover !== null
      ? `Land cover from ${study.landCover.file}, legend ${study.landCover.legend}; cover height is added to the ground outside each clearing`
      : `No land cover: the whole ground is taken as ${study.uniformTerrain}${study.uniformTerrainMark ? ' (default)' : ''}, without cover height`
  const table =
    study.lowAngleLandTable === null
      ? 'Clutter strength from the built-in low-angle land table: from memory, not proof-read in print'
      : `Clutter strength from the study's own land table, ${study.lowAngleLandTable} (by hand)`
  return [
    `Heights are orthometric, above mean sea level; vertical error of the terrain ${errors} (90\u202f%)`,
    flat
      ? `Effective-earth factor ${formatK(k)}: flat-earth sweep, ducting sensitivity, not a prediction`
      : `Effective earth: k = ${formatK(k)} ${radius}`,
    cover,
    study.obstacles === null
      ? 'No obstacles were given'
      : `Obstacles from ${study.obstacles}: each masks the azimuths it stands in and at least one`,
    table,
    airWords(input),
    northWords(),
    ...declinationLine(input),
    `Cover is worked out at k = 1 too; pass asks for both`,
    `In sight: the line of sight over ground, cover and obstacles. Ground beyond a void or the end of the terrain is unknown`,
  ]
}

/** The study's declination, while azimuths are true. */
function declinationLine({ study: { declination: d } }: MemoInput): string[] {
  if (d === null || faceNorth() !== null) return []
  return [`Magnetic azimuths are those less the declination, ${declinationWords(d.valueDeg)} on ${d.date} (${d.model})`]
}

/** Gas, rain and sea of the study, in a clause. */
function airWords({ study }: MemoInput): string {
  const { gas, rainRateMmH, seaState, windMs } = study.atmosphere
  const air = gas === 'p676' ? 'Gas loss after ITU-R P.676' : 'No gas loss'
  const rain = rainRateMmH > 0 ? `rain of ${formatNumber(rainRateMmH, 1)}\u202fmm/h, as echo and as loss` : 'no rain'
  return `${air}, ${rain}; sea state ${formatNumber(seaState, 1).replace(/\.0$/, '')}, wind ${formatNumber(windMs, 1).replace(/\.0$/, '')}\u202fm/s. Toward targets a knife edge near the mask, else free space`
}

type Pair = readonly [label: string, cell: Cell]
function pairs(id: string, title: string, rows: readonly Pair[]): Block {
  return {
    kind: 'table',
    id,
    title,
    dense: true,
    columns: [
      { head: '', width: 'fill' },
      { head: '', align: 'right' },
    ],
    rows,
  }
}
function radarRows(input: MemoInput): Pair[] {
  const r = input.study.radar
  return [
    ['Frequency', value(formatFrequency(r.frequencyHz))],
    ['Peak power', value(formatPower(r.peakPowerW))],
    ['Pulse width', value(formatPulse(r.pulseWidthS))],
    ['Pulse width, compressed', value(formatPulse(r.compressedPulseWidthS))],
    ['Noise bandwidth', value(formatBandwidth(r.noiseBandwidthHz))],
    ['Pulse repetition', { text: r.prfHz.map((f) => formatNumber(f)).join(', '), unit: 'Hz' }],
    ['Rotation', value(formatSetting(r.rotationRpm, 'rpm'))],
    ['Noise figure', value(formatSetting(r.noiseFigureDb, 'dB'))],
    ['System loss', value(formatSetting(r.systemLossDb, 'dB'))],
    ['False-alarm probability', formatPfa(r.pfa)],
    ['Polarisation', r.polarisation],
    ['Instrumented range', withMetric((s) => formatRange(r.instrumentedRangeM, s), input.system)],
  ]
}
function antennaRows(input: MemoInput): Pair[] {
  const { radar, run } = input.study
  const a = radar.antenna
  const s = radar.suppression
  const suppression =
    s.kind === 'none'
      ? 'none'
      : s.kind === 'stated'
        ? value(formatSetting(s.statedDb, 'dB'))
        : `${s.kind === 'canceller' ? 'canceller' : `filter bank (${s.window ?? 'hamming'})`}, ${s.pulses} pulses`
  const rows: Pair[] = [
    ['Gain', value(formatSetting(a.gainDbi, 'dBi'))],
    ['Azimuth beamwidth', value(formatSetting(a.azimuthBeamwidthDeg, '°', 2))],
    ['Elevation beamwidth', a.elevationPattern === 'table' ? 'by table' : value(formatSetting(a.elevationBeamwidthDeg, '°', 2))],
    ['Elevation pattern', a.elevationPattern],
    ['Tilt of the peak', value(formatAngle(a.tiltDeg, 0.1))],
    ['Azimuth side lobes', value(formatSetting(a.sidelobeDb, 'dB'))],
    ['Elevation floor, clutter only', value(formatSetting(a.elevationSidelobeDb, 'dB'))],
    [s.kind === 'stated' ? 'Suppression, as stated' : 'Suppression', suppression],
    ['Aperture', apertureWords(a)],
    ['Short-range sensitivity (STC)', radar.stc.kind === 'rtoFourth' ? 'fourth power of range' : radar.stc.kind],
    ['Polar grid, range step', value(formatSetting(run.rangeStepM, 'm', 2))],
    ['Polar grid, azimuth step', value(formatSetting(run.azimuthStepDeg, '°', 4))],
    ['Polar grid, farthest', withMetric((u) => formatRange(run.maxRangeM, u), input.system)],
  ]
  return rows
}

const apertureWords = (a: MemoInput['study']['radar']['antenna']): Cell =>
  a.apertureWidthM === null || a.apertureHeightM === null
    ? { text: 'not stated', light: true }
    : `${formatNumber(a.apertureWidthM, 2)} × ${formatNumber(a.apertureHeightM, 2)}\u202fm`

/** Defaults in two columns, read down the left one first. */
function inTwo(defaults: readonly DefaultUsed[]): Cell[][] {
  const half = Math.ceil(defaults.length / 2)
  const pair = (d: DefaultUsed | undefined): Cell[] => (d ? [d.path, defaultCell(d)] : ['', ''])
  return defaults.slice(0, half).map((d, i) => [...pair(d), ...pair(defaults[half + i])])
}
function defaultCell(d: DefaultUsed): Cell {
  const { value: v } = d
  if (typeof v === 'number') return { text: settingText(v), unit: d.unit }
  return v === null ? 'none' : typeof v === 'boolean' ? (v ? 'yes' : 'no') : v
}
/** Four significant figures, plain where it can be. */
function settingText(v: number): string {
  if (v !== 0 && (Math.abs(v) < 1e-3 || Math.abs(v) >= 1e7)) {
    const [m, e] = v.toExponential(3).split('e')
    const digits = [...e.replace('+', '')].map((c) => (c === '-' ? '⁻' : '⁰¹²³⁴⁵⁶⁷⁸⁹'[Number(c)])).join('')
    const mantissa = String(Number(m))
    return mantissa === '1' ? `10${digits}` : `${mantissa}·10${digits}`
  }
  const rounded = Number(v.toPrecision(5))
  const decimals = Math.min(5, (String(rounded).split('.')[1] ?? '').length)
  return formatNumber(rounded, decimals)
}
