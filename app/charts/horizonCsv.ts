import { csvOf } from './csv.ts'
import type { HorizonInput } from './horizonChart.ts'

/** The horizon as a table: one line per azimuth of the option's own rows, the other horizons at the nearest azimuth beside it. */
export function horizonCsv({ rows, lines = [], measured }: Pick<HorizonInput, 'rows' | 'lines' | 'measured'>): string {
  const nearest = (azimuths: readonly number[], azimuthDeg: number): number =>
    azimuths.reduce((best, a, i) => (turn(a, azimuthDeg) < turn(azimuths[best], azimuthDeg) ? i : best), 0)
  const points = measured?.points ?? []
  const known = (v: number): number | null => (Number.isFinite(v) ? v : null)
  return csvOf([
    { head: 'azimuth_deg', values: rows.map((r) => r.azimuthDeg), decimals: 3 },
    { head: 'elevation_deg', values: rows.map((r) => known(r.elevationDeg)), decimals: 4 },
    { head: 'range_m', values: rows.map((r) => known(r.rangeM)), decimals: 0 },
    { head: 'height_m_msl', values: rows.map((r) => known(r.heightM)), decimals: 1 },
    { head: 'lon', values: rows.map((r) => known(r.lon)), decimals: 6 },
    { head: 'lat', values: rows.map((r) => known(r.lat)), decimals: 6 },
    { head: 'obstacle', values: rows.map((r) => r.obstacle) },
    ...lines.map((l) => ({
      head: `${l.cover ? 'surface' : 'bare_ground'}_k_${l.k.toFixed(2)}_deg`,
      values: rows.map((r) => known(l.elevationDeg[nearest(l.azimuthsDeg, r.azimuthDeg)])),
      decimals: 4,
    })),
    ...(points.length === 0
      ? []
      : [
          {
            head: 'measured_deg',
            values: rows.map((r) => {
              const p =
                points[
                  nearest(
                    points.map((q) => q.azimuthDeg),
                    r.azimuthDeg,
                  )
                ]
              return turn(p.azimuthDeg, r.azimuthDeg) <= 0.5 ? p.elevationDeg : null
            }),
            decimals: 4,
          },
        ]),
  ])
}
const turn = (a: number, b: number): number => Math.abs(((a - b + 540) % 360) - 180)
