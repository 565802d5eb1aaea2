import { BitmapSheet } from './bitmapSheet.ts'
import type { GroundPainter, MapSurface } from './mapSurface.ts'

/** The ground as one bitmap on a 2-D canvas: works everywhere, and is the faster one without a graphics processor. */
export function canvasSurface(paint: GroundPainter, onError: (error: unknown) => void): MapSurface {
  const sheet = new BitmapSheet('base', {
    ask: paint,
    budget: () => ({ px: 1_500_000, marginPx: 96 }),
    pixelRatio: () => window.devicePixelRatio,
    reducedMotion: () => true,
    onError,
  })
  // a picture of the ground before is wrong, not old: it goes when there is none to come
  let ground = 0
  return {
    kind: 'canvas',
    element: sheet.element,
    show: (view) => sheet.show(view),
    refresh: () => sheet.refresh(`ground ${++ground}`, false),
    remove: () => sheet.remove(),
  }
}
