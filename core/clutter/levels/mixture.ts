import { decibel } from '../cells/decibelTable.ts'
import { gammaFunction } from '../land/weibull.ts'

/** Steps of level and of spread (a factor), dB, in the histogram; between two spreads the weight is shared. */
const STEP_DB = 0.25
const LOW_DB = -100
const LEVELS = 1201
const STEP_SPREAD_DB = 0.4
const LOW_SPREAD = 0.25
const LOW_SPREAD_DB = 10 * Math.log10(LOW_SPREAD)
const SPREADS = 39
/** Level over mean at which exceedance is tabled, dB. */
const OVER_LOW_DB = -150
const OVERS = 881

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
  /** Area by spread and mean level; 1 for spreads that hold any. */
  readonly area: Float32Array
  readonly used: Uint8Array
  /** Area in all, area with clutter, Σ area × mean (ratio). */
  whole: number
  cluttered: number
  power: number
}
export const makeMixture = (): Mixture => ({
  area: new Float32Array(SPREADS * LEVELS),
  used: new Uint8Array(SPREADS),
  whole: 0,
  cluttered: 0,
  power: 0,
})

/** Where a spread lies in the histogram, in rows; by hundredths of a_w up to 8. */
const SPREAD_ROW = Float32Array.from({ length: 801 }, (_, n) =>
  Math.min(SPREADS - 1.001, Math.max(0, (decibel(Math.max(0.01, n / 100)) - LOW_SPREAD_DB) / STEP_SPREAD_DB)),
)

/**
 * Adds the clutter of cells [from, to) of one azimuth, each of the area of its gate (any one unit): mean dB by gate (NaN: clutter-free), spread
 * a_w (0.25 to 8) by cell, the azimuth's at `at0`. Their area is for the caller to add to `whole`.
 */
export function addCells(
  x: Mixture,
  meanDb: Float32Array,
  spread: Float32Array,
  at0: number,
  from: number,
  to: number,
  areas: Float64Array,
): void {
  let [cluttered, power] = [0, 0]
  for (let j = from; j < to; j++) {
    const db = meanDb[j]
    if (!(db > LOW_DB)) continue
    const area = areas[j]
    const level = Math.min(LEVELS - 1, ((db - LOW_DB) / STEP_DB + 0.5) | 0)
    const row = SPREAD_ROW[Math.min(800, (100 * spread[at0 + j] + 0.5) | 0)]
    const k = row | 0
    const at = k * LEVELS + level
    x.area[at] += area * (1 - row + k)
    x.area[at + LEVELS] += area * (row - k)
    x.used[k] = x.used[k + 1] = 1
    cluttered += area
    power += area * RATIO[Math.min(RATIOS - 1, ((db - LOW_DB) * 20 + 0.5) | 0)]
  }
  x.cluttered += cluttered
  x.power += power
}
/** Power ratios in steps of 0.05 dB. */
const RATIOS = 6001
const RATIO = Float64Array.from({ length: RATIOS }, (_, n) => 10 ** ((n / 20 + LOW_DB) / 10))

/** Adds one mixture to another. */
export function addMixture(to: Mixture, from: Mixture): void {
  for (let s = 0; s < SPREADS; s++) {
    if (!from.used[s]) continue
    to.used[s] = 1
    for (let k = s * LEVELS; k < (s + 1) * LEVELS; k++) to.area[k] += from.area[k]
  }
  to.whole += from.whole
  to.cluttered += from.cluttered
  to.power += from.power
}

/** Area mean of the clutter, dB; null where there is none. */
export const meanOfMixture = (x: Mixture): number | null => (x.power > 0 ? decibel(x.power / x.whole) : null)

/**
 * Levels not exceeded by the clutter of shares p (0…1) of the area, dB: x with Σ wᵢ exp[−(x·Γ(1+aᵢ)/meanᵢ)^(1/aᵢ)] = 1 − p over all area,
 * clutter-free area as zero; null where that much of the area has no clutter. Right to 0.2 dB, closer the more cells there are. Mathematics.
 */
export function levelsOfMixture(x: Mixture, ps: readonly number[]): (number | null)[] {
  const kinds = kindsOf(x)
  return ps.map((p) => {
    const wanted = (1 - p) * x.whole
    if (!(x.cluttered > wanted)) return null
    let lo = 0
    let hi = LEVELS - 1 + 160
    if (areaOver(kinds, lo) <= wanted) return LOW_DB
    while (hi - lo > 1) {
      const mid = (lo + hi) >> 1
      if (areaOver(kinds, mid) > wanted) lo = mid
      else hi = mid
    }
    const above = Math.log(areaOver(kinds, lo))
    const below = Math.log(Math.max(1e-300, areaOver(kinds, hi)))
    return LOW_DB + STEP_DB * (lo + (above - Math.log(wanted)) / (above - below))
  })
}

/** The entries of a mixture that hold area, spread by spread. */
interface Kinds {
  readonly spreads: readonly { readonly over: Float64Array; readonly levels: Int32Array; readonly area: Float64Array }[]
}
function kindsOf(x: Mixture): Kinds {
  const spreads: Kinds['spreads'][number][] = []
  for (let s = 0; s < SPREADS; s++) {
    if (!x.used[s]) continue
    const row = x.area.subarray(s * LEVELS, (s + 1) * LEVELS)
    const levels: number[] = []
    for (let l = 0; l < LEVELS; l++) if (row[l] > 0) levels.push(l)
    if (levels.length > 0)
      spreads.push({ over: exceedance(s), levels: Int32Array.from(levels), area: Float64Array.from(levels, (l) => row[l]) })
  }
  return { spreads }
}

/** Area whose clutter exceeds the level of a step. */
function areaOver({ spreads }: Kinds, level: number): number {
  const zero = -OVER_LOW_DB / STEP_DB
  let sum = 0
  for (const { over, levels, area } of spreads)
    for (let k = 0; k < levels.length; k++) {
      const n = level - levels[k] + zero
      sum += area[k] * (n < 0 ? 1 : n >= OVERS ? 0 : over[n])
    }
  return sum
}
