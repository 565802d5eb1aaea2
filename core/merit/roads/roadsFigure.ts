import { requiredRatio } from '../../detection/index.ts'
import { velocityResponse } from '../../doppler/index.ts'
import { effectiveRadiusM, elevationAngleDeg, type LonLat, slantRangeM } from '../../geodesy/index.ts'
import { DEFAULT_VEHICLE_RCS_M2, ROAD_CLASSES } from '../../obstacles/index.ts'
import { RAD_PER_DEG, toDb } from '../../units/index.ts'
import { RING_WIDTH_M } from '../groundFigures.ts'
import { antennaM, type OptionCells } from '../optionCells.ts'
import { echoAt, targetSignal } from '../signal/targetSignal.ts'
import type { RoadPiece } from './pieces.ts'
import { type RoadSight, roadSight } from './roadSight.ts'
import {
  BLIND_ZONE_DB,
  HIGH_K,
  type RoadLengths,
  type RoadLines,
  type RoadsFigure,
  SPEED_STEP_MS,
  VEHICLE_PD,
  VEHICLE_SWERLING,
} from './types.ts'

/** What is found of one piece of road; those from `weak` on are in sight. */
const PIECE = { beyond: 0, unknown: 1, tunnel: 2, masked: 3, weak: 4, seen: 5 } as const

/** What each piece comes to at one of the earths, a value of PIECE, and the ratio a vehicle must reach. */
function outcomesOf(o: OptionCells, s: RoadSight): { byEarth: Uint8Array[]; rcsM2: number; requiredRatioDb: number } {
  const rcsM2 = o.vehicleRcsM2 ?? DEFAULT_VEHICLE_RCS_M2
  const { ratioDb: requiredRatioDb } = requiredRatio(o.radar, { pd: VEHICLE_PD, swerling: VEHICLE_SWERLING, statedRatioDb: null })
  const { ranges, rangeStepM } = o.site.grid
  const signal = targetSignal(o.radar, o.atmosphere, o.tiltDeg, rcsM2, ranges * rangeStepM * 1.5 + 50_000)
  const leastDb = requiredRatioDb - toDb(o.suppression.noiseGain)
  const mastM = antennaM(o)
  const one = (e: number, i: number): number => {
    if (s.rangeM[i] > ranges * rangeStepM) return PIECE.beyond
    if (s.pieces[i].tunnel) return PIECE.tunnel
    const lowestM = s.lowestMastM[e][i]
    if (!(o.heightM >= lowestM)) return Number.isNaN(lowestM) ? PIECE.unknown : PIECE.masked
    const radiusM = effectiveRadiusM(s.earths[e], o.place.lat, s.azimuthDeg[i])
    const slantM = slantRangeM(mastM, s.topM[i], s.rangeM[i], radiusM)
    const tan = Math.tan(elevationAngleDeg(mastM, s.topM[i], s.rangeM[i], radiusM) * RAD_PER_DEG)
    const echo = echoAt(signal, mastM, s.topM[i], s.rangeM[i], slantM, tan)
    return echo.heard && echo.snrDb >= leastDb ? PIECE.seen : PIECE.weak
  }
  return { byEarth: s.earths.map((_, e) => Uint8Array.from(s.pieces, (_piece, i) => one(e, i))), rcsM2, requiredRatioDb }
}

/** Lengths by ring and class, m: `within`, `inSight`, `seen` at [ring × classes + class]. */
interface Sums {
  readonly within: Float64Array
  readonly inSight: Float64Array
  readonly seen: Float64Array
}
const CLASSES = ROAD_CLASSES.length
function sumsOf(s: RoadSight, outcome: Uint8Array, rings: number): Sums {
  const room = () => new Float64Array(rings * CLASSES)
  const sums: Sums = { within: room(), inSight: room(), seen: room() }
  s.pieces.forEach(({ lengthM, roadClass }, i) => {
    if (outcome[i] === PIECE.beyond) return
    const at = Math.min(rings - 1, Math.floor(s.rangeM[i] / RING_WIDTH_M)) * CLASSES + roadClass
    sums.within[at] += lengthM
    if (outcome[i] >= PIECE.weak) sums.inSight[at] += lengthM
    if (outcome[i] === PIECE.seen) sums.seen[at] += lengthM
  })
  return sums
}
/** Sums over the entries that pass a test. */
function lengths(sums: Sums, keep: (ring: number, roadClass: number) => boolean): RoadLengths {
  const over = (of: Float64Array): number => of.reduce((t, m, at) => (keep(Math.floor(at / CLASSES), at % CLASSES) ? t + m : t), 0)
  return { lengthM: over(sums.within), inSightM: over(sums.inSight), seenM: over(sums.seen) }
}
const all = (): boolean => true

/**
 * Length of the roads within range whose vehicles are in sight and detected, by class, ring of 5 NM and radial speed; null where the ground has no roads.
 * A piece of at most 50 m has its own ray to the top of a vehicle (5.2 m on a motorway, 7.0 m on rails, else 4.6 m over the ground); seen = top at or
 * over the floor, within range, and S/N ≥ D₀ for Pd 0.5 and Swerling 1, with pattern and STC, in free space. Nothing in a tunnel is seen. Radial speed
 * v·|cos(course − azimuth)|·cos(elevation). Source: our own definition.
 */
export function roadsFigure(o: OptionCells): RoadsFigure | null {
  if (o.ground.roads.length === 0) return null
  const s = roadSight(o)
  const { byEarth, rcsM2, requiredRatioDb } = outcomesOf(o, s)
  const [outcome, high] = byEarth
  const { ranges, rangeStepM } = o.site.grid
  const farthestM = ranges * rangeStepM
  const rings = Math.ceil(farthestM / RING_WIDTH_M - 1e-9)
  const sums = sumsOf(s, outcome, rings)
  const only = (what: number): number => s.pieces.reduce((sum, piece, i) => sum + (outcome[i] === what ? piece.lengthM : 0), 0)
  return {
    ...lengths(sums, all),
    rcsM2,
    requiredRatioDb,
    tunnelM: only(PIECE.tunnel),
    unknownM: only(PIECE.unknown),
    classes: ROAD_CLASSES.map((roadClass, c) => ({ roadClass, ...lengths(sums, (_ring, of) => of === c) })).filter((c) => c.lengthM > 0),
    rings: Array.from({ length: rings }, (_, ring) => ({
      fromM: ring * RING_WIDTH_M,
      toM: Math.min((ring + 1) * RING_WIDTH_M, farthestM),
      ...lengths(sums, (of) => of === ring),
      seenByClassM: Array.from(sums.seen.subarray(ring * CLASSES, (ring + 1) * CLASSES)),
    })),
    ...speedsOf(o, s, outcome),
    atHighK: high ? { k: HIGH_K, ...lengths(sumsOf(s, high, rings), all) } : null,
  }
}

/** Length seen by radial speed, and how much of it lies where the processing hardly passes a vehicle. */
function speedsOf(o: OptionCells, s: RoadSight, outcome: Uint8Array): Pick<RoadsFigure, 'speeds' | 'blindM'> {
  const respond = o.suppression.blindSpeedsMs.length > 0 ? velocityResponse(o.radar) : null
  const bins: number[] = []
  let blindM = 0
  s.pieces.forEach(({ lengthM, courseDeg, speedMs }, i) => {
    if (outcome[i] !== PIECE.seen) return
    const radiusM = effectiveRadiusM(o.earth, o.place.lat, s.azimuthDeg[i])
    const elevationDeg = elevationAngleDeg(antennaM(o), s.topM[i], s.rangeM[i], radiusM)
    const radialMs = speedMs * Math.abs(Math.cos((courseDeg - s.azimuthAtPieceDeg[i]) * RAD_PER_DEG)) * Math.cos(elevationDeg * RAD_PER_DEG)
    const bin = Math.floor(radialMs / SPEED_STEP_MS)
    while (bins.length <= bin) bins.push(0)
    bins[bin] += lengthM
    if (respond && !(toDb(respond(radialMs)) >= BLIND_ZONE_DB)) blindM += lengthM
  })
  const speeds = bins.map((seenM, n) => ({ fromMs: n * SPEED_STEP_MS, toMs: (n + 1) * SPEED_STEP_MS, seenM }))
  return { speeds, blindM: respond ? blindM : null }
}

/** The roads within range as lines, those whose vehicles are seen apart from the others; pieces in a row are joined. */
export function roadLines(o: OptionCells): RoadLines {
  const lines: { seen: LonLat[][]; hidden: LonLat[][] } = { seen: [], hidden: [] }
  const s = roadSight(o)
  const [outcome] = outcomesOf(o, s).byEarth
  let before: { piece: RoadPiece; seen: boolean; line: LonLat[] } | null = null
  for (const [i, piece] of s.pieces.entries()) {
    if (outcome[i] === PIECE.beyond) continue
    const seen = outcome[i] === PIECE.seen
    if (before && before.seen === seen && goesOn(before.piece, piece)) before.line.push(piece.to)
    else {
      const line = [piece.from, piece.to]
      lines[seen ? 'seen' : 'hidden'].push(line)
      before = { piece, seen, line }
      continue
    }
    before.piece = piece
  }
  return lines
}
const goesOn = (a: RoadPiece, b: RoadPiece): boolean => a.road === b.road && a.to.lon === b.from.lon && a.to.lat === b.from.lat
