import type { HorizonRow, SettledCandidate } from '../../../core/index.ts'
import { isAtLeast } from '../../charts/index.ts'
import { declinationWords, formatMast, formatPlaceRange, formatScreening, NO_VALUE, textOf, unitOf } from '../../words/index.ts'
import { bare } from './cells.ts'
import type { Block, Cell, Column, MemoInput } from './types.ts'

/** Sectors of the horizon table, deg. */
const SECTOR_DEG = 5
const COUNT = 360 / SECTOR_DEG
/** Masts of a candidate beyond which the ranges are left out, and beyond which the table is set in one run. */
const MOST_WITH_RANGE = 3
const MOST_IN_TWO = 7
/** Between runs. */
const GAP_PT = 14

/** Highest point of the horizon in each sector, sectors centred on round azimuths; null where none of it is known. */
function bySector(rows: readonly HorizonRow[]): (HorizonRow | null)[] {
  const highest: (HorizonRow | null)[] = Array.from({ length: COUNT }, () => null)
  for (const row of rows) {
    const i = Math.round(row.azimuthDeg / SECTOR_DEG) % COUNT
    const top = highest[i]
    if (Number.isFinite(row.elevationDeg) && (top === null || row.elevationDeg > top.elevationDeg)) highest[i] = row
  }
  return highest
}
/** What sets a horizon, in a letter beside its range; terrain has none. */
const letterOf = (obstacle: string): string => (obstacle === 'terrain' ? '' : obstacle === 'cover' ? 'c' : 'o')

/** Whole degrees from 000 to 359. */
const azimuthText = (deg: number): string => String(((Math.round(deg) % 360) + 360) % 360).padStart(3, '0')

/** Horizon of one candidate from each of its masts, in runs side by side; null where nothing of it is computed. */
function candidateTable(input: MemoInput, candidate: SettledCandidate): Block | null {
  const heights = [...new Set(input.results.filter((r) => r.ref.candidate === candidate.id).map((r) => r.ref.heightM))].sort(
    (a, b) => a - b,
  )
  if (heights.length === 0) return null
  const masts = heights.flatMap((h) => {
    const result = input.results.find((r) => r.ref.candidate === candidate.id && r.ref.heightM === h)
    return result ? [bySector(result.figures.horizon.rows)] : []
  })
  const magnetic = input.study.declination?.valueDeg ?? null
  const ranges = heights.length <= MOST_WITH_RANGE
  const runs = heights.length > MOST_IN_TWO ? 1 : heights.length === 1 && ranges ? 4 : 2
  const right = { align: 'right', keep: true } as const
  const columns: Column[] = Array.from({ length: runs }, (_, run): Column[] => [
    ...(run > 0 ? [{ head: '', width: GAP_PT }] : []),
    { head: 'Az', unit: magnetic === null ? '°' : '°T', ...right },
    ...(magnetic === null ? [] : [{ head: '', unit: '°M', ...right }]),
    ...heights.flatMap((h): Column[] => {
      const group = textOf(formatMast(h))
      return ranges
        ? [
            { head: '', unit: '°', group, ...right, width: 'fill' },
            { head: '', unit: unitOf('range', input.system), group, ...right, width: 'fill' },
          ]
        : [{ head: group, unit: '°', ...right, width: 'fill' }]
    }),
  ]).flat()
  const cells = (i: number): Cell[] => [
    { text: azimuthText(i * SECTOR_DEG), light: true },
    ...(magnetic === null ? [] : [{ text: azimuthText(i * SECTOR_DEG - magnetic), light: true }]),
    ...masts.flatMap((sectors): Cell[] => {
      const row = sectors[i]
      if (row === null) return ranges ? [NO_VALUE, ''] : [NO_VALUE]
      const bound = isAtLeast(row)
      const elevation = formatScreening(row.elevationDeg).value
      const own: Cell = bound ? `≥ ${elevation}` : elevation
      if (!ranges) return [own]
      const letter = bound ? '' : letterOf(row.obstacle)
      return [own, bare(formatPlaceRange(row.rangeM, input.system), letter === '' ? {} : { unit: letter })]
    }),
  ]
  const lines = Math.ceil(COUNT / runs)
  return {
    kind: 'table',
    id: `horizon-${candidate.id}`,
    title: candidate.name === candidate.id ? candidate.id : `${candidate.id} ${candidate.name}`,
    dense: true,
    columns,
    rows: Array.from({ length: lines }, (_, i) =>
      Array.from({ length: runs }, (_run, run) => [...(run > 0 ? [''] : []), ...cells(i + run * lines)]).flat(),
    ),
  }
}

function northOf({ study: { declination: d } }: MemoInput): string {
  if (d === null) return 'Azimuths are true.'
  return `Azimuths are true (°T) and magnetic (°M), declination ${declinationWords(d.valueDeg)} on ${d.date} (${d.model}).`
}
/** Horizon of every candidate by azimuth, a column for each mast, after the body of the memo. */
export function annexBlocks(input: MemoInput): Block[] {
  const tables = input.study.candidates.flatMap((c) => candidateTable(input, c) ?? [])
  if (tables.length === 0) return [{ kind: 'paragraph', text: 'No option has been computed.' }]
  return [
    {
      kind: 'paragraph',
      role: 'small',
      text: `Elevation of the highest point of the horizon within ±\u202f${SECTOR_DEG / 2}° of each azimuth, and its range; set by terrain, c by cover, o by an obstacle, ≥ where the ground beyond is unknown. ${northOf(input)} Every azimuth: horizon.csv of the batch command.`,
    },
    ...tables,
  ]
}
