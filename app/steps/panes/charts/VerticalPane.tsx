import { type PointerEvent, useCallback, useEffect, useMemo, useRef, useState } from 'react'
import { lossCauseAt, type VerticalCut } from '../../../../core/index.ts'
import { type VerticalGeometry, verticalChart, verticalCsv } from '../../../charts/index.ts'
import { DrawingView } from '../../../charts/printers.tsx'
import type { MapHub } from '../../../map/index.ts'
import { Select } from '../../../ui/index.ts'
import {
  CHART_WORDS,
  faceNorth,
  formatDbDown,
  formatHeight,
  formatPd,
  formatPlaceRange,
  LOSS_WORDS,
  textOf,
  type UnitSystem,
} from '../../../words/index.ts'
import { useDoc, useView } from '../../session/index.ts'
import { settledOf } from '../../settled.ts'
import { AzimuthField, ChartFrame, ZoomButtons } from './ChartFrame.tsx'
import { CopyButtons } from './CopyButtons.tsx'
import { useAnswer } from './useAnswer.ts'

const SIZE = 12
/** Samples across and up: one per two pixels of a wide panel. */
const COLUMNS = 400
const ROWS = 220

interface Window {
  readonly fromRangeM: number
  readonly toRangeM: number
  readonly fromHeightM: number | null
  readonly toHeightM: number | null
}
/** Where the reading stands. */
interface Reading {
  readonly column: number
  readonly row: number
}

/** Range-height diagram of one azimuth for the target of a need. */
export function VerticalPane({ hub }: { hub: MapHub }) {
  const option = useView((v) => v.option)
  const azimuthDeg = useView((v) => v.profileAzimuthDeg) ?? 0
  const chosen = useView((v) => v.need)
  const units = useView((v) => v.units)
  const needs = useDoc((d) => d.needs)
  const maxRangeM = useDoc((d) => settledOf(d)?.run.maxRangeM ?? d.radar.instrumentedRangeM ?? 60_000)
  const [need, setNeed] = useState<string | null>(null)
  const [zoom, setZoom] = useState<Window | null>(null)
  const needId = (needs?.find((n) => n.id === (need ?? chosen)) ?? needs?.[0])?.id ?? null
  const whole: Window = { fromRangeM: 0, toRangeM: maxRangeM, fromHeightM: null, toHeightM: null }
  const window = { azimuthDeg, columns: COLUMNS, rows: ROWS, ...(zoom ?? whole) }
  const { answer: cut, none, trouble } = useAnswer('vertical', option && needId ? { option, need: needId, window } : null)
  const shown = useRef<VerticalGeometry | null>(null)
  const reading = useRef<Reading | null>(null)
  const read = useRef<HTMLParagraphElement>(null)
  const cross = useRef<SVGPathElement>(null)
  const show = useCallback(
    (at: Reading | null, tell: boolean) => {
      reading.current = at
      const g = shown.current
      if (!cut || !g) return
      const point = at && g.frame.place(cut.rangeM[at.column], cut.heightM[at.row])
      const { left, right, top, bottom } = g.frame.box
      cross.current?.setAttribute('d', point ? `M${left} ${point[1]}H${right}M${point[0]} ${top}V${bottom}` : '')
      if (read.current) read.current.textContent = at ? readingWords(cut, at, units) : CHART_WORDS.pointHint
      if (tell) hub.pointer.set(at ? { from: 'profile', at: null, azimuthDeg: cut.azimuthDeg, rangeM: cut.rangeM[at.column] } : null)
    },
    [cut, hub, units],
  )
  useEffect(() => {
    if (!cut) return
    show(null, false)
    return hub.pointer.listen((p) => {
      if (p?.from === 'profile') return
      const near = p && p.azimuthDeg !== null && p.rangeM !== null && Math.abs(((p.azimuthDeg - cut.azimuthDeg + 540) % 360) - 180) < 2
      if (!near || p.rangeM === null) return show(null, false)
      const step = cut.rangeM[1] - cut.rangeM[0]
      const column = Math.round((p.rangeM - cut.rangeM[0]) / step)
      if (column < 0 || column >= cut.rangeM.length) return show(null, false)
      const floor = cut.floorM[column]
      const row = Math.max(
        0,
        cut.heightM.findIndex((h) => h >= floor),
      )
      show({ column, row }, false)
    })
  }, [cut, hub, show])
  const zoomBy = (factor: number, at: Reading | null = reading.current) => {
    if (!cut) return
    const [r0, r1] = [window.fromRangeM, window.toRangeM]
    const [h0, h1] = [cut.heightM[0], cut.heightM[cut.heightM.length - 1]]
    const next: Window = {
      ...part(r0, r1, at ? cut.rangeM[at.column] : r0, factor, 0, maxRangeM),
      ...rise(h0, h1, at ? cut.heightM[at.row] : h0, factor),
    }
    setZoom(next.toRangeM - next.fromRangeM >= maxRangeM * 0.999 ? null : next)
  }
  const onKey = (key: string, shift: boolean): boolean => {
    if (!cut) return false
    const step = shift ? 10 : 1
    const moves: Record<string, readonly [number, number]> = {
      ArrowLeft: [-step, 0],
      ArrowRight: [step, 0],
      ArrowUp: [0, step],
      ArrowDown: [0, -step],
    }
    const move = moves[key]
    if (move) {
      const { column, row } = reading.current ?? { column: cut.rangeM.length >> 1, row: cut.heightM.length >> 1 }
      const inside = (v: number, count: number) => Math.min(count - 1, Math.max(0, v))
      show({ column: inside(column + move[0], cut.rangeM.length), row: inside(row + move[1], cut.heightM.length) }, true)
      return true
    }
    if (key === '+' || key === '=') zoomBy(1 / 1.5)
    else if (key === '-') zoomBy(1.5)
    else if (key === '0') setZoom(null)
    else return false
    return true
  }
  const at = (event: PointerEvent<SVGSVGElement> | React.WheelEvent<SVGSVGElement>): Reading | null => {
    const area = event.currentTarget.getBoundingClientRect()
    return shown.current?.sampleAt(event.clientX - area.left, event.clientY - area.top) ?? null
  }
  return (
    <ChartFrame
      name="vertical"
      readRef={read}
      onKey={onKey}
      trouble={trouble}
      topics={['usable', 'diagram']}
      empty={needId === null || none ? CHART_WORDS.noNeed : null}
      tools={
        <>
          <AzimuthField />
          {needs && needs.length > 1 && needId ? (
            <Select
              label={CHART_WORDS.need}
              hideLabel
              ariaLabel={CHART_WORDS.need}
              value={needId}
              choices={needs.map((n) => ({ id: n.id, words: n.name ?? n.id }))}
              onChange={setNeed}
            />
          ) : null}
          <ZoomButtons onZoom={zoomBy} onWhole={() => setZoom(null)} zoomed={zoom !== null} />
        </>
      }
      copy={
        <CopyButtons
          name={`range-height-${Math.round(azimuthDeg)}`}
          drawing={() => shown.current?.drawing ?? null}
          csv={() => cut && verticalCsv(cut)}
        />
      }
    >
      {(size) =>
        cut ? (
          <Diagram
            cut={cut}
            {...size}
            system={units}
            onGeometry={(g) => {
              shown.current = g
            }}
            crossRef={cross}
            onMove={(event) => show(at(event), true)}
            onLeave={() => show(null, true)}
            onWheel={(event) => zoomBy(event.deltaY > 0 ? 1.25 : 0.8, at(event))}
          />
        ) : (
          <p className="ink-3">{CHART_WORDS.drawing}</p>
        )
      }
    </ChartFrame>
  )
}

interface DiagramProps {
  readonly cut: VerticalCut
  readonly width: number
  readonly height: number
  readonly system: UnitSystem
  readonly onGeometry: (g: VerticalGeometry) => void
  readonly crossRef: React.Ref<SVGPathElement>
  readonly onMove: (event: PointerEvent<SVGSVGElement>) => void
  readonly onLeave: () => void
  readonly onWheel: (event: React.WheelEvent<SVGSVGElement>) => void
}
function Diagram({ cut, width, height, system, onGeometry, crossRef, onMove, onLeave, onWheel }: DiagramProps) {
  const north = faceNorth()
  // biome-ignore lint/correctness/useExhaustiveDependencies: the caption names the azimuth from the north of the face
  const geometry = useMemo(() => verticalChart({ cut, width, height, system, size: SIZE }), [cut, width, height, system, north])
  onGeometry(geometry)
  return (
    <DrawingView drawing={geometry.drawing} className="chart vertical" onPointerMove={onMove} onPointerLeave={onLeave} onWheel={onWheel}>
      <path ref={crossRef} d="" style={{ stroke: 'var(--accent)', fill: 'none' }} strokeWidth={1} />
    </DrawingView>
  )
}

/** A stretch of range zoomed about a place, kept inside its bounds. */
function part(from: number, to: number, about: number, factor: number, low: number, high: number) {
  const length = Math.min(high - low, (to - from) * factor)
  const share = (about - from) / (to - from)
  const start = Math.min(high - length, Math.max(low, about - share * length))
  return { fromRangeM: start, toRangeM: start + length }
}
function rise(from: number, to: number, about: number, factor: number) {
  const length = Math.max(50, (to - from) * factor)
  const share = (about - from) / (to - from)
  return { fromHeightM: about - share * length, toHeightM: about + (1 - share) * length }
}

function readingWords(cut: VerticalCut, { column, row }: Reading, units: UnitSystem): string {
  const n = column * cut.heightM.length + row
  const heightM = cut.heightM[row]
  const place = `${textOf(formatPlaceRange(cut.rangeM[column], units))} · ${textOf(formatHeight(heightM, units))} MSL`
  const cause = lossCauseAt(cut.cause[n])
  if (cause === null && Number.isNaN(cut.pdAt[n])) return `${place} · ${CHART_WORDS.inGround}`
  const hidden = heightM < cut.floorM[column]
  const parts = [place, cause === null ? CHART_WORDS.usable : LOSS_WORDS[cause]]
  if (!hidden && !Number.isNaN(cut.pdAt[n])) parts.push(`Pd ${textOf(formatPd(cut.pdAt[n]))}`)
  if (!Number.isNaN(cut.marginDb[n])) {
    parts.push(
      `${CHART_WORDS.signal} ${textOf(formatDbDown(cut.snrDb[n]))}`,
      `${CHART_WORDS.margin} ${textOf(formatDbDown(cut.marginDb[n]))}`,
    )
    if (hidden) parts.push(CHART_WORDS.diffracted)
  }
  return parts.join(' · ')
}
