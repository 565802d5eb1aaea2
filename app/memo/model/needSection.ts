import type { SettledNeed } from '../../../core/index.ts'
import {
  FOUR_WORDS,
  formatDbUp,
  formatHeight,
  formatMetPct,
  formatNumber,
  formatPd,
  formatPfa,
  formatRange,
  formatRcs,
  formatSector,
  textOf,
  type UnitSystem,
  withMetric,
} from '../../words/index.ts'
import { capital, inSentence } from './cells.ts'
import type { Block, Cell, MemoInput, TableBlock } from './types.ts'

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
    n.kind === 'layer' ? rangeWords(n, input.system) : `${KIND[n.kind]}\n${n.file ?? 'no file'}`,
    formatRcs(n.rcsM2),
    ratioCell(n),
    `${textOf(formatMetPct(n.requiredPct))}\n${MEASURE[n.kind]}`,
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
        { head: 'Asked', align: 'right' },
      ],
      rows,
    },
    ratioTable(needs),
    {
      kind: 'paragraph',
      role: 'small',
      text: 'Required ratio: echo over noise of one pulse for one scan, D₀ and its losses added up; a stated ratio stands for all of them. Hits are the pulses in the half-power beam, integrated those that count.',
    },
    {
      kind: 'paragraph',
      role: 'small',
      text: `Four words are kept apart in this memo. ${words.map(capital).join('. ')}. The first three are worked out here, together; the fourth never is. A need passes where the share asked is usable at the k of the study and at k = 1.`,
    },
  ]
}
const MEASURE: Record<SettledNeed['kind'], string> = { layer: 'of area', polygon: 'of area', fixes: 'of fixes', track: 'of length' }
const KIND = { polygon: 'outline', fixes: 'fixes', track: 'track' } as const
/** How each required ratio comes about: D₀ and its losses. */
function ratioTable(needs: readonly SettledNeed[]): TableBlock {
  const db = (x: number): Cell => ({ text: formatDbUp(x, 'dB', 0.01).value })
  const unit = { unit: 'dB', align: 'right' } as const
  return {
    kind: 'table',
    id: 'ratios',
    title: 'Required ratio, worked out',
    columns: [
      { head: 'Need', width: 'fill' },
      { head: 'Target', width: 104 },
      { head: 'Hits, integrated', align: 'right' },
      { head: 'D₀', ...unit },
      { head: 'Beam shape', ...unit },
      { head: 'Straddling', ...unit },
      { head: 'Threshold', ...unit },
      { head: 'Required', ...unit },
    ],
    rows: needs.map(({ name, required: r }): Cell[] => {
      const target = `Pd ${formatPd(r.pd).value}, Pfa ${formatPfa(r.pfa)}, case ${r.swerling}`
      if (r.by === 'stated') return [name, target, { text: 'stated, all losses in it', light: true, span: 5 }, db(r.ratioDb)]
      return [
        name,
        target,
        `${formatNumber(r.hits, 1)}, ${formatNumber(r.pulses)}`,
        db(r.d0Db),
        db(r.beamShapeDb),
        db(r.straddleDb),
        db(r.cfarDb),
        db(r.ratioDb),
      ]
    }),
  }
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
