import type { NeedFigure, OptionResult } from '../../../core/index.ts'
import { horizonChart, isAtLeast, measuredPoints, ringChart, ringFinding, suppressionRows, whyAtLeast } from '../../charts/index.ts'
import {
  CAUTIONS,
  cautionsFor,
  formatAreaDown,
  formatAreaUp,
  formatAzimuth,
  formatBand,
  formatDbUp,
  formatFloor,
  formatHeight,
  formatLossPct,
  formatMetPct,
  formatPlaceRange,
  formatScreening,
  LOSS_WORDS,
  NO_VALUE,
  textOf,
  toFace,
  unitOf,
  withMetric,
} from '../../words/index.ts'
import { bothUnits, capital, dual, dualBare, NO_HEADS, optionName, value } from './cells.ts'
import { levelsFigure, suppressionFigure, verticalBlocks } from './chartFigures.ts'
import { clutterAtKTable } from './clutterAtK.ts'
import { exponentialWords } from './exponentialWords.ts'
import { exposureCell } from './exposureSection.ts'
import { mapDrawing } from './mapFigure.ts'
import { measuredBlocks } from './measuredSection.ts'
import { availableWords, lossTable, marginTable, nestedTable, suppressionTable } from './needTables.ts'
import { isUnderGround, needName, nestedWords, UNDER_GROUND } from './needWords.ts'
import { placeBlocks } from './placeTables.ts'
import { roadBlocks, roadSpeeds, roadsSeenCell } from './roadsSection.ts'
import { hasTilts } from './summarySection.ts'
import { type Block, type Cell, type MemoInput, SMALL_PT, type TableBlock, TEXT_WIDTH_PT } from './types.ts'

const MAP_PT = 244
/** Left of two blocks side by side. */
const LEFT_PT = 282

/** One option: map and figures, horizon, needs, floors and rings, with their cautions. `figure` numbers figures through the memo. */
export function optionBlocks(input: MemoInput, r: OptionResult, figure: () => number): Block[] {
  const { lead, rest } = optionFinding(input, r)
  const blocks: Block[] = [
    { kind: 'paragraph', role: 'lead', text: lead },
    { kind: 'paragraph', text: rest },
  ]
  if (r.figures.needs.length > 0) blocks.push(nestedTable(input, r), { kind: 'caution', texts: cautionsFor('need') })
  blocks.push(...mapBlocks(input, r, figure, figureTable(input, r)), { kind: 'caution', texts: clutterCautions(input) })
  const assessed = r.figures.needs.length > 0
  if (assessed) blocks.push(marginTable(input, r))
  const air = exponentialWords(input, r)
  if (air) blocks.push({ kind: 'paragraph', role: 'small', text: air })
  blocks.push(horizonFigure(input, r, figure(), HORIZON_PT))
  blocks.push({ kind: 'caution', texts: cautionsFor('horizon') }, ...measuredBlocks(input, r))
  if (assessed) blocks.push(lossTable(input, r), ...placeBlocks(input, r), ...verticalBlocks(input, r, figure))
  const rings = (): Block => ringFigure(input, r, figure())
  const speeds = roadSpeeds(input, r)
  const atBothK = clutterAtKTable(input, r)
  blocks.push({
    kind: 'beside',
    leftPt: LEFT_PT,
    left: [floorTable(input, r), { kind: 'caution', texts: cautionsFor('floor') }],
    right: [atBothK && speeds ? speeds : rings()],
  })
  if (assessed) {
    blocks.push(suppressionTable(input, r), { kind: 'paragraph', role: 'small', text: availableWords(r) })
    if (suppressionRows(r.figures).needs > 0) blocks.push(suppressionFigure(input, r, figure()))
    blocks.push({ kind: 'caution', texts: suppressionCautions(input) })
  }
  if (atBothK && speeds) blocks.push({ kind: 'beside', leftPt: LEFT_PT, left: [atBothK], right: [rings()] })
  else blocks.push(...[atBothK, speeds].filter((t) => t !== null))
  blocks.push(...roadBlocks(input, r), levelsFigure(input, r, figure()), { kind: 'caution', texts: clutterCautions(input) })
  return blocks
}
const HORIZON_PT = 118
const RINGS_PT = { width: 182, height: 122 }
function ringFigure(input: MemoInput, r: OptionResult, number: number): Block {
  const { rings } = r.figures
  const { system } = input
  return {
    kind: 'figure',
    id: 'rings',
    number,
    caption: `${ringFinding(rings, system)}.`,
    get drawing() {
      return ringChart({ rings, ...RINGS_PT, system, size: SMALL_PT - 1 })
    },
  }
}
/** The painted map beside a table; the table alone where there is no map. */
export function mapBlocks(input: MemoInput, r: OptionResult, figure: () => number, table: TableBlock): Block[] {
  const map = input.maps.find((m) => sameRef(m.ref, r.ref))
  if (!map) {
    // the number stays its own, so that figures have the same one without pictures
    figure()
    return [table]
  }
  const { study, system } = input
  const drawing = mapDrawing({ map, candidates: study.candidates, maxRangeM: study.run.maxRangeM, system, widthPt: MAP_PT })
  const own: Block = { kind: 'figure', id: 'map', number: figure(), caption: mapCaption(input, r), drawing, png: map.png }
  return [{ kind: 'beside', leftPt: MAP_PT, left: [own], right: [table] }]
}
const sameRef = (a: OptionResult['ref'], b: OptionResult['ref']): boolean =>
  a.candidate === b.candidate && a.heightM === b.heightM && a.tiltDeg === b.tiltDeg
/** The built-in table's caution, while it is in use. */
const landCaution = (input: MemoInput): string[] => (input.study.lowAngleLandTable === null ? [CAUTIONS.landTable] : [])
const clutterCautions = (input: MemoInput): string[] => [...landCaution(input), CAUTIONS.clutterMean]
const suppressionCautions = (input: MemoInput): string[] => {
  const workedOut = input.study.needs.some((n) => n.requiredRatioBy !== 'stated')
  const { kind } = input.study.radar.suppression
  return [
    ...(workedOut ? [CAUTIONS.requiredRatio] : []),
    ...(kind === 'stated' ? [CAUTIONS.statedSuppression] : kind === 'none' ? [] : [CAUTIONS.blindSpeeds]),
    ...landCaution(input),
  ]
}

/** The finding at the head of an option, and of the app's memo column; `rest` follows it in lighter setting. */
export function optionFinding(input: MemoInput, r: OptionResult): { lead: string; rest: string } {
  const { system } = input
  const place = input.study.candidates.find((c) => c.id === r.ref.candidate)?.name ?? r.ref.candidate
  const mast = optionName(r.ref, hasTilts(input)).replace(/^\S+ at /, '')
  const over = `${withMetric((s) => formatAreaUp(r.figures.clutterOverKm2.over40, s), system)} stand over 40\u202fdB of clutter-to-noise.`
  const [first, ...others] = r.figures.needs.filter((n) => n.notAssessed === null)
  if (!first) {
    const seen = withMetric((s) => formatAreaDown(r.figures.groundInSightKm2, s), system)
    return { lead: `From ${place} a mast of ${mast} brings ${seen} of ground into sight.`, rest: capital(over) }
  }
  const asked = (n: NeedFigure): string => {
    const share = `${textOf(formatMetPct(n.requiredPct))} asked`
    if (n.passes) return `as asked (${share}) at both k`
    if (!n.met) return `against ${share}`
    return n.passes === null ? `${share}, k = 1 not run` : `${share}, but short of it at k = 1`
  }
  const lead = isUnderGround(first)
    ? `Of ${needName(first)} nothing can be seen from ${place}: ${UNDER_GROUND}.`
    : `From ${place} a mast of ${mast} has ${nestedWords(first)} of ${needName(first)}, ${asked(first)}.`
  const rest = [over]
  if (others.length > 0)
    rest.push(
      `${others
        .slice(0, MOST_OTHERS)
        .map((n) => (isUnderGround(n) ? `${needName(n)}: ${UNDER_GROUND}` : `${needName(n)}: ${nestedWords(n)}, ${asked(n)}`))
        .join('. ')}.`,
    )
  if (first.losses.length > 0 && !isUnderGround(first))
    rest.push(`Largest cause of loss: ${LOSS_WORDS[first.losses[0].cause]}, ${textOf(formatLossPct(first.losses[0].pct))}.`)
  if (first.worst && first.worstMarginM !== null && first.worstMarginM < 0) {
    const under = withMetric((s) => formatBand(-(first.worstMarginM as number), s), system)
    const where = `azimuth ${textOf(formatAzimuth(first.worst.azimuthDeg, 1))}, ${textOf(formatPlaceRange(first.worst.rangeM, system))}`
    rest.push(`The worst place of ${needName(first)} lies ${under} under the floor, at ${where}, behind ${first.worst.obstacle}.`)
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
  if (f.roads) rows.push(['Roads seen', roadsSeenCell(f.roads, input)])
  if (f.obstaclesInSight.length > 0) rows.push(['Obstacles in sight', obstacleWords(f.obstaclesInSight)])
  rows.push(['Keep clear, antenna stopped', exposureCell(input, r.ref)])
  for (const m of f.marks) rows.push([{ text: capital(m.about.replace(`, ${m.mark}`, '')), mark: m.mark, span: 2 }])
  return { kind: 'table', id: 'figures', dense: true, columns: NO_HEADS, rows }
}
const obstacleWords = (names: readonly string[]): string => (names.length === 1 ? names[0] : `${names[0]} and ${names.length - 1} more`)

/** Horizon profile of an option, `height` pt high. */
export function horizonFigure(input: MemoInput, r: OptionResult, number: number, height: number): Block {
  const { rows, highest, medianDeg } = r.figures.horizon
  const { system } = input
  const measured = measuredPoints(r.figures.measuredHorizon)
  const chart = {
    rows,
    width: TEXT_WIDTH_PT,
    height,
    system,
    size: SMALL_PT - 1,
    style: 'chart',
    labels: 7,
    ...(measured ? { measured } : {}),
  } as const
  const finding =
    highest === null
      ? 'No azimuth has a known horizon.'
      : `The horizon stands highest at azimuth ${textOf(formatAzimuth(highest.azimuthDeg, 1))}: ${textOf(formatScreening(highest.elevationDeg))}, ${isAtLeast(highest) ? `at least (${whyAtLeast(highest)})` : `set by ${highest.obstacle}`} at ${withMetric((s) => formatPlaceRange(highest.rangeM, s), input.system)}; half of all azimuths lie at or under ${textOf(formatScreening(medianDeg))}.`
  return {
    kind: 'figure',
    id: 'horizon',
    number,
    caption: finding,
    // drawn when it is printed: the column beside the map has no use for it
    get drawing() {
      return horizonChart(chart).drawing
    },
  }
}

function floorTable(input: MemoInput, r: OptionResult): TableBlock {
  const { system } = input
  const atLowK = r.figures.floorsLowK
  const low = (rangeM: number): Cell => {
    const m = atLowK?.find((f) => f.rangeM === rangeM)?.worstM ?? null
    return m === null ? NO_VALUE : dualBare((s) => formatFloor(m, s), system, `floor_${Math.round(rangeM / 1852)}nm_k1_worst_m`)
  }
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
      low(f.rangeM),
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
      { head: 'Worst, k = 1', align: 'right' },
      { head: 'At', align: 'right' },
    ],
    rows,
  }
}
