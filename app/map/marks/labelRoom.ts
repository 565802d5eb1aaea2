import type { Rect } from './Rings.tsx'

const CELL_PX = 64

/** Room for labels on a sheet: who comes first keeps it. Boxes are found by a grid, so that thousands cost little. */
export class LabelRoom {
  private readonly cells = new Map<string, Rect[]>()

  /** Takes the room whoever lies there: a mark that is drawn in any case. */
  take(box: Rect): void {
    for (const key of keysOf(box)) {
      const there = this.cells.get(key)
      if (there) there.push(box)
      else this.cells.set(key, [box])
    }
  }
  /** Takes the room when nothing lies there; false when something does. */
  tryTake(box: Rect): boolean {
    for (const key of keysOf(box))
      for (const u of this.cells.get(key) ?? [])
        if (box.left < u.right && u.left < box.right && box.top < u.bottom && u.top < box.bottom) return false
    this.take(box)
    return true
  }
}
function* keysOf(box: Rect): Generator<string> {
  for (let x = Math.floor(box.left / CELL_PX); x <= Math.floor(box.right / CELL_PX); x++)
    for (let y = Math.floor(box.top / CELL_PX); y <= Math.floor(box.bottom / CELL_PX); y++) yield `${x} ${y}`
}
