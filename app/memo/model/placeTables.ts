import type { FixFigure, NeedFigure, OptionResult } from '../../../core/index.ts'
import {
  formatAzimuth,
  formatDbDown,
  formatDuration,
  formatFloor,
  formatHeight,
  formatMargin,
  formatPd,
  formatPlaceRange,
  formatRange,
  formatRangeUp,
  NO_VALUE,
  textOf,
  unitOf,
  withMetric,
} from '../../words/index.ts'
import { bare } from './cells.ts'
import { outcomeWords, segmentWords } from './needWords.ts'
import type { Block, Cell, MemoInput, TableBlock } from './types.ts'

/** Fixes a table shows; what is left is counted under it. */
const MOST_FIXES = 40
/** Stretches of a track a table shows. */
const MOST_SEGMENTS = 30

/** Tables of the needs that are made of places: fixes worst first, tracks by stretch. */
export function placeBlocks(input: MemoInput, r: OptionResult): Block[] {
  return r.figures.needs.flatMap((n) => (n.fixes ? fixBlocks(input, n, n.fixes) : n.track ? trackBlocks(input, n) : []))
}

function fixBlocks(input: MemoInput, n: NeedFigure, fixes: readonly FixFigure[]): Block[] {
  const { system } = input
  const height = { unit: `${unitOf('height', system)} MSL`, align: 'right' } as const
  const table: TableBlock = {
    kind: 'table',
    id: 'fixes',
    title: `${n.name}: fixes, worst first`,
    columns: [
      { head: 'Fix', width: 'fill' },
      { head: 'At', align: 'right', keep: true },
      { head: 'Height', ...height },
      { head: 'Floor', ...height },
      { head: 'Margin', unit: unitOf('height', system), align: 'right' },
      { head: 'Signal', unit: 'dB', align: 'right' },
      { head: 'Pd', align: 'right' },
      { head: 'Outcome', width: 92 },
      { head: 'Behind' },
    ],
    rows: fixes
      .slice(0, MOST_FIXES)
      .map((f): Cell[] => [
        f.name,
        `${textOf(formatAzimuth(f.azimuthDeg, 1))}, ${textOf(formatPlaceRange(f.rangeM, system))}`,
        bare(formatHeight(f.altM, system)),
        bare(formatFloor(f.floorM, system)),
        bare(formatMargin(f.marginM, system)),
        bare(formatDbDown(f.signalMarginDb)),
        bare(formatPd(f.pd)),
        outcomeWords(f),
        f.obstacle === '' ? NO_VALUE : f.obstacle,
      ]),
  }
  const left = fixes.length - MOST_FIXES
  return left > 0
    ? [table, { kind: 'paragraph', role: 'small', text: `${left} further fixes, all better than these, are not listed.` }]
    : [table]
}

function trackBlocks(input: MemoInput, n: NeedFigure): Block[] {
  const { track } = n
  if (!track) return []
  const { system } = input
  const range = { unit: unitOf('range', system), align: 'right' } as const
  const along = (m: number): Cell => bare(formatPlaceRange(m, system))
  const heights = (from: number | null, to: number | null): Cell => {
    const [a, b] = [formatHeight(from, system).value, formatHeight(to, system).value]
    return a === b ? a : `${a} to ${b}`
  }
  const table: TableBlock = {
    kind: 'table',
    id: 'track',
    title: `${n.name}: the track by stretch`,
    columns: [
      { head: 'From', ...range },
      { head: 'To', ...range },
      { head: 'Range from the radar', ...range },
      { head: 'Height', unit: `${unitOf('height', system)} MSL`, align: 'right' },
      { head: 'Outcome', width: 'fill' },
    ],
    rows: track.segments
      .slice(0, MOST_SEGMENTS)
      .map((s): Cell[] => [
        along(s.fromM),
        along(s.toM),
        `${formatPlaceRange(s.fromRangeM, system).value} to ${formatPlaceRange(s.toRangeM, system).value}`,
        heights(s.fromAltM, s.toAltM),
        segmentWords(s),
      ]),
  }
  const up = (m: number): string => withMetric((s) => formatRangeUp(m, s), system)
  const gap =
    track.longestGapM > 0
      ? `longest gap ${up(track.longestGapM)}${track.longestGapS === null ? '' : `, ${formatDuration(track.longestGapS)}`}`
      : 'no gap'
  const words = [`Length ${withMetric((s) => formatRange(track.lengthM, s), system)}; ${gap}.`]
  if (track.tangentialM > 0) words.push(`Flown across the beam: ${up(track.tangentialM)}.`)
  if (track.blindM > 0) words.push(`At other blind speeds: ${up(track.blindM)}.`)
  for (const [name, p] of [
    ['Comes into sight', track.seenFrom],
    ['Last in sight', track.lostAt],
  ] as const)
    if (p)
      words.push(
        `${name} at ${textOf(formatPlaceRange(p.rangeM, system))} from the radar, ${withMetric((s) => formatHeight(p.altM, s), system)} MSL.`,
      )
  const left = track.segments.length - MOST_SEGMENTS
  if (left > 0) words.push(`${left} further stretches are not listed.`)
  return [table, { kind: 'paragraph', role: 'small', text: words.join(' ') }]
}
