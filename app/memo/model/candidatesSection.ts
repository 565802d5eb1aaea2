import type { OptionResult, SettledCandidate } from '../../../core/index.ts'
import { CAUTIONS, formatHeight, formatMast, formatPosition, textOf, type UnitSystem, unitOf } from '../../words/index.ts'
import { dual } from './cells.ts'
import type { Block, Cell, MemoInput } from './types.ts'

/** Where each candidate stands, its ground and the heights compared. */
export function candidateBlocks(input: MemoInput): Block[] {
  const rows = input.study.candidates.map((c): Cell[] => {
    const result = input.results.find((r) => r.ref.candidate === c.id)
    return [
      c.id,
      c.name,
      formatPosition(c).replace('  ', '\n'),
      groundCell(c, result, input),
      c.mastHeightsM.map((m) => textOf(formatMast(m))).join(', '),
      centreCell(c, result, input),
      textOf(formatMast(c.clearingRadiusM)),
    ]
  })
  const notes = input.study.candidates.filter((c) => c.notes !== '').map((c) => `${c.id}: ${c.notes}`)
  const blocks: Block[] = [
    {
      kind: 'table',
      id: 'candidates',
      columns: [
        { head: '' },
        { head: 'Candidate', width: 'fill' },
        { head: 'Position, WGS\u00a084' },
        { head: 'Ground MSL', align: 'right', keep: true },
        { head: 'Mast heights', align: 'right' },
        { head: 'Electrical centre MSL', align: 'right', keep: true },
        { head: 'Clearing', align: 'right' },
      ],
      rows,
    },
  ]
  if (notes.length > 0) blocks.push({ kind: 'list', items: notes })
  blocks.push({ kind: 'caution', texts: [CAUTIONS.nearMast, CAUTIONS.obstruction] })
  return blocks
}
function groundCell(c: SettledCandidate, result: OptionResult | undefined, input: MemoInput): Cell {
  const ground = c.groundHeightM ?? result?.figures.siteGroundM ?? null
  if (ground === null) return 'not computed'
  return dual((s) => formatHeight(ground, s), input.system, c.groundHeightM === null ? {} : { mark: 'stated' })
}
function centreCell(c: SettledCandidate, result: OptionResult | undefined, input: MemoInput): Cell {
  const ground = c.groundHeightM ?? result?.figures.siteGroundM ?? null
  if (ground === null) return 'not computed'
  const lowest = Math.min(...c.mastHeightsM)
  const highest = Math.max(...c.mastHeightsM)
  const span = (s: UnitSystem): string => {
    const low = formatHeight(ground + lowest, s).value
    return lowest === highest ? low : `${low} to ${formatHeight(ground + highest, s).value}`
  }
  const metric = input.system === 'metric' ? {} : { also: `${span('metric')}\u202fm` }
  return { text: span(input.system), unit: unitOf('height', input.system), ...metric }
}
