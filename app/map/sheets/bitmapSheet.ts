import type { View } from '../../../core/index.ts'
import { covers, paintView, placement } from '../camera.ts'

export interface Picture {
  readonly bitmap: ImageBitmap
  readonly view: View
}
export interface SheetOptions {
  /** Asks for a picture; one at a time, the newest view wins. */
  readonly ask: (view: View) => Promise<Picture | null>
  /** Painted pixels at most, and the margin all round (px) where that has room. */
  readonly budget: () => { readonly px: number; readonly marginPx: number }
  readonly pixelRatio: () => number
  readonly reducedMotion: () => boolean
  readonly onError: (error: unknown) => void
}
const FADE_MS = 120
/** A pan inside the painted margin asks for new ground only when it rests. */
const REST_MS = 140

/**
 * One bitmap over the map. The last picture is moved by a transform until the next arrives; a changed content cross-fades, a changed view does not.
 * A picture in the colours of the other theme is taken away at once. No picture comes back (null): one of another kin is taken away, one of the same kin is dimmed until there is a new one.
 */
export class BitmapSheet {
  readonly element: HTMLDivElement
  private front: HTMLCanvasElement
  private back: HTMLCanvasElement
  private picture: View | null = null
  private wanted: View | null = null
  private content = ''
  private shown = ''
  private serial = 0
  private asked = -1
  private busy = false
  private fade = false
  private rest: ReturnType<typeof setTimeout> | undefined
  private removed = false
  private queued = false

  constructor(
    className: string,
    private readonly o: SheetOptions,
  ) {
    this.element = document.createElement('div')
    this.element.className = `map-sheet ${className}`
    this.front = this.canvas()
    this.back = this.canvas()
  }

  private canvas(): HTMLCanvasElement {
    const c = document.createElement('canvas')
    c.style.visibility = 'hidden'
    this.element.append(c)
    return c
  }

  /** Shows a view; paints at once unless the picture there covers it at its scale. */
  show(view: View): void {
    const before = this.wanted
    this.wanted = view
    this.serial++
    // marks take the other theme's colours at once: a picture in the old ones would hide them
    if (this.picture && this.picture.night !== view.night) this.clear()
    this.place()
    clearTimeout(this.rest)
    if (view.width < 1 || view.height < 1) return
    const sameScale = this.picture !== null && before !== null && before.worldPerPx === view.worldPerPx && before.night === view.night
    if (sameScale && covers(this.picture!, view)) this.rest = setTimeout(() => this.request(), REST_MS)
    else this.soon()
  }

  /** The content changed; `kin` names what it is of. While there is none to be had, a picture of the same kin is stale, of another it is wrong. */
  refresh(kin: string, fade: boolean): void {
    this.fade ||= fade
    this.content = kin
    this.serial++
    this.soon()
  }

  /** Takes the picture away. */
  clear(): void {
    this.picture = null
    this.shown = ''
    this.front.style.visibility = 'hidden'
    this.back.style.visibility = 'hidden'
  }

  remove(): void {
    this.removed = true
    clearTimeout(this.rest)
    this.element.remove()
  }

  /** Changes of the same turn become one question. */
  private soon(): void {
    if (this.queued) return
    this.queued = true
    queueMicrotask(() => {
      this.queued = false
      this.request()
    })
  }

  private request(): void {
    clearTimeout(this.rest)
    if (this.busy || this.removed || this.asked === this.serial || !this.wanted || this.wanted.width < 1) return
    this.busy = true
    this.asked = this.serial
    const content = this.content
    const { px, marginPx } = this.o.budget()
    const view = paintView(this.wanted, this.o.pixelRatio(), px, marginPx)
    this.o
      .ask(view)
      .then((picture) => {
        if (this.removed) return picture?.bitmap.close()
        if (picture && picture.view.night !== this.wanted?.night) picture.bitmap.close()
        else if (picture) this.take(picture, content)
        else if (content === this.content) this.missing(content)
      })
      .catch((error: unknown) => {
        if (!this.removed) this.o.onError(error)
      })
      .finally(() => {
        this.busy = false
        if (this.asked !== this.serial) this.request()
      })
  }

  private missing(content: string): void {
    if (content !== this.shown) this.clear()
    else this.element.classList.add('stale')
  }

  private take({ bitmap, view }: Picture, content: string): void {
    const { front: old, back: next } = this
    next.width = bitmap.width
    next.height = bitmap.height
    next.getContext('bitmaprenderer')?.transferFromImageBitmap(bitmap)
    this.picture = view
    this.shown = content
    this.front = next
    this.back = old
    this.element.classList.remove('stale')
    this.place()
    next.style.visibility = 'visible'
    if (this.fade && !this.o.reducedMotion()) {
      // the old picture stays where it is while the new one comes over it
      next.animate([{ opacity: 0 }, { opacity: 1 }], FADE_MS)
      if (old.style.visibility === 'visible')
        old.animate([{ opacity: 1 }, { opacity: 0 }], FADE_MS).onfinish = () => {
          if (this.back === old) old.style.visibility = 'hidden'
        }
    } else old.style.visibility = 'hidden'
    this.fade = false
  }

  private place(): void {
    if (!this.picture || !this.wanted) return
    const { x, y, scale } = placement(this.picture, this.wanted)
    this.front.style.transform = `translate(${x}px, ${y}px) scale(${scale})`
  }
}
