import type { MeasuredHorizonFigure, OptionResult } from '../../../core/index.ts'
import {
  cautionsFor,
  formatAngle,
  formatAzimuth,
  formatMast,
  formatPlaceRange,
  formatScreening,
  SURVEY_WORDS,
  textOf,
  unitOf,
} from '../../words/index.ts'
import { bare } from './cells.ts'
import type { Block, Cell, MemoInput } from './types.ts'

/** Rows a table shows; the rest differ less. */
const MOST_ROWS = 24

/** A surveyed horizon beside the computed one, largest differences first where there are many rows; nothing where there is no survey. */
export function measuredBlocks(input: MemoInput, r: OptionResult): Block[] {
  const m = r.figures.measuredHorizon
  if (!m) return []
  const { system } = input
  const apart = (d: number | null): number => Math.abs(d ?? 0)
  const shown = [...m.rows]
    .sort((a, b) => apart(b.differenceDeg) - apart(a.differenceDeg))
    .slice(0, MOST_ROWS)
    .sort((a, b) => a.azimuthDeg - b.azimuthDeg)
  const angle = { unit: '°', align: 'right' } as const
  return [
    {
      kind: 'table',
      id: 'measured-horizon',
      title: `Surveyed horizon (${m.file}) against the computed one`,
      columns: [
        { head: 'Azimuth', ...angle },
        { head: 'Range', unit: unitOf('range', system), align: 'right' },
        { head: 'Surveyed,\nat the instrument', ...angle },
        { head: 'Instrument', unit: 'm', align: 'right' },
        { head: 'From the mast', ...angle },
        { head: 'Computed', ...angle },
        { head: 'Difference', ...angle },
        { head: 'Computed, set by' },
        { head: 'Method', width: 'fill' },
      ],
      rows: shown.map((row): Cell[] => [
        bare(formatAzimuth(row.azimuthDeg)),
        bare(formatPlaceRange(row.rangeM, system)),
        bare(formatAngle(row.measuredDeg)),
        bare(formatMast(row.instrumentHeightM)),
        bare(formatScreening(row.correctedDeg)),
        bare(formatScreening(row.computedDeg)),
        bare(formatAngle(row.differenceDeg)),
        row.computedObstacle,
        row.method,
      ]),
    },
    { kind: 'paragraph', role: 'small', text: measuredWords(m, m.rows.length - shown.length) },
    { kind: 'caution', texts: cautionsFor('survey') },
  ]
}

function measuredWords(m: MeasuredHorizonFigure, left: number): string {
  const deg = (d: number | null): string => textOf(formatAngle(d))
  const words = [
    m.used ? SURVEY_WORDS.used : SURVEY_WORDS.notUsed,
    m.meanDeg === null ? '' : `Surveyed less computed, from this mast: mean ${deg(m.meanDeg)}, root mean square ${deg(m.rmsDeg)}.`,
    m.worst === null ? '' : `Most at azimuth ${textOf(formatAzimuth(m.worst.azimuthDeg))}: ${deg(m.worst.differenceDeg)}.`,
    left > 0 ? `${left} further azimuths, which differ less, are not listed.` : '',
  ]
  return words.filter((w) => w !== '').join(' ')
}
