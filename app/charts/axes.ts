import { scaleLinear } from 'd3-scale'
import { decimalsOf, formatNumber } from '../words/index.ts'
import { type Box, type Item, lineOf, type Scale } from './drawing.ts'

export interface Tick {
  readonly at: number
  readonly label: string
}

/** Round domain that holds [low, high] and about `count` round ticks in it; a flat range is opened by 1. */
export function niceTicks(low: number, high: number, count: number): { from: number; to: number; ticks: Tick[] } {
  const scale = scaleLinear()
    .domain(low === high ? [low, low + 1] : [low, high])
    .nice(count)
  const [from, to] = scale.domain()
  return { from, to, ticks: numberTicks(scale.ticks(count)) }
}
/** Round ticks inside [low, high] without widening it. */
export const ticksWithin = (low: number, high: number, count: number): Tick[] => numberTicks(scaleLinear().domain([low, high]).ticks(count))

function numberTicks(values: readonly number[]): Tick[] {
  const step = values.length > 1 ? values[1] - values[0] : 1
  const decimals = decimalsOf(Number(step.toPrecision(6)))
  return values.map((at) => ({ at, label: formatNumber(at, decimals) }))
}

/** Light rules across the plot at the ticks of a vertical axis, numbers at the left, title above them. */
export function yAxis(box: Box, scale: Scale, ticks: readonly Tick[], title: string, size: number): Item[] {
  const items: Item[] = []
  for (const t of ticks) {
    const y = scale.at(t.at)
    items.push({ kind: 'path', d: lineOf(box.left, y, box.right, y), stroke: 'line', width: 0.6 })
    items.push({ kind: 'text', x: box.left - 0.45 * size, y: y + 0.34 * size, text: t.label, size, ink: 'ink-3', anchor: 'end' })
  }
  if (title !== '') items.push({ kind: 'text', x: 0, y: size, text: title, size, ink: 'ink-2' })
  return items
}

/** Short ticks under the plot, numbers below, title at the right end of the line below those. */
export function xAxis(box: Box, scale: Scale, ticks: readonly Tick[], title: string, size: number): Item[] {
  const items: Item[] = [{ kind: 'path', d: lineOf(box.left, box.bottom, box.right, box.bottom), stroke: 'ink-3', width: 0.6 }]
  for (const t of ticks) {
    const x = scale.at(t.at)
    items.push({ kind: 'path', d: lineOf(x, box.bottom, x, box.bottom + 0.3 * size), stroke: 'ink-3', width: 0.6 })
    items.push({ kind: 'text', x, y: box.bottom + 1.35 * size, text: t.label, size, ink: 'ink-3', anchor: 'middle' })
  }
  if (title !== '') items.push({ kind: 'text', x: box.right, y: box.bottom + 2.6 * size, text: title, size, ink: 'ink-2', anchor: 'end' })
  return items
}

const WINDS = ['N', 'NE', 'E', 'SE', 'S', 'SW', 'W', 'NW', 'N'] as const
/** Azimuth axis from true north, N E S W named: winds alone where room is short, degrees with them in print. */
export function azimuthTicks(style: 'winds' | 'degrees'): Tick[] {
  return WINDS.map((wind, i) => {
    const cardinal = i % 2 === 0
    const label = style === 'winds' ? wind : cardinal ? `${i * 45}°\u202f${wind}` : `${i * 45}°`
    return { at: i * 45, label }
  })
}
