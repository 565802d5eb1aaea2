import { type OptionResult, ROAD_CLASSES, type RoadClass, type RoadsFigure } from '../../../core/index.ts'
import {
  cautionsFor,
  formatDbUp,
  formatK,
  formatLossPct,
  formatNumber,
  formatRoad,
  formatSetting,
  NO_VALUE,
  ROAD_CLASS_WORDS,
  textOf,
  toFace,
  unitOf,
  withMetric,
} from '../../words/index.ts'
import { bare, bothUnits, dualBare } from './cells.ts'
import type { Block, Cell, Column, MemoInput, TableBlock } from './types.ts'

/** Roads whose vehicles an option sees: by class and ring, and by radial speed. Nothing where the study has no roads. */
export function roadBlocks(input: MemoInput, r: OptionResult): Block[] {
  const { roads } = r.figures
  if (!roads) return []
  if (roads.lengthM === 0) return [{ kind: 'paragraph', text: 'No road or railway lies within range.' }]
  return [
    ringTable(input, roads),
    { kind: 'paragraph', role: 'small', text: roadWords(input, roads) },
    { kind: 'caution', texts: cautionsFor('roads') },
  ]
}
/** Seen by radial speed; null where nothing is seen. */
export function roadSpeeds(input: MemoInput, { figures: { roads } }: OptionResult): TableBlock | null {
  return roads && roads.seenM > 0 ? speedTable(input, roads) : null
}

function ringTable({ system }: MemoInput, roads: RoadsFigure): TableBlock {
  const length = { unit: bothUnits('range', system), align: 'right' } as const
  const columns: Column[] = [
    { head: 'Ring', keep: true },
    { head: 'Within range', ...length },
    { head: 'In sight', ...length },
    { head: 'Seen', ...length },
    { head: 'Seen, by class', unit: unitOf('range', system), width: 'fill' },
  ]
  const cell = (m: number, explain?: string): Cell => (m === 0 ? '0' : dualBare((s) => formatRoad(m, s), system, explain))
  const edge = (m: number): string => formatNumber(toFace('range', m, system), 1).replace(/\.0$/, '')
  const byClass = (seenM: (c: RoadClass) => number): string =>
    roads.classes
      .filter((c) => seenM(c.roadClass) > 0)
      .map((c) => `${ROAD_CLASS_WORDS[c.roadClass].toLowerCase()} ${formatRoad(seenM(c.roadClass), system).value}`)
      .join(', ') || NO_VALUE
  const rows = roads.rings
    .filter((ring) => ring.lengthM > 0)
    .map((ring): Cell[] => [
      `${edge(ring.fromM)} to ${edge(ring.toM)}\u202f${unitOf('range', system)}`,
      cell(ring.lengthM),
      cell(ring.inSightM),
      cell(ring.seenM),
      byClass((c) => ring.seenByClassM[ROAD_CLASSES.indexOf(c)]),
    ])
  rows.push([
    'All',
    cell(roads.lengthM, 'roads_km'),
    cell(roads.inSightM, 'roads_in_sight_km'),
    cell(roads.seenM, 'roads_seen_km'),
    byClass((c) => roads.classes.find((x) => x.roadClass === c)?.seenM ?? 0),
  ])
  return { kind: 'table', id: 'roads', title: 'Roads seen, by ring and class', dense: true, columns, rows }
}

function roadWords({ system, study }: MemoInput, roads: RoadsFigure): string {
  const km = (m: number): string => withMetric((s) => formatRoad(m, s), system)
  const words = [
    `Vehicles of ${textOf(formatSetting(roads.rcsM2, 'm²'))}, seen where the top is in sight and one pulse reaches ${textOf(formatDbUp(roads.requiredRatioDb, 'dB', 0.1))} over noise (Pd 0.5).`,
  ]
  if (roads.atHighK)
    words.push(
      `At k = ${formatK(study.atmosphere.effectiveEarthFactor)} ${km(roads.seenM)} are seen, at k = ${formatK(roads.atHighK.k)} ${km(roads.atHighK.seenM)}.`,
    )
  if (roads.tunnelM > 0) words.push(`In tunnels, not seen: ${km(roads.tunnelM)}.`)
  if (roads.unknownM > 0) words.push(`On unknown ground: ${km(roads.unknownM)}.`)
  words.push(
    roads.blindM === null
      ? 'Suppression is stated or none: which radial speeds it passes is not known.'
      : roads.seenM > 0
        ? `In the blind zone of the processing, more than 10\u202fdB under its mean: ${km(roads.blindM)}, ${textOf(formatLossPct((100 * roads.blindM) / roads.seenM))} of what is seen.`
        : '',
  )
  return words.filter((w) => w !== '').join(' ')
}

function speedTable({ system }: MemoInput, roads: RoadsFigure): TableBlock {
  const edges = (from: number, to: number): string => `${from} to ${to}`
  return {
    kind: 'table',
    id: 'road-speeds',
    title: 'Roads seen, by radial speed',
    dense: true,
    columns: [
      { head: 'Radial speed', unit: 'm/s', width: 'fill' },
      { head: '', unit: 'km/h', align: 'right' },
      { head: 'Seen', unit: bothUnits('range', system), align: 'right' },
    ],
    rows: roads.speeds.map((s): Cell[] => [
      edges(s.fromMs, s.toMs),
      { text: edges(s.fromMs * 3.6, s.toMs * 3.6), light: true },
      s.seenM === 0 ? '0' : dualBare((u) => formatRoad(s.seenM, u), system),
    ]),
  }
}
/** One line for the option's table of figures. */
export const roadsSeenCell = (roads: RoadsFigure, { system }: MemoInput): Cell =>
  bare({ value: withMetric((s) => formatRoad(roads.seenM, s), system), unit: '' }, { explain: 'roads_seen_km' })
