import type { View } from '../../../core/index.ts'

/** A picture of the ground for a view, painted by the study worker; null when superseded or when there is no ground. */
export type GroundPainter = (view: View) => Promise<{ readonly bitmap: ImageBitmap; readonly view: View } | null>

/** The lowest sheet of the map. North up, no pitch; overlay and marks lie above it and are not its business. */
export interface MapSurface {
  readonly kind: 'canvas' | 'maplibre'
  readonly element: HTMLElement
  /** The view to show. What is there moves at once; missing ground follows. */
  show(view: View): void
  /** The ground has changed: everything is painted anew. */
  refresh(): void
  remove(): void
}
