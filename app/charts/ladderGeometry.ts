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
  /** Where each need is first met; `labelY` differs from `y` where labels would collide. Needs not met within the ladder are apart. */
  readonly met: readonly { readonly needId: string; readonly name: string; readonly y: number; readonly labelY: number }[]
  readonly notMet: readonly { readonly needId: string; readonly name: string }[]
  /** Strip values at a mast height, straight between the ladder's rungs; null outside it. */
  valuesAt(heightM: number): { inSightPct: number; over40Km2: number } | null
}

/** Geometry of the mast as a ruler: scale, the two strips that run up it, and the dashed lines of the needs. */
export function ladderGeometry(input: LadderInput): LadderGeometry {
  const { ladder, topM, lengthPx, stripPx, linePx } = input
  const mast = scaleOf(0, topM, lengthPx, 0)
  const ticks = ticksWithin(0, topM, Math.max(2, Math.min(8, Math.floor(lengthPx / (2.5 * linePx)))))
  if (!ladder || ladder.heightsM.length === 0) return { mast, ticks, inSight: '', clutter: '', met: [], notMet: [], valuesAt: () => null }
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

function between(ladder: Ladder, heightM: number): { inSightPct: number; over40Km2: number } | null {
  const h = ladder.heightsM
  if (heightM < h[0] || heightM > h[h.length - 1]) return null
  let i = 0
  while (i < h.length - 2 && h[i + 1] < heightM) i++
  const f = h.length === 1 ? 0 : (heightM - h[i]) / (h[i + 1] - h[i])
  const mix = (v: readonly number[]): number => (h.length === 1 ? v[0] : v[i] + f * (v[i + 1] - v[i]))
  return { inSightPct: mix(ladder.inSightPct), over40Km2: mix(ladder.over40Km2) }
}
