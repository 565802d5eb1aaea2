import type { NeedFigure, OptionResult, PlaceRef } from '../../../core/index.ts'
import {
  formatAreaDown,
  formatAreaUp,
  formatAzimuth,
  formatDbDown,
  formatDbUp,
  formatHeight,
  formatK,
  formatLossPct,
  formatMargin,
  formatMetPct,
  formatPlaceRange,
  formatRangeUp,
  NO_VALUE,
  textOf,
  unitOf,
  verdictOf,
  withMetric,
} from '../../words/index.ts'
import { bare, capital } from './cells.ts'
import { isUnderGround, lossWords, UNDER_GROUND } from './needWords.ts'
import type { Cell, Column, MemoInput, TableBlock } from './types.ts'

type NeedRow = (n: NeedFigure, key: (what: string) => { explain: string }) => Cell[][]
const keyOf =
  (n: NeedFigure) =>
  (what: string): { explain: string } => ({ explain: `need_${n.needId}_${what}` })
/** Rows of each need; one that has no shares, not assessed or under the ground, says why across the table. */
export function needRows(r: OptionResult, columns: number, rows: NeedRow): Cell[][] {
  return r.figures.needs.flatMap((n) => {
    const why = n.notAssessed !== null ? `not assessed: ${n.notAssessed}` : isUnderGround(n) ? UNDER_GROUND : null
    return why === null ? rows(n, keyOf(n)) : [[n.name, { text: why, light: true, span: columns - 1 }]]
  })
}

/** In sight, detectable and usable together, at the k of the study and at k = 1, against what is asked. */
export function nestedTable(input: MemoInput, r: OptionResult): TableBlock {
  const { system } = input
  const k = formatK(input.study.atmosphere.effectiveEarthFactor)
  const pct = { unit: '%', align: 'right' } as const
  const columns: Column[] = [
    { head: 'Need', width: 'fill' },
    { head: 'In sight', ...pct },
    { head: 'Detectable', ...pct },
    { head: 'Usable', ...pct },
    { head: 'At k = 1, the same', ...pct },
    { head: 'Asked', ...pct },
    { head: 'Usable', unit: unitOf('area', system), align: 'right' },
    { head: 'Verdict', align: 'right', keep: true },
  ]
  const rows = needRows(r, columns.length, (n, key) => [
    [
      n.name,
      bare(formatMetPct(n.inSightPct), key('in_sight_pct')),
      bare(formatMetPct(n.detectablePct), key('detectable_pct')),
      bare(formatMetPct(n.usablePct), key('usable_pct')),
      n.atLowK === null
        ? { text: 'not run', light: true }
        : {
            text: [n.atLowK.inSightPct, n.atLowK.detectablePct, n.atLowK.usablePct].map((x) => formatMetPct(x).value).join(' / '),
            ...key('usable_k1_pct'),
          },
      bare(formatMetPct(n.requiredPct)),
      n.measure === 'area'
        ? bare(formatAreaDown(n.usableKm2, system), key('usable_km2'))
        : n.measure === 'fixes'
          ? 'of fixes'
          : 'of length',
      verdictOf(n),
    ],
  ])
  return { kind: 'table', id: 'option-nested', title: `Needs at k = ${k}, and at k = 1`, columns, rows }
}

/** Height and signal margin of each need, worst and 10 % level, where, and behind what. */
export function marginTable(input: MemoInput, r: OptionResult): TableBlock {
  const { system } = input
  const columns: Column[] = [
    { head: 'Need and margin', width: 'fill' },
    { head: 'Worst', align: 'right' },
    { head: '10\u202f% level', align: 'right' },
    { head: 'Worst place', align: 'right', keep: true },
    { head: 'Behind' },
  ]
  const place = (p: PlaceRef | null): Cell[] =>
    p === null
      ? [NO_VALUE, NO_VALUE]
      : [`${textOf(formatAzimuth(p.azimuthDeg, 1))}, ${textOf(formatPlaceRange(p.rangeM, system))}`, p.obstacle]
  const height = (m: number | null, key: { explain: string }): Cell =>
    m === null ? NO_VALUE : { text: formatMargin(m, system).value, unit: unitOf('height', system), ...key }
  const signal = (db: number | null, key: { explain: string }): Cell =>
    db === null ? NO_VALUE : { text: formatDbDown(db).value, unit: 'dB', ...key }
  const rows = needRows(r, columns.length, (n, key) => [
    [
      `${n.name}: height over the floor`,
      height(n.worstMarginM, key('worst_margin_m')),
      height(n.tenthMarginM, key('tenth_margin_m')),
      ...place(n.worst),
    ],
    [
      `${n.name}: signal over the required ratio`,
      signal(n.signal.worstDb, key('worst_signal_margin_db')),
      signal(n.signal.tenthDb, key('tenth_signal_margin_db')),
      ...place(n.signal.worst),
    ],
  ])
  return { kind: 'table', id: 'option-margins', title: 'Margins', columns, rows }
}

/** What is not usable, by cause, largest first; they add up to what is missing. */
export function lossTable(input: MemoInput, r: OptionResult): TableBlock {
  const { system } = input
  const rows = needRows(r, 3, (n) => {
    const above =
      n.groundAboveKm2 > 0 ? `; ground above the level, left out: ${withMetric((s) => formatAreaUp(n.groundAboveKm2, s), system)}` : ''
    const lost = n.losses.map((l) => lossWords(n, l, system)).join('; ')
    return [[n.name, `${lost === '' ? 'Nothing is lost' : capital(lost)}${above}`, coneWords(n, input)]]
  })
  return {
    kind: 'table',
    id: 'option-losses',
    title: 'Causes of loss',
    columns: [
      { head: 'Need', width: 96 },
      { head: 'Not usable, by cause', width: 'fill' },
      { head: 'Cone of silence', width: 70 },
    ],
    rows,
  }
}
function coneWords(n: NeedFigure, { system }: MemoInput): string {
  if (n.coneOfSilence.length === 0) return NO_VALUE
  const one = n.coneOfSilence.length === 1
  return n.coneOfSilence
    .map((c) => {
      const radius = c.radiusM === null ? 'none passes' : withMetric((s) => formatRangeUp(c.radiusM, s), system)
      return one ? radius : `${textOf(formatHeight(c.levelM, system))}: ${radius}`
    })
    .join('\n')
}

/** Suppression each need asks for against what there is: shares of its places in sight, with what is masked and too weak beside them. */
export function suppressionTable(input: MemoInput, r: OptionResult): TableBlock {
  const { system } = input
  const db = { unit: 'dB', align: 'right' } as const
  const pct = { unit: '%', align: 'right' } as const
  const columns: Column[] = [
    { head: 'Need', width: 'fill' },
    { head: '50\u202f%', ...db, group: 'Needed at' },
    { head: '90\u202f%', ...db, group: 'Needed at' },
    { head: '99\u202f%', ...db, group: 'Needed at' },
    { head: 'Available', ...db },
    { head: '90\u202f%', ...db, group: 'Short by' },
    { head: '99\u202f%', ...db, group: 'Short by' },
    { head: 'Area', unit: unitOf('area', system), align: 'right', group: 'Short by' },
    { head: 'Masked', ...pct },
    { head: 'Too weak', ...pct },
  ]
  const rows = needRows(r, columns.length, (n, key) => {
    const s = n.suppression
    if (n.measure !== 'area')
      return [[n.name, { text: `by ${n.measure === 'fixes' ? 'fix' : 'piece'}: see its table`, light: true, span: columns.length - 1 }]]
    return [
      [
        n.name,
        bare(formatDbUp(s.p50Db), key('suppression_needed_50_db')),
        bare(formatDbUp(s.p90Db), key('suppression_needed_90_db')),
        bare(formatDbUp(s.p99Db), key('suppression_needed_99_db')),
        bare(formatDbDown(s.availableDb), key('suppression_available_db')),
        bare(formatDbUp(s.shortP90Db), key('suppression_short_90_db')),
        bare(formatDbUp(s.shortP99Db), key('suppression_short_99_db')),
        bare(formatAreaUp(s.shortKm2, system), key('suppression_short_km2')),
        bare(formatLossPct(s.maskedPct)),
        bare(formatLossPct(s.tooWeakPct), key('too_weak_pct')),
      ],
    ]
  })
  return { kind: 'table', id: 'option-suppression', title: 'Suppression needed against available', columns, rows }
}
/** What is available, by kind of clutter, in a sentence. */
export function availableWords(r: OptionResult): string {
  const by = r.figures.suppressionBy
  const db = (x: number): string => textOf(formatDbDown(x))
  if (by.kind === 'none') return 'No suppression is set: clutter stands as it comes back.'
  if (by.kind === 'stated' && by.uniformDb !== null)
    return `Available as stated for the radar: ${db(by.uniformDb)} on every kind of clutter.`
  const kinds = by.rows.map((x) => `${x.about === 'folded' ? 'from an earlier pulse' : x.about} ${db(x.improvementDb)}`).join(', ')
  const limits = [
    by.stabilityDb === null ? '' : `stability ${db(by.stabilityDb)}`,
    by.quantisationDb === null ? '' : `quantisation ${db(by.quantisationDb)}`,
  ].filter((w) => w !== '')
  const blind = by.blindSpeedsMs.map((v) => `${Math.round(v)}\u202fm/s`).join(', ')
  return [
    `Available by kind of clutter: ${kinds}.`,
    limits.length > 0 ? `Limits of the equipment: ${limits.join(', ')}.` : '',
    blind === '' ? '' : `First blind speed: ${blind}.`,
  ]
    .filter((w) => w !== '')
    .join(' ')
}
