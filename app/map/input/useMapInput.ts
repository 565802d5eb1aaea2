import { type RefObject, useEffect, useRef, useState } from 'react'
import { geodesicDirect, geodesicInverse, lonLatAtPixel, pixelAtLonLat, type View } from '../../../core/index.ts'
import type { Channel, MapPaneProps, PointerPlace, Trial } from '../types.ts'
import { listenGestures } from './gestures.ts'
import { takeKey } from './keys.ts'

/** Pointer, touch and keys on the stage, turned into views, trials and clicks; and the cursor of the other charts on the map. */
export function useMapInput(
  stage: RefObject<HTMLDivElement | null>,
  cursor: RefObject<SVGGElement | null>,
  camera: Channel<View>,
  props: MapPaneProps,
  fit: () => void,
) {
  const latest = useRef(props)
  latest.current = props
  const [nudging, setNudging] = useState<string | null>(null)
  const { hub } = props

  const trialOf = (id: string): Trial | null => {
    const { show, candidates } = latest.current
    const c = candidates.find((k) => k.id === id)
    if (!c) return null
    const heightM = show.option?.candidate === id ? show.option.heightM : (c.mastHeightsM[0] ?? 0)
    return { candidate: id, lon: c.lon, lat: c.lat, heightM, moving: 'place', resting: false }
  }
  const moveTo = (id: string, x: number, y: number) => {
    const trial = trialOf(id)
    if (!trial) return
    hub.pointer.set(null)
    hub.trial.set({ ...trial, ...lonLatAtPixel(camera.get(), x, y) })
  }
  const letGo = (id: string, kept: boolean) => {
    const trial = hub.trial.get()
    if (kept && trial?.candidate === id) latest.current.onMove(id, { lon: trial.lon, lat: trial.lat })
    hub.trial.set(null)
  }
  const tap = (x: number, y: number) => {
    const at = lonLatAtPixel(camera.get(), x, y)
    if (latest.current.placing) latest.current.onPlace(at)
    else if (latest.current.show.option) latest.current.onCell(at)
  }
  const hover = (place: { x: number; y: number } | null) =>
    hub.pointer.set(place ? pointerAt(camera.get(), latest.current, place.x, place.y) : null)
  const moving = useRef({ moveTo, letGo, tap, hover })
  moving.current = { moveTo, letGo, tap, hover }

  useEffect(() => {
    const host = stage.current
    if (!host) return
    return listenGestures(host, {
      view: camera.get,
      setView: camera.set,
      dragStart: (id) => {
        if (latest.current.placing) return false
        if (latest.current.show.option?.candidate !== id) latest.current.onSelect(id)
        return true
      },
      dragTo: (id, x, y) => moving.current.moveTo(id, x, y),
      dragEnd: (id, kept) => moving.current.letGo(id, kept),
      tapCandidate: (id) => latest.current.onSelect(id),
      tap: (x, y) => moving.current.tap(x, y),
      hover: (place) => moving.current.hover(place),
    })
  }, [stage, camera])

  useEffect(() => {
    const draw = () => drawCursor(cursor.current, camera.get(), latest.current, hub.pointer.get())
    const stops = [hub.pointer.listen(draw), camera.listen(draw)]
    return () => {
      for (const stop of stops) stop()
    }
  }, [hub, camera, cursor])

  const onKeyDown = (e: React.KeyboardEvent<HTMLDivElement>) => {
    const id = e.target instanceof Element ? (e.target.closest<SVGElement>('[data-candidate]')?.dataset.candidate ?? null) : null
    const middle = () => {
      const v = camera.get()
      return { x: v.width / 2, y: v.height / 2 }
    }
    const ours = takeKey(e, id, {
      view: camera.get,
      setView: (view) => {
        camera.set(view)
        hover(middle())
      },
      fit,
      take: () => tap(middle().x, middle().y),
      escape: () => {
        if (props.placing) props.onPlacingEnd()
        else if (props.lower) props.onLowerClose()
      },
      nudge: (candidate, dx, dy) => {
        const from = hub.trial.get() ?? trialOf(candidate)
        if (!from) return
        const [x, y] = pixelAtLonLat(camera.get(), from)
        setNudging(candidate)
        moveTo(candidate, x + dx, y + dy)
      },
      nudgeEnd: (candidate, kept) => {
        setNudging(null)
        letGo(candidate, kept)
      },
      tapCandidate: props.onSelect,
      nudging: (candidate) => nudging === candidate,
    })
    if (ours) {
      e.preventDefault()
      e.stopPropagation()
    }
  }
  const onBlur = () => {
    if (nudging) {
      setNudging(null)
      letGo(nudging, true)
    } else if (hub.pointer.get()?.from === 'map') hub.pointer.set(null)
  }
  return { nudging: nudging !== null, handlers: { onKeyDown, onBlur } }
}

function pointerAt(view: View, props: MapPaneProps, x: number, y: number): PointerPlace {
  const at = lonLatAtPixel(view, x, y)
  const site = props.candidates.find((c) => c.id === props.show.option?.candidate)
  if (!site) return { from: 'map', at, azimuthDeg: null, rangeM: null }
  const { azimuthDeg, distanceM } = geodesicInverse(site, at)
  return { from: 'map', at, azimuthDeg, rangeM: distanceM }
}

/** Direction and place of the pointer on another chart, drawn on the map. */
function drawCursor(group: SVGGElement | null, view: View, props: MapPaneProps, pointer: PointerPlace | null): void {
  const site = props.candidates.find((c) => c.id === props.show.option?.candidate)
  if (!group) return
  const shown = pointer !== null && pointer.from !== 'map' && pointer.azimuthDeg !== null && site !== undefined
  group.setAttribute('visibility', shown ? 'visible' : 'hidden')
  if (!shown) return
  const azimuth = pointer.azimuthDeg as number
  const [x0, y0] = pixelAtLonLat(view, site)
  const [x1, y1] = pixelAtLonLat(view, geodesicDirect(site, azimuth, props.maxRangeM))
  group.querySelector('path')?.setAttribute('d', `M${x0} ${y0}L${x1} ${y1}`)
  const dot = group.querySelector('circle')
  if (pointer.rangeM === null || pointer.rangeM > props.maxRangeM) dot?.setAttribute('visibility', 'hidden')
  else {
    const [x, y] = pixelAtLonLat(view, geodesicDirect(site, azimuth, pointer.rangeM))
    dot?.setAttribute('visibility', 'inherit')
    dot?.setAttribute('cx', String(x))
    dot?.setAttribute('cy', String(y))
  }
}
