import { BUILT_IN_LAND_TABLE, chooseRow, percentileOverMeanDb, slantSquared, weibullSpread } from '../../clutter/index.ts'
import { gateLengthM, type RadarInput } from '../../radar/index.ts'
import { RELIEF } from '../../terrain/index.ts'
import { DEG_PER_RAD, RAD_PER_DEG } from '../../units/index.ts'
import { antennaM, type OptionCells } from '../optionCells.ts'

/** Range of clutter-to-noise the receiver takes linearly, dB: stated, else 6.02 × bits − 6; null where neither is stated. */
export function receiverLinearRangeDb(r: RadarInput): number | null {
  const { bits, kind } = r.suppression
  return r.receiverLinearRangeDb ?? (bits === null || kind === 'none' ? null : 6.02 * bits - 6)
}

/** Where clutter drives the receiver out of its linear range nothing is suppressed. */
export interface Overload {
  readonly limitDb: number
  /** 99 % level of the clutter of a cell over its mean, dB. */
  readonly excessDb: Uint8Array
}
const SHARE = 0.99
/** The 99 % level lies at most this far over the mean, whatever the spread, dB: 12.8 at a spread of 4.3. */
const MOST_EXCESS_DB = 13
const DEPRESSIONS_PER_DEG = 20
const LOWEST_DEG = -5
const HIGHEST_DEG = 15

const known = new WeakMap<OptionCells['clutter'], Overload | null>()
/** Overload of an option; null where the receiver has no limit or the clutter stays well under it. */
export function overloadOf(o: OptionCells): Overload | null {
  let found = known.get(o.clutter)
  if (found === undefined) {
    found = workOut(o)
    known.set(o.clutter, found)
  }
  return found
}

function workOut(o: OptionCells): Overload | null {
  const limitDb = receiverLinearRangeDb(o.radar)
  if (limitDb === null) return null
  const { cnrDb } = o.clutter
  const most = MOST_EXCESS_DB
  let peak = Number.NEGATIVE_INFINITY
  for (let at = 0; at < cnrDb.length; at++) if (cnrDb[at] > peak) peak = cnrDb[at]
  if (!(peak + most > limitDb)) return null
  const { azimuths, ranges, rangeStepM } = o.site.grid
  const excessDb = new Uint8Array(azimuths * ranges)
  const mast = antennaM(o)
  const spreads = spreadTable(o)
  const gateM = gateLengthM(o.radar)
  const beam = o.radar.antenna.azimuthBeamwidthDeg * RAD_PER_DEG
  const over = Float64Array.from({ length: 801 }, (_, n) => percentileOverMeanDb(Math.max(0.1, n / 100), SHARE))
  for (let i = 0; i < azimuths; i++) {
    const c = 1 / o.site.effectiveRadiusM[i]
    for (let j = 0; j < ranges; j++) {
      const at = i * ranges + j
      if (!(cnrDb[at] + most > limitDb)) continue
      const r = (j + 0.5) * rangeStepM
      const ground = o.site.groundM[at]
      const depression = ((mast - ground) / r - 0.5 * r * c) * DEG_PER_RAD
      const spread = spreads(o.site.code[at], o.site.relief[at], depression, Math.sqrt(slantSquared(mast, ground, r, c)) * beam * gateM)
      excessDb[at] = Math.ceil(Math.max(0, over[Math.round(100 * spread)]))
    }
  }
  return { limitDb, excessDb }
}

/** The mark of an option whose clutter overloads the receiver, with the share of its cells where it does; empty where none. */
export function overloadNotes(o: OptionCells): { readonly mark: string; readonly about: string; readonly share: number }[] {
  const overload = overloadOf(o)
  if (!overload) return []
  const { cnrDb } = o.clutter
  let over = 0
  for (let at = 0; at < cnrDb.length; at++) if (cnrDb[at] + overload.excessDb[at] > overload.limitDb) over++
  if (over === 0) return []
  const about = `receiver limits: 99 % of clutter over ${overload.limitDb.toFixed(0)} dB before short-range sensitivity, nothing is suppressed where it stays over after it`
  return [{ mark: 'outside model', about, share: over / cnrDb.length }]
}

/** Weibull spread by ground code, relief, depression and cell area; 1 (noise-like) where no land row applies. */
export function spreadTable(o: OptionCells): (code: number, relief: number, depressionDeg: number, areaM2: number) => number {
  const table = o.landTable ?? BUILT_IN_LAND_TABLE
  const bins = (HIGHEST_DEG - LOWEST_DEG) * DEPRESSIONS_PER_DEG
  const reliefs = [RELIEF.low, RELIEF.high, RELIEF.mountains, RELIEF.unknown]
  const rows = o.ground.codes.map(({ terrain }) =>
    reliefs.map((relief) =>
      Array.from(
        { length: bins },
        (_, n) => chooseRow(terrain, relief, LOWEST_DEG + (n + 0.5) / DEPRESSIONS_PER_DEG, o.radar.frequencyHz, {}, table).band,
      ),
    ),
  )
  return (code, relief, depressionDeg, areaM2) => {
    const n = Math.floor((depressionDeg - LOWEST_DEG) * DEPRESSIONS_PER_DEG)
    const band = rows[code]?.[Math.min(3, relief)]?.[Math.min(bins - 1, Math.max(0, n))]
    return band ? weibullSpread(band, areaM2) : 1
  }
}
