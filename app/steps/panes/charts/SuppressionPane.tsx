import { useMemo, useRef } from 'react'
import type { Figures } from '../../../../core/index.ts'
import { type SuppressionGeometry, suppressionChart, suppressionCsv } from '../../../charts/index.ts'
import { DrawingView } from '../../../charts/printers.tsx'
import { optionKey } from '../../../document/index.ts'
import { CHART_WORDS, type UnitSystem } from '../../../words/index.ts'
import { useResults, useView } from '../../session/index.ts'
import { ChartFrame } from './ChartFrame.tsx'
import { CopyButtons } from './CopyButtons.tsx'

const SIZE = 12

/** Suppression that the needs ask for against what there is. */
export function SuppressionPane() {
  const option = useView((v) => v.option)
  const units = useView((v) => v.units)
  const figures = useResults((r) => (option ? r.byOption.get(optionKey(option))?.figures : undefined))
  const shown = useRef<SuppressionGeometry | null>(null)
  const read = useRef<HTMLParagraphElement>(null)
  const reading = useRef(-1)
  const point = (i: number) => {
    reading.current = i
    if (read.current) read.current.textContent = shown.current?.rows[i]?.words ?? CHART_WORDS.pointHint
  }
  const onKey = (key: string): boolean => {
    const count = shown.current?.rows.length ?? 0
    if (count === 0 || (key !== 'ArrowUp' && key !== 'ArrowDown')) return false
    point(Math.min(count - 1, Math.max(0, reading.current + (key === 'ArrowDown' ? 1 : -1))))
    return true
  }
  return (
    <ChartFrame
      name="suppression"
      readRef={read}
      onKey={onKey}
      topics={['suppression']}
      copy={
        <CopyButtons
          name="suppression"
          drawing={() => shown.current?.drawing ?? null}
          csv={() => (figures ? suppressionCsv(figures) : null)}
        />
      }
    >
      {(size) =>
        figures ? (
          <Chart
            figures={figures}
            {...size}
            system={units}
            onGeometry={(g) => {
              shown.current = g
            }}
            onPoint={point}
          />
        ) : (
          <p className="ink-3">{CHART_WORDS.drawing}</p>
        )
      }
    </ChartFrame>
  )
}

interface ChartProps {
  readonly figures: Figures
  readonly width: number
  readonly height: number
  readonly system: UnitSystem
  readonly onGeometry: (g: SuppressionGeometry) => void
  readonly onPoint: (i: number) => void
}
function Chart({ figures, width, height, system, onGeometry, onPoint }: ChartProps) {
  const geometry = useMemo(() => suppressionChart({ figures, width, height, system, size: SIZE }), [figures, width, height, system])
  onGeometry(geometry)
  return (
    <DrawingView
      drawing={geometry.drawing}
      className="chart suppression"
      onPointerMove={(e) => {
        const y = e.clientY - e.currentTarget.getBoundingClientRect().top
        onPoint(geometry.rows.findIndex((r) => y >= r.top && y < r.bottom))
      }}
      onPointerLeave={() => onPoint(-1)}
    />
  )
}
