import { type RefObject, useMemo } from 'react'
import { type LonLat, pixelAtLonLat, type View } from '../../../core/index.ts'
import type { MapPaneProps, Trial } from '../types.ts'
import { Candidates } from './Candidates.tsx'
import { ObstacleLines, Roads, SeenRoads } from './Ground.tsx'
import { type MarkLabels, markLabels } from './markLabels.ts'
import { Obstacles } from './Obstacles.tsx'
import { Rejected } from './Rejected.tsx'
import { type Rect, RingLabels, Rings, ringLabels, ringsOf } from './Rings.tsx'
import { rayPath, sectorPath } from './worldPaths.ts'

const NO_LABELS: MarkLabels = { candidates: new Map(), obstacles: [] }
const wide = { vectorEffect: 'non-scaling-stroke' } as const

/** Group transform that turns world metres from an anchor into pixels of the view. */
const anchored = (view: View, anchor: LonLat): string => {
  const [x, y] = pixelAtLonLat(view, anchor)
  return `translate(${x.toFixed(3)} ${y.toFixed(3)}) scale(${1 / view.worldPerPx})`
}

export interface MarksProps
  extends Pick<
    MapPaneProps,
    | 'candidates'
    | 'rejected'
    | 'needs'
    | 'obstacles'
    | 'roads'
    | 'roadLines'
    | 'maxRangeM'
    | 'show'
    | 'units'
    | 'cell'
    | 'profileAzimuthDeg'
  > {
  readonly view: View
  readonly trial: Trial | null
  /** Cards lying over the map, px: labels keep clear of them. */
  readonly cards: readonly Rect[]
  /** Line and dot of the other charts' pointer; moved by the map, never by render. */
  readonly cursorRef: RefObject<SVGGElement | null>
}

/** The uppermost sheet: everything that is a line, a point or a letter. */
export function Marks(p: MarksProps) {
  const { view, candidates, show, trial, maxRangeM, units } = p
  const chosen = candidates.find((c) => c.id === show.option?.candidate)
  const moved = trial && chosen && trial.candidate === chosen.id ? trial : null
  const lon = moved?.lon ?? chosen?.lon
  const lat = moved?.lat ?? chosen?.lat
  const site = useMemo(() => (lon === undefined || lat === undefined ? null : { lon, lat }), [lon, lat])
  const need = p.needs.find((n) => n.id === show.need) ?? p.needs[0]
  const ground = useMemo(() => p.roads[0]?.path[0] ?? p.obstacles[0]?.path[0] ?? null, [p.roads, p.obstacles])
  const needD = useMemo(() => (site && need?.ring ? sectorPath(site, need.fromRangeM, need.toRangeM, need.sectorDeg) : ''), [site, need])
  const rayD = useMemo(
    () => (site && p.profileAzimuthDeg !== null ? rayPath(site, p.profileAzimuthDeg, maxRangeM) : ''),
    [site, p.profileAzimuthDeg, maxRangeM],
  )
  const anchor = useMemo(() => p.obstacles[0]?.path[0] ?? candidates[0] ?? null, [p.obstacles, candidates])
  const selected = show.option?.candidate ?? null
  const letters = useMemo(
    () => (anchor ? markLabels(anchor, view.worldPerPx, candidates, selected, p.obstacles) : NO_LABELS),
    [anchor, view.worldPerPx, candidates, selected, p.obstacles],
  )
  const labels = useMemo(() => {
    if (!site) return []
    const taken = [
      ...p.cards,
      ...candidates.map((c) => {
        const [x, y] = pixelAtLonLat(view, c)
        return { left: x - 12, right: x + 18 + 8 * c.id.length, top: y - 12, bottom: y + 12 }
      }),
    ]
    return ringLabels(view, site, ringsOf(maxRangeM, units), taken)
  }, [view, site, candidates, p.cards, maxRangeM, units])
  return (
    // biome-ignore lint/a11y/useSemanticElements: a group of marks inside a picture
    <svg className="map-sheet marks" width={view.width} height={view.height} aria-label="Marks" role="group">
      {ground && (
        <g transform={anchored(view, ground)}>
          <Roads anchor={ground} roads={p.roads} />
          {p.roadLines && <SeenRoads anchor={ground} lines={p.roadLines} />}
          <ObstacleLines anchor={ground} obstacles={p.obstacles} />
        </g>
      )}
      {site && (
        <g transform={anchored(view, site)}>
          <Rings site={site} maxRangeM={maxRangeM} units={units} />
          {needD && <path className="need" d={needD} {...wide} />}
          {rayD && <path className="ray" d={rayD} {...wide} />}
        </g>
      )}
      {anchor && <Obstacles view={view} anchor={anchor} obstacles={p.obstacles} labels={letters.obstacles} />}
      <RingLabels labels={labels} units={units} />
      {p.cell && <CellMark view={view} at={p.cell} />}
      <g ref={p.cursorRef} className="cursor" visibility="hidden">
        <path className="line" />
        <circle r={4} />
      </g>
      <Rejected view={view} rejected={p.rejected} />
      <Candidates view={view} candidates={candidates} sides={letters.candidates} selected={selected} trial={trial} />
    </svg>
  )
}

function CellMark({ view, at }: { view: View; at: LonLat }) {
  const [x, y] = pixelAtLonLat(view, at)
  return (
    <g className="cell" transform={`translate(${x.toFixed(1)} ${y.toFixed(1)})`}>
      <rect className="case" x={-5} y={-5} width={10} height={10} />
      <rect x={-5} y={-5} width={10} height={10} />
    </g>
  )
}
