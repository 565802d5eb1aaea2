import type { Ladder } from '../../../core/index.ts'

/** Heights between stated ones are tried in steps of this, m. */
export const BETWEEN_STEP_M = 0.5
/** A pointer this near a stated height takes it, px. */
export const SNAP_PX = 7

/** The height under a pointer: a stated one when it is near, else the nearest half metre inside the scale. */
export function snapped(heightM: number, statedM: readonly number[], pxPerM: number, topM: number): number {
  const inside = Math.min(topM, Math.max(BETWEEN_STEP_M, heightM))
  let best: number | null = null
  for (const s of statedM)
    if (Math.abs(s - inside) * pxPerM <= SNAP_PX && (best === null || Math.abs(s - inside) < Math.abs(best - inside))) best = s
  return best ?? Math.round(inside / BETWEEN_STEP_M) * BETWEEN_STEP_M
}
/** The next stated height above (+1) or below (−1); the same when there is none. */
export function nextStated(heightM: number, statedM: readonly number[], way: 1 | -1): number {
  const beyond = statedM.filter((s) => (s - heightM) * way > 1e-9)
  return beyond.length === 0 ? heightM : way > 0 ? Math.min(...beyond) : Math.max(...beyond)
}
/** Baselines for labels that would like to stand at `wanted` (px, down): at least `gap` apart from each other and from `fixed`, inside [low, high], moved as little as can be. */
export function labelPlaces(wanted: readonly number[], fixed: readonly number[], gap: number, low: number, high: number): number[] {
  const taken = [...fixed]
  const free = (y: number) => y >= low && y <= high && taken.every((t) => Math.abs(t - y) >= gap - 1e-6)
  const out = wanted.map(() => Number.NaN)
  const order = wanted.map((_, n) => n).sort((a, b) => wanted[b]! - wanted[a]!)
  for (const n of order) {
    const start = Math.min(high, Math.max(low, wanted[n]!))
    let place = start
    for (let d = 0; d <= high - low; d++) {
      if (free(start - d)) {
        place = start - d
        break
      }
      if (free(start + d)) {
        place = start + d
        break
      }
    }
    taken.push(place)
    out[n] = place
  }
  return out
}

const OCTANT_NAMES = ['N', 'NE', 'E', 'SE', 'S', 'SW', 'W', 'NW'] as const
/** Gains smaller than this are not told, percentage points. */
const LEAST_GAIN = 0.5
/** What one more step of the ladder brings by octant, most first: percentage points of what is usable there; null at the top and without a ladder. */
export function nextStep(
  ladder: Ladder | null,
  heightM: number,
): { readonly toM: number; readonly octants: readonly { readonly name: string; readonly pct: number }[] } | null {
  const at = ladder ? ladder.heightsM.findIndex((h) => Math.abs(h - heightM) < 1e-9) : -1
  const toM = ladder?.heightsM[at + 1]
  const [now, then] = [ladder?.octantPct[at], ladder?.octantPct[at + 1]]
  if (at < 0 || toM === undefined || !now || !then) return null
  const octants = OCTANT_NAMES.flatMap((name, n) => {
    const [a, b] = [now[n] ?? null, then[n] ?? null]
    return a === null || b === null || Math.abs(b - a) < LEAST_GAIN ? [] : [{ name, pct: b - a }]
  })
  return { toM, octants: octants.sort((a, b) => b.pct - a.pct) }
}
/** `+12` or `−3`, whole percentage points. */
export const signedPct = (pct: number): string => `${pct < 0 ? '−' : '+'}${Math.round(Math.abs(pct))}`
