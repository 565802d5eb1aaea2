import type { OptionResult, TrialRow } from '../../../core/index.ts'
import {
  cautionsFor,
  formatAzimuth,
  formatFloor,
  formatHeight,
  formatMargin,
  formatPlaceRange,
  NO_VALUE,
  TRIAL_CONFIRMS_WORDS,
  textOf,
  trialRoute,
  unitOf,
} from '../../words/index.ts'
import { bare, capital } from './cells.ts'
import { needName } from './needWords.ts'
import type { Block, Cell, MemoInput, TableBlock } from './types.ts'

/** What a trial of an option should fly and a survey measure; nothing where no need is assessed. */
export function trialBlocks(input: MemoInput, r: OptionResult): Block[] {
  const { trialPlan } = r.figures
  return trialPlan.length === 0 ? [] : [trialTable(input, trialPlan), { kind: 'caution', texts: cautionsFor('trial') }]
}

function trialTable({ system }: MemoInput, rows: readonly TrialRow[]): TableBlock {
  const height = { unit: `${unitOf('height', system)} MSL`, align: 'right' } as const
  return {
    kind: 'table',
    id: 'trial-plan',
    title: 'Trial plan, through the worst margins of the needs',
    dense: true,
    columns: [
      { head: 'What', width: 124 },
      { head: 'Place', align: 'right', keep: true },
      { head: 'Altitude', ...height },
      { head: 'Floor', ...height },
      { head: 'Margin', unit: unitOf('height', system), align: 'right' },
      { head: 'Predicted' },
      { head: 'To confirm', width: 'fill' },
    ],
    rows: rows.map((t, n): Cell[] => {
      // the need stands over the first of its rows
      const need = n > 0 && rows[n - 1].needName === t.needName ? '' : `${needName({ name: t.needName })}\n`
      return [
        `${need}${n + 1} ${trialRoute(t, system)}`,
        `${textOf(formatAzimuth(t.at.azimuthDeg))}, ${textOf(formatPlaceRange(t.at.rangeM, system))}`,
        bare(formatHeight(t.altitudeM, system)),
        bare(formatFloor(t.floorM, system)),
        bare(formatMargin(t.marginM, system)),
        t.predicted ?? NO_VALUE,
        confirmWords(t),
      ]
    }),
  }
}
const confirmWords = (t: TrialRow): string => {
  const words = capital(TRIAL_CONFIRMS_WORDS[t.confirms])
  return t.obstacle === '' || t.confirms === 'cone' ? words : `${words} (${t.obstacle})`
}
