import { clutterGainTable } from '../../antenna/index.ts'
import type { Earth } from '../../geodesy/index.ts'
import { sweep, sweepRays } from '../../masking/index.ts'
import { isUnknown, type PolarShape } from '../../polar/index.ts'
import { gateLengthM, minimumRangeM, type RadarInput, radarConstantDb } from '../../radar/index.ts'
import { type Ground, type Site, siteGround } from '../../terrain/index.ts'
import { fromDb, RAD_PER_DEG } from '../../units/index.ts'
import { finish } from '../../work/index.ts'
import type { LandTable } from '../land/landTable.ts'
import { BUILT_IN_LAND_TABLE } from '../land/landTableData.ts'
import { strengthTable } from '../land/strengthTable.ts'
import type { ClutterCells } from '../types.ts'
import { type CellModel, type CellRows, cellClutter, gateWeights, slantSquared } from './cellSums.ts'
import { type ClutterOptions, clutterToNoise, electricalCentreM, sideLobeShare } from './clutterToNoise.ts'
import { leftOf } from './residue.ts'

export interface PointOptions extends ClutterOptions {
  /** Side-lobe term per gate of the grid and what is left of it, from `clutterToNoise` for the same option; worked out when absent. */
  readonly sideLobeCnrDb?: Float32Array
  readonly sideLobeResidueDb?: Float32Array
}
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
  options: ClutterOptions = {},
): PointOption {
  const table = options.landTable ?? BUILT_IN_LAND_TABLE
  const gateM = gateLengthM(r)
  const model = {
    antennaM: electricalCentreM(site, siteGround(g, site), heightM),
    strength: strengthTable(g.codes, r.frequencyHz, table),
    gain: clutterGainTable(r.antenna, tiltDeg),
    nearestM: minimumRangeM(r),
    left: leftOf(g.codes, options.improvementDb).byCode,
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

/** Side-lobe term by ground range, ratios to noise, 0 nil: the gate of the grid that holds it, beyond the grid a gate of its own ring. */
export function sideLobes(o: PointOption, options: PointOptions): (rangeM: number) => SideLobe {
  let ofGrid: Pick<ClutterCells, 'sideLobeCnrDb' | 'sideLobeResidueDb'> | null = null
  const { sideLobeCnrDb, sideLobeResidueDb } = options
  if (sideLobeCnrDb && (sideLobeResidueDb || !options.improvementDb))
    ofGrid = { sideLobeCnrDb, sideLobeResidueDb: sideLobeResidueDb ?? sideLobeCnrDb }
  const beyond = new Map<number, SideLobe>()
  return (rangeM) => {
    const j = Math.floor(rangeM / o.grid.rangeStepM)
    if (j < o.grid.ranges) {
      ofGrid ??= sideLobesOfGrid(o, options)
      return { all: fromDb(ofGrid.sideLobeCnrDb[j]) || 0, left: fromDb(ofGrid.sideLobeResidueDb[j]) || 0 }
    }
    const term = beyond.get(j) ?? sideLobeOfRing(o, (j + 0.5) * o.grid.rangeStepM)
    beyond.set(j, term)
    return term
  }
}
/** All of the term and what suppression leaves of it. */
export interface SideLobe {
  readonly all: number
  readonly left: number
}

function sideLobesOfGrid(o: PointOption, options: ClutterOptions): ClutterCells {
  const { site, masks } = finish(sweep(o.g, o.site, [o.heightM], o.grid, o.earth))
  return finish(clutterToNoise(site, masks[0], o.g.codes, o.site, o.heightM, o.earth, o.r, o.tiltDeg, options))
}

function sideLobeOfRing(o: PointOption, rangeM: number): SideLobe {
  const { model, grid } = o
  const azimuths = Array.from({ length: grid.azimuths }, (_, i) => i * grid.azimuthStepDeg)
  const cells = gateCells(o, azimuths, rangeM)
  const patterned = new Float64Array(cells.gate.length)
  const residual = new Float64Array(cells.gate.length)
  const use = new Float64Array(model.strength.sigma.length)
  let [all, left, known] = [0, 0, 0]
  for (let i = 0; i < azimuths.length; i++) {
    const at = i * patterned.length + cells.middle
    if (isUnknown(cells.state[at])) continue
    known++
    cellClutter(model, cells, i, { patterned, residual, plain: null }, use)
    const r2 = slantSquared(model.antennaM, cells.groundM[at], rangeM, 1 / cells.effectiveRadiusM[i])
    for (let k = 0; k < patterned.length; k++) {
      all += (cells.gate[k] * patterned[k]) / (r2 * r2)
      left += (cells.gate[k] * residual[k]) / (r2 * r2)
    }
  }
  const scale = known > 0 ? (o.constant * o.beamRad * sideLobeShare(o.r)) / known : 0
  return { all: all * scale, left: left * scale }
}
