import type { LonLat, Obstacle } from '../../../core/index.ts'
import { textWidth } from '../../charts/index.ts'
import type { MapCandidate } from '../types.ts'
import { LabelRoom } from './labelRoom.ts'
import { offsetFrom } from './worldPaths.ts'

/** Side of its ring a candidate's letter stands on. */
export type Side = 'right' | 'left'
export interface MarkLabels {
  /** Side of each candidate's letter; those absent find no room and show their ring alone. */
  readonly candidates: ReadonlyMap<string, Side>
  /** Obstacles that are named, by their place in the list; px from the anchor. */
  readonly obstacles: readonly { readonly n: number; readonly x: number; readonly y: number }[]
}
/** Half the room of a ring, height of a letter's line, gap from the middle of the ring to the letter, px. */
const RING_PX = 11
const LINE_PX = 16
const GAP_PX = 14

/**
 * Which letters and names are shown at a scale: the candidate on show first, then the others in their order, then obstacles from the highest down.
 * Worked out from an anchor and not from the view, so that nothing comes and goes while the map is moved.
 */
export function markLabels(
  anchor: LonLat,
  worldPerPx: number,
  candidates: readonly MapCandidate[],
  selected: string | null,
  obstacles: readonly Obstacle[],
): MarkLabels {
  const room = new LabelRoom()
  const at = (place: LonLat) => offsetFrom(anchor, place).map((m) => m / worldPerPx) as [number, number]
  const rings = candidates.map((c) => ({ c, place: at(c) }))
  for (const {
    place: [x, y],
  } of rings) // biome-ignore format: one line
    room.take({ left: x - RING_PX, right: x + RING_PX, top: y - RING_PX, bottom: y + RING_PX })
  const sides = new Map<string, Side>()
  for (const {
    c,
    place: [x, y],
  } of rings.sort((a, b) => Number(b.c.id === selected) - Number(a.c.id === selected))) {
    // biome-ignore format: one line
    const wide = textWidth(c.id, 15) + 2
    const box = (left: number) => ({ left, right: left + wide, top: y - LINE_PX / 2, bottom: y + LINE_PX / 2 })
    if (room.tryTake(box(x + GAP_PX - 2))) sides.set(c.id, 'right')
    else if (room.tryTake(box(x - GAP_PX + 2 - wide))) sides.set(c.id, 'left')
    else if (c.id === selected) sides.set(c.id, 'right')
  }
  const named = obstacles.map((o, n) => ({ o, n })).filter(({ o }) => o.path.length === 1 && o.name !== '')
  named.sort((a, b) => tallness(b.o) - tallness(a.o))
  const shown = named.flatMap(({ o, n }) => {
    const [x, y] = at(o.path[0]!)
    const box = { left: x + 5, right: x + 7 + textWidth(o.name, 12), top: y - 14, bottom: y }
    return room.tryTake(box) ? [{ n, x, y }] : []
  })
  return { candidates: sides, obstacles: shown }
}
/** What obstacles are ordered by: height above ground, or of the top above the sea where that is all that is stated, m. */
export const tallness = (o: Obstacle): number => o.heightM ?? o.topM ?? 0
