import { type RefObject, useEffect, useRef, useState } from 'react'
import type { View } from '../../../core/index.ts'
import { differenceOn } from '../difference.ts'
import { driveTrial } from '../input/trialDriver.ts'
import type { Channel, MapPaneProps } from '../types.ts'
import { BitmapSheet, type Picture } from './bitmapSheet.ts'
import { canvasSurface } from './canvasSurface.ts'
import type { GroundPainter, MapSurface } from './mapSurface.ts'
import { type WebglKind, webglKind } from './webgl.ts'

const FULL = { px: 1_500_000, marginPx: 96 }
/** While something is dragged the picture has to follow the hand: no margin, fewer pixels. */
const MOVING = { px: 700_000, marginPx: 0 }
const calm = (): boolean => window.matchMedia('(prefers-reduced-motion: reduce)').matches

type Inputs = Pick<MapPaneProps, 'client' | 'hub' | 'groundSerial' | 'show' | 'night' | 'pane'>

/** Base and overlay under the marks: made once, told of every view and every change of content. */
export function useSheets(
  host: RefObject<HTMLDivElement | null>,
  camera: Channel<View>,
  inputs: Inputs,
  onError: (error: unknown) => void,
) {
  const { client, hub, groundSerial, show, night, pane } = inputs
  const latest = useRef(inputs)
  latest.current = inputs
  const overlay = useRef<BitmapSheet | null>(null)
  const surface = useRef<MapSurface | null>(null)
  const [gl, setGl] = useState<WebglKind>('none')
  const [base, setBase] = useState<MapSurface['kind']>('canvas')

  useEffect(() => {
    const kind = webglKind()
    setGl(kind)
    if (kind === 'processor') setBase('maplibre')
  }, [])

  useEffect(() => {
    let gone = false
    const paint: GroundPainter = async (view) => {
      if (latest.current.groundSerial === null) return null
      return (await client.ask('base', { view, ...(pane ? { pane } : {}) })) as Picture | null
    }
    const start = (made: MapSurface) => {
      if (gone) return made.remove()
      surface.current?.remove()
      surface.current = made
      host.current?.prepend(made.element)
      made.show(camera.get())
      made.refresh()
    }
    if (base === 'canvas') start(canvasSurface(paint, onError))
    else
      import('./maplibreSurface.ts')
        .then(({ maplibreSurface }) => start(maplibreSurface(paint, onError)))
        .catch((error: unknown) => {
          // no picture from the graphics processor after all: the canvas always works
          if (!gone) setBase('canvas')
          onError(error)
        })
    const stop = camera.listen((view) => surface.current?.show(view))
    return () => {
      gone = true
      stop()
      surface.current?.remove()
      surface.current = null
    }
  }, [client, camera, base, host, onError, pane])

  useEffect(() => {
    const sheet = new BitmapSheet('overlay', {
      ask: async (view) => {
        const { show: now, groundSerial: serial } = latest.current
        const trial = hub.trial.get()
        if (serial === null || (!now.option && !trial)) return null
        const answered = trial && hub.trialAnswer.get() ? 'preview' : now.option
        if (!answered) return null
        const other = answered === 'preview' ? null : differenceOn(now)
        const how = { ...(other ? { difference: other } : {}), ...(pane ? { pane } : {}) }
        return (await client.ask('paint', { view, layer: now.layer, option: answered, ...how })) as Picture | null
      },
      budget: () => (hub.trial.get()?.resting === false ? MOVING : FULL),
      pixelRatio: () => (hub.trial.get()?.resting === false ? 1 : window.devicePixelRatio),
      reducedMotion: calm,
      onError,
    })
    overlay.current = sheet
    host.current?.append(sheet.element)
    sheet.show(camera.get())
    const stops = [
      camera.listen((view) => sheet.show(view)),
      client.listen((tell) => {
        if (tell.kind === 'dirty') sheet.refresh(kinOf(latest.current.show), false)
      }),
      driveTrial(client, hub, () => sheet.refresh(kinOf(latest.current.show), false), onError),
    ]
    return () => {
      for (const stop of stops) stop()
      sheet.remove()
      overlay.current = null
    }
  }, [client, hub, camera, host, onError, pane])

  // biome-ignore lint/correctness/useExhaustiveDependencies: a new ground is what this waits for
  useEffect(() => {
    surface.current?.refresh()
    overlay.current?.refresh(kinOf(latest.current.show), false)
  }, [groundSerial])

  const { option, layer, need } = show
  const other = differenceOn(show)
  // biome-ignore lint/correctness/useExhaustiveDependencies: what is shown is read through `latest`
  useEffect(() => {
    overlay.current?.refresh(kinOf(latest.current.show), true)
  }, [option?.candidate, option?.heightM, option?.tiltDeg, layer, need, other?.candidate, other?.heightM, other?.tiltDeg])

  useEffect(() => {
    const view = camera.get()
    if (view.night !== night) camera.set({ ...view, night })
  }, [camera, night])

  return { base, setBase, gl }
}

const kinOf = (show: MapPaneProps['show']): string =>
  `${show.option?.candidate ?? ''}|${show.layer}|${show.need ?? ''}|${differenceOn(show)?.candidate ?? ''}`
