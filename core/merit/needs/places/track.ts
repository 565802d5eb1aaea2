import { velocityResponse } from '../../../doppler/index.ts'
import { geodesicDirect, geodesicInverse } from '../../../geodesy/index.ts'
import { sightPoint } from '../../../masking/index.ts'
import { RAD_PER_DEG, toDb, wavelengthM } from '../../../units/index.ts'
import { antennaM } from '../../optionCells.ts'
import type { TrackFigure, TrackPiece, TrackPlace, TrackSegment } from '../needTypes.ts'
import { checkPlace, heightAt, type PlaceModel, type Response, sightOf, visibleFrom } from './placeCheck.ts'
import type { NeedPlace } from './types.ts'

/** Longest piece of a track, m. */
export const PIECE_M = 250
/** A speed counts as blind where the response lies this far below its mean, dB. */
const BLIND_DB = -10
/** Lowest response that is given, dB. */
const LEAST_RESPONSE_DB = -60
/** Places where a track comes into sight or leaves it are narrowed down to this, m. */
const EDGE_M = 10
/**
 * Share of the first blind speed up to which a target counts as flying across the beam where the processing is not known: there a two-pulse
 * canceller is 10 dB below its mean.
 */
const ACROSS_SHARE = 0.072

/** One leg of a track between two corners. */
interface Leg {
  readonly from: NeedPlace
  readonly to: NeedPlace
  readonly azimuthDeg: number
  readonly lengthM: number
  readonly startM: number
}
function legsOf(corners: readonly NeedPlace[]): Leg[] {
  const legs: Leg[] = []
  let startM = 0
  for (let n = 0; n + 1 < corners.length; n++) {
    const { azimuthDeg, distanceM } = geodesicInverse(corners[n], corners[n + 1])
    if (!(distanceM > 0)) continue
    legs.push({ from: corners[n], to: corners[n + 1], azimuthDeg, lengthM: distanceM, startM })
    startM += distanceM
  }
  return legs
}
/** Place on a leg at a distance from its start; heights are linear along it. */
function onLeg(leg: Leg, m: number): NeedPlace & { readonly courseDeg: number } {
  const { lon, lat, azimuthDeg } = geodesicDirect(leg.from, leg.azimuthDeg, m)
  const altM = leg.from.altM + ((leg.to.altM - leg.from.altM) * m) / leg.lengthM
  return { lon, lat, altM, above: leg.from.above, name: '', courseDeg: azimuthDeg }
}

/** Flies a track once: every piece on its own ray, with its radial speed and the response of the processing to it. */
export function flyTrack(m: PlaceModel, corners: readonly NeedPlace[]): TrackFigure {
  const legs = legsOf(corners)
  const speedMs = m.need.speedMs
  const respond = responder(m)
  const pieces: TrackPiece[] = []
  for (const leg of legs) {
    const count = Math.max(1, Math.ceil(leg.lengthM / PIECE_M - 1e-9))
    const lengthM = leg.lengthM / count
    for (let k = 0; k < count; k++) {
      const alongLegM = (k + 0.5) * lengthM
      const at = onLeg(leg, alongLegM)
      const seen = sightOf(m.o, at)
      const radialSpeedMs = speedMs === null ? null : radialSpeed(m, at, seen.sight, speedMs, leg)
      const { response, tangential, blind } = respond(radialSpeedMs)
      pieces.push({
        ...checkPlace(m, at, seen, response),
        alongM: leg.startM + alongLegM,
        lengthM,
        radialSpeedMs,
        responseDb: response.echoDb + response.residueDb,
        tangential,
        blind,
      })
    }
  }
  const lengthM = legs.reduce((s, leg) => s + leg.lengthM, 0)
  const longestGapM = longestGap(pieces)
  const stretch = (which: (p: TrackPiece) => boolean) => pieces.reduce((s, p) => s + (which(p) ? p.lengthM : 0), 0)
  return {
    lengthM,
    pieces,
    segments: segmentsOf(pieces),
    longestGapM,
    longestGapS: speedMs === null ? null : longestGapM / speedMs,
    tangentialM: stretch((p) => p.tangential),
    blindM: stretch((p) => p.blind && !p.tangential),
    ...sightEdges(m, legs, pieces),
  }
}

/** Range rate of a target on a leg, m/s, negative toward the radar; its climb counts. */
function radialSpeed(
  m: PlaceModel,
  at: NeedPlace & { readonly courseDeg: number },
  sight: { readonly azimuthDeg: number; readonly rangeM: number; readonly groundM: number },
  speedMs: number,
  leg: Leg,
): number {
  const back = geodesicInverse(at, m.o.place)
  const outwardDeg = back.azimuthDeg + 180
  const heightM = heightAt(at, sight.groundM) - antennaM(m.o)
  const slope = Number.isFinite(heightM) && sight.rangeM > 0 ? heightM / sight.rangeM : 0
  const cos = 1 / Math.hypot(1, slope)
  const climb = (leg.to.altM - leg.from.altM) / leg.lengthM
  return speedMs * (Math.cos((at.courseDeg - outwardDeg) * RAD_PER_DEG) * cos + climb * slope * cos)
}

/** Response to a radial speed, and whether it lies across the beam or at another blind speed. */
function responder(m: PlaceModel): (speedMs: number | null) => { response: Response; tangential: boolean; blind: boolean } {
  const { radar, suppression } = m.o
  const respond = velocityResponse(radar)
  const bank = radar.suppression.kind === 'filterBank'
  const processed = suppression.blindSpeedsMs.length > 0
  const firstBlindMs = (wavelengthM(radar.frequencyHz) * Math.min(...radar.prfHz)) / 2
  const acrossMs = ACROSS_SHARE * firstBlindMs
  return (speedMs) => {
    if (speedMs === null) return { response: { echoDb: 0, residueDb: 0 }, tangential: false, blind: false }
    const speed = Math.abs(speedMs)
    if (!processed) return { response: { echoDb: 0, residueDb: 0 }, tangential: speed < acrossMs, blind: false }
    const db = Math.max(LEAST_RESPONSE_DB, toDb(respond(speed)))
    const blind = db < BLIND_DB
    return {
      response: bank ? { echoDb: 0, residueDb: db } : { echoDb: db, residueDb: 0 },
      blind,
      tangential: blind && speed < firstBlindMs / 2,
    }
  }
}

function longestGap(pieces: readonly TrackPiece[]): number {
  let longest = 0
  let run = 0
  for (const p of pieces) {
    run = p.usable ? 0 : run + p.lengthM
    longest = Math.max(longest, run)
  }
  return longest
}

function segmentsOf(pieces: readonly TrackPiece[]): TrackSegment[] {
  const out: { segment: TrackSegment; key: string }[] = []
  for (const p of pieces) {
    const key = `${p.cause}|${p.tangential}|${p.blind}`
    const toM = p.alongM + p.lengthM / 2
    const last = out[out.length - 1]
    if (last?.key === key) last.segment = { ...last.segment, toM, toRangeM: p.rangeM, toAltM: p.altM }
    else
      out.push({
        key,
        segment: {
          fromM: p.alongM - p.lengthM / 2,
          toM,
          cause: p.cause,
          tangential: p.tangential,
          blind: p.blind,
          fromRangeM: p.rangeM,
          toRangeM: p.rangeM,
          fromAltM: p.altM,
          toAltM: p.altM,
        },
      })
  }
  return out.map((s) => s.segment)
}

/** Where the track first comes into sight and where it is last in sight, narrowed down between two pieces. */
function sightEdges(m: PlaceModel, legs: readonly Leg[], pieces: readonly TrackPiece[]): Pick<TrackFigure, 'seenFrom' | 'lostAt'> {
  const seen = pieces.map((p) => p.visible === 'yes')
  const first = seen.indexOf(true)
  const last = seen.lastIndexOf(true)
  if (first < 0) return { seenFrom: null, lostAt: null }
  const edge = (inside: TrackPiece, outside: TrackPiece | undefined) => (outside ? narrow(m, legs, inside.alongM, outside.alongM) : null)
  return { seenFrom: edge(pieces[first], pieces[first - 1]), lostAt: edge(pieces[last], pieces[last + 1]) }
}

function narrow(m: PlaceModel, legs: readonly Leg[], inM: number, outM: number): TrackPlace {
  const placeAt = (alongM: number) => {
    const leg = legs.findLast((l) => l.startM <= alongM) ?? legs[0]
    const at = onLeg(leg, Math.min(leg.lengthM, alongM - leg.startM))
    const sight = sightPoint(m.o.ground, m.o.place, m.o.heightM, m.o.earth, at)
    return { at, sight, altM: heightAt(at, sight.groundM) }
  }
  let inside = inM
  let outside = outM
  while (Math.abs(outside - inside) > EDGE_M) {
    const middle = (inside + outside) / 2
    const { sight, altM } = placeAt(middle)
    if (visibleFrom(sight, altM) === 'yes') inside = middle
    else outside = middle
  }
  const { at, sight, altM } = placeAt(inside)
  return { alongM: inside, lon: at.lon, lat: at.lat, rangeM: sight.rangeM, altM, floorM: sight.floorM }
}
