import { type NeedFigure, type OptionResult, rankOptions } from '../../../core/index.ts'
import {
  CAUTIONS,
  FIRST_PAGE_CAUTIONS,
  formatAreaUp,
  formatDbDown,
  formatDbUp,
  formatExposure,
  formatK,
  formatMetPct,
  formatScore,
  NOT_ASSESSED,
  textOf,
  verdictOf,
  withMetric,
} from '../../words/index.ts'
import { capital, countWord, inSentence, inWords, optionName, someInWords } from './cells.ts'
import { mustWords, summaryTable } from './comparisonTable.ts'
import { exposureFor } from './exposureSection.ts'
import { isUnderGround, needName, nestedWords, UNDER_GROUND } from './needWords.ts'
import { inOrder, mustNeeds, orderSentence, reaches, shortfallPct, shortKm2, usableAtWorstPct } from './ranking.ts'
import type { Block, Cell, MemoInput, TableBlock } from './types.ts'

/** Options the study asks for. */
const optionCount = (input: MemoInput): number => input.study.candidates.reduce((n, c) => n + c.mastHeightsM.length * c.tiltsDeg.length, 0)
export const hasTilts = (input: MemoInput): boolean => new Set(input.results.map((r) => r.ref.tiltDeg)).size > 1

/** First page: what is found, side by side, the cautions, and what is not assessed. */
export function summaryBlocks(input: MemoInput): Block[] {
  const ordered = inOrder(input.results, input.study.ranking)
  const blocks: Block[] = [{ kind: 'paragraph', role: 'lead', text: leadSentence(input, ordered) }]
  const rest = restSentences(input, ordered)
  if (rest !== '') blocks.push({ kind: 'paragraph', text: rest })
  const met = ordered[0] && metTable(input, ordered[0])
  if (met) blocks.push(met)
  if (ordered.length > 1) {
    blocks.push(summaryTable(input, ordered.slice(0, MOST_ROWS)))
    const left =
      ordered.length > MOST_ROWS ? ` ${capital(countWord(ordered.length - MOST_ROWS))} further options stand in the comparison.` : ''
    blocks.push({ kind: 'paragraph', role: 'small', text: orderSentence(input.study.ranking) + left })
  }
  const what = NOT_ASSESSED.map((n) => inSentence(n.what))
  blocks.push({
    kind: 'paragraph',
    role: 'small',
    text: `Not assessed in this version: ${inWords(what)}. What each leaves open is listed further on.`,
  })
  blocks.push({ kind: 'caution', texts: firstPageCautions(input) })
  return blocks
}
const MOST_ROWS = 6
/** Needs the first page has room for. */
const MOST_MET = 6

/** What the option that comes first meets, and by how much; null where nothing is assessed. */
function metTable(input: MemoInput, best: OptionResult): TableBlock | null {
  const needs = best.figures.needs.filter((n) => n.notAssessed === null)
  if (needs.length === 0) return null
  const usable = { group: 'Usable, %', align: 'right' } as const
  return {
    kind: 'table',
    id: 'met',
    title: `${optionName(best.ref, hasTilts(input))}: what is met, and by how much at the less favourable k`,
    columns: [
      { head: 'Need', width: 'fill' },
      { head: 'Kind', width: 40 },
      { head: 'Asked', unit: '%', align: 'right' },
      { head: `k = ${formatK(input.study.atmosphere.effectiveEarthFactor)}`, ...usable },
      { head: 'k = 1', ...usable },
      { head: 'Over or short', unit: 'points', align: 'right' },
      { head: 'Verdict', align: 'right', keep: true },
    ],
    rows: needs
      .slice(0, MOST_MET)
      .map((n): Cell[] => [
        n.name,
        n.must ? 'must' : 'wish',
        formatMetPct(n.requiredPct).value,
        ...(isUnderGround(n)
          ? [{ text: UNDER_GROUND, light: true, span: 3 }]
          : [
              formatMetPct(n.usablePct).value,
              n.atLowK === null ? { text: 'not run', light: true } : formatMetPct(n.atLowK.usablePct).value,
              pointsWords(usableAtWorstPct(n) - n.requiredPct),
            ]),
        verdictOf(n),
      ]),
  }
}
/** `+ 4`, `− 15`, rounded down. */
function pointsWords(points: number): string {
  const whole = Math.floor(points)
  return `${whole < 0 ? '−' : '+'}\u202f${Math.abs(whole)}`
}

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
      : `No option is recommended as it stands. None of the ${countWord(ordered.length)} options computed ${meets}. ${name} comes nearest: ${shares}, ${clutter}.`
  const site = input.study.candidates.find((c) => c.id === best.ref.candidate)?.name ?? best.ref.candidate
  const advice = `Recommended: ${name}${site === best.ref.candidate ? '' : `, ${site}`}. `
  const many =
    reaching.length === 1
      ? `Only ${name} ${meets}`
      : `${capital(countWord(reaching.length))} of ${countWord(ordered.length)} options ${meets.replace(/^(meet|passe)s/, (w) => (w === 'meets' ? 'meet' : 'pass'))}`
  return `${advice}${reaching.length === 1 ? many : `${many}; ${name} comes first of them`}: ${shares}, ${clutter}.`
}
const shareWords = (n: NeedFigure): string =>
  isUnderGround(n) ? `${needName(n)}: ${UNDER_GROUND}` : `${needName(n)} ${nestedWords(n)} (${textOf(formatMetPct(n.requiredPct))} asked)`

/** Why the first option stands before the second; empty where there is no second. */
function reasonSentence(input: MemoInput, [best, second]: readonly OptionResult[]): string {
  if (!best || !second) return ''
  const name = (r: OptionResult): string => optionName(r.ref, hasTilts(input))
  const { ranking } = input.study
  if (ranking) {
    const { options, effects } = rankOptions(input.results, ranking)
    const score = (r: OptionResult): number | null => options.find((o) => o.ref === r.ref)?.score ?? null
    const moved = effects.some((e) => e.changes.some((c) => c.from === 1))
    const holds = moved ? 'one weight 20\u202f% less or more puts another option first' : 'no weight 20\u202f% less or more changes that'
    const own = mustWords(best)
    return own === mustWords(second)
      ? `It comes first with a score of ${formatScore(score(best))} of 100 against ${formatScore(score(second))} of ${name(second)}; ${holds}.`
      : `It comes before ${name(second)} by its must needs (${own}), with a score of ${formatScore(score(best))} of 100; ${holds}.`
  }
  const area = (r: OptionResult): string => withMetric((s) => formatAreaUp(shortKm2(r), s), input.system)
  const points = (r: OptionResult): string => String(Math.ceil(shortfallPct(r)))
  if (shortfallPct(best) < shortfallPct(second))
    return `It comes before ${name(second)} because it misses less of the must needs: ${points(best)} percentage points against ${points(second)}.`
  if (shortKm2(best) < shortKm2(second))
    return `It comes before ${name(second)} because less area is short of suppression: ${area(best)} against ${area(second)}.`
  return best.ref.heightM < second.ref.heightM ? `It comes before ${name(second)}, which does as well, because its mast is lower.` : ''
}

function restSentences(input: MemoInput, ordered: readonly OptionResult[]): string {
  const reason = reasonSentence(input, ordered)
  const out: string[] = reason === '' ? [] : [reason]
  const best = ordered[0]
  const need = best && mustNeeds(best)[0]
  if (best && need && need.suppression.p90Db !== null) {
    const { p90Db, availableDb, shortKm2 } = need.suppression
    const asked = p90Db <= 0 ? 'no suppression is needed' : `${textOf(formatDbUp(p90Db))} of suppression is needed`
    const short = shortKm2 > 0 ? `${withMetric((s) => formatAreaUp(shortKm2, s), input.system)} need more` : 'no place needs more'
    out.push(
      `At 90\u202f% of the places in sight of ${needName(need)} that are strong enough ${asked}; with ${textOf(formatDbDown(availableDb))} available, ${short}.`,
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
  if (open.length > 0) out.push(`Not part of this: ${inWords(open.map((n) => `${needName(n)} (${n.notAssessed})`))}.`)
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
