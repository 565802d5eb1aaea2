import { type ClutterLevels, clutterLevels, fillCellStrength, LEVEL_RING_M, percentileOverMeanDb } from '../../clutter/index.ts'
import { weibullThresholdDb } from '../../detection/index.ts'
import type { RadarInput } from '../../radar/index.ts'
import type { OptionCells } from '../optionCells.ts'

/** Range of clutter-to-noise the receiver takes linearly, dB: stated, else 6.02 × bits − 6; null where neither is stated. */
export function receiverLinearRangeDb(r: RadarInput): number | null {
  const { bits, kind } = r.suppression
  return r.receiverLinearRangeDb ?? (bits === null || kind === 'none' ? null : 6.02 * bits - 6)
}

/** Where clutter drives the receiver out of its linear range nothing is suppressed. */
export interface Overload {
  readonly limitDb: number
  /** 99 % level of the clutter of a cell over its mean, tenths of a dB, rounded up. */
  readonly excessTenths: Uint8Array
}
const SHARE = 0.99

/** What the spikes of an option's clutter decide, kept with it. */
interface Spikes {
  readonly overload: Overload | null
  readonly riseDb: Float32Array | null
  readonly levels: ClutterLevels
}
const known = new WeakMap<OptionCells['clutter'], Spikes>()
function spikesOf(o: OptionCells): Spikes {
  let found = known.get(o.clutter)
  if (!found) {
    const spread = new Float32Array(o.site.groundM.length)
    const options = { weather: o.atmosphere, ...(o.landTable ? { landTable: o.landTable } : {}) }
    fillCellStrength(o.site, o.mask, o.ground.codes, o.place, o.heightM, o.radar, options, { strengthDb: null, spread })
    const levels = clutterLevels(o.clutter, o.mask, spread, o.place.lat, LEVEL_RING_M.nm)
    found = {
      levels,
      overload: overloadFrom(o, spread, levels),
      riseDb: o.radar.detector === 'areaCfar' ? riseFrom(spread, o.radar.pfa) : null,
    }
    known.set(o.clutter, found)
  }
  return found
}

/** Levels of C/N by ring of 5 NM and octant: mean, 90 and 99 %. */
export const clutterLevelsOf = (o: OptionCells): ClutterLevels => spikesOf(o).levels

/** Overload of an option; null where the receiver has no limit or no clutter reaches it. */
export const overloadOf = (o: OptionCells): Overload | null => (receiverLinearRangeDb(o.radar) === null ? null : spikesOf(o).overload)

/**
 * How far the spikes of each cell raise the threshold of an area CFAR over that for noise-like clutter of the same mean, dB; null for a detector
 * over noise. Single sample of Weibull power: with care where a filter has been through it.
 */
export const thresholdRiseOf = (o: OptionCells): Float32Array | null => (o.radar.detector === 'areaCfar' ? spikesOf(o).riseDb : null)

/** Turns spreads into rises, in place of a second grid. */
function riseFrom(spread: Float32Array, pfa: number): Float32Array {
  const rise = Float64Array.from({ length: 801 }, (_, n) => Math.max(0, weibullThresholdDb(Math.max(1, n / 100), pfa).extraDb))
  return spread.map((a) => rise[Math.min(800, Math.round(100 * a))])
}

function overloadFrom(o: OptionCells, spread: Float32Array, { peak }: ClutterLevels): Overload | null {
  const limitDb = receiverLinearRangeDb(o.radar)
  if (limitDb === null || !peak || !(peak.p99Db > limitDb)) return null
  // a_w by hundredths
  const over = Float64Array.from({ length: 801 }, (_, n) => percentileOverMeanDb(Math.max(0.1, n / 100), SHARE))
  const excessTenths = new Uint8Array(spread.length)
  for (let at = 0; at < spread.length; at++)
    excessTenths[at] = Math.ceil(10 * Math.max(0, over[Math.min(800, Math.round(100 * spread[at]))]))
  return { limitDb, excessTenths }
}

/** The mark of an option whose clutter overloads the receiver, with the share of its cells where it does; empty where none. */
export function overloadNotes(o: OptionCells): { readonly mark: string; readonly about: string; readonly share: number }[] {
  const overload = overloadOf(o)
  if (!overload) return []
  const { cnrDb } = o.clutter
  let over = 0
  for (let at = 0; at < cnrDb.length; at++) if (cnrDb[at] + 0.1 * overload.excessTenths[at] > overload.limitDb) over++
  if (over === 0) return []
  const about = `receiver limits: 99 % of clutter over ${overload.limitDb.toFixed(0)} dB before short-range sensitivity, nothing is suppressed where it stays over after it`
  return [{ mark: 'outside model', about, share: over / cnrDb.length }]
}
