import { pixelAtLonLat, type View } from '../../../core/index.ts'
import type { MapCandidate, Trial } from '../types.ts'
import type { MarkLabels } from './markLabels.ts'

/** A candidate: a ring with a dot and its letter. The one on show in accent, above the others. Dragging and keys are the map's business (`data-candidate`). */
export function Candidates({
  view,
  candidates,
  sides,
  selected,
  trial,
}: {
  view: View
  candidates: readonly MapCandidate[]
  /** Where each letter stands; none where it finds no room. */
  sides: MarkLabels['candidates']
  selected: string | null
  trial: Trial | null
}) {
  const ordered = [...candidates].sort((a, b) => Number(a.id === selected) - Number(b.id === selected))
  return (
    <g className="candidates">
      {ordered.map((c) => {
        const at = trial && trial.candidate === c.id && trial.moving === 'place' ? trial : c
        const [x, y] = pixelAtLonLat(view, at)
        if (x < -80 || y < -40 || x > view.width + 40 || y > view.height + 40) return null
        return (
          // biome-ignore lint/a11y/useSemanticElements: an SVG mark cannot be a button element
          <g
            key={c.id}
            className={`candidate${c.id === selected ? ' selected' : ''}`}
            transform={`translate(${x.toFixed(2)} ${y.toFixed(2)})`}
            data-candidate={c.id}
            role="button"
            tabIndex={0}
            aria-pressed={c.id === selected}
            aria-label={`Candidate ${c.id}${c.name ? `, ${c.name}` : ''}`}
          >
            <circle className="touch" r={18} />
            <circle className="focus-ring" r={14} />
            <circle className="halo" r={10.5} />
            <circle className="ring" r={8} />
            <circle className="dot" r={2.3} />
            {sides.has(c.id) ? (
              <text x={sides.get(c.id) === 'left' ? -14 : 14} y={5} textAnchor={sides.get(c.id) === 'left' ? 'end' : 'start'}>
                {c.id}
              </text>
            ) : null}
          </g>
        )
      })}
    </g>
  )
}
