import { M_PER_NM, type OptionResult } from '../../../core/index.ts'
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
import { nestedNumbers } from './needWords.ts'
import { mustNeeds } from './ranking.ts'
import type { Cell, Column, MemoInput, TableBlock } from './types.ts'

/** Needs a table shows before it gets too wide; the rest stand in each option's own table. */
const MOST_NEEDS = 2
/** Ground range of the floor that stands for an option, NM; a shorter one where the polar grid ends sooner. */
const FLOOR_NM = 20
function floorNm(results: readonly OptionResult[]): number {
  const known = results.flatMap((r) => r.figures.floors.filter((f) => f.worstM !== null).map((f) => Math.round(f.rangeM / M_PER_NM)))
  const reached = known.filter((nm) => nm <= FLOOR_NM)
  return reached.length === 0 ? FLOOR_NM : Math.max(...reached)
}

/** What the must needs of an option come to together. */
function mustWords(r: OptionResult): string {
  const must = mustNeeds(r)
  if (must.length === 0) return NO_VALUE
  const passes = must.every((n) => n.passes) ? true : must.some((n) => n.passes === false) ? false : null
  return verdictOf({ met: must.every((n) => n.met), passes })
}

/** Options as rows, figures as columns; `summary` is the short form of the first page. */
export function comparisonTable(input: MemoInput, results: readonly OptionResult[], form: 'summary' | 'full'): TableBlock {
  const { system } = input
  const tilts = new Set(input.results.map((r) => r.ref.tiltDeg)).size > 1
  const needs = (results[0]?.figures.needs ?? []).filter((n) => n.notAssessed === null).slice(0, MOST_NEEDS)
  const first = needs[0]
  const nm = floorNm(results)
  const columns: Column[] = [{ head: 'Option', keep: true }]
  for (const n of needs) {
    columns.push({ head: `${n.name}: in sight, detectable, usable`, unit: `%, asked ${n.requiredPct}`, align: 'right', width: 'fill' })
    if (form === 'full') columns.push({ head: 'Its margins,\n10\u202f% level', align: 'right' })
  }
  columns.push({ head: 'Must\nneeds', align: 'right' })
  columns.push({
    head: `Floor at\n${textOf(formatSetting(toFace('range', nm * M_PER_NM, system), unitOf('range', system)))},\nworst`,
    unit: `${bothUnits('height', system)} MSL`,
    align: 'right',
  })
  columns.push({ head: 'C/N over\n40\u202fdB', unit: bothUnits('area', system), align: 'right' })
  if (first) {
    columns.push({ head: 'Suppression\nneeded, 90\u202f%', unit: 'dB', align: 'right' })
    if (form === 'full') columns.push({ head: 'Short\nof it', unit: bothUnits('area', system), align: 'right' })
  }
  const rows = results.map((r) => {
    const f = r.figures
    const floor = f.floors.find((x) => Math.round(x.rangeM / M_PER_NM) === nm)
    const cells: Cell[] = [optionName(r.ref, tilts)]
    for (const n of needs) {
      const own = f.needs.find((x) => x.needId === n.needId)
      cells.push(own ? { text: nestedNumbers(own), explain: `need_${n.needId}_usable_pct` } : NO_VALUE)
      if (form === 'full')
        cells.push(own ? `${textOf(formatMargin(own.tenthMarginM, system))},\n${textOf(formatDbDown(own.signal.tenthDb))}` : NO_VALUE)
    }
    cells.push(mustWords(r))
    cells.push(dualBare((s) => formatFloor(floor?.worstM, s), system, `floor_${nm}nm_worst_m`))
    cells.push(dualBare((s) => formatAreaUp(f.clutterOverKm2.over40, s), system, 'clutter_over_40_km2'))
    if (first) {
      const own = f.needs.find((x) => x.needId === first.needId)?.suppression
      cells.push(bare(formatDbUp(own?.p90Db), { explain: `need_${first.needId}_suppression_needed_90_db` }))
      if (form === 'full') cells.push(dualBare((s) => formatAreaUp(own?.shortKm2, s), system, `need_${first.needId}_suppression_short_km2`))
    }
    return cells
  })
  return { kind: 'table', id: `compare-${form}`, columns, rows }
}
