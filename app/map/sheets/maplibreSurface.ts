import * as maplibregl from 'maplibre-gl'
import 'maplibre-gl/dist/maplibre-gl.css'
import workerUrl from 'maplibre-gl/dist/maplibre-gl-worker.mjs?worker&url'
import type { View } from '../../../core/index.ts'
import type { GroundPainter, MapSurface } from './mapSurface.ts'
import { cameraOf, TILE_PX, tileView } from './tiles.ts'

maplibregl.setWorkerUrl(workerUrl)

const SCHEME = 'sightfell-ground'
let surfaces = 0

/**
 * The ground drawn by the graphics processor: our own hillshade as tiles of a custom protocol, painted one at a time by the study worker.
 * Throws maplibregl.GPUInitializationError where there is no WebGL. No controls and no gestures of its own: the view comes from the map pane.
 */
export function maplibreSurface(paint: GroundPainter, onError: (error: unknown) => void): MapSurface {
  const element = document.createElement('div')
  element.className = 'map-sheet base maplibre'
  element.setAttribute('aria-hidden', 'true')
  const scheme = `${SCHEME}-${++surfaces}`
  let version = 0
  let night = false
  // one tile after another: a newer request for a picture of the ground replaces an older one
  let queue: Promise<unknown> = Promise.resolve()
  maplibregl.addProtocol(scheme, ({ url }, abort) => {
    const [z, x, y] = url.split('/').slice(-3).map(Number) as [number, number, number]
    const view = tileView(z, x, y, night)
    const next = queue.then(async () => {
      if (abort.signal.aborted) throw new DOMException('no longer wanted', 'AbortError')
      const picture = await paint(view)
      return { data: picture?.bitmap ?? (await emptyTile()) }
    })
    queue = next.catch(() => undefined)
    return next
  })
  const source = () => `${scheme}://${version}-${night ? 'night' : 'day'}/{z}/{x}/{y}`
  const map = new maplibregl.Map({
    container: element,
    interactive: false,
    attributionControl: false,
    fadeDuration: 0,
    renderWorldCopies: true,
    pitchWithRotate: false,
    style: {
      version: 8,
      sources: { ground: { type: 'raster', tiles: [source()], tileSize: TILE_PX, maxzoom: 16 } },
      layers: [{ id: 'ground', type: 'raster', source: 'ground', paint: { 'raster-fade-duration': 0 } }],
    },
  })
  map.on('error', ({ error }) => onError(error))
  let gone = false
  let wanted: View | null = null
  const again = () => {
    version++
    const tiles = map.getSource('ground')
    if (tiles instanceof maplibregl.RasterTileSource) tiles.setTiles([source()])
  }
  return {
    kind: 'maplibre',
    element,
    show(view) {
      const sized = !wanted || wanted.width !== view.width || wanted.height !== view.height
      wanted = view
      if (sized) requestAnimationFrame(() => gone || map.resize())
      map.jumpTo(cameraOf(view))
      if (view.night !== night) {
        night = view.night
        if (map.isStyleLoaded()) again()
        else map.once('load', again)
      }
    },
    refresh() {
      if (map.isStyleLoaded()) again()
      else map.once('load', again)
    },
    remove() {
      gone = true
      map.remove()
      maplibregl.removeProtocol(scheme)
      element.remove()
    },
  }
}

const emptyTile = (): Promise<ImageBitmap> => createImageBitmap(new ImageData(1, 1))
