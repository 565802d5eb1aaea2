import { WEATHER_DEFAULTS } from '../atmosphere/index.ts'
import { defaultFoldRangeM } from '../clutter/index.ts'
import { DEFAULT_STRADDLE_LOSS_DB, requiredRatio } from '../detection/index.ts'
import { InputError } from '../errors/index.ts'
import { DEFAULT_VEHICLE_RCS_M2 } from '../obstacles/index.ts'
import { type AntennaInput, CIRCULAR_DEFAULTS, type CircularInput, type RadarInput } from '../radar/index.ts'
import { checkDoc } from './checkDoc.ts'
import { shortestPulseS } from './checkPulses.ts'
import { instrumentedRangeOf } from './crossChecks.ts'
import { defaultAzimuthStepDeg, defaultRangeStepM, evenStepDeg, gateOfM } from './grid.ts'
import { limitOf } from './limits.ts'
import { originsOf } from './origins.ts'
import { settlePulses } from './settlePulses.ts'
import type {
  AntennaDoc,
  AtmosphereDoc,
  CandidateDoc,
  Confirmation,
  ConfirmationDoc,
  DefaultUsed,
  NeedDoc,
  RadarDoc,
  SettledCandidate,
  SettledNeed,
  SettledStudy,
  StudyDoc,
} from './types.ts'

/** End of a need that a file bounds, m: farther than any radar looks. */
const FARTHEST_M = 2e6

/** Takes what is stated, else the default, and writes the default down. */
class Defaults {
  readonly used: DefaultUsed[] = []
  take<T extends string | number | boolean | null>(path: string, stated: T | undefined, value: T, unit = limitOf(path)?.unit ?? ''): T {
    if (stated !== undefined) return stated
    this.used.push({ path, value, unit })
    return value
  }
}

/** The antenna with its defaults; a table needs no beamwidth. */
function settleAntenna(a: AntennaDoc, d: Defaults): AntennaInput {
  const pattern = d.take('radar.antenna.elevationPattern', a.elevationPattern, 'gaussian')
  return {
    gainDbi: a.gainDbi,
    azimuthBeamwidthDeg: a.azimuthBeamwidthDeg,
    elevationBeamwidthDeg:
      pattern === 'table' ? (a.elevationBeamwidthDeg ?? 5) : d.take('radar.antenna.elevationBeamwidthDeg', a.elevationBeamwidthDeg, 5),
    elevationPattern: pattern,
    cosecantLimitDeg:
      pattern === 'cosecant-squared' ? d.take('radar.antenna.cosecantLimitDeg', a.cosecantLimitDeg, 30) : (a.cosecantLimitDeg ?? 30),
    elevationTable: a.elevationTable ?? [],
    sidelobeDb: d.take('radar.antenna.sidelobeDb', a.sidelobeDb, -28),
    elevationSidelobeDb: d.take('radar.antenna.elevationSidelobeDb', a.elevationSidelobeDb, -30),
    tiltDeg: d.take('radar.antenna.tiltDeg', a.tiltDeg, 0),
    apertureWidthM: a.apertureWidthM ?? null,
    apertureHeightM: a.apertureHeightM ?? null,
  }
}

function settleRadar(r: RadarDoc, instrumentedRangeM: number, d: Defaults): RadarInput {
  const s = r.suppression
  const compressedPulseWidthS = d.take('radar.compressedPulseWidthS', r.compressedPulseWidthS, r.pulseWidthS)
  const antenna = settleAntenna(r.antenna, d)
  const kind = d.take('radar.suppression.kind', s?.kind, 'none')
  const stcKind = d.take('radar.stc.kind', r.stc?.kind, 'none')
  const takesPulses = kind === 'canceller' || kind === 'filterBank'
  return {
    name: d.take('radar.name', r.name, 'Unnamed radar'),
    frequencyHz: r.frequencyHz,
    peakPowerW: r.peakPowerW,
    pulseWidthS: r.pulseWidthS,
    compressedPulseWidthS,
    noiseBandwidthHz: d.take('radar.noiseBandwidthHz', r.noiseBandwidthHz, 1 / compressedPulseWidthS),
    prfHz: [...r.prfHz],
    prfMode: d.take('radar.prfMode', r.prfMode, 'single'),
    ...(r.prfMode === 'dwellStagger' ? { dwellsNeeded: d.take('radar.dwellsNeeded', r.dwellsNeeded, r.prfHz.length) } : {}),
    coherentTransmitter: d.take('radar.coherentTransmitter', r.coherentTransmitter, false),
    polarisation: d.take('radar.polarisation', r.polarisation, 'V'),
    ...(r.polarisation === 'circular' ? { circular: settleCircular(r, d) } : {}),
    rotationRpm: d.take('radar.rotationRpm', r.rotationRpm, 10),
    noiseFigureDb: d.take('radar.noiseFigureDb', r.noiseFigureDb, 4),
    systemLossDb: d.take('radar.systemLossDb', r.systemLossDb, 6),
    pfa: d.take('radar.pfa', r.pfa, 1e-6),
    antenna,
    ...settlePulses(r, antenna),
    suppression: {
      kind,
      statedDb: s?.statedDb ?? 0,
      pulses: takesPulses ? d.take('radar.suppression.pulses', s?.pulses, kind === 'canceller' ? 3 : 8) : (s?.pulses ?? 1),
      stabilityLimitDb: s?.stabilityLimitDb ?? null,
      bits: s?.bits ?? null,
      ...(kind === 'filterBank' ? { window: d.take('radar.suppression.window', s?.window, 'hamming') } : {}),
    },
    stc: { kind: stcKind, curve: r.stc?.curve ?? [], cornerM: r.stc?.cornerM ?? 0, maxDb: r.stc?.maxDb ?? 0 },
    instrumentedRangeM: d.take('radar.instrumentedRangeM', r.instrumentedRangeM, instrumentedRangeM),
    detector: d.take('radar.detector', r.detector, 'noise'),
    straddleLossDb: d.take('radar.straddleLossDb', r.straddleLossDb, DEFAULT_STRADDLE_LOSS_DB),
    cfarLossDb: r.cfarLossDb ?? (r.cfarReferenceCells == null ? d.take('radar.cfarLossDb', undefined, 0) : null),
    cfarReferenceCells: r.cfarReferenceCells ?? null,
    recoveryS: d.take('radar.recoveryS', r.recoveryS, 0),
    receiverLinearRangeDb: r.receiverLinearRangeDb ?? null,
  }
}

function settleCircular(r: RadarDoc, d: Defaults): CircularInput {
  return {
    rainLossDb: d.take('radar.circular.rainLossDb', r.circular?.rainLossDb, CIRCULAR_DEFAULTS.rainLossDb),
    targetLossDb: d.take('radar.circular.targetLossDb', r.circular?.targetLossDb, CIRCULAR_DEFAULTS.targetLossDb),
  }
}

/** Where it rains and how the water stands; what a dry study leaves unstated is no default that anything rests on. */
function settleRainAndTide(air: AtmosphereDoc | undefined, d: Defaults) {
  const { rainTopM, rainExtentM, tideM } = WEATHER_DEFAULTS
  const wet = (air?.rainRateMmH ?? 0) > 0
  const rain = (key: 'rainTopM' | 'rainExtentM', value: number): number =>
    wet ? d.take(`atmosphere.${key}`, air?.[key], value) : (air?.[key] ?? value)
  return {
    rainTopM: rain('rainTopM', rainTopM),
    rainExtentM: rain('rainExtentM', rainExtentM),
    tideM: d.take('atmosphere.tideM', air?.tideM, tideM),
  }
}

/** Floor, three between and ceiling; or the one height. */
function levels(heightM: NeedDoc['heightM']): readonly number[] {
  if (heightM === undefined) return []
  if (typeof heightM === 'number') return [heightM]
  const [floor, ceiling] = heightM
  return [0, 1, 2, 3, 4].map((n) => floor + ((ceiling - floor) * n) / 4)
}

function settleNeed(n: NeedDoc, i: number, radar: RadarInput, maxRangeM: number, d: Defaults): SettledNeed {
  const path = (key: string) => `needs[${i}].${key}`
  const swerling = d.take(path('swerling'), n.swerling, 1)
  const pd = d.take(path('pd'), n.pd, 0.8)
  const required = requiredRatio(radar, { pd, swerling, statedRatioDb: n.requiredRatioDb ?? null })
  return {
    id: n.id,
    name: n.name ?? n.id,
    must: d.take(path('must'), n.must, true),
    rcsM2: d.take(path('rcsM2'), n.rcsM2, 1),
    swerling,
    pd,
    requiredRatioDb: required.ratioDb,
    requiredRatioBy: required.by,
    requiredRatioMark: null,
    required,
    requiredPct: d.take(path('requiredPct'), n.requiredPct, 100),
    kind: n.kind,
    levelsM: levels(n.heightM),
    heightAbove: d.take(path('heightAbove'), n.heightAbove, 'sea'),
    fromRangeM: d.take(path('fromRangeM'), n.fromRangeM, 0),
    toRangeM: n.kind === 'layer' ? d.take(path('toRangeM'), n.toRangeM, maxRangeM) : (n.toRangeM ?? FARTHEST_M),
    sectorDeg: n.sectorDeg ?? [0, 360],
    file: n.file ?? null,
    speedMs: n.speedMs ?? null,
    qnhHpa: n.qnhHpa ?? null,
  }
}

function settleCandidate(
  c: CandidateDoc,
  i: number,
  antennaTiltDeg: number,
  air: SettledStudy['atmosphere'],
  d: Defaults,
): SettledCandidate {
  const earth = { effectiveEarthFactor: air.effectiveEarthFactor, earthRadiusM: air.earthRadiusM }
  return {
    id: c.id,
    name: c.name ?? c.id,
    lon: c.lon,
    lat: c.lat,
    groundHeightM: c.groundHeightM ?? null,
    mastHeightsM: [...c.mastHeightsM],
    tiltsDeg: c.tiltsDeg ? [...c.tiltsDeg] : [antennaTiltDeg],
    clearingRadiusM: d.take(`candidates[${i}].clearingRadiusM`, c.clearingRadiusM, 50),
    notes: c.notes ?? '',
    measuredHorizon: c.measuredHorizon
      ? { file: c.measuredHorizon.file, used: d.take(`candidates[${i}].useMeasuredHorizon`, c.useMeasuredHorizon, false), earth }
      : null,
  }
}

/** A confirmation that has been checked at the door. */
const settleConfirmation = (c: ConfirmationDoc): Confirmation => ({
  need: c.need ?? null,
  place: c.place?.trim() ?? '',
  candidate: c.candidate,
  heightM: c.heightM,
  who: c.who?.trim() ?? '',
  when: c.when?.trim() ?? '',
  method: c.method?.trim() ?? '',
  altitudeM: c.altitudeM ?? Number.NaN,
  result: c.result?.trim() ?? '',
})

/**
 * Fills in every default of a sound document and lists each one used.
 * @param fileName for the sentence of an error
 * @throws InputError at the first problem of the document
 */
export function settle(doc: StudyDoc, fileName?: string): SettledStudy {
  const first = checkDoc(doc).problems[0]
  if (first) throw new InputError({ ...first, place: first.path, ...(fileName === undefined ? {} : { file: fileName }) })
  const d = new Defaults()
  const terrain = doc.terrain.map((t, i) => ({
    file: t.file,
    heights: d.take(`terrain[${i}].heights`, t.heights as 'orthometric' | undefined, 'orthometric'),
    verticalErrorM: d.take(`terrain[${i}].verticalErrorM`, t.verticalErrorM, 10),
    crs: t.crs ?? null,
    unit: t.unit ?? null,
  }))
  const bare = doc.landCover === undefined && doc.uniformTerrain === undefined
  const uniformTerrain = bare ? d.take('uniformTerrain', doc.uniformTerrain, 'rural') : (doc.uniformTerrain ?? 'rural')
  const air = doc.atmosphere
  const atmosphere = {
    effectiveEarthFactor: d.take('atmosphere.effectiveEarthFactor', air?.effectiveEarthFactor, 4 / 3),
    earthRadiusM: air?.earthRadiusM ?? null,
    gas: d.take('atmosphere.gas', air?.gas, 'none'),
    rainRateMmH: d.take('atmosphere.rainRateMmH', air?.rainRateMmH, 0),
    windMs: d.take('atmosphere.windMs', air?.windMs, 8),
    seaState: d.take('atmosphere.seaState', air?.seaState, 3),
    ...settleRainAndTide(air, d),
    seaSpreadMs: air?.seaSpreadMs ?? null,
    seaMeanMs: air?.seaMeanMs ?? null,
    rainSpreadMs: air?.rainSpreadMs ?? null,
    rainMeanMs: air?.rainMeanMs ?? null,
  }
  const radar = settleRadar(doc.radar, instrumentedRangeOf(doc.radar, doc.run), d)
  const maxRangeM = d.take('run.maxRangeM', doc.run?.maxRangeM, radar.instrumentedRangeM)
  const stated = doc.run?.azimuthStepDeg
  const azimuthStepDeg = d.take(
    'run.azimuthStepDeg',
    stated === undefined ? undefined : evenStepDeg(stated),
    defaultAzimuthStepDeg(radar.antenna.azimuthBeamwidthDeg),
  )
  const rangeStepM = d.take(
    'run.rangeStepM',
    doc.run?.rangeStepM,
    defaultRangeStepM(gateOfM(shortestPulseS(doc.radar)), maxRangeM, azimuthStepDeg),
  )
  return {
    name: doc.name,
    terrain,
    landCover: doc.landCover ?? null,
    uniformTerrain,
    uniformTerrainMark: bare ? 'default' : null,
    obstacles: doc.obstacles?.file ?? null,
    roads: doc.roads?.file ?? null,
    vehicleRcsM2: doc.roads
      ? d.take('vehicleRcsM2', doc.vehicleRcsM2, DEFAULT_VEHICLE_RCS_M2)
      : (doc.vehicleRcsM2 ?? DEFAULT_VEHICLE_RCS_M2),
    lowAngleLandTable: doc.tables?.lowAngleLand ?? null,
    atmosphere,
    radar,
    needs: (doc.needs ?? []).map((n, i) => settleNeed(n, i, radar, maxRangeM, d)),
    candidates: doc.candidates.flatMap((c, i) =>
      c.rejected === undefined ? [settleCandidate(c, i, radar.antenna.tiltDeg, atmosphere, d)] : [],
    ),
    rejected: doc.candidates.flatMap((c) =>
      c.rejected === undefined ? [] : [{ id: c.id, name: c.name ?? c.id, lon: c.lon, lat: c.lat, reason: c.rejected }],
    ),
    ranking: doc.ranking && doc.ranking.criteria.length > 0 ? doc.ranking : null,
    confirmations: (doc.confirmations ?? []).map(settleConfirmation),
    run: { maxRangeM, rangeStepM, azimuthStepDeg },
    foldRangeM: d.take('run.foldRangeM', doc.run?.foldRangeM, defaultFoldRangeM(radar)),
    defaults: d.used,
    origins: originsOf(doc),
    declination: doc.declination ?? null,
  }
}

/** Every option of a study: candidate × mast height × tilt, in the order written. */
export function optionsOf(study: SettledStudy): { candidate: string; heightM: number; tiltDeg: number }[] {
  return study.candidates.flatMap((c) =>
    c.mastHeightsM.flatMap((heightM) => c.tiltsDeg.map((tiltDeg) => ({ candidate: c.id, heightM, tiltDeg }))),
  )
}
