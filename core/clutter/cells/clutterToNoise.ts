import type { Earth } from '../../geodesy/index.ts'
import type { GroundCode } from '../../landcover/index.ts'
import type { SightCells, SiteCells } from '../../masking/index.ts'
import { CELL, type PolarShape } from '../../polar/index.ts'
import type { RadarInput } from '../../radar/index.ts'
import type { Site } from '../../terrain/index.ts'
import { fromDb, toDb } from '../../units/index.ts'
import type { Work } from '../../work/index.ts'
import { notesInUse } from '../land/strengthTable.ts'
import type { ClutterCells, ModelNote } from '../types.ts'
import { azimuthSum } from './azimuthSum.ts'
import type { CellRows } from './cellSums.ts'
import { decibel } from './decibelTable.ts'
import { addDiscretes, addToGates, isReceived, makeGates, passedOver, segmentRow } from './gates.ts'
import { type ClutterOptions, type OptionModel, optionModel } from './optionModel.ts'

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
export function optionNotes(o: OptionModel, use: Float64Array, earth: Earth): ModelNote[] {
  const k = earth.effectiveEarthFactor
  const flat = k > 0 && k <= 10 ? [] : [NOTE_FLAT]
  return [...notesInUse(o.cell.strength, use), ...o.notes, ...flat]
}

/** Two-way azimuth side-lobe level, ratio to the peak. */
export const sideLobeLevel = (r: RadarInput): number => fromDb(2 * r.antenna.sidelobeDb)
/** Side lobes all round against the main beam: two-way level × 360°/θ, ratio. */
export const sideLobeShare = (r: RadarInput): number => sideLobeLevel(r) * (360 / r.antenna.azimuthBeamwidthDeg)

/**
 * Clutter-to-noise of every cell of a polar grid for one option, dB, one pulse, before STC, integration and suppression: radar equation with
 * σ°F⁴·A over the ground in sight of the resolution cell centred on the cell (A = R·θaz·cτc/2·sec ψ; two-way Gaussian azimuth kernel; cells
 * weighted by their overlap with the gate; elevation gain at cell centres with the side-lobe floor), plus rain, discrete echoes, and one
 * side-lobe term per gate (of all of these), and folded clutter where it is given; gas and rain loss as the weather says. The residue is the same sum with each kind of clutter
 * divided by its improvement factor. NaN where sight is unknown and inside cτ/2. Holds within LAND_LIMITS, SEA_LIMITS and RAIN_LIMITS; beyond
 * them notes say so. Throws InputError for a frequency outside 30 MHz to 40 GHz or a pattern that is refused.
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
  const cells: CellRows = { ...pick(s), inSight: m.inSight, floorM: m.floorM, centresM: centresOf(grid) }
  const o = optionModel(codes, electricalCentreM(site, s.siteGroundM, heightM), r, tiltDeg, grid, options)
  const { left, kernel } = o
  const folded = options.foldedRatio
  const beamwidthDeg = r.antenna.azimuthBeamwidthDeg
  const passed = passedOver(o, cells, grid)
  const rowsPerYield = Math.max(1, Math.floor(CELLS_PER_YIELD / ranges))
  const total = 2 * azimuths

  // First pass: clutter of each gate on one azimuth and its mean round the ring; twice over where kinds of clutter differ in suppression.
  const known = new Uint32Array(ranges)
  const all = makeGates(grid)
  const rest = left.same === null ? makeGates(grid) : null
  const use = new Float64Array(o.cell.strength.sigma.length)
  for (let i = 0; i < azimuths; i++) {
    for (const segment of o.segments) segmentRow(i, o, segment, cells, m.state, passed, all, rest, known, use)
    if ((i + 1) % rowsPerYield === 0) yield { done: i + 1, total }
  }
  const sideLobe = sideLobesOf(o, r, all.ring, known, grid.rangeStepM, 1)
  const sideLobeLeft = rest ? sideLobesOf(o, r, rest.ring, known, grid.rangeStepM, left.discrete) : null

  // Second pass: the azimuth beam, discrete echoes, dB.
  const cnrDb = new Float32Array(azimuths * ranges)
  const residueDb = left.same === 1 ? cnrDb : new Float32Array(azimuths * ranges)
  const sameDb = left.same === null ? 0 : toDb(left.same)
  for (let i = 0; i < azimuths; i++) {
    azimuthSum(all.gates, azimuths, i, kernel, all.row)
    addDiscretes(i, o, grid, beamwidthDeg, 1, all.row)
    const from = i * ranges
    if (folded) for (let j = 0; j < ranges; j++) all.row[j] += folded[from + j]
    toDecibels(cnrDb, all.row, i, o, cells, m.state, sideLobe)
    if (rest && sideLobeLeft) {
      azimuthSum(rest.gates, azimuths, i, kernel, rest.row)
      addDiscretes(i, o, grid, beamwidthDeg, left.discrete, rest.row)
      if (folded) for (let j = 0; j < ranges; j++) rest.row[j] += folded[from + j] * left.folded
      toDecibels(residueDb, rest.row, i, o, cells, m.state, sideLobeLeft)
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
    notes: optionNotes(o, use, earth),
  }
}

const pick = ({ groundM, code, relief, slopePermille, effectiveRadiusM, siteGroundM }: SiteCells) => ({
  groundM,
  code,
  relief,
  slopePermille,
  effectiveRadiusM,
  siteGroundM,
})

/** Side-lobe term of each gate, ratio: its mean round the ring and every discrete echo at the two-way level. */
function sideLobesOf(
  o: OptionModel,
  r: RadarInput,
  ring: Float64Array,
  known: Uint32Array,
  rangeStepM: number,
  discreteLeft: number,
): Float64Array {
  const scale = o.beamRad * sideLobeShare(r)
  const out = ring.map((sum, j) => (known[j] > 0 ? (scale * sum) / known[j] : 0))
  for (const echo of o.discretes) addToGates(echo.rangeM, echo.reachM, rangeStepM, echo.ratio * sideLobeLevel(r) * discreteLeft, out)
  return out
}

function toDecibels(
  out: Float32Array,
  main: Float64Array,
  i: number,
  { segments, cell: { antennaM } }: OptionModel,
  cells: CellRows,
  state: Uint8Array,
  sideLobe: Float64Array,
): void {
  const { centresM, groundM } = cells
  const n = centresM.length
  const c = 1 / cells.effectiveRadiusM[i]
  for (let j = 0, at = i * n; j < n; j++, at++) {
    const received = state[at] < CELL.beyondVoid && isReceived(segments, antennaM, groundM[at], centresM[j], c)
    out[at] = received ? decibel(main[j] + sideLobe[j]) : Number.NaN
  }
}
