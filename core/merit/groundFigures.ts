import type { SightCells } from '../masking/index.ts'
import { CELL, cellAreasM2, type PolarShape } from '../polar/index.ts'
import { fromDb, M_PER_NM, toDb } from '../units/index.ts'
import type { OptionCells } from './optionCells.ts'
import { percentile } from './percentile.ts'
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
  const ground = new Float64Array(ringCount)
  const seen = new Float64Array(ringCount)
  const unknown = new Float64Array(ringCount)
  const power = new Float64Array(ringCount)
  const powerArea = new Float64Array(ringCount)
  const max = new Float64Array(ringCount).fill(Number.NEGATIVE_INFINITY)
  const over = { over0: 0, over20: 0, over40: 0, over60: 0 }
  const ratio = ratioTable()
  const { state, inSight } = o.mask
  const { cnrDb } = o.clutter
  for (let j = 0; j < ranges; j++) {
    const area = areas[j]
    const ring = ringOf(j)
    for (let i = 0; i < azimuths; i++) {
      const at = i * ranges + j
      const s = state[at]
      ground[ring] += area
      if (s === CELL.beyondVoid || s === CELL.outside || s === 0) {
        unknown[ring] += area
        continue
      }
      const share = inSight[at] / 65535
      seen[ring] += area * share
      const cnr = cnrDb[at]
      if (!(cnr > -100)) continue
      if (share > 0) {
        power[ring] += area * share * ratioOf(ratio, cnr)
        powerArea[ring] += area * share
        if (cnr > max[ring]) max[ring] = cnr
      }
      if (cnr > 0) {
        over.over0 += area
        if (cnr > 20) {
          over.over20 += area
          if (cnr > 40) {
            over.over40 += area
            if (cnr > 60) over.over60 += area
          }
        }
      }
    }
  }
  const rings: RingFigure[] = []
  for (let k = 0; k < ringCount; k++)
    rings.push({
      fromM: k * RING_WIDTH_M,
      toM: Math.min((k + 1) * RING_WIDTH_M, ranges * rangeStepM),
      groundKm2: ground[k] / 1e6,
      inSightKm2: seen[k] / 1e6,
      unknownKm2: unknown[k] / 1e6,
      cnrMeanDb: powerArea[k] > 0 ? toDb(power[k] / powerArea[k]) : null,
      cnrMaxDb: Number.isFinite(max[k]) ? max[k] : null,
    })
  const sum = (a: Float64Array) => a.reduce((t, v) => t + v, 0) / 1e6
  const peak = max.reduce((a, b) => Math.max(a, b), Number.NEGATIVE_INFINITY)
  return {
    rings,
    inSightKm2: sum(seen),
    maskedKm2: sum(ground) - sum(unknown) - sum(seen),
    unknownKm2: sum(unknown),
    over: { over0: over.over0 / 1e6, over20: over.over20 / 1e6, over40: over.over40 / 1e6, over60: over.over60 / 1e6 },
    peakDb: Number.isFinite(peak) ? peak : null,
  }
}

/** Power ratios for −100…150 dB in steps of 0.05 dB. */
function ratioTable(): Float64Array {
  const t = new Float64Array(5001)
  for (let i = 0; i < t.length; i++) t[i] = fromDb(i / 20 - 100)
  return t
}
const ratioOf = (t: Float64Array, db: number): number => t[Math.min(5000, Math.max(0, Math.round((db + 100) * 20)))]

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
