import { groundPerPx, type View } from '../../../core/index.ts'
import { MAP_WORDS, scaleBar, type UnitSystem } from '../../words/index.ts'

/** Scale bar of the view's middle, and true north (always up). */
export function ScaleBar({ view, units }: { view: View; units: UnitSystem }) {
  const bar = scaleBar(groundPerPx(view), 96, units)
  return (
    <div className="scale" role="img" aria-label={`Scale: ${bar.text}; true north is up`}>
      <svg width={14} height={26} viewBox="0 0 14 26" aria-hidden>
        <path d="M7 25V13M7 12L4 18M7 12L10 18" />
        <text x={7} y={9} textAnchor="middle">
          {MAP_WORDS.north}
        </text>
      </svg>
      <span className="bar" style={{ width: bar.px }}>
        {bar.text}
      </span>
    </div>
  )
}
