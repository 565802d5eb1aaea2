import { M_PER_NM, type NeedFigure, type OptionResult } from '../../../core/index.ts'
import { inSightPctOf } from '../../charts/index.ts'
import {
  formatAreaUp,
  formatDbDown,
  formatDbUp,
  formatFloor,
  formatLossPct,
  formatMargin,
  formatMetPct,
  formatSetting,
  NO_VALUE,
  type Quantity,
  textOf,
  toFace,
  type UnitSystem,
  unitOf,
} from '../../words/index.ts'
import { FLOOR_RANGE_M, floorNear, needOf } from './figuresOf.ts'

export interface Column {
  readonly id: string
  /** Columns in a row with the same group stand under one heading. */
  readonly group: string
  head(results: readonly OptionResult[], system: UnitSystem): string
  value(result: OptionResult, need: string | null, system: UnitSystem): Quantity
  /** Key of the figure in the summary, for its explanation; null where there is none. */
  key(result: OptionResult, need: string | null): string | null
  /** The same for every need: written once an option. */
  readonly ofOption?: boolean
}

/** Share inside the error band of the floor, %; null where the need is no area. */
export const marginalPctOf = (n: NeedFigure): number | null => (n.areaKm2 > 0 ? (100 * n.marginalKm2) / n.areaKm2 : null)

const NONE: Quantity = { value: NO_VALUE, unit: '' }
const ofNeed = (id: string, group: string, head: string, tail: string, value: (n: NeedFigure, system: UnitSystem) => Quantity): Column => ({
  id,
  group,
  head: () => head,
  value: (r, need, system) => {
    const n = needOf(r, need)
    return n ? value(n, system) : NONE
  },
  key: (r, need) => {
    const n = needOf(r, need)
    return n ? `need_${n.needId}_${tail}` : null
  },
})

const SHARE = 'Share of the need'
const MARGIN = 'Worst margin'
const SUPPRESSION = 'Suppression'
const CLUTTER_OVER: Column = {
  id: 'over40',
  group: 'C/N',
  head: () => 'over 40 dB',
  value: (r, _need, system) => formatAreaUp(r.figures.clutterOverKm2.over40, system),
  key: () => 'clutter_over_40_km2',
  ofOption: true,
}
/** A stated range without decimals it does not have: `20 NM`, `37 km`. */
const roundRange = (m: number, system: UnitSystem): string => textOf(formatSetting(toFace('range', m, system), unitOf('range', system), 1))
const FLOOR: Column = {
  id: 'floor',
  group: 'Floor, worst',
  head: (results, system) => `at ${roundRange((results[0] && floorNear(results[0])?.rangeM) ?? FLOOR_RANGE_M, system)}`,
  value: (r, _need, system) => formatFloor(floorNear(r)?.worstM, system),
  key: (r) => {
    const floor = floorNear(r)
    return floor ? `floor_${Math.round(floor.rangeM / M_PER_NM)}nm_worst_m` : null
  },
  ofOption: true,
}
/** The three words stand together, then what lies inside the error band, the verdict and both margins. */
export const NEED_COLUMNS: readonly Column[] = [
  ofNeed('inSight', SHARE, 'in sight', 'in_sight_pct', (n) => formatMetPct(n.inSightPct)),
  ofNeed('detectable', SHARE, 'detectable', 'detectable_pct', (n) => formatMetPct(n.detectablePct)),
  ofNeed('usable', SHARE, 'usable', 'usable_pct', (n) => formatMetPct(n.usablePct)),
  ofNeed('marginal', SHARE, 'marginal', 'marginal_km2', (n) => formatLossPct(marginalPctOf(n))),
  ofNeed('margin', MARGIN, 'height', 'worst_margin_m', (n, system) => formatMargin(n.worstMarginM, system)),
  ofNeed('signal', MARGIN, 'signal', 'worst_signal_margin_db', (n) => formatDbDown(n.signal.worstDb)),
  ofNeed('suppression', SUPPRESSION, 'needed, 90 %', 'suppression_needed_90_db', (n) => formatDbUp(n.suppression.p90Db)),
  ofNeed('short', SUPPRESSION, 'short', 'suppression_short_km2', (n, system) =>
    n.measure === 'area' ? formatAreaUp(n.suppression.shortKm2, system) : NONE,
  ),
  CLUTTER_OVER,
  FLOOR,
]
/** Where no need is assessed only ground and clutter are counted. */
export const GROUND_COLUMNS: readonly Column[] = [
  {
    id: 'inSight',
    group: 'Ground',
    head: () => 'in sight',
    value: (r) => formatMetPct(inSightPctOf(r, null)),
    key: () => 'ground_in_sight_km2',
  },
  CLUTTER_OVER,
  FLOOR,
]
/** Headings over columns that belong together, with how many columns each spans. */
export function columnGroups(columns: readonly Column[]): { readonly group: string; readonly span: number }[] {
  const out: { group: string; span: number }[] = []
  for (const { group } of columns) {
    const last = out.at(-1)
    if (last?.group === group) last.span++
    else out.push({ group, span: 1 })
  }
  return out
}
/** The unit of a column, from its first number; nothing while there is none. */
export function unitUnder(column: Column, results: readonly OptionResult[], needIds: readonly string[], system: UnitSystem): string {
  for (const r of results)
    for (const need of needIds.length > 0 ? needIds : [null]) {
      const { unit } = column.value(r, need, system)
      if (unit !== '') return unit
    }
  return ''
}
