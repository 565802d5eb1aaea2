import type { NeedFigure, OptionResult } from '../../../core/index.ts'
import {
  CAUTIONS,
  FIRST_PAGE_CAUTIONS,
  formatAreaUp,
  formatDbDown,
  formatDbUp,
  formatExposure,
  formatMetPct,
  NOT_ASSESSED,
  textOf,
  withMetric,
} from '../../words/index.ts'
import { capital, countWord, inSentence, inWords, optionName, someInWords } from './cells.ts'
import { comparisonTable } from './comparisonTable.ts'
import { exposureFor } from './exposureSection.ts'
import { nestedWords } from './needWords.ts'
import { inOrder, mustNeeds, orderSentence, reaches, shortKm2 } from './ranking.ts'
import type { Block, MemoInput } from './types.ts'

/** Options the study asks for. */
const optionCount = (input: MemoInput): number => input.study.candidates.reduce((n, c) => n + c.mastHeightsM.length * c.tiltsDeg.length, 0)
export const hasTilts = (input: MemoInput): boolean => new Set(input.results.map((r) => r.ref.tiltDeg)).size > 1

/** First page: what is found, side by side, the cautions, and what is not assessed. */
export function summaryBlocks(input: MemoInput): Block[] {
  const ordered = inOrder(input.results, input.study.ranking)
  const blocks: Block[] = [{ kind: 'paragraph', role: 'lead', text: leadSentence(input, ordered) }]
  const rest = restSentences(input, ordered)
  if (rest !== '') blocks.push({ kind: 'paragraph', text: rest })
  if (ordered.length > 0) {
    blocks.push(comparisonTable(input, ordered.slice(0, MOST_ROWS), 'summary'))
    const left =
      ordered.length > MOST_ROWS ? ` ${capital(countWord(ordered.length - MOST_ROWS))} further options stand in the comparison.` : ''
    blocks.push({ kind: 'paragraph', role: 'small', text: orderSentence(input.study.ranking) + left })
  }
  blocks.push({ kind: 'caution', texts: firstPageCautions(input) })
  const what = NOT_ASSESSED.map((n) => inSentence(n.what))
  blocks.push({
    kind: 'paragraph',
    role: 'small',
    text: `Not assessed in this version: ${inWords(what)}. What each leaves open is listed further on.`,
  })
  return blocks
}
const MOST_ROWS = 6

/** The first page's cautions; the land table's only while the built-in one is in use. */
export function firstPageCautions(input: MemoInput): readonly string[] {
  return FIRST_PAGE_CAUTIONS.filter((id) => id !== 'landTable' || input.study.lowAngleLandTable === null).map((id) => CAUTIONS[id])
}

function leadSentence(input: MemoInput, ordered: readonly OptionResult[]): string {
  if (ordered.length === 0) return 'No option has been computed yet: this memo holds the study and nothing of its results.'
  const tilts = hasTilts(input)
  const best = ordered[0]
  const needs = mustNeeds(best)
  const name = optionName(best.ref, tilts)
  const short = shortKm2(best)
  const clutter =
    short > 0
      ? `with ${withMetric((s) => formatAreaUp(short, s), input.system)} of all needs short of suppression`
      : 'with no area of the needs short of suppression'
  if (needs.length === 0)
    return `No must need is assessed, so nothing sets one option before another; least is short of suppression from ${name}, ${clutter}.`
  const reaching = ordered.filter((r) => mustNeeds(r).every(reaches))
  const shares = someInWords(needs.map(shareWords), 2)
  const open = needs.some((n) => n.passes === null)
  const meets = open ? 'meets every must need at the k of the study' : 'passes every must need, at the k of the study and at k = 1'
  if (reaching.length === 0)
    return ordered.length === 1
      ? `${name}, the one option computed, ${meets.replace(/^(meet|passe)s/, (w) => (w === 'meets' ? 'does not meet' : 'does not pass'))}: ${shares}, ${clutter}.`
      : `None of the ${countWord(ordered.length)} options computed ${meets}. ${name} comes nearest: ${shares}, ${clutter}.`
  const many =
    reaching.length === 1
      ? `Only ${name} ${meets}`
      : `${capital(countWord(reaching.length))} of ${countWord(ordered.length)} options ${meets.replace(/^(meet|passe)s/, (w) => (w === 'meets' ? 'meet' : 'pass'))}`
  return reaching.length === 1 ? `${many}: ${shares}, ${clutter}.` : `${many}; ${name} comes first of them: ${shares}, ${clutter}.`
}
const shareWords = (n: NeedFigure): string => `${n.name} ${nestedWords(n)} (${textOf(formatMetPct(n.requiredPct))} asked)`

function restSentences(input: MemoInput, ordered: readonly OptionResult[]): string {
  const out: string[] = []
  const best = ordered[0]
  const need = best && mustNeeds(best)[0]
  if (best && need && need.suppression.p90Db !== null) {
    const { p90Db, availableDb, shortKm2 } = need.suppression
    const asked = p90Db <= 0 ? 'no suppression is needed' : `${textOf(formatDbUp(p90Db))} of suppression is needed`
    const short = shortKm2 > 0 ? `${withMetric((s) => formatAreaUp(shortKm2, s), input.system)} need more` : 'no place needs more'
    out.push(
      `At 90\u202f% of the places in sight of ${need.name} that are strong enough ${asked}; with ${textOf(formatDbDown(availableDb))} available, ${short}.`,
    )
  }
  const lower = best && lowestReaching(ordered, best)
  if (lower) out.push(`The lowest mast that does so too is ${optionName(lower.ref, hasTilts(input))}.`)
  const clear = best && exposureFor(input, best.ref)
  if (clear)
    out.push(
      `With the antenna stopped the main beam is to be kept clear to ${textOf(formatExposure(clear.stoppedM))} (limit ${clear.limit.basis === 'read' ? `from ${clear.limit.source}` : clear.limit.basis}).`,
    )
  const open = best?.figures.needs.filter((n) => n.notAssessed !== null) ?? []
  if (open.length > 0) out.push(`Not part of this: ${inWords(open.map((n) => `${n.name} (${n.notAssessed})`))}.`)
  const total = optionCount(input)
  if (ordered.length > 0 && ordered.length < total)
    out.push(`${capital(countWord(total - ordered.length))} of ${countWord(total)} options are not computed yet.`)
  return out.join(' ')
}
function lowestReaching(ordered: readonly OptionResult[], best: OptionResult): OptionResult | null {
  const reaching = ordered.filter((r) => mustNeeds(r).every(reaches) && mustNeeds(r).length > 0)
  const lowest = [...reaching].sort((a, b) => a.ref.heightM - b.ref.heightM)[0]
  return lowest && lowest.ref.heightM < best.ref.heightM ? lowest : null
}
