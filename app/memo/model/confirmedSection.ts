import { CONFIRMED_WORDS, FOUR_WORDS, formatDate, formatHeight, formatMast, textOf, unitOf } from '../../words/index.ts'
import { bare, capital, inSentence } from './cells.ts'
import type { Block, Cell, MemoInput } from './types.ts'

/** What was measured on site or in trial, as entered, with the rule of the four words. */
export function confirmedBlocks(input: MemoInput): Block[] {
  const { confirmations, needs } = input.study
  const { inSight, detectable, usable, confirmed } = FOUR_WORDS
  const words = [inSight, detectable, usable, confirmed].map((w) => `${w.word}: ${inSentence(w.meaning)}`)
  const rule: Block = { kind: 'paragraph', role: 'small', text: `${words.map(capital).join('. ')}. ${CONFIRMED_WORDS.rule}` }
  if (confirmations.length === 0)
    return [
      { kind: 'paragraph', text: CONFIRMED_WORDS.none },
      { kind: 'paragraph', role: 'small', text: CONFIRMED_WORDS.rule },
    ]
  const { parts } = CONFIRMED_WORDS
  return [
    {
      kind: 'table',
      id: 'confirmed',
      columns: [
        { head: parts.option, keep: true },
        { head: parts.what, width: 90 },
        { head: parts.altitude, unit: `${unitOf('height', input.system)} MSL`, align: 'right' },
        { head: parts.result, width: 'fill' },
        { head: parts.method, width: 80 },
        { head: parts.who },
        { head: parts.when, keep: true },
      ],
      rows: confirmations.map((c): Cell[] => [
        `${c.candidate} at ${textOf(formatMast(c.heightM))}`,
        [c.need === null ? '' : (needs.find((n) => n.id === c.need)?.name ?? c.need), c.place].filter((w) => w !== '').join(', '),
        bare(formatHeight(c.altitudeM, input.system)),
        c.result,
        c.method,
        c.who,
        c.when.length === 10 ? formatDate(c.when) : c.when,
      ]),
    },
    rule,
  ]
}
