import { useEffect, useLayoutEffect, useMemo, useRef, useState } from 'react'
import { Button } from 'react-aria-components'
import type { HorizonRow } from '../../core/index.ts'
import { type HorizonInput, horizonChart, horizonCsv } from '../charts/index.ts'
import { HorizonChart, moveCursor } from '../charts/printers.tsx'
import { CHART_WORDS, formatAzimuth, formatPlaceRange, formatScreening, MAP_WORDS, textOf, type UnitSystem } from '../words/index.ts'
import type { HorizonStripProps } from './types.ts'
import { useChannel } from './useChannel.ts'
import './ruler.css'

const SIZE = 12
/** Height of the stretched strip; the shell's grid takes it from `--strip`. */
const STRETCHED_HEIGHT = '224px'
/** Shares of the height that the stretched strip shows: all of it, its lower half, quarter, eighth. */
const TIMES = [1, 2, 4, 8] as const

/** The horizon wraps the map: its profile along the map's upper edge, azimuth by azimuth, pointer linked both ways. */
export function HorizonStrip({ hub, rows, lines, measured, units, onPick, onStretched, onCharts, copy }: HorizonStripProps) {
  const box = useRef<HTMLDivElement>(null)
  const cursor = useRef<SVGLineElement>(null)
  const read = useRef<HTMLSpanElement>(null)
  const [size, setSize] = useState({ width: 0, height: 0 })
  const [pointed, setPointed] = useState(false)
  const [stretched, setStretched] = useState(false)
  const [times, setTimes] = useState<(typeof TIMES)[number]>(1)
  const answer = useChannel(hub.trialAnswer)
  useLayoutEffect(() => {
    const { style } = document.documentElement
    if (stretched) style.setProperty('--strip', STRETCHED_HEIGHT)
    onStretched(stretched)
    return () => {
      style.removeProperty('--strip')
    }
  }, [stretched, onStretched])
  useLayoutEffect(() => {
    const host = box.current
    if (!host) return
    const measure = () => setSize({ width: host.clientWidth, height: host.clientHeight })
    measure()
    const watch = new ResizeObserver(measure)
    watch.observe(host)
    return () => watch.disconnect()
  }, [])
  const tried = useMemo(() => (answer ? answer.horizon.map(roughRow) : null), [answer])
  const shown = tried ?? rows
  // the pointer's own words take the place of the names; a preview knows no names
  const labels = tried || pointed ? 0 : undefined
  const { width } = size
  const height = size.height
  // other horizons and the survey have room in the stretched strip only, and none beside a place on trial
  const others = stretched && !tried
  const input = useMemo(
    (): HorizonInput => ({
      rows: shown,
      width,
      height,
      system: units,
      size: SIZE,
      style: 'strip',
      labels,
      ...(others ? { lines, measured: measured ?? undefined, stretch: times } : {}),
    }),
    [shown, width, height, units, labels, others, lines, measured, times],
  )
  const geometry = useMemo(() => (width > 0 && shown.length > 0 ? horizonChart(input) : null), [input, width, shown])
  useEffect(
    () =>
      hub.pointer.listen((p) => {
        if (!geometry) return
        const azimuth = p?.azimuthDeg ?? null
        setPointed(azimuth !== null)
        moveCursor(cursor.current, geometry.azimuth, azimuth)
        const row = azimuth === null ? null : geometry.rowAt(azimuth)
        if (read.current) read.current.textContent = row && azimuth !== null ? rowText(row, azimuth, units) : ''
      }),
    [hub, geometry, units],
  )
  return (
    <div ref={box} className={`horizon-strip${stretched ? ' stretched' : ''}`}>
      {geometry ? (
        <div className="horizon-chart">
          <HorizonChart
            {...input}
            cursorRef={cursor}
            onPoint={(azimuth) => hub.pointer.set(azimuth === null ? null : placeOn(azimuth, geometry.rowAt(azimuth)))}
            onPick={onPick}
          />
          <span ref={read} className="horizon-read" aria-hidden />
          <span className="stretch">
            {stretched
              ? copy(
                  () => geometry.drawing,
                  () => horizonCsv(input),
                )
              : null}
            {stretched ? (
              <Button className="button quiet small" onPress={() => setTimes(TIMES[(TIMES.indexOf(times) + 1) % TIMES.length])}>
                {CHART_WORDS.stretchOf(times)}
              </Button>
            ) : null}
            <Button className="button quiet small" onPress={onCharts}>
              {CHART_WORDS.charts}
            </Button>
            <Button className="button quiet small" aria-pressed={stretched} onPress={() => setStretched(!stretched)}>
              {MAP_WORDS.stretch}
            </Button>
          </span>
        </div>
      ) : (
        <p className="ink-3 horizon-empty">{MAP_WORDS.horizonEmpty}</p>
      )}
    </div>
  )
}

const placeOn = (azimuthDeg: number, row: HorizonRow | null) => ({
  from: 'horizon' as const,
  at: null,
  azimuthDeg,
  rangeM: row && row.rangeM > 0 ? row.rangeM : null,
})
const rowText = (row: HorizonRow, azimuthDeg: number, units: UnitSystem): string =>
  [
    textOf(formatAzimuth(azimuthDeg)),
    textOf(formatScreening(row.elevationDeg)),
    row.rangeM > 0 ? textOf(formatPlaceRange(row.rangeM, units)) : '',
    row.obstacle,
  ]
    .filter(Boolean)
    .join(' · ')
/** A preview knows the elevation of the horizon only. */
const roughRow = (r: { azimuthDeg: number; elevationDeg: number }): HorizonRow => ({
  ...r,
  rangeM: 0,
  heightM: 0,
  lon: 0,
  lat: 0,
  obstacle: '',
})
