import type { SightCells } from '../../masking/index.ts'
import { CELL, cellAreasM2 } from '../../polar/index.ts'
import { M_PER_NM } from '../../units/index.ts'
import { percentileOverMeanDb } from '../land/weibull.ts'
import type { ClutterCells } from '../types.ts'
import { addCells, addMixture, levelsOfMixture, type Mixture, makeMixture, meanOfMixture } from './mixture.ts'

/** Rings a study may be told in, m. */
export const LEVEL_RING_M = { nm: 5 * M_PER_NM, km: 10_000 } as const

/** Clutter over known ground of one part of the grid. */
export interface ClutterLevel {
  readonly knownKm2: number
  /** Share of it with C/N over 40 dB, %. */
  readonly over40Pct: number
  /** Area mean, and levels not exceeded over 90 and 99 % of the area; null where that much of it is free of clutter. */
  readonly meanDb: number | null
  readonly p90Db: number | null
  readonly p99Db: number | null
}
export interface RingLevel extends ClutterLevel {
  readonly fromM: number
  readonly toM: number
}
export interface OctantLevel extends ClutterLevel {
  /** Middle of the octant, degrees true; it reaches 22.5° to each side. */
  readonly azimuthDeg: number
}
export interface ClutterLevels {
  readonly whole: ClutterLevel
  readonly rings: readonly RingLevel[]
  readonly octants: readonly OctantLevel[]
  /** Ring by octant: entry ring × 8 + octant. */
  readonly sectors: readonly ClutterLevel[]
  /** The cell whose 99 % level is highest, to hold against the linear range of the receiver; null without clutter. */
  readonly peak: { readonly meanDb: number; readonly p99Db: number; readonly azimuthDeg: number; readonly rangeM: number } | null
}

/**
 * Levels of C/N by ring (from the site outward, `ringM` wide) and octant (± 22.5° of north, north-east …, true): the mixture of the cells' Weibull
 * distributions over all known ground, clutter-free ground as zero. `spread` per cell from `fillCellStrength`; `lessDb` per range gate is taken
 * off first (short-range sensitivity), none when absent. The mean holds for any distribution; 90 and 99 % rest on the land table's spreads.
 */
export function clutterLevels(
  c: Pick<ClutterCells, 'grid' | 'cnrDb'>,
  m: Pick<SightCells, 'state'>,
  spread: Float32Array,
  siteLatDeg: number,
  ringM: number,
  lessDb?: Float32Array,
): ClutterLevels {
  const { azimuths, ranges, azimuthStepDeg, rangeStepM } = c.grid
  const areas = cellAreasM2(c.grid, siteLatDeg)
  const rings = Math.ceil((ranges * rangeStepM) / ringM - 1e-9)
  const parts = Array.from({ length: rings * 8 }, makeMixture)
  const over40 = new Float64Array(rings * 8)
  const excess = Float64Array.from({ length: 801 }, (_, n) => percentileOverMeanDb(Math.max(0.1, n / 100), 0.99))
  const { cnrDb } = c
  const less = lessDb ?? null
  const ringEnds = Array.from({ length: rings }, (_, k) => Math.min(ranges, Math.ceil(((k + 1) * ringM) / rangeStepM - 0.5)))
  const db = new Float32Array(ranges)
  let peak: ClutterLevels['peak'] = null
  let highest = Number.NEGATIVE_INFINITY
  for (let i = 0; i < azimuths; i++) {
    const octant = Math.floor((i * azimuthStepDeg) / 45 + 0.5) % 8
    const at0 = i * ranges
    for (let k = 0, j = 0; k < rings; k++) {
      const part = k * 8 + octant
      const from = j
      let over = 0
      let whole = 0
      for (; j < ringEnds[k]; j++) {
        const s = m.state[at0 + j]
        const known = s > 0 && s < CELL.beyondVoid
        db[j] = known ? cnrDb[at0 + j] - (less ? less[j] : 0) : Number.NaN
        if (!known) continue
        whole += areas[j]
        if (!(db[j] > -100)) continue
        if (db[j] > 40) over += areas[j]
        const p99 = db[j] + excess[Math.min(800, (100 * spread[at0 + j] + 0.5) | 0)]
        if (p99 > highest) {
          highest = p99
          peak = { meanDb: db[j], p99Db: p99, azimuthDeg: i * azimuthStepDeg, rangeM: (j + 0.5) * rangeStepM }
        }
      }
      over40[part] += over
      parts[part].whole += whole
      addCells(parts[part], db, spread, at0, from, j, areas)
    }
  }
  const level = (x: Mixture, over: number): ClutterLevel => {
    const [p90Db, p99Db] = levelsOfMixture(x, [0.9, 0.99])
    return { knownKm2: x.whole / 1e6, over40Pct: x.whole > 0 ? (100 * over) / x.whole : 0, meanDb: meanOfMixture(x), p90Db, p99Db }
  }
  const sumOf = (which: readonly number[]): ClutterLevel => {
    const all = makeMixture()
    for (const k of which) addMixture(all, parts[k])
    return level(
      all,
      which.reduce((s, k) => s + over40[k], 0),
    )
  }
  const octants = [0, 1, 2, 3, 4, 5, 6, 7]
  const ringNumbers = Array.from({ length: rings }, (_, k) => k)
  return {
    whole: sumOf(parts.map((_, k) => k)),
    rings: ringNumbers.map((k) => ({
      fromM: k * ringM,
      toM: Math.min((k + 1) * ringM, ranges * rangeStepM),
      ...sumOf(octants.map((o) => k * 8 + o)),
    })),
    octants: octants.map((o) => ({ azimuthDeg: 45 * o, ...sumOf(ringNumbers.map((k) => k * 8 + o)) })),
    sectors: parts.map((x, k) => level(x, over40[k])),
    peak,
  }
}
