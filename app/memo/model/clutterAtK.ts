import type { OptionResult } from '../../../core/index.ts'
import { formatAreaUp, formatDbUp, formatK, NO_VALUE } from '../../words/index.ts'
import { dual, value } from './cells.ts'
import type { Cell, MemoInput, TableBlock } from './types.ts'

/** Clutter at the study's k and at k = 2.75 side by side; null where only one is worked out. */
export function clutterAtKTable(input: MemoInput, r: OptionResult): TableBlock | null {
  const f = r.figures
  const high = f.atHighK
  if (high === null) return null
  const { system } = input
  const area = (km2: number | null, key: string): Cell =>
    km2 === null ? NO_VALUE : dual((s) => formatAreaUp(km2, s), system, { explain: key })
  const db = (level: number | null, key: string): Cell => (level === null ? NO_VALUE : value(formatDbUp(level), { explain: key }))
  const levels = [
    [0, f.clutterOverKm2.over0, high.clutterOverKm2.over0],
    [20, f.clutterOverKm2.over20, high.clutterOverKm2.over20],
    [40, f.clutterOverKm2.over40, high.clutterOverKm2.over40],
    [60, f.clutterOverKm2.over60, high.clutterOverKm2.over60],
  ] as const
  const rows: Cell[][] = levels.map(([level, own, at]) => [
    `C/N over ${level}\u202fdB`,
    area(own, `clutter_over_${level}_km2`),
    area(at, `clutter_over_${level}_k2_75_km2`),
  ])
  rows.push(['C/N, highest', db(f.cnrPeakDb, 'clutter_to_noise_peak_db'), db(high.cnrPeakDb, 'clutter_to_noise_peak_k2_75_db')])
  rows.push([
    'Folded from earlier pulses',
    area(f.secondTimeAround.km2, 'second_time_around_km2'),
    area(high.secondTimeAroundKm2, 'second_time_around_k2_75_km2'),
  ])
  for (const s of high.suppression) {
    const own = f.needs.find((n) => n.needId === s.needId)?.suppression
    const key = `need_${s.needId}_suppression_needed_90`
    rows.push([`${s.name}: suppression needed, 90\u202f%`, db(own?.p90Db ?? null, `${key}_db`), db(s.p90Db, `${key}_k2_75_db`)])
  }
  return {
    kind: 'table',
    id: 'clutter-at-k',
    title: 'Clutter at both k',
    dense: true,
    columns: [
      { head: 'Figure', width: 'fill' },
      { head: `k = ${formatK(input.study.atmosphere.effectiveEarthFactor)}`, align: 'right' },
      { head: 'k = 2.75', align: 'right' },
    ],
    rows,
  }
}
