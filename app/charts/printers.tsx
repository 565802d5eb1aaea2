import { type PointerEvent, type Ref, useMemo } from 'react'
import { faceNorth } from '../words/index.ts'
import { DrawingView } from './DrawingView.tsx'
import type { Box, Scale } from './drawing.ts'
import { type HorizonInput, horizonChart } from './horizonChart.ts'
import { type OptionsInput, optionsChart } from './optionsChart.ts'
import { type RingInput, ringChart } from './ringChart.ts'
import { type TerrainInput, terrainChart } from './terrainChart.ts'

export { DrawingView }

/** Vertical line at the pointer; moved by `moveCursor`, never by render. */
function Cursor({ box, cursorRef }: { box: Box; cursorRef: Ref<SVGLineElement> | undefined }) {
  return <line ref={cursorRef} y1={box.top} y2={box.bottom} x1={-9} x2={-9} style={{ stroke: 'var(--accent)' }} strokeWidth={1} />
}
/** Moves a chart's cursor to a value of its horizontal scale; null puts it away. */
export function moveCursor(line: SVGLineElement | null, scale: Scale, value: number | null): void {
  const x = value === null ? '-9' : String(scale.at(value))
  line?.setAttribute('x1', x)
  line?.setAttribute('x2', x)
}
/** Value of the horizontal scale under the pointer; null outside the plot. */
export function valueAtPointer(event: PointerEvent<SVGSVGElement>, scale: Scale): number | null {
  const area = event.currentTarget.getBoundingClientRect()
  const shown = event.currentTarget.viewBox.baseVal.width || area.width
  const value = scale.invert(((event.clientX - area.left) * shown) / area.width)
  return value < Math.min(scale.from, scale.to) || value > Math.max(scale.from, scale.to) ? null : value
}
interface Pointing {
  readonly cursorRef?: Ref<SVGLineElement>
  /** Azimuth (deg) or range (m) under the pointer; null when it leaves. */
  readonly onPoint?: (value: number | null) => void
  /** Same, on click. */
  readonly onPick?: (value: number) => void
}
function usePointing(scale: Scale, { onPoint, onPick }: Pointing) {
  return {
    onPointerMove: onPoint && ((e: PointerEvent<SVGSVGElement>) => onPoint(valueAtPointer(e, scale))),
    onPointerLeave: onPoint && (() => onPoint(null)),
    onClick:
      onPick &&
      ((e: { currentTarget: SVGSVGElement; clientX: number }) => {
        const value = valueAtPointer(e as PointerEvent<SVGSVGElement>, scale)
        if (value !== null) onPick(value)
      }),
  }
}

/** Horizon profile; as `strip` it wraps the upper edge of the map. */
export function HorizonChart({ cursorRef, onPoint, onPick, ...input }: HorizonInput & Pointing) {
  const { rows, width, height, system, size, style, labels, lines, measured, stretch } = input
  const geometry = useMemo(
    () => horizonChart({ rows, width, height, system, size, style, labels, lines, measured, stretch }),
    [rows, width, height, system, size, style, labels, lines, measured, stretch],
  )
  const pointing = usePointing(geometry.azimuth, { onPoint, onPick })
  return (
    <DrawingView drawing={geometry.drawing} className="chart horizon" {...pointing}>
      <Cursor box={geometry.box} cursorRef={cursorRef} />
    </DrawingView>
  )
}
/** Terrain profile along one azimuth. */
export function TerrainChart({
  cursorRef,
  onPoint,
  onPickPlace,
  ...input
}: TerrainInput & Omit<Pointing, 'onPick'> & { onPickPlace?: (x: number, y: number) => void }) {
  const { profile, width, height, system, size, window } = input
  const north = faceNorth()
  // biome-ignore lint/correctness/useExhaustiveDependencies: the title names the azimuth from the north of the face
  const geometry = useMemo(
    () => terrainChart({ profile, width, height, system, size, ...(window ? { window } : {}) }),
    [profile, width, height, system, size, window, north],
  )
  const pointing = usePointing(geometry.range, { onPoint })
  const pick =
    onPickPlace &&
    ((e: { currentTarget: SVGSVGElement; clientX: number; clientY: number }) => {
      const area = e.currentTarget.getBoundingClientRect()
      const [x, y] = [e.clientX - area.left, e.clientY - area.top]
      const { left, right, top, bottom } = geometry.box
      if (x >= left && x <= right && y >= top && y <= bottom) onPickPlace(x, y)
    })
  return (
    <DrawingView drawing={geometry.drawing} className="chart terrain" {...pointing} onClick={pick}>
      <Cursor box={geometry.box} cursorRef={cursorRef} />
    </DrawingView>
  )
}
/** Ground and C/N by range ring. */
export function RingChart({ rings, width, height, system, size }: RingInput) {
  const drawing = useMemo(() => ringChart({ rings, width, height, system, size }), [rings, width, height, system, size])
  return <DrawingView drawing={drawing} className="chart rings" />
}
/** Options as points; a click picks the nearest. */
export function OptionsChart({ onChoose, ...input }: OptionsInput & { onChoose?: (ref: OptionsInput['results'][number]['ref']) => void }) {
  const { results, needId, selected, width, height, system, size } = input
  const geometry = useMemo(
    () => optionsChart({ results, needId, selected, width, height, system, size }),
    [results, needId, selected, width, height, system, size],
  )
  return (
    <DrawingView drawing={geometry.drawing} className="chart options">
      {onChoose &&
        geometry.points.map((p) => (
          // Keyboard users choose in the comparison table beside the plot.
          // biome-ignore lint/a11y/noStaticElementInteractions: see above
          <circle key={p.label} cx={p.x} cy={p.y} r={12} style={{ fill: 'transparent', cursor: 'pointer' }} onClick={() => onChoose(p.ref)}>
            <title>{p.label}</title>
          </circle>
        ))}
    </DrawingView>
  )
}
