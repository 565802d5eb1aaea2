import { useCallback, useEffect, useId, useLayoutEffect, useMemo, useRef, useState } from 'react'
import { Button } from 'react-aria-components'
import { geodesicDirect, type LonLat, pixelAtLonLat, type View } from '../../core/index.ts'
import { MAP_WORDS, optionWords } from '../words/index.ts'
import { fitted, openingView, panned, resized, zoomed } from './camera.ts'
import { differenceOn } from './difference.ts'
import { Legend } from './face/Legend.tsx'
import { Progress } from './face/Progress.tsx'
import { ReadOut } from './face/ReadOut.tsx'
import { ScaleBar } from './face/ScaleBar.tsx'
import { Sentence } from './face/Sentence.tsx'
import { type FitTo, Tools } from './face/Tools.tsx'
import { createChannel } from './hub.ts'
import { useMapInput } from './input/useMapInput.ts'
import { Marks } from './marks/Marks.tsx'
import type { Rect } from './marks/Rings.tsx'
import { useSheets } from './sheets/useSheets.ts'
import type { Channel, MapPaneProps } from './types.ts'
import { useChannel } from './useChannel.ts'
import { useLink } from './useLink.ts'
import './map.css'

const FIT_MARGIN_PX = 28

/** The map: base, overlay and marks as three stacked sheets, with its own sentence, legend, scale, read-out and tools. */
export function MapPane(props: MapPaneProps) {
  const { hub, candidates, show, units, night, corners, maxRangeM } = props
  const stage = useRef<HTMLDivElement>(null)
  const sheets = useRef<HTMLDivElement>(null)
  const cursor = useRef<SVGGElement>(null)
  // biome-ignore lint/correctness/useExhaustiveDependencies: made once, the theme follows in useSheets
  const camera = useMemo(() => createChannel<View>(openingView(night)), [])
  const view = useChannel(camera)
  const trial = useChannel(hub.trial)
  const [trouble, setTrouble] = useState<string | null>(null)
  const onError = useCallback((error: unknown) => setTrouble(error instanceof Error ? error.message : String(error)), [])
  const { base, setBase, gl } = useSheets(sheets, camera, props, onError)
  useLink(camera, props.link, props.pane)
  const other = differenceOn(show)
  const tilts = candidates.some((c) => c.tiltsDeg.length > 1)
  const chosen = candidates.find((c) => c.id === show.option?.candidate) ?? null
  const lon = chosen?.lon
  const lat = chosen?.lat
  const site = useMemo(() => (lon === undefined || lat === undefined ? null : { lon, lat }), [lon, lat])

  const placesOf = useCallback(
    (to: FitTo) => {
      if (to === 'ground') return corners
      if (to === 'candidates') return candidates
      return site ? [0, 90, 180, 270].map((az) => geodesicDirect(site, az, maxRangeM)) : []
    },
    [corners, candidates, site, maxRangeM],
  )
  const showWhole = useCallback(
    (to: FitTo) => camera.set(fitted(camera.get(), placesOf(to), FIT_MARGIN_PX, insetOf(stage.current))),
    [camera, placesOf],
  )
  const fits = (['range', 'candidates', 'ground'] as const).filter((f) => placesOf(f).length > (f === 'candidates' ? 1 : 0))
  useFirstFit(stage, camera, props, fits.includes('range') ? 'range' : 'ground', showWhole)
  useFirstCandidate(site, props.groundSerial, () => showWhole('range'))
  useFreePart(stage, camera, props.lower !== null, site, props.cell)
  const input = useMapInput(stage, cursor, camera, props, () => showWhole(fits.includes('ground') ? 'ground' : 'range'))
  const cards = useCards(stage, view, show.layer, props.lower !== null)
  const hint = props.placing ? MAP_WORDS.placing : input.nudging ? MAP_WORDS.movingByKeys : MAP_WORDS.pointHint
  const empty = props.groundSerial === null
  const helpId = useId()
  const label = props.pane && show.option ? `${MAP_WORDS.mapOf} ${optionWords(show.option, tilts)}` : MAP_WORDS.map

  return (
    <section className={`map-pane${props.placing ? ' placing' : ''}${props.lower ? ' with-lower' : ''}`} aria-label={label}>
      <div
        ref={stage}
        className="stage"
        role="application"
        aria-label={label}
        aria-describedby={helpId}
        // biome-ignore lint/a11y/noNoninteractiveTabindex: the map is worked by keys, as its role says
        tabIndex={0}
        {...input.handlers}
      >
        <div ref={sheets} className="sheets" />
        <Marks
          view={view}
          trial={trial}
          cards={cards}
          cursorRef={cursor}
          candidates={candidates}
          rejected={props.rejected}
          needs={props.needs}
          obstacles={props.obstacles}
          roads={props.roads}
          roadLines={props.roadLines}
          maxRangeM={maxRangeM}
          show={show}
          units={units}
          cell={props.cell}
          profileAzimuthDeg={props.profileAzimuthDeg}
        />
        <span className="cross" aria-hidden />
      </div>
      <span id={helpId} className="visually-hidden">
        {MAP_WORDS.help}
      </span>
      <div className="map-head">
        <div className="map-words">
          {props.pane && show.option ? (
            <p className="map-card sentence">{optionWords(show.option, tilts)}</p>
          ) : (
            <Sentence
              show={show}
              candidates={candidates}
              needs={props.needs}
              trial={trial}
              onShow={props.onShow}
              onSelect={props.onSelect}
            />
          )}
          {props.progress ? <Progress progress={props.progress} onStop={props.onStop} /> : null}
          {trouble ? (
            <p className="map-card trouble" role="alert">
              {trouble}
              <Button className="button quiet small" onPress={() => setTrouble(null)}>
                {MAP_WORDS.close}
              </Button>
            </p>
          ) : null}
        </div>
        {props.pane ? null : (
          <Tools
            onZoom={(factor) => camera.set(zoomed(camera.get(), factor, view.width / 2, view.height / 2))}
            onFit={showWhole}
            fits={fits}
            base={base}
            gl={gl}
            onBase={setBase}
          />
        )}
      </div>
      {empty && props.empty ? <div className="map-empty">{props.empty}</div> : null}
      <div className="map-foot">
        {empty || props.pane ? (
          <span />
        ) : (
          <Legend
            layer={show.layer}
            units={units}
            night={night}
            marks={props.marks}
            losses={props.losses}
            roads={props.roadLines}
            rejected={props.rejected.length > 0}
            difference={other && show.option ? [optionWords(show.option, tilts), optionWords(other, tilts)] : null}
          />
        )}
        <div className="map-corner">
          {empty ? null : <ScaleBar view={view} units={units} />}
          {empty ? null : (
            <ReadOut
              client={props.client}
              hub={hub}
              site={site}
              units={units}
              hint={hint}
              option={show.option}
              against={other}
              pane={props.pane}
            />
          )}
        </div>
      </div>
      {props.lower ? <LowerChart onClose={props.onLowerClose}>{props.lower}</LowerChart> : null}
    </section>
  )
}

/** Pixels at the left edge that something lies over. */
const insetOf = (stage: HTMLElement | null): number =>
  stage?.parentElement ? Number.parseFloat(getComputedStyle(stage.parentElement.querySelector('.map-head') ?? stage).left) - 12 || 0 : 0

/** A chart over the lower half of the map; Esc closes it. */
function LowerChart({ children, onClose }: { children: MapPaneProps['lower']; onClose: () => void }) {
  useEffect(() => {
    const key = (e: KeyboardEvent) => {
      if (e.key === 'Escape' && !e.defaultPrevented && !document.querySelector('.popover, .dialog')) onClose()
    }
    window.addEventListener('keydown', key)
    return () => window.removeEventListener('keydown', key)
  }, [onClose])
  return (
    <div className="map-lower">
      <Button className="button quiet small close" onPress={onClose}>
        {MAP_WORDS.close}
      </Button>
      {children}
    </div>
  )
}

/** Size of the stage, and the first view once ground or candidate is there. */
function useFirstFit(
  stage: React.RefObject<HTMLDivElement | null>,
  camera: Channel<View>,
  props: MapPaneProps,
  to: FitTo,
  showWhole: (to: FitTo) => void,
) {
  const fittedFor = useRef<string | null>(null)
  const now = { to, showWhole, serial: props.groundSerial, corners: props.corners, pane: props.pane }
  const latest = useRef(now)
  latest.current = now
  const once = useCallback(() => {
    // the second of two maps follows the first
    const { to, showWhole, serial, corners, pane } = latest.current
    // the same ground read again leaves the view where the user has put it
    const key = serial === null ? null : JSON.stringify(corners)
    if (fittedFor.current === key || camera.get().width < 1 || pane) return
    fittedFor.current = key
    if (key !== null) showWhole(to)
  }, [camera])
  useLayoutEffect(() => {
    const host = stage.current
    if (!host) return
    const measure = () => {
      camera.set(resized(camera.get(), host.clientWidth, host.clientHeight))
      once()
    }
    measure()
    const watch = new ResizeObserver(measure)
    watch.observe(host)
    return () => watch.disconnect()
  }, [stage, camera, once])
  // biome-ignore lint/correctness/useExhaustiveDependencies: a new ground is looked at whole
  useLayoutEffect(once, [props.groundSerial, props.corners])
}

/** The first candidate on a ground is shown with its whole range. */
function useFirstCandidate(site: LonLat | null, serial: number | null, show: () => void) {
  const before = useRef({ site, serial })
  // biome-ignore lint/correctness/useExhaustiveDependencies: only a place where there was none
  useEffect(() => {
    const first = before.current.site === null && site !== null && before.current.serial === serial && serial !== null
    before.current = { site, serial }
    if (first) show()
  }, [site, serial])
}

/** While a chart lies over the lower half, the candidate (with the cell, where both fit) stands in the middle of what is left; the view goes back after it, unless it was moved. */
function useFreePart(
  stage: React.RefObject<HTMLDivElement | null>,
  camera: Channel<View>,
  lower: boolean,
  site: LonLat | null,
  cell: LonLat | null,
) {
  const back = useRef<{ from: View; to: View } | null>(null)
  const places = useRef({ site, cell })
  places.current = { site, cell }
  useEffect(() => {
    const host = stage.current
    const { site, cell } = places.current
    if (!lower || !host?.parentElement || !site) return
    const from = camera.get()
    const view = resized(from, host.clientWidth, host.clientHeight)
    const foot = host.parentElement.querySelector<HTMLElement>('.map-foot')?.offsetHeight ?? 0
    const head = host.parentElement.querySelector<HTMLElement>('.map-head')?.offsetHeight ?? 0
    const left = insetOf(host)
    const free = { width: view.width - left, height: view.height - foot - head - 36 }
    const [x, y] = pixelAtLonLat(view, site)
    const [cx, cy] = cell ? pixelAtLonLat(view, cell) : [x, y]
    const both = Math.abs(cx - x) < free.width - 48 && Math.abs(cy - y) < free.height - 48
    const [px, py] = both ? [(x + cx) / 2, (y + cy) / 2] : [x, y]
    const to = panned(view, left + free.width / 2 - px, head + 24 + free.height / 2 - py)
    back.current = { from, to }
    camera.set(to)
    return () => {
      const now = camera.get()
      const then = back.current?.to
      const still = then && now.worldX === then.worldX && now.worldY === then.worldY && now.worldPerPx === then.worldPerPx
      if (back.current && still) camera.set({ ...back.current.from, night: now.night })
      back.current = null
    }
  }, [stage, camera, lower])
}

/** Where cards lie over the map, so that ring labels keep clear of them. */
function useCards(stage: React.RefObject<HTMLDivElement | null>, view: View, layer: string, lower: boolean): readonly Rect[] {
  const [cards, setCards] = useState<readonly Rect[]>([])
  // biome-ignore lint/correctness/useExhaustiveDependencies: cards change with the size, the layer and the lower chart
  useLayoutEffect(() => {
    const host = stage.current
    const box = host?.getBoundingClientRect()
    if (!host?.parentElement || !box) return
    const found = [...host.parentElement.querySelectorAll('.map-card, .map-lower')].map((card) => {
      const r = card.getBoundingClientRect()
      return { left: r.left - box.left - 4, top: r.top - box.top - 4, right: r.right - box.left + 4, bottom: r.bottom - box.top + 4 }
    })
    setCards(found)
  }, [stage, view.width, view.height, layer, lower])
  return cards
}
