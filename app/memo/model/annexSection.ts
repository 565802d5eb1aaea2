import type { HorizonRow, OptionResult } from '../../../core/index.ts'
import { isAtLeast, whyAtLeast } from '../../charts/index.ts'
import { formatAzimuth, formatPlaceRange, formatScreening, NO_VALUE, textOf, unitOf } from '../../words/index.ts'
import type { Block, Cell, Column, MemoInput, TableBlock } from './types.ts'

/** Sectors of the horizon table, deg. */
const SECTOR_DEG = 10
/** The highest point of the horizon in each sector, sectors centred on round azimuths, in three runs of twelve. */
function sectorTable(input: MemoInput, r: OptionResult, title: string): TableBlock {
  const count = 360 / SECTOR_DEG
  const highest: (HorizonRow | null)[] = Array.from({ length: count }, () => null)
  for (const row of r.figures.horizon.rows) {
    const i = Math.round(row.azimuthDeg / SECTOR_DEG) % count
    const top = highest[i]
    if (Number.isFinite(row.elevationDeg) && (top === null || row.elevationDeg > top.elevationDeg)) highest[i] = row
  }
  const cells = (i: number): Cell[] => {
    const row = highest[i]
    const azimuth = textOf(formatAzimuth(i * SECTOR_DEG, 1))
    if (row === null) return [azimuth, NO_VALUE, NO_VALUE, { text: 'unknown', light: true }]
    const bound = isAtLeast(row)
    const far = formatPlaceRange(row.rangeM, input.system)
    const elevation = formatScreening(row.elevationDeg).value
    return [azimuth, bound ? `≥ ${elevation}` : elevation, far.value, bound ? { text: whyAtLeast(row), light: true } : row.obstacle]
  }
  const third = count / 3
  const columns: Column[] = Array.from({ length: 3 }, (): Column[] => [
    { head: 'Azimuth', align: 'right' },
    { head: 'deg', align: 'right' },
    { head: unitOf('range', input.system), align: 'right' },
    { head: 'Set by', width: 'fill' },
  ]).flat()
  return {
    kind: 'table',
    id: 'horizon-sectors',
    title,
    columns,
    rows: Array.from({ length: third }, (_, i) => [...cells(i), ...cells(i + third), ...cells(i + 2 * third)]),
  }
}

/** Horizon of every option as a table, after the body of the memo. */
export function annexBlocks(input: MemoInput, results: readonly OptionResult[], titleOf: (r: OptionResult) => string): Block[] {
  if (results.length === 0) return [{ kind: 'paragraph', text: 'No option has been computed.' }]
  return [
    {
      kind: 'paragraph',
      role: 'small',
      text: `Each line gives the highest point of the horizon within ±\u202f${SECTOR_DEG / 2}° of its azimuth from true north. The batch command writes every azimuth to horizon.csv.`,
    },
    ...results.map((r) => sectorTable(input, r, titleOf(r))),
  ]
}
