import { azimuthKernel, clutterGainTable } from '../../antenna/index.ts'
import type { Earth } from '../../geodesy/index.ts'
import type { GroundCode } from '../../landcover/index.ts'
import type { SightCells, SiteCells } from '../../masking/index.ts'
import { CELL, type PolarShape } from '../../polar/index.ts'
import { gateLengthM, minimumRangeM, type RadarInput, radarConstantDb } from '../../radar/index.ts'
import type { Site } from '../../terrain/index.ts'
import { fromDb, RAD_PER_DEG, toDb } from '../../units/index.ts'
import type { Work } from '../../work/index.ts'
import type { LandTable } from '../land/landTable.ts'
import { BUILT_IN_LAND_TABLE } from '../land/landTableData.ts'
import { notesInUse, strengthTable } from '../land/strengthTable.ts'
import type { ClutterCells, ImprovementDb, ModelNote } from '../types.ts'
import { azimuthSum } from './azimuthSum.ts'
import { type CellModel, type CellRows, cellClutter, gateSums, gateWeights, slantSquared } from './cellSums.ts'
import { decibel } from './decibelTable.ts'
import { leftOf } from './residue.ts'

export interface ClutterOptions {
  /** Low-angle land table in place of the built-in one. */
  readonly landTable?: LandTable
  /** Suppression by kind of clutter, dB; absent = none, and the residue is all of the clutter. */
  readonly improvementDb?: ImprovementDb
  /** Key of the result; '' when the caller keeps none. */
  readonly key?: string
}
/** Cells summed between two yields: a few milliseconds. */
const CELLS_PER_YIELD = 60_000

/** A factor k outside this is a sensitivity of ducting, not a prediction. */
const NOTE_FLAT: ModelNote = { mark: 'outside model', about: 'flat-earth rays: ducting sensitivity, not a prediction' }

/** Ground range of the cell centres of a polar grid, m. */
export const centresOf = (grid: PolarShape): Float64Array =>
  Float64Array.from({ length: grid.ranges }, (_, j) => (j + 0.5) * grid.rangeStepM)

/** Electrical centre, m MSL: stated ground or that of the raster, plus mast height. */
export const electricalCentreM = (site: Site, siteGroundM: number, heightM: number): number => (site.groundHeightM ?? siteGroundM) + heightM

/** The words that hold for a whole option, from the entries of the strength table its cells took. */
export function optionNotes(model: CellModel, use: Float64Array, earth: Earth): ModelNote[] {
  const k = earth.effectiveEarthFactor
  return k > 0 && k <= 10 ? notesInUse(model.strength, use) : [...notesInUse(model.strength, use), NOTE_FLAT]
}

/** Side lobes all round against the main beam: two-way level × 360°/θ, ratio. */
export const sideLobeShare = (r: RadarInput): number => fromDb(2 * r.antenna.sidelobeDb) * (360 / r.antenna.azimuthBeamwidthDeg)

/**
 * Clutter-to-noise of every cell of a polar grid for one option, dB, one pulse, before STC, integration and suppression: radar equation with
 * σ°F⁴·A over the ground in sight of the resolution cell centred on the cell (A = R·θaz·cτc/2·sec ψ; two-way Gaussian azimuth kernel; cells
 * weighted by their overlap with the gate; elevation gain at cell centres with the side-lobe floor), plus one side-lobe term per gate. The
 * residue is the same sum with each kind of clutter divided by its improvement factor. NaN where sight is unknown and inside cτ/2. Holds within LAND_LIMITS; beyond them notes say so. Throws InputError for a frequency outside
 * 30 MHz to 40 GHz or a pattern that is refused.
 */
export function* clutterToNoise(
  s: SiteCells,
  m: SightCells,
  codes: readonly GroundCode[],
  site: Site,
  heightM: number,
  earth: Earth,
  r: RadarInput,
  tiltDeg: number,
  options: ClutterOptions = {},
): Work<ClutterCells> {
  const { grid } = s
  const { azimuths, ranges } = grid
  const centresM = centresOf(grid)
  const cells: CellRows = { ...pick(s), inSight: m.inSight, centresM }
  const left = leftOf(codes, options.improvementDb)
  const model: CellModel = {
    antennaM: electricalCentreM(site, s.siteGroundM, heightM),
    strength: strengthTable(codes, r.frequencyHz, options.landTable ?? BUILT_IN_LAND_TABLE),
    gain: clutterGainTable(r.antenna, tiltDeg),
    nearestM: minimumRangeM(r),
    left: left.byCode,
  }
  const { antennaM, nearestM } = model
  const constant = fromDb(radarConstantDb(r))
  const rowsPerYield = Math.max(1, Math.floor(CELLS_PER_YIELD / ranges))
  const total = 2 * azimuths

  // First pass: clutter of each gate on one azimuth and its mean round the ring; twice over where kinds of clutter differ in suppression.
  const weights = gateWeights(gateLengthM(r), grid.rangeStepM)
  const known = new Uint32Array(ranges)
  const all = makeGates(azimuths, ranges)
  const rest = left.same === null ? makeGates(azimuths, ranges) : null
  const out = { patterned: all.row, residual: rest?.row ?? null, plain: null }
  const use = new Float64Array(model.strength.sigma.length)
  for (let i = 0; i < azimuths; i++) {
    cellClutter(model, cells, i, out, use)
    gateSums(all.row, weights, all.sums)
    if (rest) gateSums(rest.row, weights, rest.sums)
    gatesOfRow(i, cells, m.state, antennaM, nearestM, constant, all, rest, known)
    if ((i + 1) % rowsPerYield === 0) yield { done: i + 1, total }
  }
  const kernel = azimuthKernel(r.antenna.azimuthBeamwidthDeg, grid.azimuthStepDeg)
  const ringScale = r.antenna.azimuthBeamwidthDeg * RAD_PER_DEG * sideLobeShare(r)
  const sideLobe = all.ring.map((sum, j) => (known[j] > 0 ? (ringScale * sum) / known[j] : 0))
  const sideLobeLeft = rest ? rest.ring.map((sum, j) => (known[j] > 0 ? (ringScale * sum) / known[j] : 0)) : null

  // Second pass: the azimuth beam, the radar equation, dB.
  const cnrDb = new Float32Array(azimuths * ranges)
  const residueDb = left.same === 1 ? cnrDb : new Float32Array(azimuths * ranges)
  const sameDb = left.same === null ? 0 : toDb(left.same)
  for (let i = 0; i < azimuths; i++) {
    azimuthSum(all.gates, azimuths, i, kernel, all.row)
    toDecibels(cnrDb, all.row, i, cells, m.state, antennaM, nearestM, sideLobe)
    const from = i * ranges
    if (rest && sideLobeLeft) {
      azimuthSum(rest.gates, azimuths, i, kernel, rest.row)
      toDecibels(residueDb, rest.row, i, cells, m.state, antennaM, nearestM, sideLobeLeft)
    } else if (residueDb !== cnrDb) for (let at = from; at < from + ranges; at++) residueDb[at] = cnrDb[at] + sameDb
    if ((i + 1) % rowsPerYield === 0) yield { done: azimuths + i + 1, total }
  }
  const sideLobeCnrDb = Float32Array.from(sideLobe, decibel)
  return {
    kind: 'clutter',
    version: 1,
    key: options.key ?? '',
    grid,
    heightM,
    tiltDeg,
    cnrDb,
    residueDb,
    sideLobeCnrDb,
    sideLobeResidueDb: sideLobeLeft ? Float32Array.from(sideLobeLeft, decibel) : sideLobeCnrDb.map((v) => v + sameDb),
    notes: optionNotes(model, use, earth),
  }
}

const pick = ({ groundM, code, relief, effectiveRadiusM, siteGroundM }: SiteCells) => ({
  groundM,
  code,
  relief,
  effectiveRadiusM,
  siteGroundM,
})

/** One kind of sum, all of the clutter or what suppression leaves: a row of cells and its gates, every gate of the grid, sums round the rings. */
interface Gates {
  readonly row: Float64Array
  readonly sums: Float64Array
  /** Clutter-to-noise of the gates per radian of azimuth, ratio. */
  readonly gates: Float32Array
  readonly ring: Float64Array
}
const makeGates = (azimuths: number, ranges: number): Gates => ({
  row: new Float64Array(ranges),
  sums: new Float64Array(ranges),
  gates: new Float32Array(azimuths * ranges),
  ring: new Float64Array(ranges),
})

/** Is the cell nearer than the pulse allows? The slant range is worked out only where it can decide. */
function tooNear(nearestM: number, antennaM: number, groundM: number, rangeM: number, c: number): boolean {
  return rangeM <= 1.01 * nearestM && slantSquared(antennaM, groundM, rangeM, c) < nearestM * nearestM
}

/** Radar equation of the gates on one azimuth, each at the slant range of its middle cell; counts the cells known in each ring. */
function gatesOfRow(
  i: number,
  cells: CellRows,
  state: Uint8Array,
  antennaM: number,
  nearestM: number,
  constant: number,
  all: Gates,
  rest: Gates | null,
  known: Uint32Array,
): void {
  const { centresM, groundM } = cells
  const { sums, gates, ring } = all
  const n = centresM.length
  const c = 1 / cells.effectiveRadiusM[i]
  for (let j = 0, at = i * n; j < n; j++, at++) {
    if (state[at] >= CELL.beyondVoid || tooNear(nearestM, antennaM, groundM[at], centresM[j], c)) continue
    known[j]++
    if (sums[j] === 0) continue
    const r2 = slantSquared(antennaM, groundM[at], centresM[j], c)
    const factor = constant / (r2 * r2)
    const v = sums[j] * factor
    ring[j] += v
    gates[at] = v
    if (rest) {
      const w = rest.sums[j] * factor
      rest.ring[j] += w
      rest.gates[at] = w
    }
  }
}

function toDecibels(
  out: Float32Array,
  main: Float64Array,
  i: number,
  cells: CellRows,
  state: Uint8Array,
  antennaM: number,
  nearestM: number,
  sideLobe: Float64Array,
): void {
  const { centresM, groundM } = cells
  const n = centresM.length
  const c = 1 / cells.effectiveRadiusM[i]
  for (let j = 0, at = i * n; j < n; j++, at++) {
    const undefinedHere = state[at] >= CELL.beyondVoid || tooNear(nearestM, antennaM, groundM[at], centresM[j], c)
    out[at] = undefinedHere ? Number.NaN : decibel(main[j] + sideLobe[j])
  }
}
