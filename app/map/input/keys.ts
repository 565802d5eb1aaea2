import type { View } from '../../../core/index.ts'
import { panned, zoomed } from '../camera.ts'

export interface KeyHandlers {
  readonly view: () => View
  readonly setView: (view: View) => void
  readonly fit: () => void
  /** Enter: what a click on the middle of the map does. */
  readonly take: () => void
  readonly escape: () => void
  /** A candidate has the focus: moved by pixels, set, or put back. */
  readonly nudge: (candidate: string, dx: number, dy: number) => void
  readonly nudgeEnd: (candidate: string, kept: boolean) => void
  readonly tapCandidate: (candidate: string) => void
  /** Is this candidate being moved by keys? */
  readonly nudging: (candidate: string) => boolean
}
const ARROWS: Readonly<Record<string, readonly [dx: number, dy: number]>> = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, -1],
  ArrowDown: [0, 1],
}
const PAN_PX = 64
const NUDGE_PX = 8

/** One key on the stage or on a candidate's mark; true = it was ours. */
export function takeKey(
  e: { key: string; shiftKey: boolean; ctrlKey: boolean; metaKey: boolean; altKey: boolean },
  candidate: string | null,
  h: KeyHandlers,
): boolean {
  if (e.ctrlKey || e.metaKey || e.altKey) return false
  const arrow = ARROWS[e.key]
  if (candidate !== null) {
    if (arrow) {
      const step = e.shiftKey ? 1 : NUDGE_PX
      h.nudge(candidate, arrow[0] * step, arrow[1] * step)
      return true
    }
    if (e.key === 'Enter' || e.key === ' ') {
      if (h.nudging(candidate)) h.nudgeEnd(candidate, true)
      else h.tapCandidate(candidate)
      return true
    }
    if (e.key === 'Escape' && h.nudging(candidate)) {
      h.nudgeEnd(candidate, false)
      return true
    }
  }
  const view = h.view()
  if (arrow) {
    const step = e.shiftKey ? PAN_PX / 8 : PAN_PX
    h.setView(panned(view, -arrow[0] * step, -arrow[1] * step))
    return true
  }
  switch (e.key) {
    case '+':
    case '=':
      h.setView(zoomed(view, 1.5, view.width / 2, view.height / 2))
      return true
    case '-':
    case '_':
      h.setView(zoomed(view, 1 / 1.5, view.width / 2, view.height / 2))
      return true
    case 'Home':
      h.fit()
      return true
    case 'Enter':
      h.take()
      return true
    case 'Escape':
      h.escape()
      return true
  }
  return false
}
