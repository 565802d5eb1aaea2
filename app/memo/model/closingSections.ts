import type { OptionResult } from '../../../core/index.ts'
import { optionsChart } from '../../charts/index.ts'
import {
  CAUTIONS,
  cautionsFor,
  DEFERRED_CAUTIONS,
  formatDbDown,
  formatDbUp,
  formatMetPct,
  MARK_WORDS,
  NOT_ASSESSED,
  textOf,
} from '../../words/index.ts'
import { capital, inSentence, inWords, optionName } from './cells.ts'
import { comparisonTable } from './comparisonTable.ts'
import { inOrder, mustNeeds, ORDER_SENTENCE, reaches } from './ranking.ts'
import { hasTilts } from './summarySection.ts'
import { type Block, type Cell, type MemoInput, SMALL_PT, TEXT_WIDTH_PT } from './types.ts'

/** Options side by side, coverage against clutter, and why each falls short. */
export function comparisonBlocks(input: MemoInput, figure: () => number): Block[] {
  const ordered = inOrder(input.results)
  if (ordered.length === 0) return [{ kind: 'paragraph', text: 'Nothing to compare: no option has been computed.' }]
  const blocks: Block[] = [comparisonTable(input, ordered, 'full'), { kind: 'paragraph', role: 'small', text: ORDER_SENTENCE }]
  if (ordered.length > 1) {
    const { drawing } = optionsChart({
      results: input.results,
      needId: mustNeeds(ordered[0])[0]?.needId ?? null,
      selected: ordered[0].ref,
      width: TEXT_WIDTH_PT,
      height: 190,
      system: input.system,
      size: SMALL_PT - 1,
    })
    blocks.push({ kind: 'figure', id: 'options', number: figure(), caption: comparisonFinding(input, ordered), drawing })
  }
  blocks.push({
    kind: 'caution',
    texts: cautionsFor('compare').filter((t) => t !== CAUTIONS.landTable || input.study.lowAngleLandTable === null),
  })
  blocks.push({
    kind: 'table',
    id: 'rejected',
    title: 'Where each option falls short',
    columns: [
      { head: 'Option', keep: true },
      { head: 'Reason', width: 'fill' },
    ],
    rows: ordered.map((r): Cell[] => [optionName(r.ref, hasTilts(input)), shortWords(r)]),
  })
  return blocks
}
function comparisonFinding(input: MemoInput, ordered: readonly OptionResult[]): string {
  const best = ordered[0]
  const most = [...ordered].sort((a, b) => b.figures.clutterOverKm2.over40 - a.figures.clutterOverKm2.over40)[0]
  const name = (r: OptionResult): string => optionName(r.ref, hasTilts(input))
  const pair =
    best === most
      ? `${name(best)} sees most of what is asked and brings most clutter with it`
      : `${name(best)} comes first in the order of reading; ${name(most)} brings most clutter`
  return `${pair}. Mast heights of one candidate are joined.`
}
function shortWords(r: OptionResult): string {
  const reasons: string[] = []
  for (const n of r.figures.needs) {
    if (n.notAssessed !== null) continue
    if (!reaches(n)) {
      const behind = n.worst ? `, worst behind ${n.worst.obstacle} at azimuth ${Math.round(n.worst.azimuthDeg)}°` : ''
      reasons.push(
        `${n.name}${n.must ? '' : ' (wish)'}: ${textOf(formatMetPct(n.inSightPct))} in sight, ${textOf(formatMetPct(n.requiredPct))} asked${behind}`,
      )
    }
    const s = n.suppression
    if (s.p90Db !== null && s.p90Db > s.availableDb)
      reasons.push(
        `${n.name}: ${textOf(formatDbUp(s.p90Db))} of suppression needed at 90\u202f%, ${textOf(formatDbDown(s.availableDb))} available`,
      )
  }
  const open = r.figures.needs.filter((n) => n.notAssessed !== null).map((n) => n.name)
  if (open.length > 0) reasons.push(`${inWords(open)}: not assessed`)
  return reasons.length === 0 ? 'Falls short of nothing that is assessed' : `${reasons.join('; ')}`
}

export function notAssessedBlocks(): Block[] {
  return [
    {
      kind: 'table',
      id: 'not-assessed',
      columns: [{ head: 'Not assessed' }, { head: 'So', width: 'fill' }],
      rows: NOT_ASSESSED.map((n): Cell[] => [n.what, capital(n.so)]),
    },
  ]
}
/** What defers to local codes and licensed practice. */
export function cautionBlocks(): Block[] {
  return [
    { kind: 'caution', texts: [CAUTIONS.prediction, CAUTIONS.notForNavigation, CAUTIONS.sensitive] },
    {
      kind: 'paragraph',
      text: 'For what follows, local codes and licensed practice prevail over this memo, with professional sign-off where it is reserved.',
    },
    { kind: 'list', items: DEFERRED_CAUTIONS.map((id) => CAUTIONS[id].replace(/\.$/, '')) },
  ]
}

interface ModelRow {
  readonly model: string
  readonly source: string
  readonly basis: string
}
/** Models in use and where their numbers stand. */
const MODELS: readonly ModelRow[] = [
  { model: 'Geodesics, ellipsoid WGS 84', source: 'Karney, Algorithms for geodesics, 2013', basis: 'computed' },
  {
    model: 'Effective earth, exact sight geometry',
    source: 'Spherical trigonometry on k times the radius of curvature',
    basis: 'computed',
  },
  { model: 'Line of sight over crossings', source: 'Bilinear surface between posts, highest angle per segment', basis: 'computed' },
  { model: 'Error band of the floor', source: 'Vertical errors of terrain and obstacle, lever of their ranges', basis: 'computed' },
  { model: 'Radar equation, thermal noise', source: 'SI constants; noise figure at 290\u202fK', basis: 'computed' },
  { model: 'Weibull spread of cell means', source: 'Relations of the Weibull distribution', basis: 'computed' },
  { model: 'Relief classes, 2° of slope', source: 'Billingsley, Low-Angle Radar Land Clutter, 2002, §5.4.3', basis: 'read' },
  { model: 'Ground cover heights by class', source: 'Our own engineering choice, editable', basis: 'default' },
]
export function modelBlocks(input: MemoInput): Block[] {
  const own = input.study.lowAngleLandTable
  const land: ModelRow =
    own === null
      ? {
          model: 'Low-angle land clutter table',
          source: 'Billingsley, TR-786 rev. 1, 1993, and Low-Angle Radar Land Clutter, 2002',
          basis: 'from memory',
        }
      : { model: 'Low-angle land clutter table', source: `The study's own: ${own}`, basis: 'by hand' }
  const marks = new Map<string, Set<string>>()
  for (const r of input.results)
    for (const m of r.figures.marks) {
      const about = m.about.replace(`, ${m.mark}`, '')
      marks.set(about, (marks.get(about) ?? new Set()).add(m.mark))
    }
  const blocks: Block[] = [
    {
      kind: 'table',
      id: 'models',
      columns: [{ head: 'Model' }, { head: 'Source', width: 'fill' }, { head: 'Basis' }],
      rows: [land, ...MODELS].map((m): Cell[] => [
        m.model,
        m.source,
        m.basis === 'computed' || m.basis === 'read' ? m.basis : { text: '', mark: m.basis },
      ]),
    },
  ]
  if (marks.size > 0)
    blocks.push({
      kind: 'table',
      id: 'marks',
      title: 'Marks beside figures of this memo',
      columns: [{ head: 'About', width: 'fill' }, { head: 'Mark' }],
      rows: [...marks].map(([about, words]): Cell[] => [capital(about), { text: '', mark: [...words].join(', ') }]),
    })
  blocks.push({
    kind: 'list',
    role: 'small',
    items: Object.values(MARK_WORDS).map((m) => `${m.word}: ${inSentence(m.meaning)}`),
  })
  return blocks
}
