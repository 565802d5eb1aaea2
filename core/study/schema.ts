import * as z from 'zod'
import { TERRAIN_NAMES } from '../landcover/index.ts'
import { allowed, LIMITS, quantity, within } from './limits.ts'

/** Shape of a study of version 1. Objects are open: a key it does not name is kept. Ranges come from LIMITS. */

/** A number with the limit of its key path. */
const num = (path: string) => {
  const limit = LIMITS[path]
  if (!limit) throw new Error(`no limit for ${path}`)
  return z.number().superRefine((value, ctx) => {
    if (within(limit, value)) return
    ctx.addIssue({
      code: 'custom',
      params: { code: 'range', found: `${limit.what} is ${quantity(value, limit.unit)}`, remedy: allowed(limit) },
    })
  })
}
const fileName = z.string().superRefine((value, ctx) => {
  if (value.trim() === '')
    ctx.addIssue({ code: 'custom', params: { code: 'no-file', found: 'file name is empty', remedy: 'name a file beside the study' } })
})
const ID = /^[A-Za-z0-9_-]{1,32}$/
const id = z.string().superRefine((value, ctx) => {
  if (ID.test(value)) return
  const found = `identifier is ${JSON.stringify(value.length > 40 ? `${value.slice(0, 40)}…` : value)}`
  ctx.addIssue({ code: 'custom', params: { code: 'id', found, remedy: 'use 1 to 32 of the characters A-Z a-z 0-9 _ -' } })
})
const origins = z.record(z.string(), z.string())
const fileOnly = z.looseObject({ file: fileName })

const terrainFile = z.looseObject({
  file: fileName,
  heights: z.enum(['orthometric', 'ellipsoidal']).optional(),
  verticalErrorM: num('terrain[].verticalErrorM').optional(),
  crs: z.string().nullable().optional(),
  unit: z.enum(['m', 'ft', 'us-ft']).nullable().optional(),
})
const landCover = z.looseObject({
  file: fileName,
  legend: z.enum(['worldcover', 'nlcd', 'corine', 'custom']),
  classes: z
    .record(z.string(), z.looseObject({ terrain: z.enum(TERRAIN_NAMES), coverHeightM: num('landCover.classes.*.coverHeightM') }))
    .optional(),
})
const atmosphere = z.looseObject({
  effectiveEarthFactor: num('atmosphere.effectiveEarthFactor').optional(),
  earthRadiusM: num('atmosphere.earthRadiusM').nullable().optional(),
  gas: z.enum(['none', 'p676']).optional(),
  rainRateMmH: num('atmosphere.rainRateMmH').optional(),
  windMs: num('atmosphere.windMs').optional(),
  seaState: num('atmosphere.seaState').optional(),
  rainTopM: num('atmosphere.rainTopM').optional(),
  rainExtentM: num('atmosphere.rainExtentM').optional(),
  tideM: num('atmosphere.tideM').optional(),
  seaSpreadMs: num('atmosphere.seaSpreadMs').nullable().optional(),
  seaMeanMs: num('atmosphere.seaMeanMs').nullable().optional(),
  rainSpreadMs: num('atmosphere.rainSpreadMs').nullable().optional(),
  rainMeanMs: num('atmosphere.rainMeanMs').nullable().optional(),
})
const antenna = z.looseObject({
  gainDbi: num('radar.antenna.gainDbi'),
  azimuthBeamwidthDeg: num('radar.antenna.azimuthBeamwidthDeg'),
  elevationBeamwidthDeg: num('radar.antenna.elevationBeamwidthDeg').optional(),
  elevationPattern: z.enum(['cosecant-squared', 'gaussian', 'table']).optional(),
  cosecantLimitDeg: num('radar.antenna.cosecantLimitDeg').optional(),
  elevationTable: z.array(z.tuple([num('radar.antenna.elevationTable[][0]'), z.number()])).optional(),
  sidelobeDb: num('radar.antenna.sidelobeDb').optional(),
  elevationSidelobeDb: num('radar.antenna.elevationSidelobeDb').optional(),
  tiltDeg: num('radar.antenna.tiltDeg').optional(),
  apertureWidthM: num('radar.antenna.apertureWidthM').nullable().optional(),
  apertureHeightM: num('radar.antenna.apertureHeightM').nullable().optional(),
})
const pulse = z.looseObject({
  widthS: num('radar.pulses[].widthS'),
  compressedWidthS: num('radar.pulses[].compressedWidthS').optional(),
  noiseBandwidthHz: num('radar.pulses[].noiseBandwidthHz').optional(),
  fromRangeM: num('radar.pulses[].fromRangeM'),
  toRangeM: num('radar.pulses[].toRangeM'),
  rangeSidelobeDb: num('radar.pulses[].rangeSidelobeDb').nullable().optional(),
})
const beam = z.looseObject({
  name: id,
  gainDbi: num('radar.antenna.gainDbi').optional(),
  offsetDeg: num('radar.beams[].offsetDeg').optional(),
  elevationBeamwidthDeg: num('radar.antenna.elevationBeamwidthDeg').optional(),
  elevationPattern: z.enum(['cosecant-squared', 'gaussian', 'table']).optional(),
  cosecantLimitDeg: num('radar.antenna.cosecantLimitDeg').optional(),
  elevationTable: z.array(z.tuple([num('radar.antenna.elevationTable[][0]'), z.number()])).optional(),
})
const beamSwitch = z.looseObject({
  fromRangeM: num('radar.beamSwitch[].fromRangeM'),
  toRangeM: num('radar.beamSwitch[].toRangeM'),
  transmit: z.string(),
  receive: z.string(),
})
const radar = z.looseObject({
  name: z.string().optional(),
  frequencyHz: num('radar.frequencyHz'),
  peakPowerW: num('radar.peakPowerW'),
  pulseWidthS: num('radar.pulseWidthS'),
  compressedPulseWidthS: num('radar.compressedPulseWidthS').optional(),
  noiseBandwidthHz: num('radar.noiseBandwidthHz').optional(),
  prfHz: z.array(num('radar.prfHz[]')),
  prfMode: z.enum(['single', 'pulseStagger', 'dwellStagger']).optional(),
  dwellsNeeded: num('radar.dwellsNeeded').optional(),
  coherentTransmitter: z.boolean().optional(),
  polarisation: z.enum(['H', 'V', 'circular']).optional(),
  circular: z
    .looseObject({ rainLossDb: num('radar.circular.rainLossDb').optional(), targetLossDb: num('radar.circular.targetLossDb').optional() })
    .optional(),
  rotationRpm: num('radar.rotationRpm').optional(),
  noiseFigureDb: num('radar.noiseFigureDb').optional(),
  systemLossDb: num('radar.systemLossDb').optional(),
  pfa: num('radar.pfa').optional(),
  antenna,
  pulses: z.array(pulse).optional(),
  beams: z.array(beam).optional(),
  beamSwitch: z.array(beamSwitch).optional(),
  suppression: z
    .looseObject({
      kind: z.enum(['none', 'stated', 'canceller', 'filterBank']),
      statedDb: num('radar.suppression.statedDb').optional(),
      pulses: num('radar.suppression.pulses').optional(),
      stabilityLimitDb: num('radar.suppression.stabilityLimitDb').optional(),
      bits: num('radar.suppression.bits').optional(),
      window: z.enum(['uniform', 'hamming']).optional(),
    })
    .optional(),
  stc: z
    .looseObject({
      kind: z.enum(['none', 'curve', 'rtoFourth']),
      curve: z.array(z.tuple([num('radar.stc.curve[][0]'), num('radar.stc.curve[][1]')])).optional(),
      cornerM: num('radar.stc.cornerM').optional(),
      maxDb: num('radar.stc.maxDb').optional(),
    })
    .optional(),
  instrumentedRangeM: num('radar.instrumentedRangeM').optional(),
  straddleLossDb: num('radar.straddleLossDb').optional(),
  detector: z.enum(['noise', 'areaCfar']).optional(),
  cfarLossDb: num('radar.cfarLossDb').nullable().optional(),
  cfarReferenceCells: num('radar.cfarReferenceCells').nullable().optional(),
  recoveryS: num('radar.recoveryS').optional(),
  receiverLinearRangeDb: num('radar.receiverLinearRangeDb').nullable().optional(),
  origins: origins.optional(),
})
/** One height or [floor, ceiling]. */
const levelOrBand = z.unknown().superRefine((value, ctx) => {
  const limit = LIMITS['needs[].heightM']!
  const say = (found: string, remedy: string) => ctx.addIssue({ code: 'custom', params: { code: 'height', found, remedy } })
  const heights: unknown[] = Array.isArray(value) ? value : [value]
  if (Array.isArray(value) && value.length !== 2)
    return say(`height list has ${value.length} entries`, 'give one height or [floor, ceiling] in m')
  for (const h of heights) {
    if (typeof h !== 'number') return say(`height is ${JSON.stringify(h)}`, 'give one height or [floor, ceiling] in m')
    if (!within(limit, h)) return say(`${limit.what} is ${quantity(h, limit.unit)}`, allowed(limit))
  }
  if (heights.length === 2 && Number(heights[0]) >= Number(heights[1]))
    say(`floor ${heights[0]} m is not below ceiling ${heights[1]} m`, 'give [floor, ceiling], lower first')
})
const need = z.looseObject({
  id,
  name: z.string().optional(),
  must: z.boolean().optional(),
  rcsM2: num('needs[].rcsM2').optional(),
  swerling: z.literal([0, 1, 2, 3, 4]).optional(),
  pd: num('needs[].pd').optional(),
  requiredRatioDb: num('needs[].requiredRatioDb').nullable().optional(),
  requiredPct: num('needs[].requiredPct').optional(),
  kind: z.enum(['layer', 'fixes', 'track', 'polygon']),
  heightM: levelOrBand.optional(),
  heightAbove: z.enum(['sea', 'ground']).optional(),
  fromRangeM: num('needs[].fromRangeM').optional(),
  toRangeM: num('needs[].toRangeM').optional(),
  sectorDeg: z.tuple([num('needs[].sectorDeg[]'), num('needs[].sectorDeg[]')]).optional(),
  file: fileName.optional(),
  speedMs: num('needs[].speedMs').nullable().optional(),
  qnhHpa: num('needs[].qnhHpa').nullable().optional(),
  origins: origins.optional(),
})
const reason = z.string().superRefine((value, ctx) => {
  if (value.trim() === '')
    ctx.addIssue({
      code: 'custom',
      params: { code: 'no-reason', found: 'a rejected candidate without a reason', remedy: 'say why, or take the key out' },
    })
})
const FIGURE = /^[a-z][A-Za-z0-9_-]*$/
const figureName = z.string().superRefine((value, ctx) => {
  if (FIGURE.test(value)) return
  const found = `figure is ${JSON.stringify(value.length > 40 ? `${value.slice(0, 40)}…` : value)}`
  ctx.addIssue({ code: 'custom', params: { code: 'figure', found, remedy: 'use a name of summary.json, such as "clutter_over_40_km2"' } })
})
const candidate = z.looseObject({
  id,
  name: z.string().optional(),
  lon: num('candidates[].lon'),
  lat: num('candidates[].lat'),
  groundHeightM: num('candidates[].groundHeightM').nullable().optional(),
  mastHeightsM: z.array(num('candidates[].mastHeightsM[]')),
  tiltsDeg: z.array(num('candidates[].tiltsDeg[]')).nullable().optional(),
  clearingRadiusM: num('candidates[].clearingRadiusM').optional(),
  notes: z.string().optional(),
  measuredHorizon: fileOnly.nullable().optional(),
  useMeasuredHorizon: z.boolean().optional(),
  rejected: reason.optional(),
})
const criterion = z.looseObject({
  figure: figureName,
  worst: num('ranking.criteria[].worst'),
  best: num('ranking.criteria[].best'),
  weight: num('ranking.criteria[].weight'),
})

const confirmation = z.looseObject({
  need: z.string().optional(),
  place: z.string().optional(),
  candidate: id,
  heightM: num('candidates[].mastHeightsM[]'),
  who: z.string().optional(),
  when: z.string().optional(),
  method: z.string().optional(),
  altitudeM: num('confirmations[].altitudeM').optional(),
  result: z.string().optional(),
})

export const studySchema = z.looseObject({
  format: z.literal('sightfell-study'),
  version: z.literal(1),
  name: z.string(),
  terrain: z.array(terrainFile),
  landCover: landCover.optional(),
  uniformTerrain: z.enum(TERRAIN_NAMES).optional(),
  obstacles: fileOnly.optional(),
  roads: fileOnly.optional(),
  vehicleRcsM2: num('vehicleRcsM2').optional(),
  facades: fileOnly.optional(),
  tables: z.looseObject({ lowAngleLand: fileName.optional() }).optional(),
  atmosphere: atmosphere.optional(),
  declination: z.looseObject({ valueDeg: num('declination.valueDeg'), date: z.string(), model: z.string() }).optional(),
  radar,
  needs: z.array(need).optional(),
  candidates: z.array(candidate),
  confirmations: z.array(confirmation).optional(),
  ranking: z.looseObject({ criteria: z.array(criterion) }).optional(),
  run: z
    .looseObject({
      maxRangeM: num('run.maxRangeM').optional(),
      rangeStepM: num('run.rangeStepM').optional(),
      azimuthStepDeg: num('run.azimuthStepDeg').optional(),
      foldRangeM: num('run.foldRangeM').optional(),
    })
    .optional(),
})
