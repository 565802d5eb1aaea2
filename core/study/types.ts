import type { RequiredRatio } from '../detection/index.ts'
import type { TerrainName } from '../landcover/index.ts'
import type { RadarInput } from '../radar/index.ts'

/** The document as it is written: only what the user stated. Unknown keys are kept untouched. */
export interface TerrainFileDoc {
  file: string
  heights?: 'orthometric' | 'ellipsoidal'
  verticalErrorM?: number
  crs?: string | null
  unit?: 'm' | 'ft' | 'us-ft' | null
}
export interface LandCoverDoc {
  file: string
  legend: 'worldcover' | 'nlcd' | 'corine' | 'custom'
  classes?: Record<string, { terrain: TerrainName; coverHeightM: number }>
}
export interface AntennaDoc {
  gainDbi: number
  azimuthBeamwidthDeg: number
  elevationBeamwidthDeg?: number
  elevationPattern?: 'cosecant-squared' | 'gaussian' | 'table'
  cosecantLimitDeg?: number
  elevationTable?: [number, number][]
  sidelobeDb?: number
  elevationSidelobeDb?: number
  tiltDeg?: number
  apertureWidthM?: number | null
  apertureHeightM?: number | null
}
/** One of several pulses, by slant range. */
export interface PulseDoc {
  widthS: number
  compressedWidthS?: number
  noiseBandwidthHz?: number
  fromRangeM: number
  toRangeM: number
  rangeSidelobeDb?: number | null
}
/** A stacked beam; what it does not state is the antenna's. */
export interface BeamDoc {
  name: string
  gainDbi?: number
  offsetDeg?: number
  elevationBeamwidthDeg?: number
  elevationPattern?: 'cosecant-squared' | 'gaussian' | 'table'
  cosecantLimitDeg?: number
  elevationTable?: [number, number][]
}
export interface BeamSwitchDoc {
  fromRangeM: number
  toRangeM: number
  transmit: string
  receive: string
}
export interface RadarDoc {
  name?: string
  frequencyHz: number
  peakPowerW: number
  pulseWidthS: number
  compressedPulseWidthS?: number
  noiseBandwidthHz?: number
  prfHz: number[]
  prfMode?: 'single' | 'pulseStagger' | 'dwellStagger'
  /** dwellStagger: a place counts when it is usable on at least this many PRFs; absent = all. */
  dwellsNeeded?: number
  coherentTransmitter?: boolean
  polarisation?: 'H' | 'V' | 'circular'
  /** What circular polarisation takes off rain clutter and targets, dB. */
  circular?: { rainLossDb?: number; targetLossDb?: number }
  rotationRpm?: number
  noiseFigureDb?: number
  systemLossDb?: number
  pfa?: number
  antenna: AntennaDoc
  pulses?: PulseDoc[]
  beams?: BeamDoc[]
  beamSwitch?: BeamSwitchDoc[]
  suppression?: {
    kind: 'none' | 'stated' | 'canceller' | 'filterBank'
    statedDb?: number
    pulses?: number
    stabilityLimitDb?: number
    bits?: number
    window?: 'uniform' | 'hamming'
  }
  stc?: { kind: 'none' | 'curve' | 'rtoFourth'; curve?: [number, number][]; cornerM?: number; maxDb?: number }
  instrumentedRangeM?: number
  straddleLossDb?: number
  /** Threshold over noise, or over the clutter of an area: spiky clutter then raises it. */
  detector?: 'noise' | 'areaCfar'
  cfarLossDb?: number | null
  cfarReferenceCells?: number | null
  recoveryS?: number
  receiverLinearRangeDb?: number | null
  /** Where values come from, by key path inside the radar: `from memory: ITU-R M.1464, radar C`. */
  origins?: Record<string, string>
}
export interface NeedDoc {
  id: string
  name?: string
  must?: boolean
  rcsM2?: number
  swerling?: 0 | 1 | 2 | 3 | 4
  pd?: number
  requiredRatioDb?: number | null
  /** Share of the area that must be met for the need to count as met, %. */
  requiredPct?: number
  kind: 'layer' | 'fixes' | 'track' | 'polygon'
  heightM?: number | [number, number]
  heightAbove?: 'sea' | 'ground'
  fromRangeM?: number
  toRangeM?: number
  sectorDeg?: [number, number]
  file?: string
  /** Speed over ground of a target on a track, m/s: gaps in seconds, radial speeds. */
  speedMs?: number | null
  /** Pressure setting that turns flight levels of a fix file into heights, hPa. */
  qnhHpa?: number | null
  /** Where values come from, by key path inside the need. */
  origins?: Record<string, string>
}
/** Something measured on site or in trial: entered by the user, never computed. All but `need`, `place` and `notes` is asked for. */
export interface ConfirmationDoc {
  /** Id of the need, or a place in words; one of the two. */
  need?: string
  place?: string
  candidate: string
  /** Mast height of the option, m. */
  heightM: number
  who?: string
  /** Day, as 2026-05-31. */
  when?: string
  method?: string
  /** Altitude flown or measured, m MSL. */
  altitudeM?: number
  result?: string
}
export interface CandidateDoc {
  id: string
  name?: string
  lon: number
  lat: number
  groundHeightM?: number | null
  mastHeightsM: number[]
  tiltsDeg?: number[] | null
  clearingRadiusM?: number
  notes?: string
  /** Horizon surveyed at this candidate. */
  measuredHorizon?: { file: string } | null
  /** Take the higher of surveyed and computed horizon. */
  useMeasuredHorizon?: boolean
  /** Why the candidate is out: it is listed with this reason and no longer worked out. */
  rejected?: string
}
/** One thing options are ranked by: a figure of the summary, the values that count as worst and best, and its weight. */
export interface CriterionDoc {
  /** Plain name as in the summary file: `need_n1_usable_pct`. */
  figure: string
  worst: number
  best: number
  weight: number
}
export interface RankingDoc {
  criteria: CriterionDoc[]
}
export interface AtmosphereDoc {
  effectiveEarthFactor?: number
  earthRadiusM?: number | null
  gas?: 'none' | 'p676'
  rainRateMmH?: number
  windMs?: number
  seaState?: number
  /** Rain top, m MSL; how far it rains from the radar, m. */
  rainTopM?: number
  rainExtentM?: number
  /** Water stands this much above the raster, m. */
  tideM?: number
  /** How sea and rain echoes move, m/s: spread and mean radial velocity; absent = worked out from the wind. */
  seaSpreadMs?: number | null
  seaMeanMs?: number | null
  rainSpreadMs?: number | null
  rainMeanMs?: number | null
}
export interface RunDoc {
  maxRangeM?: number
  rangeStepM?: number
  azimuthStepDeg?: number
  /** How far clutter from beyond the unambiguous range is looked for, m. */
  foldRangeM?: number
}
export interface StudyDoc {
  format: 'sightfell-study'
  version: 1
  name: string
  terrain: TerrainFileDoc[]
  landCover?: LandCoverDoc
  uniformTerrain?: TerrainName
  obstacles?: { file: string }
  roads?: { file: string }
  /** Radar cross-section of a vehicle on a road, m². */
  vehicleRcsM2?: number
  facades?: { file: string }
  tables?: { lowAngleLand?: string }
  atmosphere?: AtmosphereDoc
  /** Magnetic declination for azimuths at the face, deg, positive east: of which day and by which field model or survey. */
  declination?: { valueDeg: number; date: string; model: string }
  radar: RadarDoc
  needs?: NeedDoc[]
  candidates: CandidateDoc[]
  confirmations?: ConfirmationDoc[]
  /** How options are ranked; absent: an order of reading only. */
  ranking?: RankingDoc
  run?: RunDoc
}

/** A default that stands in for something the user did not state; all are listed in the memo. */
export interface DefaultUsed {
  /** Key path, e.g. 'radar.noiseFigureDb'. */
  readonly path: string
  readonly value: string | number | boolean | null
  readonly unit: string
}
/** Where a value of the study comes from, as the study says. */
export interface OriginOf {
  /** Key path, e.g. 'radar.antenna.gainDbi'. */
  readonly path: string
  readonly value: unknown
  /** `from memory: ITU-R M.1464, radar C`. */
  readonly origin: string
}
export interface SettledNeed {
  readonly id: string
  readonly name: string
  readonly must: boolean
  readonly rcsM2: number
  readonly swerling: 0 | 1 | 2 | 3 | 4
  readonly pd: number
  /** Ratio of echo to noise, and to noise and residue, that a target must reach, dB: stated, or worked out (`required` says from what). */
  readonly requiredRatioDb: number
  readonly requiredRatioBy: 'stated' | 'detection'
  readonly requiredRatioMark: 'default' | null
  readonly required: RequiredRatio
  /** Share of the area that must be met, %; 100 unless stated. */
  readonly requiredPct: number
  readonly kind: NeedDoc['kind']
  /** Heights tested, m: one, or floor, three between, ceiling. */
  readonly levelsM: readonly number[]
  readonly heightAbove: 'sea' | 'ground'
  readonly fromRangeM: number
  readonly toRangeM: number
  readonly sectorDeg: readonly [number, number]
  /** File of fixes, track or polygon; null for a layer. */
  readonly file: string | null
  readonly speedMs: number | null
  readonly qnhHpa: number | null
}
export interface SettledCandidate {
  readonly id: string
  readonly name: string
  readonly lon: number
  readonly lat: number
  readonly groundHeightM: number | null
  readonly mastHeightsM: readonly number[]
  /** Never empty: the antenna's own tilt when none are stated. */
  readonly tiltsDeg: readonly number[]
  readonly clearingRadiusM: number
  readonly notes: string
  /** The horizon surveyed there: its file, whether it is taken as the higher of both, and the earth its angles become heights with; null = none. */
  readonly measuredHorizon: {
    readonly file: string
    readonly used: boolean
    readonly earth: { readonly effectiveEarthFactor: number; readonly earthRadiusM: number | null }
  } | null
}
/** Measured on site or in trial; complete. */
export interface Confirmation {
  readonly need: string | null
  readonly place: string
  readonly candidate: string
  readonly heightM: number
  readonly who: string
  readonly when: string
  readonly method: string
  readonly altitudeM: number
  readonly result: string
}
export interface RejectedCandidate {
  readonly id: string
  readonly name: string
  readonly lon: number
  readonly lat: number
  readonly reason: string
}
/** The document with every default filled in: what the engine runs on. */
export interface SettledStudy {
  readonly name: string
  readonly terrain: readonly {
    file: string
    heights: 'orthometric'
    verticalErrorM: number
    crs: string | null
    unit: 'm' | 'ft' | 'us-ft' | null
  }[]
  readonly landCover: LandCoverDoc | null
  readonly uniformTerrain: TerrainName
  readonly uniformTerrainMark: 'default' | null
  readonly obstacles: string | null
  readonly roads: string | null
  /** Radar cross-section of a vehicle, m². */
  readonly vehicleRcsM2: number
  readonly lowAngleLandTable: string | null
  readonly atmosphere: {
    readonly effectiveEarthFactor: number
    readonly earthRadiusM: number | null
    readonly gas: 'none' | 'p676'
    readonly rainRateMmH: number
    readonly windMs: number
    readonly seaState: number
    readonly rainTopM: number
    readonly rainExtentM: number
    readonly tideM: number
    readonly seaSpreadMs: number | null
    readonly seaMeanMs: number | null
    readonly rainSpreadMs: number | null
    readonly rainMeanMs: number | null
  }
  readonly radar: RadarInput
  readonly needs: readonly SettledNeed[]
  /** Those that are worked out. */
  readonly candidates: readonly SettledCandidate[]
  readonly confirmations: readonly Confirmation[]
  /** Those the study has given up, with the reason. */
  readonly rejected: readonly RejectedCandidate[]
  readonly ranking: RankingDoc | null
  readonly run: { readonly maxRangeM: number; readonly rangeStepM: number; readonly azimuthStepDeg: number }
  /** Slant range to which clutter that folds is looked for, m. */
  readonly foldRangeM: number
  readonly defaults: readonly DefaultUsed[]
  /** Values taken from a template, with where each comes from. */
  readonly origins: readonly OriginOf[]
  /** Stated declination; null where none is. Nothing is computed with it. */
  readonly declination: { readonly valueDeg: number; readonly date: string; readonly model: string } | null
}
