import type { OptionResult } from '../../../core/index.ts'
import { formatDbDown, formatK, formatMargin, formatMetPct, NO_VALUE, unitOf, verdictOf } from '../../words/index.ts'
import { bare } from './cells.ts'
import { needRows } from './needTables.ts'
import { nestedNumbers } from './needWords.ts'
import { figureTable, horizonFigure, mapBlocks, optionFinding } from './optionSection.ts'
import type { Block, Cell, Column, MemoInput, TableBlock } from './types.ts'

const HORIZON_PT = 150

/** An option that does not come first, on a page: finding, map beside its figures, horizon and needs. `full`: the option that is given in full. */
export function optionPageBlocks(input: MemoInput, r: OptionResult, figure: () => number, full: string): Block[] {
  const { lead, rest } = optionFinding(input, r)
  return [
    { kind: 'paragraph', role: 'lead', text: lead },
    { kind: 'paragraph', text: rest },
    ...mapBlocks(input, r, figure, figureTable(input, r)),
    ...(r.figures.needs.length > 0 ? [needsTable(input, r)] : []),
    horizonFigure(input, r, figure(), HORIZON_PT),
    { kind: 'caution', texts: [`Every caution under the figures of ${full} holds for these too.`] },
  ]
}

/** Needs in one table: nested shares at both k, both margins, verdict. */
function needsTable(input: MemoInput, r: OptionResult): TableBlock {
  const { system } = input
  const k = formatK(input.study.atmosphere.effectiveEarthFactor)
  const right = { align: 'right', keep: true } as const
  const three = { group: 'In sight / detectable / usable, %', ...right }
  const height = { unit: unitOf('height', system), group: 'Height over the floor', ...right }
  const signal = { unit: 'dB', group: 'Signal over the ratio', ...right }
  const columns: Column[] = [
    { head: 'Need', width: 'fill' },
    { head: `k = ${k}`, ...three },
    { head: 'k = 1', ...three },
    { head: 'Asked', unit: '%', ...right },
    { head: 'Worst', ...height },
    { head: '10\u202f%', ...height },
    { head: 'Worst', ...signal },
    { head: '10\u202f%', ...signal },
    { head: 'Verdict', align: 'right' },
  ]
  const rows = needRows(r, columns.length, (n): Cell[][] => [
    [
      n.name,
      nestedNumbers(n),
      n.atLowK === null ? { text: 'not run', light: true } : nestedNumbers(n.atLowK),
      formatMetPct(n.requiredPct).value,
      n.worstMarginM === null ? NO_VALUE : bare(formatMargin(n.worstMarginM, system)),
      n.tenthMarginM === null ? NO_VALUE : bare(formatMargin(n.tenthMarginM, system)),
      n.signal.worstDb === null ? NO_VALUE : bare(formatDbDown(n.signal.worstDb)),
      n.signal.tenthDb === null ? NO_VALUE : bare(formatDbDown(n.signal.tenthDb)),
      verdictOf(n),
    ],
  ])
  return {
    kind: 'table',
    id: 'option-needs',
    title: 'Needs: shares, margins at the worst place and at the 10\u202f% level, verdict',
    columns,
    rows,
  }
}
