import { decibel } from '../cells/decibelTable.ts'
import { gammaFunction } from '../land/weibull.ts'

/** Steps of level and of spread (a factor), dB, in the histogram; weights are shared between neighbours. */
const STEP_DB = 0.5
const LOW_DB = -100
const LEVELS = 601
const STEP_SPREAD_DB = 0.4
const LOW_SPREAD = 0.25
const LOW_SPREAD_DB = 10 * Math.log10(LOW_SPREAD)
const SPREADS = 39
/** Level over mean at which exceedance is tabled, dB. */
const OVER_LOW_DB = -150
const OVERS = 441

/** Share of area whose clutter exceeds a level so far over its mean, by spread; made when first asked for. */
const tables: (Float64Array | undefined)[] = []
function exceedance(spreadBin: number): Float64Array {
  let t = tables[spreadBin]
  if (!t) {
    const a = LOW_SPREAD * 10 ** ((spreadBin * STEP_SPREAD_DB) / 10)
    const scale = gammaFunction(1 + a)
    t = Float64Array.from({ length: OVERS }, (_, n) => Math.exp(-((10 ** ((OVER_LOW_DB + n * STEP_DB) / 10) * scale) ** (1 / a))))
    tables[spreadBin] = t
  }
  return t
}

/** Clutter of many cells as one distribution of power over area: each cell Weibull about its mean, clutter-free area as zero. */
export interface Mixture {
  /** Area by spread and mean level. */
  readonly area: Float32Array
  /** Area in all, area with clutter, Σ area × mean (ratio). */
  whole: number
  cluttered: number
  power: number
}
export const makeMixture = (): Mixture => ({ area: new Float32Array(SPREADS * LEVELS), whole: 0, cluttered: 0, power: 0 })

/** Adds a cell: mean clutter as ratio (0 or NaN: clutter-free), its level in dB, spread a_w (0.25 to 8), area in any one unit. */
export function addToMixture(x: Mixture, meanRatio: number, meanDb: number, spread: number, area: number): void {
  x.whole += area
  if (!(meanRatio > 0) || !(meanDb > LOW_DB)) return
  x.cluttered += area
  x.power += area * meanRatio
  const l = Math.min(LEVELS - 1.001, (meanDb - LOW_DB) / STEP_DB)
  const s = Math.min(SPREADS - 1.001, Math.max(0, (decibel(spread) - LOW_SPREAD_DB) / STEP_SPREAD_DB))
  const lk = l | 0
  const sk = s | 0
  const at = sk * LEVELS + lk
  const lw = l - lk
  const sw = s - sk
  x.area[at] += area * (1 - lw) * (1 - sw)
  x.area[at + 1] += area * lw * (1 - sw)
  x.area[at + LEVELS] += area * (1 - lw) * sw
  x.area[at + LEVELS + 1] += area * lw * sw
}

/** Adds one mixture to another. */
export function addMixture(to: Mixture, from: Mixture): void {
  for (let k = 0; k < to.area.length; k++) to.area[k] += from.area[k]
  to.whole += from.whole
  to.cluttered += from.cluttered
  to.power += from.power
}

/** Area mean of the clutter, dB; null where there is none. */
export const meanOfMixture = (x: Mixture): number | null => (x.power > 0 ? decibel(x.power / x.whole) : null)

/**
 * Level not exceeded by the clutter of a share p (0…1) of the area, dB: x with Σ wᵢ exp[−(x·Γ(1+aᵢ)/meanᵢ)^(1/aᵢ)] = 1 − p over all area,
 * clutter-free area as zero; null where that much of the area has no clutter. Right to 0.05 dB. Mathematics.
 */
export function levelOfMixture(x: Mixture, p: number): number | null {
  const wanted = (1 - p) * x.whole
  if (!(x.cluttered > wanted)) return null
  let lo = 0
  let hi = LEVELS - 1 + 80
  if (areaOver(x, lo) <= wanted) return LOW_DB
  while (hi - lo > 1) {
    const mid = (lo + hi) >> 1
    if (areaOver(x, mid) > wanted) lo = mid
    else hi = mid
  }
  const above = Math.log(areaOver(x, lo))
  const below = Math.log(Math.max(1e-300, areaOver(x, hi)))
  return LOW_DB + STEP_DB * (lo + (above - Math.log(wanted)) / (above - below))
}

/** Area whose clutter exceeds the level of a step. */
function areaOver(x: Mixture, level: number): number {
  const zero = -OVER_LOW_DB / STEP_DB
  let sum = 0
  for (let s = 0; s < SPREADS; s++) {
    const from = s * LEVELS
    let t: Float64Array | null = null
    for (let l = 0; l < LEVELS; l++) {
      const w = x.area[from + l]
      if (w === 0) continue
      t ??= exceedance(s)
      const over = level - l + zero
      sum += w * (over < 0 ? 1 : over >= OVERS ? 0 : t[over])
    }
  }
  return sum
}
