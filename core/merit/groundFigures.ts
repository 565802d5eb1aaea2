import type { SightCells } from '../masking/index.ts'
import { CELL, cellAreasM2, type PolarShape } from '../polar/index.ts'
import { M_PER_NM, toDb } from '../units/index.ts'
import type { OptionCells } from './optionCells.ts'
import { percentile } from './percentile.ts'
import { ratioOfDb } from './signal/decibelTables.ts'
import type { Figures, FloorFigure, RingFigure } from './types.ts'

/** Rings are 5 NM wide. */
export const RING_WIDTH_M = 5 * M_PER_NM
const FLOOR_RANGES_NM = [5, 10, 20, 40, 60]

export interface GroundSums {
  readonly rings: RingFigure[]
  readonly inSightKm2: number
  readonly maskedKm2: number
  readonly unknownKm2: number
  readonly over: Figures['clutterOverKm2']
  readonly peakDb: number | null
}

/** Areas of ground in sight, masked and unknown, and of clutter over 0, 20, 40 and 60 dB, by ring and in all. */
export function groundSums(o: OptionCells): GroundSums {
  const { azimuths, ranges, rangeStepM } = o.site.grid
  const areas = cellAreasM2(o.site.grid, o.place.lat)
  const ringOf = (j: number) => Math.floor(((j + 0.5) * rangeStepM) / RING_WIDTH_M)
  const ringCount = ringOf(ranges - 1) + 1
  // by range cell, in cells: areas come in at the end
  const seen = new Float64Array(ranges)
  const unknown = new Float64Array(ranges)
  const power = new Float64Array(ranges)
  const powerCells = new Float64Array(ranges)
  const max = new Float64Array(ranges).fill(Number.NEGATIVE_INFINITY)
  const over = [new Float64Array(ranges), new Float64Array(ranges), new Float64Array(ranges), new Float64Array(ranges)]
  const { state, inSight } = o.mask
  const { cnrDb } = o.clutter
  for (let i = 0; i < azimuths; i++)
    for (let j = 0; j < ranges; j++) {
      const at = i * ranges + j
      const s = state[at]
      if (s === CELL.beyondVoid || s === CELL.outside || s === 0) {
        unknown[j]++
        continue
      }
      const share = inSight[at] / 65535
      seen[j] += share
      const cnr = cnrDb[at]
      if (!(cnr > -100)) continue
      if (share > 0) {
        power[j] += share * ratioOfDb(cnr)
        powerCells[j] += share
        if (cnr > max[j]) max[j] = cnr
      }
      if (cnr > 0) over[cnr > 60 ? 3 : cnr > 40 ? 2 : cnr > 20 ? 1 : 0][j]++
    }
  const ringSum = (of: Float64Array): Float64Array => {
    const sums = new Float64Array(ringCount)
    for (let j = 0; j < ranges; j++) sums[ringOf(j)] += of[j] * areas[j]
    return sums
  }
  const ground = ringSum(new Float64Array(ranges).fill(azimuths))
  const [seenM2, unknownM2, powerM2, powerAreaM2] = [seen, unknown, power, powerCells].map(ringSum)
  const ringMax = new Float64Array(ringCount).fill(Number.NEGATIVE_INFINITY)
  for (let j = 0; j < ranges; j++) ringMax[ringOf(j)] = Math.max(ringMax[ringOf(j)], max[j])
  const overM2 = over.map((of) => ringSum(of).reduce((t, v) => t + v, 0))
  const overFrom = (n: number): number => overM2.slice(n).reduce((t, v) => t + v, 0) / 1e6
  const rings: RingFigure[] = []
  for (let k = 0; k < ringCount; k++)
    rings.push({
      fromM: k * RING_WIDTH_M,
      toM: Math.min((k + 1) * RING_WIDTH_M, ranges * rangeStepM),
      groundKm2: ground[k] / 1e6,
      inSightKm2: seenM2[k] / 1e6,
      unknownKm2: unknownM2[k] / 1e6,
      cnrMeanDb: powerAreaM2[k] > 0 ? toDb(powerM2[k] / powerAreaM2[k]) : null,
      cnrMaxDb: Number.isFinite(ringMax[k]) ? ringMax[k] : null,
    })
  const sum = (a: Float64Array) => a.reduce((t, v) => t + v, 0) / 1e6
  const peak = max.reduce((a, b) => Math.max(a, b), Number.NEGATIVE_INFINITY)
  return {
    rings,
    inSightKm2: sum(seenM2),
    maskedKm2: sum(ground) - sum(unknownM2) - sum(seenM2),
    unknownKm2: sum(unknownM2),
    over: { over0: overFrom(0), over20: overFrom(1), over40: overFrom(2), over60: overFrom(3) },
    peakDb: Number.isFinite(peak) ? peak : null,
  }
}

/** Coverage floor at 5, 10, 20, 40 and 60 NM, as far as the grid goes: best, median and worst azimuth. */
export function floorFigures(mask: Pick<SightCells, 'floorM' | 'floorBandM'>, grid: PolarShape): FloorFigure[] {
  const { azimuths, ranges, rangeStepM, azimuthStepDeg } = grid
  const out: FloorFigure[] = []
  for (const nm of FLOOR_RANGES_NM) {
    const rangeM = nm * M_PER_NM
    const j = Math.round(rangeM / rangeStepM - 0.5)
    if (j < 0 || j >= ranges) continue
    const floors: number[] = []
    let worst = -1
    for (let i = 0; i < azimuths; i++) {
      const v = mask.floorM[i * ranges + j]
      if (Number.isNaN(v)) continue
      floors.push(v)
      if (worst < 0 || v > mask.floorM[worst * ranges + j]) worst = i
    }
    out.push({
      rangeM,
      bestM: percentile(floors, 0),
      medianM: percentile(floors, 0.5),
      worstM: worst < 0 ? null : mask.floorM[worst * ranges + j],
      worstAzimuthDeg: worst < 0 ? null : worst * azimuthStepDeg,
      worstBandM: worst < 0 ? null : mask.floorBandM[worst * ranges + j],
    })
  }
  return out
}
