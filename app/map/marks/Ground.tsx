import { memo, useMemo } from 'react'
import type { LonLat, Obstacle, Road, RoadLines } from '../../../core/index.ts'
import { linesPath } from './worldPaths.ts'

const MAJOR = /^(motorway|trunk|primary)/
const RAIL = /^(rail|light_rail|narrow_gauge|tram|subway)$/
const wide = { vectorEffect: 'non-scaling-stroke' } as const

/** Roads and railways as three paths in world metres from an anchor; the parent group scales them. */
export const Roads = memo(function Roads({ anchor, roads }: { anchor: LonLat; roads: readonly Road[] }) {
  const paths = useMemo(() => {
    const of = (keep: (r: Road) => boolean) => linesPath(anchor, roads.filter(keep).map((r) => r.path)) // biome-ignore format: one line
    return {
      rail: of((r) => RAIL.test(r.highway)),
      major: of((r) => MAJOR.test(r.highway)),
      minor: of((r) => !MAJOR.test(r.highway) && !RAIL.test(r.highway)),
    }
  }, [anchor, roads])
  return (
    <g className="roads">
      <path className="minor" d={paths.minor} {...wide} />
      <path className="case" d={paths.major} {...wide} />
      <path className="major" d={paths.major} {...wide} />
      <path className="rail" d={paths.rail} {...wide} />
    </g>
  )
})
/** Roads whose vehicles are seen, over the others, in world metres from an anchor. */
export const SeenRoads = memo(function SeenRoads({ anchor, lines }: { anchor: LonLat; lines: RoadLines }) {
  const d = useMemo(() => linesPath(anchor, lines.seen), [anchor, lines])
  return (
    <g className="roads">
      <path className="seen-case" d={d} {...wide} />
      <path className="seen" d={d} {...wide} />
    </g>
  )
})
/** Obstacles that are lines, in world metres from an anchor. */
export const ObstacleLines = memo(function ObstacleLines({ anchor, obstacles }: { anchor: LonLat; obstacles: readonly Obstacle[] }) {
  const d = useMemo(() => linesPath(anchor, obstacles.filter((o) => o.path.length > 1).map((o) => o.path)), [anchor, obstacles]) // biome-ignore format: one line
  return <path className="obstacle-line" d={d} {...wide} />
})
