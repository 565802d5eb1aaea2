import { clutterGainTable } from '../../antenna/index.ts'
import type { Earth } from '../../geodesy/index.ts'
import { sweep, sweepRays } from '../../masking/index.ts'
import { isUnknown, type PolarShape } from '../../polar/index.ts'
import { gateLengthM, minimumRangeM, type RadarInput, radarConstantDb } from '../../radar/index.ts'
import { type Ground, type Site, siteGround } from '../../terrain/index.ts'
import { fromDb, RAD_PER_DEG, toDb } from '../../units/index.ts'
import { finish } from '../../work/index.ts'
import type { LandTable } from '../land/landTable.ts'
import { BUILT_IN_LAND_TABLE } from '../land/landTableData.ts'
import { strengthTable } from '../land/strengthTable.ts'
import { type CellModel, type CellRows, cellClutter, gateWeights, slantSquared } from './cellSums.ts'
import { type ClutterOptions, clutterToNoise, electricalCentreM, sideLobeShare } from './clutterToNoise.ts'

/** One option as single places need it; tables are made once. */
export interface PointOption {
  readonly g: Ground
  readonly site: Site
  readonly heightM: number
  readonly earth: Earth
  readonly r: RadarInput
  readonly tiltDeg: number
  readonly grid: PolarShape
  readonly table: LandTable
  readonly model: CellModel
  /** Echo-to-noise ratio of 1 m² at 1 m. */
  readonly constant: number
  readonly gateM: number
  readonly beamRad: number
  readonly weights: Float64Array
}

export function pointOption(
  g: Ground,
  site: Site,
  heightM: number,
  earth: Earth,
  r: RadarInput,
  tiltDeg: number,
  grid: PolarShape,
  landTable?: LandTable,
): PointOption {
  const table = landTable ?? BUILT_IN_LAND_TABLE
  const gateM = gateLengthM(r)
  const model = {
    antennaM: electricalCentreM(site, siteGround(g, site), heightM),
    strength: strengthTable(g.codes, r.frequencyHz, table),
    gain: clutterGainTable(r.antenna, tiltDeg),
    nearestM: minimumRangeM(r),
  }
  const constant = fromDb(radarConstantDb(r))
  const beamRad = r.antenna.azimuthBeamwidthDeg * RAD_PER_DEG
  return { g, site, heightM, earth, r, tiltDeg, grid, table, model, constant, gateM, beamRad, weights: gateWeights(gateM, grid.rangeStepM) }
}

/** Cells on chosen azimuths that share in the gate around a ground range. */
export interface GateCells extends CellRows {
  readonly state: Uint8Array
  /** Weight of each cell of a row, m. */
  readonly gate: readonly number[]
  /** Which of them lies on the range asked for. */
  readonly middle: number
}
export function gateCells(o: PointOption, azimuthsDeg: readonly number[], rangeM: number): GateCells {
  const { grid, weights } = o
  const half = weights.length >> 1
  // Cells behind the site are left out; the rest stand for the gate.
  const offsets = Array.from(weights, (_, k) => k - half).filter((k) => rangeM + k * grid.rangeStepM > 0)
  const centres = offsets.map((k) => rangeM + k * grid.rangeStepM)
  const own = offsets.map((k) => weights[k + half])
  const whole = o.gateM / own.reduce((s, w) => s + w, 0)
  const swept = sweepRays(o.g, o.site, o.heightM, o.earth, azimuthsDeg, centres, grid.rangeStepM)
  return { ...swept, centresM: Float64Array.from(centres), gate: own.map((w) => w * whole), middle: offsets.indexOf(0) }
}

/** Side-lobe term by ground range, dB, NaN nil: the gate of the grid that holds it, beyond the grid a gate of its own ring. */
export function sideLobes(o: PointOption, options: ClutterOptions & { sideLobeCnrDb?: Float32Array }): (rangeM: number) => number {
  let ofGrid = options.sideLobeCnrDb
  const beyond = new Map<number, number>()
  return (rangeM) => {
    const j = Math.floor(rangeM / o.grid.rangeStepM)
    if (j < o.grid.ranges) return (ofGrid ??= sideLobesOfGrid(o, options))[j]
    const term = beyond.get(j) ?? sideLobeOfRing(o, (j + 0.5) * o.grid.rangeStepM)
    beyond.set(j, term)
    return term
  }
}

function sideLobesOfGrid(o: PointOption, options: ClutterOptions): Float32Array {
  const { site, masks } = finish(sweep(o.g, o.site, [o.heightM], o.grid, o.earth))
  return finish(clutterToNoise(site, masks[0], o.g.codes, o.site, o.heightM, o.earth, o.r, o.tiltDeg, options)).sideLobeCnrDb
}

function sideLobeOfRing(o: PointOption, rangeM: number): number {
  const { model, grid } = o
  const azimuths = Array.from({ length: grid.azimuths }, (_, i) => i * grid.azimuthStepDeg)
  const cells = gateCells(o, azimuths, rangeM)
  const row = new Float64Array(cells.gate.length)
  const use = new Float64Array(model.strength.sigma.length)
  let sum = 0
  let known = 0
  for (let i = 0; i < azimuths.length; i++) {
    const at = i * row.length + cells.middle
    if (isUnknown(cells.state[at])) continue
    known++
    cellClutter(model, cells, i, row, null, use)
    const r2 = slantSquared(model.antennaM, cells.groundM[at], rangeM, 1 / cells.effectiveRadiusM[i])
    for (let k = 0; k < row.length; k++) sum += (cells.gate[k] * row[k]) / (r2 * r2)
  }
  return sum > 0 ? toDb(((sum * o.constant * o.beamRad) / known) * sideLobeShare(o.r)) : Number.NaN
}
