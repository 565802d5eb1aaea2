import { azimuthKernel, clutterGainTable } from '../../antenna/index.ts'
import { GAS_LIMITS, type PathLoss, pathLoss, RAIN_LOSS_LIMITS, type Weather } from '../../atmosphere/index.ts'
import type { GroundCode } from '../../landcover/index.ts'
import { gateLengthM, minimumRangeM, type RadarInput, radarConstantDb } from '../../radar/index.ts'
import { fromDb, RAD_PER_DEG } from '../../units/index.ts'
import { type DiscreteEcho, type PlacedEcho, placeEchoes } from '../discretes/discreteEchoes.ts'
import type { LandTable } from '../land/landTable.ts'
import { BUILT_IN_LAND_TABLE } from '../land/landTableData.ts'
import { strengthTable } from '../land/strengthTable.ts'
import { type RainBeam, rainBeam } from '../rain/rainBeam.ts'
import type { ImprovementDb, ModelNote } from '../types.ts'
import { type CellModel, gateWeights } from './cellSums.ts'
import { type Left, leftOf } from './residue.ts'

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
  /** Echo-to-noise ratio of 1 m² at 1 m. */
  readonly constant: number
  readonly gateM: number
  readonly beamRad: number
  /** Weights of neighbouring range cells in a gate, m, and of neighbouring azimuths in the beam, rad. */
  readonly weights: Float64Array
  readonly kernel: Float64Array
  readonly table: LandTable
  readonly left: Left
  readonly loss: PathLoss | null
  readonly rain: RainBeam | null
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
  const rain = weather ? rainBeam(weather, r, tiltDeg) : null
  const gateM = gateLengthM(r)
  const { azimuthBeamwidthDeg } = r.antenna
  return {
    cell: {
      antennaM,
      strength: strengthTable(codes, r.frequencyHz, table, sea),
      gain: clutterGainTable(r.antenna, tiltDeg),
      nearestM: minimumRangeM(r),
      left: left.byCode,
      tideM: weather?.tideM ?? 0,
    },
    constant: fromDb(radarConstantDb(r)),
    gateM,
    beamRad: azimuthBeamwidthDeg * RAD_PER_DEG,
    weights: gateWeights(gateM, grid.rangeStepM),
    kernel: azimuthKernel(azimuthBeamwidthDeg, grid.azimuthStepDeg),
    table,
    left,
    loss,
    rain,
    discretes: placeEchoes(discretes, antennaM, r, tiltDeg, loss, gateM, grid.rangeStepM),
    notes: weather ? weatherNotes(weather, r.frequencyHz, rain) : [],
  }
}

function weatherNotes(w: Weather, frequencyHz: number, rain: RainBeam | null): ModelNote[] {
  const notes: ModelNote[] = []
  if (w.gas === 'p676' && frequencyHz < GAS_LIMITS.frequencyGHz.low * 1e9) notes.push(NOTE_GAS_LOW)
  if (rain && frequencyHz < RAIN_LOSS_LIMITS.frequencyGHz.low * 1e9) notes.push(NOTE_RAIN_LOSS_LOW)
  return [...notes, ...(rain?.notes ?? [])]
}
