import type { ClutterLevels } from '../../../core/index.ts'
import { csvOf } from '../csv.ts'
import { OCTANTS } from './levelsChart.ts'

/** Levels of C/N of the whole, of each ring, octant, and ring by octant, as a table. */
export function levelsCsv({ whole, rings, octants, sectors }: ClutterLevels): string {
  const rows = [
    { from: null, to: null, octant: '', ...whole },
    ...rings.map((r) => ({ from: r.fromM, to: r.toM, octant: '', ...r })),
    ...octants.map((o, n) => ({ from: null, to: null, octant: OCTANTS[n] as string, ...o })),
    ...sectors.map((s, n) => ({
      from: rings[Math.floor(n / 8)].fromM,
      to: rings[Math.floor(n / 8)].toM,
      octant: OCTANTS[n % 8] as string,
      ...s,
    })),
  ]
  return csvOf([
    { head: 'from_m', values: rows.map((r) => r.from), decimals: 0 },
    { head: 'to_m', values: rows.map((r) => r.to), decimals: 0 },
    { head: 'octant', values: rows.map((r) => r.octant) },
    { head: 'known_km2', values: rows.map((r) => r.knownKm2), decimals: 2 },
    { head: 'over_40_db_pct', values: rows.map((r) => r.over40Pct), decimals: 2 },
    { head: 'clutter_to_noise_mean_db', values: rows.map((r) => r.meanDb), decimals: 2 },
    { head: 'clutter_to_noise_90_db', values: rows.map((r) => r.p90Db), decimals: 2 },
    { head: 'clutter_to_noise_99_db', values: rows.map((r) => r.p99Db), decimals: 2 },
  ])
}
