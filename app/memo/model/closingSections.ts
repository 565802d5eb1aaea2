import { coverageOf, type OptionResult } from '../../../core/index.ts'
import { optionsChart } from '../../charts/index.ts'
import {
  CAUTIONS,
  cautionsFor,
  DEFERRED_CAUTIONS,
  formatDbDown,
  formatDbUp,
  formatMetPct,
  NOT_ASSESSED,
  RANKING_WORDS,
  textOf,
} from '../../words/index.ts'
import { capital, inWords, optionName } from './cells.ts'
import { comparisonTables } from './comparisonTable.ts'
import { isUnderGround, lossWords, needName, nestedWords, UNDER_GROUND } from './needWords.ts'
import { inOrder, orderSentence, reaches } from './ranking.ts'
import { rankingBlocks, rejectedBlocks } from './rankingBlocks.ts'
import { hasTilts } from './summarySection.ts'
import { type Block, type Cell, type MemoInput, SMALL_PT, TEXT_WIDTH_PT } from './types.ts'

/** Options side by side, coverage against clutter, and why each falls short. */
export function comparisonBlocks(input: MemoInput, figure: () => number): Block[] {
  const { ranking } = input.study
  const ordered = inOrder(input.results, ranking)
  if (ordered.length === 0)
    return [{ kind: 'paragraph', text: 'Nothing to compare: no option has been computed.' }, ...rejectedBlocks(input)]
  const blocks: Block[] = [
    ...comparisonTables(input, ordered),
    { kind: 'paragraph', role: 'small', text: orderSentence(ranking) },
    ...rankingBlocks(input),
  ]
  const rated = ordered.some((r) => (coverageOf(r.figures, null)?.usablePct ?? r.figures.groundInSightKm2) > 0)
  if (ordered.length > 1 && !rated)
    blocks.push({
      kind: 'paragraph',
      role: 'small',
      text: 'Coverage against clutter is not drawn: no option has any usable share of the needs.',
    })
  if (ordered.length > 1 && rated) {
    const { drawing, points } = optionsChart({
      results: input.results,
      needId: null,
      selected: ordered[0].ref,
      width: TEXT_WIDTH_PT,
      height: 190,
      system: input.system,
      size: SMALL_PT - 1,
    })
    blocks.push({ kind: 'figure', id: 'options', number: figure(), caption: comparisonFinding(input, ordered), drawing })
    const best = points.filter((p) => p.best).map((p) => optionName(p.ref, hasTilts(input)))
    if (best.length > 0)
      blocks.push({
        kind: 'paragraph',
        role: 'small',
        text: `No other option beats ${inWords(best)}: none has at least as much usable with as little short of suppression.`,
      })
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
    rows: ordered.map((r): Cell[] => [optionName(r.ref, hasTilts(input)), shortWords(r, input.system)]),
  })
  blocks.push(...rejectedBlocks(input))
  return blocks
}
function comparisonFinding(input: MemoInput, ordered: readonly OptionResult[]): string {
  const best = ordered[0]
  const name = (r: OptionResult): string => optionName(r.ref, hasTilts(input))
  const rated = ordered.flatMap((r) => {
    const both = coverageOf(r.figures, null)
    return both ? [{ r, ...both }] : []
  })
  if (rated.length === 0)
    return `Ground in sight against ground with C/N over 40\u202fdB; ${name(best)} comes first in the order. Mast heights of one candidate are joined.`
  const usable = [...rated].sort((a, b) => b.usablePct - a.usablePct)[0]
  const short = [...rated].sort((a, b) => b.shortKm2 - a.shortKm2)[0]
  const most =
    usable.r === short.r
      ? `${name(usable.r)} has most usable and most area short of suppression`
      : `${name(usable.r)} has most usable; ${short.shortKm2 > 0 ? `${name(short.r)} most area short of suppression` : 'none is short of suppression'}`
  return `${most}. Usable share of the needs of an area, each by its area, against their area where more suppression is needed than there is; high and left is better, ${RANKING_WORDS.plotBest}. Mast heights of one candidate are joined.`
}
function shortWords(r: OptionResult, system: MemoInput['system']): string {
  const reasons: string[] = []
  for (const n of r.figures.needs) {
    if (n.notAssessed !== null) continue
    if (isUnderGround(n)) {
      reasons.push(`${needName(n)}: ${UNDER_GROUND}`)
      continue
    }
    if (!reaches(n)) {
      const behind = n.worst ? `, worst behind ${n.worst.obstacle} at azimuth ${Math.round(n.worst.azimuthDeg)}°` : ''
      const first = n.losses[0] ? `; most lost: ${lossWords(n, n.losses[0], system)}` : ''
      const at = n.met ? ', short at k = 1' : ''
      reasons.push(
        `${needName(n)}${n.must ? '' : ' (wish)'}: ${nestedWords(n)}, ${textOf(formatMetPct(n.requiredPct))} asked${at}${first}${behind}`,
      )
    }
    const s = n.suppression
    if (n.measure === 'area' && s.p90Db !== null && s.shortP90Db !== null && s.shortP90Db > 0)
      reasons.push(
        `${needName(n)}: ${textOf(formatDbUp(s.p90Db))} of suppression needed at 90\u202f%, ${textOf(formatDbDown(s.availableDb))} available`,
      )
  }
  const open = r.figures.needs.filter((n) => n.notAssessed !== null).map(needName)
  if (open.length > 0) reasons.push(`${inWords(open)}: not assessed`)
  return reasons.length === 0 ? 'Falls short of nothing that is assessed' : `${reasons.join('. ')}`
}

export function notAssessedBlocks(): Block[] {
  return [
    {
      kind: 'table',
      id: 'not-assessed',
      dense: true,
      columns: [
        { head: 'Not assessed', width: 138 },
        { head: 'So', width: 'fill' },
      ],
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
    {
      kind: 'table',
      id: 'release',
      title: 'Release: a draft until signed',
      columns: [
        { head: '' },
        { head: 'Name', width: 'fill' },
        { head: 'Licence', width: 80 },
        { head: 'Date', width: 60 },
        { head: 'Signature', width: 130 },
      ],
      rows: ['Prepared', 'Checked', 'Approved'].map((role): Cell[] => [role, '', '', '', '']),
    },
  ]
}
