import { useEffect } from 'react'
import type { PaneId, View } from '../../core/index.ts'
import { resized } from './camera.ts'
import type { Channel, LinkedView } from './types.ts'

/** Keeps the middle and scale of two maps the same: what one shows, the other shows in its own size. */
export function useLink(camera: Channel<View>, link: Channel<LinkedView | null> | undefined, pane: PaneId | undefined): void {
  useEffect(() => {
    if (!link) return
    let taking = false
    const take = (linked: LinkedView | null) => {
      const { width, height, night } = camera.get()
      if (!linked || linked.from === pane || width < 1) return
      taking = true
      camera.set({ ...resized(linked.view, width, height), night })
      taking = false
    }
    const give = (view: View) => {
      if (!taking && view.width >= 1) link.set({ from: pane, view })
    }
    // the second map starts where the first is
    if (pane) take(link.get())
    else give(camera.get())
    const stops = [link.listen(take), camera.listen(give)]
    return () => {
      for (const stop of stops) stop()
    }
  }, [camera, link, pane])
}
