import { azimuthKernel } from '../../antenna/index.ts'
import { GAS_LIMITS, type PathLoss, pathLoss, RAIN_LOSS_LIMITS, type Weather } from '../../atmosphere/index.ts'
import type { GroundCode } from '../../landcover/index.ts'
import type { RadarInput } from '../../radar/index.ts'
import { RAD_PER_DEG } from '../../units/index.ts'
import { type DiscreteEcho, type PlacedEcho, placeEchoes } from '../discretes/discreteEchoes.ts'
import type { LandTable } from '../land/landTable.ts'
import { BUILT_IN_LAND_TABLE } from '../land/landTableData.ts'
import { strengthTable } from '../land/strengthTable.ts'
import type { RainBeam } from '../rain/rainBeam.ts'
import type { ImprovementDb, ModelNote } from '../types.ts'
import type { CellModel } from './cellSums.ts'
import { type Left, leftOf } from './residue.ts'
import { makeSegments, type Segment } from './segment.ts'

export interface ClutterOptions {
  /** Low-angle land table in place of the built-in one. */
  readonly landTable?: LandTable
  /** Gas, rain and sea; absent: no losses, no rain, sea clutter not assessed. */
  readonly weather?: Weather
  /** Obstacles that send back echoes of their own, from `discreteEchoes`; absent: none. */
  readonly discretes?: readonly DiscreteEcho[]
  /** Second-time-around clutter per cell of the grid over noise, ratio, from `foldedClutter`; absent: none is added. */
  readonly foldedRatio?: Float32Array
  /** Suppression by kind of clutter, dB; absent = none, and the residue is all of the clutter. */
  readonly improvementDb?: ImprovementDb
  /** Key of the result; '' when the caller keeps none. */
  readonly key?: string
}

/** One option's radar, tilt and weather with the tables its cells share: the same for a polar grid and for single points. */
export interface OptionModel {
  readonly cell: CellModel
  /** Pulses and beams by slant range, nearest first. */
  readonly segments: readonly Segment[]
  readonly rangeStepM: number
  readonly beamRad: number
  /** Weights of neighbouring azimuths in the beam, rad. */
  readonly kernel: Float64Array
  readonly table: LandTable
  readonly left: Left
  readonly loss: PathLoss | null
  readonly discretes: readonly PlacedEcho[]
  /** Words of the weather. */
  readonly notes: readonly ModelNote[]
}

const NOTE_GAS_LOW: ModelNote = { mark: 'outside model', about: 'gas loss below 1 GHz: the Recommendation starts there' }
const NOTE_RAIN_LOSS_LOW: ModelNote = { mark: 'outside model', about: 'rain loss below 1 GHz: the law at 1 GHz held, likely high' }

/** Throws InputError for a frequency outside 30 MHz to 40 GHz or a pattern that is refused. */
export function optionModel(
  codes: readonly GroundCode[],
  antennaM: number,
  r: RadarInput,
  tiltDeg: number,
  grid: { readonly azimuthStepDeg: number; readonly rangeStepM: number },
  options: ClutterOptions,
): OptionModel {
  const { weather, improvementDb, discretes = [] } = options
  const table = options.landTable ?? BUILT_IN_LAND_TABLE
  const sea = weather ? { seaState: weather.seaState, polarisation: r.polarisation } : null
  const left = leftOf(codes, improvementDb)
  const loss = weather ? pathLoss(weather, r.frequencyHz, r.polarisation) : null
  const segments = makeSegments(r, tiltDeg, grid.rangeStepM, weather)
  const { azimuthBeamwidthDeg } = r.antenna
  return {
    cell: {
      antennaM,
      strength: strengthTable(codes, r.frequencyHz, table, sea),
      left: left.byCode,
      tideM: weather?.tideM ?? 0,
    },
    segments,
    rangeStepM: grid.rangeStepM,
    beamRad: azimuthBeamwidthDeg * RAD_PER_DEG,
    kernel: azimuthKernel(azimuthBeamwidthDeg, grid.azimuthStepDeg),
    table,
    left,
    loss,
    discretes: placeEchoes(discretes, antennaM, segments, tiltDeg, loss, grid.rangeStepM),
    notes: weather ? weatherNotes(weather, r.frequencyHz, segments[0]?.rain ?? null) : [],
  }
}

function weatherNotes(w: Weather, frequencyHz: number, rain: RainBeam | null): ModelNote[] {
  const notes: ModelNote[] = []
  if (w.gas === 'p676' && frequencyHz < GAS_LIMITS.frequencyGHz.low * 1e9) notes.push(NOTE_GAS_LOW)
  if (rain && frequencyHz < RAIN_LOSS_LIMITS.frequencyGHz.low * 1e9) notes.push(NOTE_RAIN_LOSS_LOW)
  return [...notes, ...(rain?.notes ?? [])]
}
