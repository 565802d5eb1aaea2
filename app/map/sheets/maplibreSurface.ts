import * as maplibregl from 'maplibre-gl'
import 'maplibre-gl/dist/maplibre-gl.css'
import workerUrl from 'maplibre-gl/dist/maplibre-gl-worker.mjs?worker&url'
import { latFromWorldY, lonFromWorldX, type View, WORLD_WIDTH_M } from '../../../core/index.ts'
import type { GroundPainter, MapSurface } from './mapSurface.ts'

maplibregl.setWorkerUrl(workerUrl)

const TILE_PX = 512
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

/** Centre and zoom of a view: at zoom 0 one tile of 512 px is the world. */
export function cameraOf(view: View): { center: [number, number]; zoom: number } {
  return {
    center: [
      lonFromWorldX(view.worldX + (view.width / 2) * view.worldPerPx),
      latFromWorldY(view.worldY - (view.height / 2) * view.worldPerPx),
    ],
    zoom: Math.log2(WORLD_WIDTH_M / TILE_PX / view.worldPerPx),
  }
}
/** The view of one map tile. */
export function tileView(z: number, x: number, y: number, night: boolean): View {
  const side = WORLD_WIDTH_M / 2 ** z
  return {
    width: TILE_PX,
    height: TILE_PX,
    worldX: x * side - WORLD_WIDTH_M / 2,
    worldY: WORLD_WIDTH_M / 2 - y * side,
    worldPerPx: side / TILE_PX,
    night,
  }
}
const emptyTile = (): Promise<ImageBitmap> => createImageBitmap(new ImageData(1, 1))
