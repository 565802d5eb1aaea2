import type { View } from '../../../core/index.ts'
import { panned, zoomed } from '../camera.ts'

/** What hands on the map mean. Places are pixels of the stage. */
export interface GestureHandlers {
  readonly view: () => View
  readonly setView: (view: View) => void
  /** A press on a candidate became a drag; false refuses it. */
  readonly dragStart: (candidate: string) => boolean
  /** The dragged candidate's ring is now here. */
  readonly dragTo: (candidate: string, x: number, y: number) => void
  readonly dragEnd: (candidate: string, kept: boolean) => void
  readonly tapCandidate: (candidate: string) => void
  readonly tap: (x: number, y: number) => void
  /** Where the pointer hovers; null = it left. */
  readonly hover: (place: { x: number; y: number } | null) => void
}
interface Finger {
  x: number
  y: number
}
/** A press that moves less than this is a click, px. */
const SLOP_PX = 4
/** One notch of a wheel zooms by this much. */
const WHEEL_PER_PX = 0.0018

/** Pointer, wheel and touch on the stage: drag pans, a drag on a candidate moves it, wheel and pinch zoom about the pointer. Returns the removal. */
export function listenGestures(stage: HTMLElement, h: GestureHandlers): () => void {
  const fingers = new Map<number, Finger>()
  let grip: { id: number; startX: number; startY: number; moved: boolean; candidate: string | null; offX: number; offY: number } | null =
    null
  let pinched = false
  const place = (e: { clientX: number; clientY: number }) => {
    const box = stage.getBoundingClientRect()
    return { x: e.clientX - box.left, y: e.clientY - box.top }
  }
  const candidateAt = (target: EventTarget | null) => (target instanceof Element ? target.closest<SVGElement>('[data-candidate]') : null)

  const down = (e: PointerEvent) => {
    if (e.button !== 0) return
    const at = place(e)
    fingers.set(e.pointerId, at)
    stage.setPointerCapture(e.pointerId)
    if (fingers.size > 1) {
      pinched = true
      if (grip?.candidate && grip.moved) h.dragEnd(grip.candidate, false)
      grip = null
      return
    }
    pinched = false
    const mark = candidateAt(e.target)
    const ring = mark?.getBoundingClientRect()
    // the ring keeps its place under the finger: the first circle of the mark is centred on it
    const circle = mark?.querySelector('circle')?.getBoundingClientRect() ?? ring
    const own = circle ? place({ clientX: (circle.left + circle.right) / 2, clientY: (circle.top + circle.bottom) / 2 }) : at
    grip = {
      id: e.pointerId,
      startX: at.x,
      startY: at.y,
      moved: false,
      candidate: mark?.dataset.candidate ?? null,
      offX: own.x - at.x,
      offY: own.y - at.y,
    }
  }
  const move = (e: PointerEvent) => {
    const at = place(e)
    const before = fingers.get(e.pointerId)
    if (!before) {
      h.hover(at)
      return
    }
    if (fingers.size === 2) pinch(e.pointerId, before, at)
    fingers.set(e.pointerId, at)
    if (!grip || grip.id !== e.pointerId) return
    if (!grip.moved) {
      if (Math.hypot(at.x - grip.startX, at.y - grip.startY) < SLOP_PX) return
      if (grip.candidate && !h.dragStart(grip.candidate)) grip.candidate = null
      grip.moved = true
      stage.classList.toggle('grabbing', !grip.candidate)
    }
    if (grip.candidate) h.dragTo(grip.candidate, at.x + grip.offX, at.y + grip.offY)
    else {
      h.setView(panned(h.view(), at.x - before.x, at.y - before.y))
      h.hover(null)
    }
  }
  const pinch = (id: number, before: Finger, at: Finger) => {
    const other = [...fingers].find(([key]) => key !== id)?.[1]
    if (!other) return
    const was = Math.hypot(before.x - other.x, before.y - other.y)
    const now = Math.hypot(at.x - other.x, at.y - other.y)
    const mid = { x: (at.x + other.x) / 2, y: (at.y + other.y) / 2 }
    const view = panned(h.view(), (at.x - before.x) / 2, (at.y - before.y) / 2)
    h.setView(was > 8 && now > 8 ? zoomed(view, now / was, mid.x, mid.y) : view)
  }
  const up = (e: PointerEvent) => {
    const at = place(e)
    fingers.delete(e.pointerId)
    stage.classList.remove('grabbing')
    const held = grip
    if (!held || held.id !== e.pointerId) return
    grip = null
    if (held.moved) {
      if (held.candidate) h.dragEnd(held.candidate, e.type === 'pointerup')
    } else if (e.type === 'pointerup' && !pinched) {
      if (held.candidate) h.tapCandidate(held.candidate)
      else h.tap(at.x, at.y)
    }
  }
  const leave = () => {
    if (fingers.size === 0) h.hover(null)
  }
  const wheel = (e: WheelEvent) => {
    e.preventDefault()
    const at = place(e)
    const px = e.deltaMode === 1 ? e.deltaY * 33 : e.deltaMode === 2 ? e.deltaY * 300 : e.deltaY
    h.setView(zoomed(h.view(), Math.exp(-Math.max(-300, Math.min(300, px)) * WHEEL_PER_PX), at.x, at.y))
  }
  stage.addEventListener('pointerdown', down)
  stage.addEventListener('pointermove', move)
  stage.addEventListener('pointerup', up)
  stage.addEventListener('pointercancel', up)
  stage.addEventListener('pointerleave', leave)
  stage.addEventListener('wheel', wheel, { passive: false })
  return () => {
    stage.removeEventListener('pointerdown', down)
    stage.removeEventListener('pointermove', move)
    stage.removeEventListener('pointerup', up)
    stage.removeEventListener('pointercancel', up)
    stage.removeEventListener('pointerleave', leave)
    stage.removeEventListener('wheel', wheel)
  }
}
