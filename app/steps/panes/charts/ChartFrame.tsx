import { type KeyboardEvent, type ReactNode, type Ref, useRef } from 'react'
import { Button, Caution, Notice, NumberField, Select } from '../../../ui/index.ts'
import { type CautionTopic, CHART_WORDS, cautionsFor, DEG, formatMast, textOf } from '../../../words/index.ts'
import { useSession, useView } from '../../session/index.ts'
import { useBoxSize } from './useBoxSize.ts'

export type ChartName = keyof typeof CHART_WORDS.names
const NAMES = Object.entries(CHART_WORDS.names).map(([id, words]) => ({ id: id as ChartName, words }))

export interface ChartFrameProps {
  readonly name: ChartName
  /** Between the chooser and the copy buttons: azimuth, need, zoom. */
  readonly tools?: ReactNode
  readonly copy: ReactNode
  /** The chart at the size there is for it. */
  readonly children: (size: { width: number; height: number }) => ReactNode
  /** Line under the chart, written by the pointer. */
  readonly readRef?: Ref<HTMLParagraphElement>
  readonly onKey?: (key: string, shift: boolean) => boolean
  readonly trouble?: string
  readonly topics: readonly CautionTopic[]
  /** Stands in place of the chart. */
  readonly empty?: string | null
}

/** A chart over the lower half of the map: which one, its tools, the drawing, what the pointer or the keys read, and its cautions. */
export function ChartFrame({ name, tools, copy, children, readRef, onKey, trouble, topics, empty }: ChartFrameProps) {
  const { view } = useSession()
  const option = useView((v) => v.option)
  const box = useRef<HTMLDivElement>(null)
  const size = useBoxSize(box)
  const keyed = (event: KeyboardEvent) => {
    if (event.ctrlKey || event.metaKey || event.altKey || !onKey?.(event.key, event.shiftKey)) return
    event.preventDefault()
    event.stopPropagation()
  }
  const words = `${CHART_WORDS.names[name]}, ${option ? `${option.candidate} at ${textOf(formatMast(option.heightM))}` : ''}`
  const cautions = [...new Set(topics.flatMap((t) => [...cautionsFor(t)]))]
  return (
    <div className="chart-panel">
      <div className="chart-head">
        <Select
          label={CHART_WORDS.choose}
          hideLabel
          ariaLabel={CHART_WORDS.choose}
          value={name}
          choices={NAMES}
          onChange={(chart) => view.getState().set({ chart })}
        />
        <span className="chart-option ink-2">{option ? `${option.candidate} at ${textOf(formatMast(option.heightM))}` : ''}</span>
        {tools}
        {copy}
      </div>
      {trouble ? <Notice tone="bad">{trouble}</Notice> : null}
      {empty ? <p className="ink-2 chart-empty">{empty}</p> : null}
      <div
        className="plot-box"
        ref={box}
        role="application"
        aria-label={words}
        aria-description={CHART_WORDS.keys}
        // biome-ignore lint/a11y/noNoninteractiveTabindex: the reading is moved by keys
        tabIndex={0}
        onKeyDown={keyed}
      >
        {!empty && size.width > 0 && size.height > 60 ? children(size) : null}
      </div>
      <p className="chart-read" ref={readRef} aria-live="polite">
        {'\u00a0'}
      </p>
      {cautions.map((c) => (
        <Caution key={c}>{c}</Caution>
      ))}
    </div>
  )
}

/** The azimuth of the profile and of the diagram, and steps beside it. */
export function AzimuthField() {
  const { view } = useSession()
  const azimuthDeg = useView((v) => v.profileAzimuthDeg) ?? 0
  const set = (deg: number) => view.getState().set({ profileAzimuthDeg: (((Math.round(deg * 100) / 100) % 360) + 360) % 360 })
  return (
    <span className="azimuth">
      <NumberField label={CHART_WORDS.azimuth} value={azimuthDeg} onCommit={(v) => v !== undefined && set(v)} face={DEG} required />
      <Button small look="quiet" label="Azimuth one degree back" onPress={() => set(azimuthDeg - 1)}>
        −1°
      </Button>
      <Button small look="quiet" label="Azimuth one degree on" onPress={() => set(azimuthDeg + 1)}>
        +1°
      </Button>
    </span>
  )
}

export function ZoomButtons({ onZoom, onWhole, zoomed }: { onZoom: (factor: number) => void; onWhole: () => void; zoomed: boolean }) {
  return (
    <span className="zoom">
      <Button small look="quiet" label={CHART_WORDS.zoomIn} onPress={() => onZoom(1 / 1.5)}>
        +
      </Button>
      <Button small look="quiet" label={CHART_WORDS.zoomOut} onPress={() => onZoom(1.5)} disabled={!zoomed}>
        −
      </Button>
      <Button small look="quiet" onPress={onWhole} disabled={!zoomed}>
        {CHART_WORDS.whole}
      </Button>
    </span>
  )
}
