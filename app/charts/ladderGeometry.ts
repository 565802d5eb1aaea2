import type { Ladder } from '../../core/index.ts'
import { type Tick, ticksWithin } from './axes.ts'
import { type Point, pathOf, round3, type Scale, scaleOf } from './drawing.ts'

export interface LadderInput {
  /** null while none is computed: the scale alone. */
  readonly ladder: Ladder | null
  /** Top of the scale, m above ground. */
  readonly topM: number
  /** Pixels from the top of the scale to the ground. */
  readonly lengthPx: number
  /** Widest of each strip, px. */
  readonly stripPx: number
  /** Line height of the labels, px; labels of needs are kept this far apart. */
  readonly linePx: number
}
export interface LadderGeometry {
  /** Mast height, m above ground, to y (0 at the top of the scale). */
  readonly mast: Scale
  readonly ticks: readonly Tick[]
  /** Closed outline of the strip, x from 0: in sight %, 100 % = stripPx. Empty when there is no ladder. */
  readonly inSight: string
  /** Closed outline of the strip, x from 0: km² over 40 dB, the ladder's greatest = stripPx. */
  readonly clutter: string
  /** The same of the first need's usable share, and of the area of all needs short of suppression. */
  readonly usable: string
  readonly short: string
  /** Every stretch of mast heights in which a need is met at both k, as y from top to bottom; a taller mast can lose one. */
  readonly intervals: readonly {
    readonly needId: string
    readonly name: string
    readonly stretches: readonly (readonly [top: number, bottom: number])[]
  }[]
  /** Where each need is first met; `labelY` differs from `y` where labels would collide. Needs not met within the ladder are apart. */
  readonly met: readonly { readonly needId: string; readonly name: string; readonly y: number; readonly labelY: number }[]
  readonly notMet: readonly { readonly needId: string; readonly name: string }[]
  /** Strip values at a mast height, straight between the ladder's rungs; null outside it. */
  valuesAt(heightM: number): LadderValues | null
}
/** Values of the strips at one mast height. */
export interface LadderValues {
  readonly inSightPct: number
  readonly over40Km2: number
  readonly usablePct: number
  readonly shortKm2: number
}

/** Geometry of the mast as a ruler: scale, the two strips that run up it, and the dashed lines of the needs. */
export function ladderGeometry(input: LadderInput): LadderGeometry {
  const { ladder, topM, lengthPx, stripPx, linePx } = input
  const mast = scaleOf(0, topM, lengthPx, 0)
  const ticks = ticksWithin(0, topM, Math.max(2, Math.min(8, Math.floor(lengthPx / (2.5 * linePx)))))
  if (!ladder || ladder.heightsM.length === 0)
    return { mast, ticks, inSight: '', clutter: '', usable: '', short: '', intervals: [], met: [], notMet: [], valuesAt: () => null }
  const most = Math.max(...ladder.over40Km2)
  const strip = (values: readonly number[], full: number): string => {
    const edge = ladder.heightsM.map((m, i): Point => [full > 0 ? (stripPx * Math.max(0, values[i])) / full : 0, mast.at(m)])
    return pathOf([[0, edge[0][1]], ...edge, [0, edge[edge.length - 1][1]]], true)
  }
  const reached = ladder.needMetAtM.filter((n) => n.heightM !== null && n.heightM <= topM)
  const placed = spread(
    reached.map((n) => mast.at(n.heightM as number)),
    linePx,
    lengthPx,
  )
  return {
    mast,
    ticks,
    inSight: strip(ladder.inSightPct, 100),
    clutter: strip(ladder.over40Km2, most),
    usable: strip(ladder.usablePct, 100),
    short: strip(ladder.shortKm2, Math.max(...ladder.shortKm2)),
    intervals: ladder.needMet.map((n) => ({
      needId: n.needId,
      name: n.name,
      stretches: n.intervals
        .filter(([from]) => from <= topM)
        .map(([from, to]) => [round3(mast.at(Math.min(to, topM))), round3(mast.at(from))] as const),
    })),
    met: reached.map((n, i) => ({ needId: n.needId, name: n.name, y: round3(mast.at(n.heightM as number)), labelY: placed[i] })),
    notMet: ladder.needMetAtM.filter((n) => !reached.includes(n)).map((n) => ({ needId: n.needId, name: n.name })),
    valuesAt: (heightM) => between(ladder, heightM),
  }
}

/** Positions at least `gap` apart, in their order from the bottom up, none outside [gap, length]. */
function spread(ys: readonly number[], gap: number, length: number): number[] {
  const order = ys.map((_, i) => i).sort((a, b) => ys[b] - ys[a])
  const out = [...ys]
  let last = length + gap
  for (const i of order) {
    out[i] = Math.min(ys[i], last - gap)
    last = out[i]
  }
  last = 0
  for (const i of [...order].reverse()) {
    out[i] = Math.max(out[i], last + gap)
    last = out[i]
  }
  return out.map(round3)
}

function between(ladder: Ladder, heightM: number): LadderValues | null {
  const h = ladder.heightsM
  if (heightM < h[0] || heightM > h[h.length - 1]) return null
  let i = 0
  while (i < h.length - 2 && h[i + 1] < heightM) i++
  const f = h.length === 1 ? 0 : (heightM - h[i]) / (h[i + 1] - h[i])
  const mix = (v: readonly number[]): number => (h.length === 1 ? v[0] : v[i] + f * (v[i + 1] - v[i]))
  return {
    inSightPct: mix(ladder.inSightPct),
    over40Km2: mix(ladder.over40Km2),
    usablePct: mix(ladder.usablePct),
    shortKm2: mix(ladder.shortKm2),
  }
}
