import { pixelAtLonLat, type View } from '../../../core/index.ts'
import type { MapRejected } from '../types.ts'

/** Rejected candidates: a faint crossed ring with its letter; nothing to take hold of. */
export function Rejected({ view, rejected }: { view: View; rejected: readonly MapRejected[] }) {
  return (
    <g className="rejected-marks">
      {rejected.map((c) => {
        const [x, y] = pixelAtLonLat(view, c)
        if (x < -80 || y < -40 || x > view.width + 40 || y > view.height + 40) return null
        return (
          <g key={c.id} transform={`translate(${x.toFixed(1)} ${y.toFixed(1)})`}>
            <title>{c.name}</title>
            <path className="case" d={REJECTED_MARK} />
            <path d={REJECTED_MARK} />
            <text x={11} y={4}>
              {c.id}
            </text>
          </g>
        )
      })}
    </g>
  )
}
/** Ring and stroke about the place, px. */
export const REJECTED_MARK = 'M-6 0a6 6 0 1 0 12 0a6 6 0 1 0 -12 0M-4.2 4.2L4.2 -4.2'
