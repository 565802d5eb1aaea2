import { type OptionRef, type Ranking, rankOptions, WEIGHT_FACTORS } from '../../../core/index.ts'
import {
  criterionWords,
  effectWords,
  formatCriterion,
  formatNumber,
  formatScore,
  NO_VALUE,
  optionWords,
  RANKING_WORDS,
  rankWords,
} from '../../words/index.ts'
import { value } from './cells.ts'
import { mustWords } from './comparisonTable.ts'
import type { Block, Cell, MemoInput } from './types.ts'

/** The study's ranking: what is weighed, the scores, and whether they hold when a weight changes. Nothing where none is stated. */
export function rankingBlocks(input: MemoInput): Block[] {
  const { ranking, needs } = input.study
  if (!ranking || input.results.length === 0) return []
  const result = rankOptions(input.results, ranking)
  const sum = ranking.criteria.reduce((s, c) => s + c.weight, 0)
  return [
    {
      kind: 'table',
      id: 'ranking-criteria',
      title: 'What options are ranked by',
      columns: [
        { head: '' },
        { head: 'Figure', width: 'fill' },
        { head: 'Worst', align: 'right', keep: true },
        { head: 'Best', align: 'right', keep: true },
        { head: 'Weight', align: 'right' },
        { head: 'Share', align: 'right', keep: true },
      ],
      rows: ranking.criteria.map((c, i): Cell[] => [
        `${i + 1}`,
        criterionWords(c.figure, needs),
        value(formatCriterion(c.worst, c.figure, input.system)),
        value(formatCriterion(c.best, c.figure, input.system)),
        formatNumber(c.weight, Number.isInteger(c.weight) ? 0 : 2),
        value({ value: formatNumber((100 * c.weight) / sum, 0), unit: '%' }),
      ]),
    },
    scoresTable(input, result),
    { kind: 'paragraph', role: 'small', text: RANKING_WORDS.rule },
    effectsTable(input, result),
  ]
}
const hasTilts = (input: MemoInput): boolean => new Set(input.results.map((r) => r.ref.tiltDeg)).size > 1

function scoresTable(input: MemoInput, { options }: Ranking): Block {
  const ranks = options.map((o) => o.rank)
  const criteria = input.study.ranking?.criteria ?? []
  const verdictOf = (ref: OptionRef): string => {
    const own = input.results.find((r) => r.ref === ref)
    return own ? mustWords(own) : NO_VALUE
  }
  return {
    kind: 'table',
    id: 'ranking-scores',
    title: 'Ranking',
    columns: [
      { head: 'Rank' },
      { head: 'Option', keep: true, width: 'fill' },
      { head: 'Must needs' },
      ...criteria.map((_c, i) => ({ head: `Points ${i + 1}`, align: 'right' as const })),
      { head: 'Score of 100', align: 'right' },
    ],
    rows: options.map((o): Cell[] => [
      rankWords(o.rank, ranks),
      optionWords(o.ref, hasTilts(input)),
      verdictOf(o.ref),
      ...o.criteria.map((c) => formatScore(c.u === null ? null : c.u * c.share)),
      formatScore(o.score),
    ]),
  }
}
function effectsTable(input: MemoInput, { effects }: Ranking): Block {
  const criteria = input.study.ranking?.criteria ?? []
  const of = (figure: string, factor: number): string => {
    const effect = effects.find((e) => e.figure === figure && e.factor === factor)
    return effect ? effectWords(effect, hasTilts(input)) : ''
  }
  return {
    kind: 'table',
    id: 'ranking-effects',
    title: RANKING_WORDS.effects,
    columns: [{ head: 'Weight of' }, { head: '20\u202f% less', width: 'fill' }, { head: '20\u202f% more', width: 'fill' }],
    rows: criteria.map((c): Cell[] => [criterionWords(c.figure, input.study.needs), ...WEIGHT_FACTORS.map((f) => of(c.figure, f))]),
  }
}

/** Candidates the study has given up, with the reason; nothing where there are none. */
export function rejectedBlocks(input: MemoInput): Block[] {
  const { rejected } = input.study
  if (rejected.length === 0) return []
  return [
    {
      kind: 'table',
      id: 'rejected-candidates',
      title: RANKING_WORDS.rejected,
      columns: [
        { head: 'Candidate', keep: true },
        { head: 'Reason', width: 'fill' },
      ],
      rows: rejected.map((c): Cell[] => [c.name === c.id ? c.id : `${c.id} ${c.name}`, c.reason]),
    },
  ]
}
