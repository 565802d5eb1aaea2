import type { Profile } from '../../core/index.ts'
import { CHART_WORDS } from '../words/index.ts'
import { type Box, type Item, lineOf, type Point, pathOf } from './drawing.ts'

type Place = (rangeM: number, heightM: number) => Point

/** The ray of a profile with its first Fresnel zone: whole as far as the controlling point, dashed beyond; a ring where it goes. */
export function rayItems(p: Profile, place: Place, box: Box, control: number): Item[] {
  const { ray } = p
  if (!ray) return []
  const inside = ([x, y]: Point): boolean => x >= box.left - 0.5 && x <= box.right + 0.5 && y >= box.top && y <= box.bottom
  const at = (i: number, offset: number): Point => {
    const h = ray.heightM[i]
    const point = place(p.distM[i], h + offset * ray.fresnelM[i])
    return Number.isFinite(h) && inside(point) ? point : [Number.NaN, 0]
  }
  const line = (from: number, to: number, offset = 0): Point[] => {
    const points: Point[] = []
    for (let i = Math.max(0, from); i < Math.min(to, p.distM.length); i++) points.push(at(i, offset))
    return points
  }
  const count = p.distM.length
  const start = place(0, p.antennaM)
  const target = place(ray.toRangeM, ray.toHeightM)
  const turn = control >= 0 && p.distM[control] < ray.toRangeM ? control + 1 : count
  const near: Point[] = [inside(start) ? start : [Number.NaN, 0], ...line(0, turn)]
  const far: Point[] = turn < count ? [...line(turn - 1, count), inside(target) ? target : [Number.NaN, 0]] : []
  const items: Item[] = [
    { kind: 'path', d: pathOf(line(0, count, 1)), stroke: 'ink-3', width: 0.7, dash: [2, 2] },
    { kind: 'path', d: pathOf(line(0, count, -1)), stroke: 'ink-3', width: 0.7, dash: [2, 2] },
    { kind: 'path', d: pathOf(turn < count ? near : [...near, inside(target) ? target : [Number.NaN, 0]]), stroke: 'ink', width: 0.8 },
    { kind: 'path', d: pathOf(far), stroke: 'ink', width: 0.6, dash: [4, 3] },
  ]
  if (inside(start)) {
    const foot = Number.isNaN(p.groundM[0]) ? box.bottom : place(0, p.groundM[0])[1]
    items.push({ kind: 'path', d: lineOf(start[0], foot, start[0], start[1]), stroke: 'ink', width: 2 })
  }
  if (inside(target)) items.push({ kind: 'circle', x: target[0], y: target[1], r: 3, stroke: 'ink', width: 1, fill: 'sheet' })
  return items
}

/** Where the name of the Fresnel zone goes: over its widest part; null where that is not shown. */
export function fresnelLabel(p: Profile, place: Place, box: Box): { text: string; x: number; y: number } | null {
  const { ray } = p
  if (!ray) return null
  let best = -1
  for (let i = 0; i < p.distM.length; i++) {
    if (!Number.isFinite(ray.fresnelM[i])) continue
    const [x, y] = place(p.distM[i], ray.heightM[i] + ray.fresnelM[i])
    if (x < box.left || x > box.right || y < box.top + 12) continue
    if (best < 0 || ray.fresnelM[i] > ray.fresnelM[best]) best = i
  }
  if (best < 0) return null
  const [x, y] = place(p.distM[best], ray.heightM[best] + ray.fresnelM[best])
  return { text: CHART_WORDS.fresnel, x, y: y - 9 }
}
