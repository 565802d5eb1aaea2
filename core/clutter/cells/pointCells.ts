import { KERNEL_REACH_BEAMWIDTHS } from '../../antenna/index.ts'
import { twoWayLossParts } from '../../atmosphere/index.ts'
import { depressionAtTerrainDeg, type Earth } from '../../geodesy/index.ts'
import { sweep, sweepRays } from '../../masking/index.ts'
import { cellAt, isUnknown, type PolarShape } from '../../polar/index.ts'
import type { RadarInput } from '../../radar/index.ts'
import { type Ground, type Site, siteGround } from '../../terrain/index.ts'
import { fromDb } from '../../units/index.ts'
import { finish } from '../../work/index.ts'
import { towardEcho } from '../discretes/discreteEchoes.ts'
import { chooseRow, type LandChoice } from '../land/landRow.ts'
import { CODE_KIND, grazingDegOf, isOverOpen, OVER_OPEN_WITHIN_M } from '../land/strengthTable.ts'
import { rainPerMetre } from '../rain/rainBeam.ts'
import type { ClutterCells } from '../types.ts'
import { type CellRows, cellClutter, gateSums, slantSquared } from './cellSums.ts'
import { clutterToNoise, electricalCentreM, sideLobeLevel, sideLobeShare } from './clutterToNoise.ts'
import { runningSum } from './gates.ts'
import { type ClutterOptions, type OptionModel, optionModel } from './optionModel.ts'
import { rangeLobes, reachOf, type Segment, segmentOf } from './segment.ts'

export interface PointOptions extends ClutterOptions {
  /** Side-lobe term per gate of the grid and what is left of it, from `clutterToNoise` for the same option; worked out when absent. */
  readonly sideLobeCnrDb?: Float32Array
  readonly sideLobeResidueDb?: Float32Array
}
/** One option as single places need it; tables are made once. */
export interface PointOption extends OptionModel {
  readonly g: Ground
  readonly site: Site
  readonly heightM: number
  readonly earth: Earth
  readonly r: RadarInput
  readonly tiltDeg: number
  readonly grid: PolarShape
  readonly options: PointOptions
}

export function pointOption(
  g: Ground,
  site: Site,
  heightM: number,
  earth: Earth,
  r: RadarInput,
  tiltDeg: number,
  grid: PolarShape,
  options: PointOptions = {},
): PointOption {
  const model = optionModel(g.codes, electricalCentreM(site, siteGround(g, site), heightM), r, tiltDeg, grid, options)
  return { ...model, g, site, heightM, earth, r, tiltDeg, grid, options }
}

/** Cells on chosen azimuths that share in the gate around a ground range, for one pulse and pair of beams. */
export interface GateCells extends CellRows {
  readonly segment: Segment
  /** Cells before this one of a row only tell what lies toward the radar. */
  readonly first: number
  /** First cell whose own gate is whole. */
  readonly gatesFrom: number
  readonly state: Uint8Array
  /** Weight of each cell of a row, m; 0 for those that only tell what lies toward the radar. */
  readonly gate: readonly number[]
  /** Which of them lies on the range asked for. */
  readonly middle: number
}
export function gateCells(o: PointOption, segment: Segment, azimuthsDeg: readonly number[], rangeM: number): GateCells {
  const { grid, cell } = o
  const { weights, gateM } = segment
  const half = weights.length >> 1
  const reach = reachOf(segment, grid.rangeStepM)
  const urban = cell.strength.kinds.some((k) => k & CODE_KIND.urban)
  const before = urban ? Math.ceil(OVER_OPEN_WITHIN_M / grid.rangeStepM) : 0
  // Cells behind the site are left out; the rest stand for the gate.
  const offsets: number[] = []
  for (let k = -reach - before; k <= reach; k++) if (rangeM + k * grid.rangeStepM > 0) offsets.push(k)
  const centres = offsets.map((k) => rangeM + k * grid.rangeStepM)
  const own = offsets.map((k) => weights[k + half] ?? 0)
  const whole = gateM / own.reduce((s, w) => s + w, 0)
  const swept = sweepRays(o.g, o.site, o.heightM, o.earth, azimuthsDeg, centres, grid.rangeStepM)
  const first = offsets.findIndex((k) => k >= -reach)
  return {
    ...swept,
    segment,
    centresM: Float64Array.from(centres),
    first,
    gatesFrom: offsets[first] > -reach ? first : first + half,
    gate: own.map((w) => w * whole),
    middle: offsets.indexOf(0),
  }
}

/** Slant range to cell k of a row, m; NaN where its ground is unknown. */
export function slantOf({ cell }: PointOption, cells: GateCells, row: number, k = cells.middle): number {
  const groundM = cells.groundM[row * cells.gate.length + k]
  return Math.sqrt(slantSquared(cell.antennaM, groundM, cells.centresM[k], 1 / cells.effectiveRadiusM[row]))
}

/** Row of the land table one cell takes; null where its ground code is unknown. */
export function choiceOf(o: PointOption, cells: GateCells, row: number, k: number): LandChoice | null {
  const from = row * cells.gate.length
  const at = from + k
  const code = o.g.codes[cells.code[at]]
  if (!code) return null
  const { strength, antennaM, tideM } = o.cell
  const { weather } = o.options
  const groundM = cells.groundM[at] + (code.terrain === 'water' ? tideM : 0)
  const depressionDeg = depressionAtTerrainDeg(antennaM - groundM, cells.centresM[k], cells.effectiveRadiusM[row])
  const context = {
    urbanOverOpen: code.terrain === 'urban' && isOverOpen(strength, cells, from, k),
    grazingDeg: grazingDegOf(depressionDeg, cells.slopePermille[at] / 1000),
    ...(weather ? { sea: { seaState: weather.seaState, polarisation: o.r.polarisation } } : {}),
  }
  return chooseRow(code.terrain, cells.relief[at], depressionDeg, o.r.frequencyHz, context, o.table)
}

/** Two-way losses of the weather to cell k of a row, dB. */
export function lossesOf(o: PointOption, cells: GateCells, row: number, k = cells.middle): { gasDb: number; rainDb: number } {
  if (!o.loss) return { gasDb: 0, rainDb: 0 }
  const groundM = cells.groundM[row * cells.gate.length + k]
  return twoWayLossParts(o.loss, o.cell.antennaM, groundM, cells.centresM[k], slantOf(o, cells, row, k))
}

/** Radar equation with losses for 1 m² in cell k of a row; 0 where its ground is unknown. */
export function perSquareMetre(o: PointOption, cells: GateCells, row: number, k = cells.middle): number {
  if (isUnknown(cells.state[row * cells.gate.length + k])) return 0
  const { gasDb, rainDb } = lossesOf(o, cells, row, k)
  return (cells.segment.constant * fromDb(-gasDb - rainDb)) / slantOf(o, cells, row, k) ** 4
}

/** Echo of the rain in the gate around cell k of a row, m² per radian of azimuth. */
export function rainOf(o: PointOption, cells: GateCells, row: number, k = cells.middle): number {
  const { gate, centresM, segment } = cells
  const at = row * gate.length + k
  if (!segment.rain || isUnknown(cells.state[at])) return 0
  const c = 1 / cells.effectiveRadiusM[row]
  return segment.gateM * rainPerMetre(segment.rain, o.cell.antennaM, cells.floorM[at], centresM[k], slantOf(o, cells, row, k), c)
}

/** What range side lobes bring into the middle gate of a row from its cells of clutter per metre, ratio per radian; `rainLeft` of the rain counts. */
export function rangeLobesOf(o: PointOption, cells: GateCells, row: number, perMetre: Float64Array, rainLeft: number): number {
  const { segment, gate, gatesFrom, middle } = cells
  if (!(segment.lobe > 0)) return 0
  const end = gate.length - (segment.weights.length >> 1)
  const echoes = new Float64Array(gate.length)
  gateSums(perMetre, segment.weights, echoes, gatesFrom, end)
  for (let k = gatesFrom; k < end; k++)
    echoes[k] =
      slantOf(o, cells, row, k) < segment.pulseM ? 0 : (echoes[k] + rainOf(o, cells, row, k) * rainLeft) * perSquareMetre(o, cells, row, k)
  return rangeLobes(segment, runningSum(echoes, gatesFrom, end), middle - gatesFrom, o.grid.rangeStepM)
}

/** Discrete echoes in the gate and beam of a place, ratio to noise. */
export function discretesAt(o: PointOption, azimuthDeg: number, rangeM: number): number {
  const width = o.r.antenna.azimuthBeamwidthDeg
  return o.discretes.reduce(
    (sum, e) =>
      Math.abs(rangeM - e.rangeM) > e.reachM ? sum : sum + e.ratio * towardEcho(azimuthDeg, e, width, KERNEL_REACH_BEAMWIDTHS * width),
    0,
  )
}

/** Second-time-around clutter in the cell of the grid that holds a place, ratio to noise; 0 beyond the grid. */
export function foldedAt(o: PointOption, azimuthDeg: number, rangeM: number): number {
  const { foldedRatio } = o.options
  const cell = foldedRatio ? cellAt(o.grid, azimuthDeg, rangeM) : -1
  return foldedRatio && cell >= 0 ? foldedRatio[cell] : 0
}

/** Side-lobe term by ground range, ratios to noise, 0 nil: the gate of the grid that holds it, beyond the grid a gate of its own ring. */
export function sideLobes(o: PointOption): (rangeM: number) => SideLobe {
  const { sideLobeCnrDb, sideLobeResidueDb, improvementDb } = o.options
  let ofGrid: Pick<ClutterCells, 'sideLobeCnrDb' | 'sideLobeResidueDb'> | null = null
  if (sideLobeCnrDb && (sideLobeResidueDb || !improvementDb))
    ofGrid = { sideLobeCnrDb, sideLobeResidueDb: sideLobeResidueDb ?? sideLobeCnrDb }
  const beyond = new Map<number, SideLobe>()
  return (rangeM) => {
    const j = Math.floor(rangeM / o.grid.rangeStepM)
    if (j < o.grid.ranges) {
      ofGrid ??= sideLobesOfGrid(o)
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

function sideLobesOfGrid(o: PointOption): ClutterCells {
  const { site, masks } = finish(sweep(o.g, o.site, [o.heightM], o.grid, o.earth, { heightToSee: false }))
  return finish(clutterToNoise(site, masks[0], o.g.codes, o.site, o.heightM, o.earth, o.r, o.tiltDeg, o.options))
}

function sideLobeOfRing(o: PointOption, rangeM: number): SideLobe {
  const { cell, grid } = o
  const segment = segmentOf(o.segments, rangeM)
  if (!segment) return { all: 0, left: 0 }
  const azimuths = Array.from({ length: grid.azimuths }, (_, i) => i * grid.azimuthStepDeg)
  const cells = gateCells(o, segment, azimuths, rangeM)
  const patterned = new Float64Array(cells.gate.length)
  const residual = new Float64Array(cells.gate.length)
  const use = new Float64Array(cell.strength.sigma.length)
  let [all, left, known] = [0, 0, 0]
  for (let i = 0; i < azimuths.length; i++) {
    if (isUnknown(cells.state[i * patterned.length + cells.middle])) continue
    known++
    cellClutter(cell, segment, cells, i, { patterned, residual, plain: null }, use, cells.first)
    const factor = perSquareMetre(o, cells, i)
    const rain = rainOf(o, cells, i)
    all += rain * factor + rangeLobesOf(o, cells, i, patterned, 1)
    left += rain * o.left.rain * factor + rangeLobesOf(o, cells, i, residual, o.left.rain)
    for (let k = cells.first; k < patterned.length; k++) {
      all += cells.gate[k] * patterned[k] * factor
      left += cells.gate[k] * residual[k] * factor
    }
  }
  const scale = known > 0 ? (o.beamRad * sideLobeShare(o.r)) / known : 0
  const discrete = sideLobeLevel(o.r) * o.discretes.reduce((s, e) => (Math.abs(rangeM - e.rangeM) > e.reachM ? s : s + e.ratio), 0)
  return { all: all * scale + discrete, left: left * scale + discrete * o.left.discrete }
}
