import { useCallback, useEffect, useMemo, useRef } from 'react'
import { type LevelPart, type LevelsGeometry, levelsChart, levelsCsv } from '../../../charts/index.ts'
import { DrawingView } from '../../../charts/printers.tsx'
import { optionKey } from '../../../document/index.ts'
import type { MapHub } from '../../../map/index.ts'
import { CHART_WORDS, formatArea, formatDbUp, textOf, type UnitSystem } from '../../../words/index.ts'
import { useResults, useView } from '../../session/index.ts'
import { ChartFrame } from './ChartFrame.tsx'
import { CopyButtons } from './CopyButtons.tsx'

const SIZE = 12

/** Clutter by ring and by octant: mean, 90 and 99 %. */
export function LevelsPane({ hub }: { hub: MapHub }) {
  const option = useView((v) => v.option)
  const units = useView((v) => v.units)
  const azimuthDeg = useView((v) => v.profileAzimuthDeg) ?? 0
  const levels = useResults((r) => (option ? r.byOption.get(optionKey(option))?.figures.clutterLevels : undefined))
  const shown = useRef<LevelsGeometry | null>(null)
  const read = useRef<HTMLParagraphElement>(null)
  const bands = [useRef<SVGRectElement>(null), useRef<SVGRectElement>(null)] as const
  const reading = useRef(-1)
  const mark = useCallback(
    (at: readonly number[]) => {
      const g = shown.current
      for (const side of [0, 1] as const) {
        const part = g?.parts[at[side]]
        const box = g?.boxes[side]
        const rect = bands[side].current
        rect?.setAttribute('x', String(part?.left ?? -9))
        rect?.setAttribute('width', String(part ? part.right - part.left : 0))
        if (box) rect?.setAttribute('y', String(box.top))
        if (box) rect?.setAttribute('height', String(box.bottom - box.top))
      }
      const words = at.flatMap((i) => (g?.parts[i] ? [partWords(g.parts[i], units)] : []))
      if (read.current) read.current.textContent = words.length > 0 ? words.join(' · ') : CHART_WORDS.pointHint
    },
    [units, bands[0], bands[1]],
  )
  const point = (i: number) => {
    const g = shown.current
    reading.current = i
    const part = g?.parts[i]
    const rings = levels?.rings.length ?? 0
    mark(i < rings ? [i, -1] : [-1, i])
    hub.pointer.set(part ? { from: 'profile', at: null, azimuthDeg: part.azimuthDeg ?? azimuthDeg, rangeM: part.rangeM } : null)
  }
  useEffect(
    () =>
      hub.pointer.listen((p) => {
        if (p?.from === 'profile' || !levels) return
        const ring = p?.rangeM == null ? -1 : levels.rings.findIndex((r) => (p.rangeM ?? 0) < r.toM)
        const octant = p?.azimuthDeg == null ? -1 : levels.rings.length + (Math.round(p.azimuthDeg / 45) % 8)
        mark([ring, octant])
      }),
    [hub, levels, mark],
  )
  const onKey = (key: string): boolean => {
    const count = shown.current?.parts.length ?? 0
    if (count === 0 || (key !== 'ArrowLeft' && key !== 'ArrowRight')) return false
    point(Math.min(count - 1, Math.max(0, reading.current + (key === 'ArrowRight' ? 1 : -1))))
    return true
  }
  return (
    <ChartFrame
      name="rings"
      readRef={read}
      onKey={onKey}
      topics={['clutter']}
      copy={
        <CopyButtons name="clutter-levels" drawing={() => shown.current?.drawing ?? null} csv={() => (levels ? levelsCsv(levels) : null)} />
      }
    >
      {(size) =>
        levels ? (
          <Chart
            levels={levels}
            {...size}
            system={units}
            onGeometry={(g) => {
              shown.current = g
            }}
            onPoint={point}
            bands={bands}
          />
        ) : (
          <p className="ink-3">{CHART_WORDS.drawing}</p>
        )
      }
    </ChartFrame>
  )
}

interface ChartProps {
  readonly levels: Parameters<typeof levelsCsv>[0]
  readonly width: number
  readonly height: number
  readonly system: UnitSystem
  readonly onGeometry: (g: LevelsGeometry) => void
  readonly onPoint: (i: number) => void
  readonly bands: readonly [React.Ref<SVGRectElement>, React.Ref<SVGRectElement>]
}
function Chart({ levels, width, height, system, onGeometry, onPoint, bands }: ChartProps) {
  const geometry = useMemo(() => levelsChart({ levels, width, height, system, size: SIZE }), [levels, width, height, system])
  onGeometry(geometry)
  return (
    <DrawingView
      drawing={geometry.drawing}
      className="chart levels"
      onPointerMove={(e) => {
        const x = e.clientX - e.currentTarget.getBoundingClientRect().left
        onPoint(geometry.parts.findIndex((p) => x >= p.left && x < p.right))
      }}
      onPointerLeave={() => onPoint(-1)}
    >
      <rect ref={bands[0]} x={-9} width={0} style={{ fill: 'var(--accent)' }} opacity={0.12} />
      <rect ref={bands[1]} x={-9} width={0} style={{ fill: 'var(--accent)' }} opacity={0.12} />
    </DrawingView>
  )
}

function partWords({ words, level }: LevelPart, units: UnitSystem): string {
  if (level.meanDb === null) return `${words}: ${CHART_WORDS.noClutter.toLowerCase()}`
  const db = (v: number | null): string => textOf(formatDbUp(v))
  return `${words}: ${CHART_WORDS.mean} ${db(level.meanDb)}, 90\u202f% ${db(level.p90Db)}, 99\u202f% ${db(level.p99Db)}, ${CHART_WORDS.known} ${textOf(formatArea(level.knownKm2, units))}`
}
