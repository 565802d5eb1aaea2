import { lossCauseAt, type VerticalCut } from '../../../core/index.ts'
import { csvOf } from '../csv.ts'

/** Most rows of a diagram as a table: a coarser grid is taken from a finer one. */
const MOST_COLUMNS = 120
const MOST_ROWS = 80

/** The diagram as a table: one line per range and height. */
export function verticalCsv(cut: VerticalCut): string {
  const [columns, rows] = [cut.rangeM.length, cut.heightM.length]
  const [across, up] = [Math.max(1, Math.ceil(columns / MOST_COLUMNS)), Math.max(1, Math.ceil(rows / MOST_ROWS))]
  const at: { i: number; k: number; n: number }[] = []
  for (let i = 0; i < columns; i += across) for (let k = 0; k < rows; k += up) at.push({ i, k, n: i * rows + k })
  const known = (v: number): number | null => (Number.isNaN(v) ? null : v)
  return csvOf([
    { head: 'azimuth_deg', values: at.map(() => cut.azimuthDeg), decimals: 2 },
    { head: 'range_m', values: at.map((p) => cut.rangeM[p.i]), decimals: 0 },
    { head: 'height_m_msl', values: at.map((p) => cut.heightM[p.k]), decimals: 1 },
    { head: 'coverage_floor_m_msl', values: at.map((p) => known(cut.floorM[p.i])), decimals: 1 },
    { head: 'signal_to_noise_db', values: at.map((p) => known(cut.snrDb[p.n])), decimals: 2 },
    { head: 'signal_margin_db', values: at.map((p) => known(cut.marginDb[p.n])), decimals: 2 },
    { head: 'probability_of_detection', values: at.map((p) => known(cut.pdAt[p.n])), decimals: 3 },
    {
      head: 'outcome',
      values: at.map((p) =>
        Number.isNaN(cut.pdAt[p.n]) && cut.cause[p.n] === 0 ? 'inside the ground' : (lossCauseAt(cut.cause[p.n]) ?? 'usable'),
      ),
    },
  ])
}
