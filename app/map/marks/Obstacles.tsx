import { memo, useMemo } from 'react'
import { type LonLat, type Obstacle, pixelAtLonLat, type View } from '../../../core/index.ts'
import { type MarkLabels, tallness } from './markLabels.ts'
import { offsetFrom } from './worldPaths.ts'

/** Obstacles are named once the view is near enough for the names not to crowd, world m per px. */
const NAMES_BELOW = 60
/** Two obstacles nearer than this are one stroke, px; of very many fewer are drawn, so that the ground stays in sight. */
const APART_PX = 3
const APART_OF_MANY_PX = 14
const MANY = 300

/** Obstacles that are points, however many, as two paths; those that find room with their names. */
export function Obstacles(p: { view: View; anchor: LonLat; obstacles: readonly Obstacle[]; labels: MarkLabels['obstacles'] }) {
  const { view, anchor, obstacles } = p
  const [x, y] = pixelAtLonLat(view, anchor)
  return (
    <g className="obstacles" transform={`translate(${x.toFixed(1)} ${y.toFixed(1)})`}>
      <Strokes anchor={anchor} obstacles={obstacles} worldPerPx={view.worldPerPx} />
      {view.worldPerPx < NAMES_BELOW
        ? p.labels.map((l) => {
            const [left, top] = [x + l.x, y + l.y]
            if (left < -200 || top < -20 || left > view.width + 10 || top > view.height + 20) return null
            return (
              <text key={l.n} x={l.x + 5} y={l.y - 4}>
                {obstacles[l.n]?.name}
              </text>
            )
          })
        : null}
    </g>
  )
}

const Strokes = memo(function Strokes({
  anchor,
  obstacles,
  worldPerPx,
}: {
  anchor: LonLat
  obstacles: readonly Obstacle[]
  worldPerPx: number
}) {
  const [mast, foot] = useMemo(() => strokesOf(anchor, obstacles, worldPerPx), [anchor, obstacles, worldPerPx])
  return (
    <>
      <path className="case" d={mast} />
      <path d={mast + foot} />
    </>
  )
})

/** Masts and feet of the points at a scale, px from the anchor; of those on the same few pixels the highest alone. */
export function strokesOf(anchor: LonLat, obstacles: readonly Obstacle[], worldPerPx: number): readonly [mast: string, foot: string] {
  const points = obstacles.filter((o) => o.path.length === 1)
  const apartPx = points.length > MANY ? APART_OF_MANY_PX : APART_PX
  const drawn = new Set<string>()
  let [mast, foot] = ['', '']
  for (const { path } of points.sort((a, b) => tallness(b) - tallness(a))) {
    const at = path[0]!
    const [east, south] = offsetFrom(anchor, at)
    const [x, y] = [east / worldPerPx, south / worldPerPx]
    const cell = `${Math.round(x / apartPx)} ${Math.round(y / apartPx)}`
    if (drawn.has(cell)) continue
    drawn.add(cell)
    mast += `M${x.toFixed(1)} ${y.toFixed(1)}v-10`
    foot += `M${(x - 2.5).toFixed(1)} ${y.toFixed(1)}h5`
  }
  return [mast, foot]
}
