import type { OptionResult } from '../../../core/index.ts'
import {
  formatAreaDown,
  formatAreaUp,
  formatDbUp,
  formatHeight,
  formatK,
  formatRoad,
  formatScreening,
  NO_VALUE,
  unitOf,
} from '../../words/index.ts'
import { bare, bothUnits, dualBare, optionName } from './cells.ts'
import { hasTilts } from './summarySection.ts'
import type { Block, Cell, Column, MemoInput, TableBlock } from './types.ts'

/** Figures of every option, a row each: ground and clutter at the k of the study, then what k = 2.75 and the roads bring. */
export function everyOptionBlocks(input: MemoInput, ordered: readonly OptionResult[]): Block[] {
  const more = atHighKTable(input, ordered)
  const words: Block = {
    kind: 'paragraph',
    role: 'small',
    text: `Causes of loss, fixes and tracks, clutter levels by ring, roads by class and the trial plan of the options that do not come first stand in the app and in summary.json of the batch command.`,
  }
  return [groundTable(input, ordered), ...(more ? [more] : []), words]
}
const option: Column = { head: 'Option', keep: true }

function groundTable(input: MemoInput, ordered: readonly OptionResult[]): TableBlock {
  const { system } = input
  const k = formatK(input.study.atmosphere.effectiveEarthFactor)
  const area = { unit: bothUnits('area', system), align: 'right' } as const
  const over = (level: number): Column => ({ head: `${level}\u202fdB`, group: `C/N at k = ${k} over, ${area.unit}`, align: 'right' })
  return {
    kind: 'table',
    id: 'every-ground',
    title: `Ground and clutter at k = ${k}`,
    dense: true,
    columns: [
      option,
      { head: 'Antenna', unit: `${bothUnits('height', system)} MSL`, align: 'right' },
      { head: 'In sight', ...area },
      { head: 'Horizon, median', unit: '°', align: 'right' },
      ...[0, 20, 40, 60].map(over),
      { head: 'C/N, highest', unit: 'dB', align: 'right' },
    ],
    rows: ordered.map(({ ref, figures: f }): Cell[] => {
      const km2 = (x: number): Cell => dualBare((s) => formatAreaUp(x, s), system)
      const { over0, over20, over40, over60 } = f.clutterOverKm2
      return [
        optionName(ref, hasTilts(input)),
        dualBare((s) => formatHeight(f.antennaM, s), system),
        dualBare((s) => formatAreaDown(f.groundInSightKm2, s), system),
        bare(formatScreening(f.horizon.medianDeg)),
        ...[over0, over20, over40, over60].map(km2),
        bare(formatDbUp(f.cnrPeakDb)),
      ]
    }),
  }
}

/** Null where neither k = 2.75 nor roads are worked out. */
function atHighKTable(input: MemoInput, ordered: readonly OptionResult[]): TableBlock | null {
  const { system } = input
  const high = ordered.some((r) => r.figures.atHighK !== null)
  const roads = ordered.some((r) => r.figures.roads !== null)
  if (!high && !roads) return null
  const area = bothUnits('area', system)
  const k = formatK(input.study.atmosphere.effectiveEarthFactor)
  const bothK = `k\u00a0=\u00a0${k}\u202f/\u202f2.75`
  const need = ordered[0].figures.atHighK?.suppression[0]
  const columns: Column[] = [option]
  const folded = ordered.some((r) => (r.figures.atHighK?.secondTimeAroundKm2 ?? null) !== null)
  if (high) {
    columns.push({ head: 'C/N over 40\u202fdB', unit: area, group: 'At k = 2.75', align: 'right' })
    columns.push({ head: 'C/N, highest', unit: 'dB', group: 'At k = 2.75', align: 'right' })
    if (folded) columns.push({ head: 'Folded', unit: area, group: 'At k = 2.75', align: 'right' })
    if (need)
      columns.push({ head: 'Suppression needed, 90\u202f%', unit: `dB, ${bothK}`, group: `“${need.name}”`, align: 'right', width: 'fill' })
  }
  if (roads) {
    columns.push({ head: 'In sight', unit: bothUnits('range', system), group: 'Roads', align: 'right' })
    columns.push({ head: 'Seen', unit: bothUnits('range', system), group: 'Roads', align: 'right' })
    columns.push({ head: 'Seen, k\u00a0=\u00a02.75', unit: unitOf('range', system), group: 'Roads', align: 'right' })
  }
  const rows = ordered.map(({ ref, figures: f }): Cell[] => {
    const cells: Cell[] = [optionName(ref, hasTilts(input))]
    const km2 = (x: number | null | undefined): Cell => ((x ?? null) === null ? NO_VALUE : dualBare((s) => formatAreaUp(x, s), system))
    const length = (m: number | undefined): Cell => (m === undefined ? NO_VALUE : dualBare((s) => formatRoad(m, s), system))
    if (high) {
      cells.push(km2(f.atHighK?.clutterOverKm2.over40), bare(formatDbUp(f.atHighK?.cnrPeakDb)))
      if (folded) cells.push(km2(f.atHighK?.secondTimeAroundKm2))
      if (need) {
        const own = f.needs.find((n) => n.needId === need.needId)?.suppression
        const at = f.atHighK?.suppression.find((n) => n.needId === need.needId)
        cells.push(`${formatDbUp(own?.p90Db).value} / ${formatDbUp(at?.p90Db).value}`)
      }
    }
    if (roads) {
      const seen = f.roads?.atHighK?.seenM
      cells.push(length(f.roads?.inSightM), length(f.roads?.seenM), seen === undefined ? NO_VALUE : bare(formatRoad(seen, system)))
    }
    return cells
  })
  return {
    kind: 'table',
    id: 'every-high-k',
    dense: true,
    title: high ? `Clutter at k = 2.75${roads ? ', and roads' : ''}` : 'Roads',
    columns,
    rows,
  }
}
