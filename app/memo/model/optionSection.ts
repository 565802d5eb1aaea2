import type { NeedFigure, OptionResult } from '../../../core/index.ts'
import { horizonChart, isAtLeast, ringChart, ringFinding, whyAtLeast } from '../../charts/index.ts'
import {
  CAUTIONS,
  cautionsFor,
  formatAreaDown,
  formatAreaUp,
  formatAzimuth,
  formatBand,
  formatDbDown,
  formatDbUp,
  formatFloor,
  formatHeight,
  formatLossPct,
  formatMargin,
  formatMetPct,
  formatPlaceRange,
  formatScreening,
  NO_VALUE,
  textOf,
  toFace,
  unitOf,
  withMetric,
} from '../../words/index.ts'
import { bare, bothUnits, capital, dual, dualBare, NO_HEADS, optionName, value } from './cells.ts'
import { mapDrawing } from './mapFigure.ts'
import { reaches } from './ranking.ts'
import { hasTilts } from './summarySection.ts'
import { type Block, type Cell, type Column, type MemoInput, SMALL_PT, type TableBlock, TEXT_WIDTH_PT } from './types.ts'

const MAP_PT = 256

/** One option: map and figures, horizon, needs, floors and rings, with their cautions. `figure` numbers figures through the memo. */
export function optionBlocks(input: MemoInput, r: OptionResult, figure: () => number): Block[] {
  const { lead, rest } = optionFinding(input, r)
  const blocks: Block[] = [
    { kind: 'paragraph', role: 'lead', text: lead },
    { kind: 'paragraph', text: rest },
  ]
  const map = input.maps.find((m) => sameRef(m.ref, r.ref))
  const figures = figureTable(input, r)
  if (map) {
    const drawing = mapDrawing({
      map,
      candidates: input.study.candidates,
      maxRangeM: input.study.run.maxRangeM,
      system: input.system,
      widthPt: MAP_PT,
    })
    const caption = mapCaption(input, r)
    blocks.push({
      kind: 'beside',
      leftPt: MAP_PT,
      left: [{ kind: 'figure', id: 'map', number: figure(), caption, drawing, png: map.png }],
      right: [figures],
    })
  } else blocks.push(figures)
  blocks.push({ kind: 'caution', texts: clutterCautions(input) })
  blocks.push(horizonFigure(input, r, figure()))
  blocks.push({ kind: 'caution', texts: cautionsFor('horizon') })
  if (r.figures.needs.length > 0) {
    blocks.push(sightTable(input, r), { kind: 'caution', texts: cautionsFor('need') })
    blocks.push(suppressionTable(input, r), { kind: 'caution', texts: suppressionCautions(input) })
  }
  const rings = ringChart({ rings: r.figures.rings, width: 182, height: 172, system: input.system, size: SMALL_PT - 1 })
  blocks.push({
    kind: 'beside',
    leftPt: 282,
    left: [floorTable(input, r), { kind: 'caution', texts: cautionsFor('floor') }],
    right: [{ kind: 'figure', id: 'rings', number: figure(), caption: `${ringFinding(r.figures.rings, input.system)}.`, drawing: rings }],
  })
  return blocks
}
const sameRef = (a: OptionResult['ref'], b: OptionResult['ref']): boolean =>
  a.candidate === b.candidate && a.heightM === b.heightM && a.tiltDeg === b.tiltDeg
/** The built-in table's caution, while it is in use. */
const landCaution = (input: MemoInput): string[] => (input.study.lowAngleLandTable === null ? [CAUTIONS.landTable] : [])
const clutterCautions = (input: MemoInput): string[] => [...landCaution(input), CAUTIONS.clutterMean]
const suppressionCautions = (input: MemoInput): string[] => {
  const workedOut = input.study.needs.some((n) => n.requiredRatioBy !== 'stated')
  return [...(workedOut ? [CAUTIONS.requiredRatio] : []), ...landCaution(input)]
}

/** The finding at the head of an option, and of the app's memo column; `rest` follows it in lighter setting. */
export function optionFinding(input: MemoInput, r: OptionResult): { lead: string; rest: string } {
  const { system } = input
  const place = input.study.candidates.find((c) => c.id === r.ref.candidate)?.name ?? r.ref.candidate
  const mast = optionName(r.ref, hasTilts(input)).replace(/^\S+ at /, '')
  const over = `${withMetric((s) => formatAreaUp(r.figures.clutterOverKm2.over40, s), system)} of ground stand over 40\u202fdB.`
  const [first, ...others] = r.figures.needs.filter((n) => n.notAssessed === null)
  if (!first) {
    const seen = withMetric((s) => formatAreaDown(r.figures.groundInSightKm2, s), system)
    return { lead: `From ${place} a mast of ${mast} brings ${seen} of ground into sight.`, rest: capital(over) }
  }
  const asked = (n: NeedFigure): string => (reaches(n) ? ', as asked' : `, against ${textOf(formatMetPct(n.requiredPct))} asked`)
  const lead = `From ${place} a mast of ${mast} brings ${textOf(formatMetPct(first.inSightPct))} of ${first.name} into sight${asked(first)}.`
  const rest = [over]
  const words = (n: NeedFigure): string => `${n.name} ${textOf(formatMetPct(n.inSightPct))}${asked(n)}`
  if (others.length > 0) rest.push(`In sight of the other needs: ${others.slice(0, MOST_OTHERS).map(words).join('; ')}.`)
  if (first.worst && first.worstMarginM !== null && first.worstMarginM < 0) {
    const under = withMetric((s) => formatBand(-(first.worstMarginM as number), s), system)
    const where = `azimuth ${textOf(formatAzimuth(first.worst.azimuthDeg, 1))}, ${textOf(formatPlaceRange(first.worst.rangeM, system))}`
    rest.push(`The worst place of ${first.name} lies ${under} under the floor, at ${where}, behind ${first.worst.obstacle}.`)
  }
  return { lead, rest: rest.join(' ') }
}
/** Further needs named in the sentence; all stand in the tables. */
const MOST_OTHERS = 2
function mapCaption(input: MemoInput, r: OptionResult): string {
  const peak = textOf(formatDbUp(r.figures.cnrPeakDb))
  const over = withMetric((s) => formatAreaUp(r.figures.clutterOverKm2.over60, s), input.system)
  return r.figures.cnrPeakDb === null
    ? 'No ground in sight returns clutter over noise.'
    : `Clutter reaches ${peak} over noise; ${over} stand over 60\u202fdB. Mean C/N of one pulse, over shaded ground.`
}

/** The option's figures as label and number: the table beside the map and the app's memo column. */
export function figureTable(input: MemoInput, r: OptionResult): TableBlock {
  const { system } = input
  const f = r.figures
  const over = f.clutterOverKm2
  const rows: Cell[][] = [
    ['Electrical centre, MSL', dual((s) => formatHeight(f.antennaM, s), system, { explain: 'antenna_m' })],
    ['Ground in sight', dual((s) => formatAreaDown(f.groundInSightKm2, s), system, { explain: 'ground_in_sight_km2' })],
    ['Masked', dual((s) => formatAreaUp(f.maskedKm2, s), system, { explain: 'masked_km2' })],
    ['Unknown', dual((s) => formatAreaUp(f.unknownKm2, s), system, { explain: 'unknown_km2' })],
    ['Horizon, median', value(formatScreening(f.horizon.medianDeg), { explain: 'horizon_median_deg' })],
    ['Horizon, 90\u202f% below', value(formatScreening(f.horizon.p90Deg), { explain: 'horizon_p90_deg' })],
    ['C/N over 0\u202fdB', dual((s) => formatAreaUp(over.over0, s), system, { explain: 'clutter_over_0_km2' })],
    ['C/N over 20\u202fdB', dual((s) => formatAreaUp(over.over20, s), system, { explain: 'clutter_over_20_km2' })],
    ['C/N over 40\u202fdB', dual((s) => formatAreaUp(over.over40, s), system, { explain: 'clutter_over_40_km2' })],
    ['C/N over 60\u202fdB', dual((s) => formatAreaUp(over.over60, s), system, { explain: 'clutter_over_60_km2' })],
    ['C/N, highest', value(formatDbUp(f.cnrPeakDb), { explain: 'clutter_to_noise_peak_db' })],
  ]
  if (f.obstaclesInSight.length > 0) rows.push(['Obstacles in sight', obstacleWords(f.obstaclesInSight)])
  for (const m of f.marks) rows.push([capital(m.about.replace(`, ${m.mark}`, '')), { text: '', mark: m.mark }])
  return { kind: 'table', id: 'figures', columns: NO_HEADS, rows }
}
const obstacleWords = (names: readonly string[]): string => (names.length === 1 ? names[0] : `${names[0]} and ${names.length - 1} more`)

function horizonFigure(input: MemoInput, r: OptionResult, number: number): Block {
  const { rows, highest, medianDeg } = r.figures.horizon
  const { drawing } = horizonChart({
    rows,
    width: TEXT_WIDTH_PT,
    height: 132,
    system: input.system,
    size: SMALL_PT - 1,
    style: 'chart',
    labels: 7,
  })
  const finding =
    highest === null
      ? 'No azimuth has a known horizon.'
      : `The horizon stands highest at azimuth ${textOf(formatAzimuth(highest.azimuthDeg, 1))}: ${textOf(formatScreening(highest.elevationDeg))}, ${isAtLeast(highest) ? `at least (${whyAtLeast(highest)})` : `set by ${highest.obstacle}`} at ${withMetric((s) => formatPlaceRange(highest.rangeM, s), input.system)}; half of all azimuths lie at or under ${textOf(formatScreening(medianDeg))}.`
  return { kind: 'figure', id: 'horizon', number, caption: finding, drawing }
}

function floorTable(input: MemoInput, r: OptionResult): TableBlock {
  const { system } = input
  const rows = r.figures.floors.map((f): Cell[] => {
    const nm = Math.round(f.rangeM / 1852)
    const floor = (m: number | null, which: string): Cell =>
      m === null ? NO_VALUE : dualBare((s) => formatFloor(m, s), system, `floor_${nm}nm_${which}_m`)
    return [
      { text: String(Math.round(toFace('range', f.rangeM, system) * 10) / 10), unit: unitOf('range', system) },
      floor(f.bestM, 'best'),
      floor(f.medianM, 'median'),
      floor(f.worstM, 'worst'),
      f.worstBandM === null ? NO_VALUE : { ...dualBare((s) => formatBand(f.worstBandM, s), system), light: true },
      f.worstAzimuthDeg === null ? { text: 'unknown', light: true } : { text: textOf(formatAzimuth(f.worstAzimuthDeg, 1)) },
    ]
  })
  return {
    kind: 'table',
    id: 'floors',
    title: `Coverage floor, ${bothUnits('height', system)} MSL`,
    columns: [
      { head: 'Range', align: 'right', width: 'fill' },
      { head: 'Best', align: 'right' },
      { head: 'Median', align: 'right' },
      { head: 'Worst', align: 'right' },
      { head: 'Band ±', align: 'right' },
      { head: 'At', align: 'right' },
    ],
    rows,
  }
}

type NeedRow = (n: NeedFigure, key: (what: string) => { explain: string }) => Cell[]
function needRows(r: OptionResult, columns: number, row: NeedRow): Cell[][] {
  return r.figures.needs.map((n) => {
    if (n.notAssessed === null) return [n.name, ...row(n, (what) => ({ explain: `need_${n.needId}_${what}` }))]
    return [n.name, { text: 'not assessed', light: true, span: columns - 1 }]
  })
}
/** Needs of one option by line of sight: shares, unknown ground, margins. */
export function sightTable(input: MemoInput, r: OptionResult): TableBlock {
  const { system } = input
  const area = { unit: unitOf('area', system), align: 'right' } as const
  const columns: Column[] = [
    { head: 'Need', width: 'fill' },
    { head: 'Asked', unit: '%', align: 'right' },
    { head: 'In sight', unit: '%', align: 'right' },
    { head: 'In sight', ...area },
    { head: 'Marginal', ...area },
    { head: 'Unknown', ...area },
    { head: 'Unknown', unit: '%', align: 'right' },
    { head: 'Worst margin', unit: unitOf('height', system), align: 'right' },
    { head: '10\u202f% level', unit: unitOf('height', system), align: 'right' },
  ]
  const rows = needRows(r, columns.length, (n, key) => [
    bare(formatMetPct(n.requiredPct)),
    bare(formatMetPct(n.inSightPct), key('in_sight_pct')),
    bare(formatAreaDown(n.inSightKm2, system), key('in_sight_km2')),
    bare(formatAreaUp(n.marginalKm2, system), key('marginal_km2')),
    bare(formatAreaUp(n.unknownKm2, system), key('unknown_km2')),
    bare(formatLossPct(n.areaKm2 > 0 ? (100 * n.unknownKm2) / n.areaKm2 : null)),
    bare(formatMargin(n.worstMarginM, system), key('worst_margin_m')),
    bare(formatMargin(n.tenthMarginM, system), key('tenth_margin_m')),
  ])
  return { kind: 'table', id: 'option-sight', title: 'Needs, line of sight', columns, rows }
}
/** Suppression each need asks for: shares of its places in sight, with what is masked and too weak beside them. */
export function suppressionTable(input: MemoInput, r: OptionResult): TableBlock {
  const { system } = input
  const db = { unit: 'dB', align: 'right' } as const
  const pct = { unit: '%', align: 'right' } as const
  const columns: Column[] = [
    { head: 'Need', width: 'fill' },
    { head: 'Needed at 50\u202f%', ...db },
    { head: '90\u202f%', ...db },
    { head: '99\u202f%', ...db },
    { head: 'Available', ...db },
    { head: 'Short', unit: unitOf('area', system), align: 'right' },
    { head: 'Masked', ...pct },
    { head: 'Too weak', ...pct },
  ]
  const rows = needRows(r, columns.length, ({ suppression: s }, key) => [
    bare(formatDbUp(s.p50Db), key('suppression_needed_50_db')),
    bare(formatDbUp(s.p90Db), key('suppression_needed_90_db')),
    bare(formatDbUp(s.p99Db), key('suppression_needed_99_db')),
    bare(formatDbDown(s.availableDb), key('suppression_available_db')),
    bare(formatAreaUp(s.shortKm2, system), key('suppression_short_km2')),
    bare(formatLossPct(s.maskedPct)),
    bare(formatLossPct(s.tooWeakPct), key('too_weak_pct')),
  ])
  return { kind: 'table', id: 'option-suppression', title: 'Needs, suppression', columns, rows }
}
