import type { SettledNeed } from '../../../core/index.ts'
import {
  FOUR_WORDS,
  formatDbUp,
  formatHeight,
  formatMetPct,
  formatPd,
  formatRange,
  formatRcs,
  formatSector,
  textOf,
  type UnitSystem,
  withMetric,
} from '../../words/index.ts'
import { capital, inSentence } from './cells.ts'
import type { Block, Cell, MemoInput } from './types.ts'

/** What must be seen, as stated. */
export function needBlocks(input: MemoInput): Block[] {
  const { needs } = input.study
  if (needs.length === 0)
    return [
      {
        kind: 'paragraph',
        text: 'No need is stated. The figures of the options stand side by side; nothing says which of them is enough.',
      },
    ]
  const rows = needs.map((n): Cell[] => [
    n.name,
    n.must ? 'must' : 'wish',
    heightWords(n, input.system),
    n.kind === 'layer' ? rangeWords(n, input.system) : `by ${n.kind}`,
    formatRcs(n.rcsM2),
    ratioCell(n),
    textOf(formatMetPct(n.requiredPct)),
  ])
  const { inSight, detectable, usable, confirmed } = FOUR_WORDS
  const words = [inSight, detectable, usable, confirmed].map((w) => `${w.word}: ${inSentence(w.meaning)}`)
  return [
    {
      kind: 'table',
      id: 'needs',
      columns: [
        { head: 'Need', width: 'fill' },
        { head: '' },
        { head: 'Height' },
        { head: 'Where' },
        { head: 'Target RCS' },
        { head: 'Required ratio' },
        { head: 'Asked of area', align: 'right' },
      ],
      rows,
    },
    {
      kind: 'paragraph',
      role: 'small',
      text: `Four words are kept apart in this memo. ${words.map(capital).join('. ')}. This version states the first only.`,
    },
  ]
}
/** The ratio and what it comes from; a worked-out one is rounded up. */
function ratioCell(n: SettledNeed): Cell {
  const ratio = textOf(formatDbUp(n.requiredRatioDb, 'dB', 0.1))
  const from = n.requiredRatioBy === 'stated' ? 'stated' : `Pd ${formatPd(n.pd).value}, case ${n.swerling}`
  const text = `${ratio},\n${from}`
  return n.requiredRatioMark ? { text, mark: n.requiredRatioMark } : text
}
function heightWords(n: SettledNeed, system: UnitSystem): string {
  if (n.levelsM.length === 0) return '–'
  const words = (m: number): string => withMetric((s) => formatHeight(m, s), system)
  const low = n.levelsM[0]
  const high = n.levelsM[n.levelsM.length - 1]
  const above = n.heightAbove === 'sea' ? 'MSL' : 'above ground'
  return low === high ? `${words(low)}\n${above}` : `${words(low)} to ${words(high)}\n${above}, ${n.levelsM.length} levels`
}
function rangeWords(n: SettledNeed, system: UnitSystem): string {
  const to = withMetric((s) => formatRange(n.toRangeM, s), system)
  const reach = n.fromRangeM > 0 ? `${withMetric((s) => formatRange(n.fromRangeM, s), system)} to ${to}` : `to ${to}`
  return `${reach},\n${formatSector(n.sectorDeg)}`
}
