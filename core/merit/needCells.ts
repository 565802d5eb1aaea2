import { suppressionNeededDb } from '../clutter/index.ts'
import { CELL } from '../polar/index.ts'
import type { SettledNeed } from '../study/index.ts'
import { wrap360 } from '../units/index.ts'
import { antennaM, meanEffectiveRadiusM, type OptionCells } from './optionCells.ts'
import { snrDbAt, stcAt, type TargetSignal, targetSignal } from './targetSignal.ts'

/** What a need's check found in each polar cell; the lowest bits that apply are set. */
export const PLACE = { inNeed: 1, inSight: 2, marginal: 4, unknown: 8, groundAbove: 16, strong: 32 } as const

/** A need tested in every cell of one option. Arrays of one value per polar cell. */
export interface NeedCells {
  /** Bits of PLACE; 0 outside the need's sector and ranges. */
  readonly place: Uint8Array
  /** Height margin, m: least over the levels of (level − floor); NaN outside the need and where unknown. */
  readonly marginM: Float32Array
  /** Suppression needed, dB, worst level; 0 = none needed; NaN where masked, unknown or too weak. */
  readonly neededDb: Float32Array
}

/** Is an azimuth inside a sector [from, to] clockwise? A sector of 360° or more holds all. */
export function inSector(azimuthDeg: number, sector: readonly [number, number]): boolean {
  const width = sector[1] - sector[0]
  if (width >= 360 || width === 0) return true
  return wrap360(azimuthDeg - sector[0]) <= wrap360(width)
}

/**
 * Tests one layer need in every cell of an option. A place passes at a level when level − floor ≥ the floor's error band; it must pass at
 * every level above its ground. Signal: one pulse, propagation factor 1, after STC. Clutter: the resolution cell at the target's slant range.
 */
export function needCells(o: OptionCells, need: SettledNeed): NeedCells {
  const { azimuths, ranges, azimuthStepDeg, rangeStepM } = o.site.grid
  const count = azimuths * ranges
  const place = new Uint8Array(count)
  const marginM = new Float32Array(count).fill(Number.NaN)
  const neededDb = new Float32Array(count).fill(Number.NaN)
  const radius = meanEffectiveRadiusM(o.site)
  const flat = !Number.isFinite(radius)
  const mast = antennaM(o)
  const signal = targetSignal(o.radar, o.tiltDeg, need.rcsM2, ranges * rangeStepM * 1.5 + 50_000)
  const first = Math.max(0, Math.ceil(need.fromRangeM / rangeStepM - 0.5))
  const last = Math.min(ranges, Math.ceil(need.toRangeM / rangeStepM - 0.5))
  const { groundM } = o.site
  const { state, floorM, floorBandM } = o.mask
  const { cnrDb } = o.clutter
  const aboveSea = need.heightAbove === 'sea'
  const levels = need.levelsM
  for (let i = 0; i < azimuths; i++) {
    if (!inSector(i * azimuthStepDeg, need.sectorDeg)) continue
    const row = i * ranges
    for (let j = first; j < last; j++) {
      const at = row + j
      const s = state[at]
      if (s === CELL.beyondVoid || s === CELL.outside || s === 0) {
        place[at] = PLACE.inNeed | PLACE.unknown
        continue
      }
      const r = (j + 0.5) * rangeStepM
      const cos = flat ? 1 : Math.cos(r / radius)
      const sin = flat ? 0 : Math.sin(r / radius)
      const ground = groundM[at]
      const groundSlant2 = flat ? r * r + (ground - mast) ** 2 : slant2(radius, mast, ground, cos)
      let bits = 0
      let least = Number.POSITIVE_INFINITY
      let worst = -1
      let tested = 0
      let seen = 0
      for (const level of levels) {
        const target = aboveSea ? level : ground + level
        if (target < ground) continue
        tested++
        const margin = target - floorM[at]
        if (margin < least) least = margin
        if (margin <= -floorBandM[at]) continue
        if (margin < floorBandM[at]) {
          bits |= PLACE.marginal
          continue
        }
        seen++
        const slantSquared = flat ? r * r + (target - mast) ** 2 : slant2(radius, mast, target, cos)
        const slant = Math.sqrt(slantSquared)
        const tan = flat ? (target - mast) / r : ((radius + target) * cos - (radius + mast)) / ((radius + target) * sin)
        const snr = snrDbAt(signal, slant, tan)
        if (!(snr > need.requiredRatioDb)) continue
        bits |= PLACE.strong
        const gate = j + Math.round((slant - Math.sqrt(groundSlant2)) / rangeStepM)
        const cnr = gate < ranges ? cnrDb[row + gate] : Number.NaN
        const needed = cnr === cnr ? suppressionNeededDb(cnr - stcAt(signal, slant), snr, need.requiredRatioDb) : 0
        if (needed !== null && needed > worst) worst = needed
      }
      if (tested === 0) bits = PLACE.groundAbove
      else {
        marginM[at] = least
        if (seen === tested) bits = (bits & ~PLACE.marginal) | PLACE.inSight
        if (worst >= 0) neededDb[at] = worst
      }
      place[at] = bits | PLACE.inNeed
    }
  }
  return { place, marginM, neededDb }
}

const slant2 = (radius: number, a: number, b: number, cos: number): number =>
  (b - a) * (b - a) + 2 * (radius + a) * (radius + b) * (1 - cos)

export type { TargetSignal }
