import { M_PER_NM, type NeedFigure, type OptionResult } from '../../../core/index.ts'
import {
  formatAreaUp,
  formatDbDown,
  formatDbUp,
  formatFloor,
  formatMargin,
  formatSetting,
  NO_VALUE,
  textOf,
  toFace,
  unitOf,
  verdictOf,
} from '../../words/index.ts'
import { bare, bothUnits, dualBare, optionName } from './cells.ts'
import { isUnderGround, needName, nestedNumbers } from './needWords.ts'
import { mustNeeds } from './ranking.ts'
import { hasTilts } from './summarySection.ts'
import type { Cell, Column, MemoInput, TableBlock } from './types.ts'

/** Needs a table shows before it gets too wide; the rest stand in each option's own table. */
const MOST_IN_SUMMARY = 2
const MOST_NEEDS = 3
/** Ground range of the floor that stands for an option, NM; a shorter one where the polar grid ends sooner. */
const FLOOR_NM = 20
function floorNm(results: readonly OptionResult[]): number {
  const known = results.flatMap((r) => r.figures.floors.filter((f) => f.worstM !== null).map((f) => Math.round(f.rangeM / M_PER_NM)))
  const reached = known.filter((nm) => nm <= FLOOR_NM)
  return reached.length === 0 ? FLOOR_NM : Math.max(...reached)
}
const assessed = (results: readonly OptionResult[], most: number): readonly NeedFigure[] =>
  (results[0]?.figures.needs ?? []).filter((n) => n.notAssessed === null).slice(0, most)

/** What the must needs of an option come to together. */
export function mustWords(r: OptionResult): string {
  const must = mustNeeds(r)
  if (must.length === 0) return NO_VALUE
  const passes = must.every((n) => n.passes) ? true : must.some((n) => n.passes === false) ? false : null
  return verdictOf({ met: must.every((n) => n.met), passes })
}
/** Options from which the tables are set close. */
const DENSE_FROM = 6
/** A column and what stands in it for an option. */
interface Part {
  readonly column: Column
  readonly cell: (r: OptionResult) => Cell
}
const tableOf = (id: string, title: string | null, results: readonly OptionResult[], parts: readonly Part[]): TableBlock => ({
  kind: 'table',
  id,
  dense: results.length > DENSE_FROM,
  ...(title === null ? {} : { title }),
  columns: parts.map((p) => p.column),
  rows: results.map((r) => parts.map((p) => p.cell(r))),
})
const option = (input: MemoInput): Part => ({
  column: { head: 'Option', keep: true },
  cell: (r) => optionName(r.ref, hasTilts(input)),
})
const must: Part = { column: { head: 'Must needs', align: 'right' }, cell: mustWords }
const own = (r: OptionResult, n: NeedFigure): NeedFigure | undefined => r.figures.needs.find((x) => x.needId === n.needId)

const groupOf = (n: NeedFigure): string => `${needName(n)}, asked ${n.requiredPct}\u202f%`
function shares(n: NeedFigure): Part {
  return {
    column: { head: 'In sight / detectable / usable', unit: '%', group: groupOf(n), align: 'right', width: 'fill' },
    cell: (r) => {
      const x = own(r, n)
      return x && !isUnderGround(x) ? { text: nestedNumbers(x), explain: `need_${n.needId}_usable_pct` } : NO_VALUE
    },
  }
}
function figures(input: MemoInput, results: readonly OptionResult[]): { floor: Part; clutter: Part } {
  const { system } = input
  const nm = floorNm(results)
  const at = textOf(formatSetting(toFace('range', nm * M_PER_NM, system), unitOf('range', system)))
  return {
    floor: {
      column: { head: `Floor at ${at}, worst`, unit: `${bothUnits('height', system)} MSL`, align: 'right' },
      cell: (r) => {
        const floor = r.figures.floors.find((x) => Math.round(x.rangeM / M_PER_NM) === nm)
        return dualBare((s) => formatFloor(floor?.worstM, s), system, `floor_${nm}nm_worst_m`)
      },
    },
    clutter: {
      column: { head: 'C/N over 40\u202fdB', unit: bothUnits('area', system), align: 'right' },
      cell: (r) => dualBare((s) => formatAreaUp(r.figures.clutterOverKm2.over40, s), system, 'clutter_over_40_km2'),
    },
  }
}
const needed = (n: NeedFigure, column: Partial<Column>): Part => ({
  column: { head: 'Suppression needed, 90\u202f%', unit: 'dB', align: 'right', ...column },
  cell: (r) => bare(formatDbUp(own(r, n)?.suppression.p90Db), { explain: `need_${n.needId}_suppression_needed_90_db` }),
})

/** The short form of the first page: options as rows, the first needs, floor, clutter and suppression. */
export function summaryTable(input: MemoInput, results: readonly OptionResult[]): TableBlock {
  const needs = assessed(results, MOST_IN_SUMMARY)
  const { floor, clutter } = figures(input, results)
  const parts = [option(input), ...needs.map((n) => shares(n)), must, floor, clutter]
  if (needs[0]) parts.push(needed(needs[0], {}))
  return tableOf('compare-summary', null, results, parts)
}

/** Every option against the needs, then against floor, clutter and suppression. */
export function comparisonTables(input: MemoInput, results: readonly OptionResult[]): TableBlock[] {
  const { system } = input
  const needs = assessed(results, MOST_NEEDS)
  const { floor, clutter } = figures(input, results)
  const tenth = (group: string, n: NeedFigure): Part[] => [
    {
      column: { head: 'Height margin, 10\u202f%', unit: unitOf('height', system), group, align: 'right', keep: true },
      cell: (r) => bare(formatMargin(own(r, n)?.tenthMarginM, system)),
    },
    {
      column: { head: 'Signal margin, 10\u202f%', unit: 'dB', group, align: 'right', keep: true },
      cell: (r) => bare(formatDbDown(own(r, n)?.signal.tenthDb)),
    },
  ]
  const out: TableBlock[] = []
  if (needs.length > 0) {
    const byNeed = needs.flatMap((n) => {
      const group = groupOf(n)
      // a third need leaves no room for margins
      return [shares(n), ...(needs.length < MOST_NEEDS ? tenth(group, n) : [])]
    })
    out.push(tableOf('compare-needs', 'Needs', results, [option(input), ...byNeed, must]))
  }
  const short = (n: NeedFigure): Part[] => {
    const group = needName(n)
    return [
      needed(n, { group, head: 'Needed, 90\u202f%' }),
      {
        column: { head: 'Available', unit: 'dB', group, align: 'right' },
        cell: (r) => bare(formatDbDown(own(r, n)?.suppression.availableDb)),
      },
      {
        column: { head: 'Area short', unit: bothUnits('area', system), group, align: 'right' },
        cell: (r) => dualBare((s) => formatAreaUp(own(r, n)?.suppression.shortKm2, s), system, `need_${n.needId}_suppression_short_km2`),
      },
    ]
  }
  const byArea = needs.filter((n) => n.measure === 'area').slice(0, MOST_IN_SUMMARY)
  out.push(
    tableOf('compare-figures', `Floor, clutter${byArea.length > 0 ? ' and suppression of the needs' : ''}`, results, [
      option(input),
      floor,
      clutter,
      ...byArea.flatMap(short),
    ]),
  )
  return out
}
