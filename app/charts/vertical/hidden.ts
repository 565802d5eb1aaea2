import type { VerticalCut } from '../../../core/index.ts'
import { type Item, type Point, pathOf } from '../drawing.ts'
import type { Frame } from './frame.ts'

const HATCH_APART = 7
const HATCH_STEP = 2

/** What the ground hides, in ink with a hatch; the ground itself under it; unknown columns outlined. Lies over the contours. */
export function hiddenItems(cut: VerticalCut, f: Frame): { under: Item[]; ground: Item[] } {
  const columns = cut.rangeM.length
  const limit = (h: number): number => Math.min(f.topM, Math.max(f.bottomM, h))
  const under: Item[] = []
  const ground: Item[] = []
  for (const [first, last] of runs(columns, (i) => Number.isFinite(cut.floorM[i]))) {
    const floor = line(cut, f, first, last, (i) => limit(cut.floorM[i]))
    const base = line(cut, f, first, last, (i) => limit(Math.max(f.bottomM, cut.groundM[i])))
    const foot = line(cut, f, first, last, () => f.bottomM)
    const shape = pathOf([...floor, ...[...base].reverse()], true)
    under.push({ kind: 'path', d: shape, fill: 'sheet' }, { kind: 'path', d: shape, fill: 'ink', opacity: 0.12 })
    ground.push({ kind: 'path', d: pathOf([...base, ...[...foot].reverse()], true), fill: 'sheet' })
    ground.push({ kind: 'path', d: pathOf([...base, ...[...foot].reverse()], true), fill: 'ink', opacity: 0.34 })
    ground.push({ kind: 'path', d: pathOf(base), stroke: 'ink', width: 0.8 })
    under.push({ kind: 'path', d: hatch(cut, f, first, last), stroke: 'ink', width: 0.6, opacity: 0.32 })
  }
  for (const [first, last] of runs(columns, (i) => !Number.isFinite(cut.floorM[i]))) {
    const top = line(cut, f, first, last, () => f.topM)
    const foot = line(cut, f, first, last, () => f.bottomM)
    under.push({ kind: 'path', d: pathOf([...top, ...[...foot].reverse()], true), fill: 'sheet' })
    under.push({ kind: 'path', d: pathOf([...top, ...[...foot].reverse()], true), stroke: 'warn', width: 0.8, dash: [3, 3] })
  }
  return { under, ground }
}

/** First and last column of every run for which something holds. */
export function runs(count: number, holds: (i: number) => boolean): [number, number][] {
  const out: [number, number][] = []
  for (let i = 0; i < count; ) {
    if (!holds(i)) {
      i++
      continue
    }
    let end = i
    while (end + 1 < count && holds(end + 1)) end++
    out.push([i, end])
    i = end + 1
  }
  return out
}
/** A line over columns first … last, from edge to edge of them. */
function line(cut: VerticalCut, f: Frame, first: number, last: number, heightM: (i: number) => number): Point[] {
  const half = cut.rangeM.length > 1 ? (cut.rangeM[1] - cut.rangeM[0]) / 2 : 0
  const points: Point[] = [f.place(cut.rangeM[first] - half, heightM(first))]
  for (let i = first; i <= last; i++) points.push(f.place(cut.rangeM[i], heightM(i)))
  points.push(f.place(cut.rangeM[last] + half, heightM(last)))
  return points
}

/** Lines at 45° through what lies between ground and floor. */
function hatch(cut: VerticalCut, f: Frame, first: number, last: number): string {
  const { box } = f
  const step = cut.rangeM.length > 1 ? cut.rangeM[1] - cut.rangeM[0] : 1
  const half = step / 2
  const left = f.range.at(cut.rangeM[first] - half)
  const right = f.range.at(cut.rangeM[last] + half)
  let d = ''
  const inside = (x: number, y: number): boolean => {
    if (x < left || x > right || y < box.top || y > box.bottom) return false
    const rangeM = f.range.invert(x)
    const i = Math.min(last, Math.max(first, Math.round((rangeM - cut.rangeM[0]) / step)))
    const h = f.heightAt(rangeM, y)
    return h < cut.floorM[i] && h > cut.groundM[i]
  }
  for (let c = left + box.top; c <= right + box.bottom; c += HATCH_APART) {
    let open: Point | null = null
    let lastIn: Point | null = null
    for (let x = Math.max(left, c - box.bottom); x <= Math.min(right, c - box.top); x += HATCH_STEP) {
      const y = c - x
      if (inside(x, y)) {
        open ??= [x, y]
        lastIn = [x, y]
      } else if (open && lastIn) {
        d += pathOf([open, lastIn])
        open = null
      }
    }
    if (open && lastIn) d += pathOf([open, lastIn])
  }
  return d
}
