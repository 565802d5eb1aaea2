import { geodesicDirect, geodesicInverse, type LonLat } from '../../geodesy/index.ts'
import { AT_LEAST_EDGE, AT_LEAST_VOID } from '../../masking/index.ts'
import type { SettledNeed } from '../../study/index.ts'
import type { FixFigure, NeedFigure, PlaceRef } from '../needs/needTypes.ts'
import { checkPlace, type PlaceModel, placeModel, sightOf } from '../needs/places/placeCheck.ts'
import type { OptionCells } from '../optionCells.ts'
import type { TrialPrediction, TrialRow } from './types.ts'

/** Fixes of a need that a plan takes, worst first. */
const MOST_FIXES = 5
/** Obstacles this near to one already in the plan are the same, m. */
const SAME_OBSTACLE_M = 200
/** A radial over a cone of silence is flown out to this many times its radius. */
const CONE_TIMES = 2

/**
 * What a trial of one option should fly and a survey should measure, from the worst margins of its needs. A rule of our own, the same for the same
 * figures: must needs first, else as the study lists them. Of an area: the radial through the worst height margin at the lowest level, a hold there at the
 * lowest height that clears the floor by its error band, the radial through the worst signal margin where it lies in another beam, the orbit at the range
 * of the worst height margin, and a radial at the ceiling over the cone of silence. Of fixes: the five worst. Of a track: the track, and the places where
 * sight begins and ends. Last, the controlling obstacles of these on the ground, each once. Needs not assessed are left out.
 */
export function trialPlan(o: OptionCells, needs: readonly SettledNeed[], figures: readonly NeedFigure[]): TrialRow[] {
  const flown = [...needs]
    .sort((a, b) => Number(b.must) - Number(a.must))
    .flatMap((need) => {
      const figure = figures.find((f) => f.needId === need.id)
      return figure && figure.notAssessed === null ? rowsOf(o, need, figure) : []
    })
  return [...flown, ...surveys(o, flown)]
}

function rowsOf(o: OptionCells, need: SettledNeed, figure: NeedFigure): TrialRow[] {
  const m = placeModel(o, need)
  if (figure.fixes) return figure.fixes.slice(0, MOST_FIXES).map((f) => row(need, f, { kind: 'fix', confirms: 'fix', name: f.name }))
  if (figure.track) return trackRows(need, figure.track)
  return areaRows(m, need, figure)
}

type Part = Pick<TrialRow, 'kind' | 'confirms'> & Partial<TrialRow>
/** A row for a place that has been checked against the option. */
function row(need: SettledNeed, f: FixFigure, part: Part): TrialRow {
  return {
    needId: need.id,
    needName: need.name,
    name: '',
    at: { lon: f.lon, lat: f.lat, azimuthDeg: f.azimuthDeg, rangeM: f.rangeM },
    fromRangeM: null,
    toRangeM: null,
    fromAzimuthDeg: null,
    toAzimuthDeg: null,
    altitudeM: f.altM,
    floorM: f.floorM,
    floorBandM: f.floorBandM,
    marginM: f.marginM,
    signalMarginDb: f.signalMarginDb,
    predicted: predictionOf(f),
    obstacle: f.obstacle,
    obstacleRangeM: f.obstacleRangeM,
    ...part,
  }
}
const predictionOf = (f: FixFigure): TrialPrediction => {
  if (f.visible === 'unknown' || f.visible === 'marginal') return f.visible
  if (f.visible === 'no') return 'masked'
  return f.usable ? 'usable' : f.detectable ? 'detectable' : 'in sight'
}

function areaRows(m: PlaceModel, need: SettledNeed, figure: NeedFigure): TrialRow[] {
  const { o } = m
  const { grid } = o.site
  const [lowest] = need.levelsM
  const ceilingM = need.levelsM[need.levelsM.length - 1]
  const check = (at: LonLat, altM: number, above: 'sea' | 'ground' = need.heightAbove): FixFigure => {
    const place = { lon: at.lon, lat: at.lat, name: '', altM, above }
    return checkPlace(m, place, sightOf(o, place))
  }
  const nearM = Math.max(need.fromRangeM, 0)
  const farM = Math.min(need.toRangeM, grid.ranges * grid.rangeStepM)
  const out: TrialRow[] = []
  const radial = (p: PlaceRef, confirms: 'floor' | 'signal'): void => {
    out.push(row(need, check(p, lowest), { kind: 'radial', confirms, fromRangeM: nearM, toRangeM: farM }))
  }
  const { worst } = figure
  if (worst) {
    radial(worst, 'floor')
    const [{ floorM, floorBandM }] = out
    if (floorM !== null && floorBandM !== null)
      out.push(row(need, check(worst, floorM + floorBandM, 'sea'), { kind: 'hold', confirms: 'floor' }))
  }
  const weakest = figure.signal.worst
  if (weakest && (!worst || apartDeg(weakest.azimuthDeg, worst.azimuthDeg) > o.radar.antenna.azimuthBeamwidthDeg)) radial(weakest, 'signal')
  if (worst) {
    const [fromAzimuthDeg, toAzimuthDeg] = need.sectorDeg
    out.push(row(need, check(worst, lowest), { kind: 'orbit', confirms: 'horizon', fromAzimuthDeg, toAzimuthDeg }))
  }
  const coneM = figure.coneOfSilence.reduce((r, c) => Math.max(r, c.radiusM ?? 0), 0)
  if (coneM > 0 && coneM < farM) {
    const [from, to] = need.sectorDeg
    const middleDeg = (from + ((((to - from) % 360) + 360) % 360 || 360) / 2) % 360
    const edge = check(geodesicDirect(o.place, middleDeg, coneM), ceilingM)
    out.push(row(need, edge, { kind: 'radial', confirms: 'cone', fromRangeM: 0, toRangeM: Math.min(farM, CONE_TIMES * coneM) }))
  }
  return out
}
const apartDeg = (a: number, b: number): number => Math.abs(((a - b + 540) % 360) - 180)

function trackRows(need: SettledNeed, track: NonNullable<NeedFigure['track']>): TrialRow[] {
  const { pieces } = track
  if (pieces.length === 0) return []
  const margin = (f: FixFigure): number => f.marginM ?? Number.NEGATIVE_INFINITY
  const worst = pieces.reduce((least, p) => (margin(p) < margin(least) ? p : least))
  const out = [
    row(need, worst, {
      kind: 'track',
      confirms: 'gap',
      fromRangeM: pieces[0].rangeM,
      toRangeM: pieces[pieces.length - 1].rangeM,
    }),
  ]
  for (const edge of [track.seenFrom, track.lostAt]) {
    if (!edge) continue
    const piece = pieces.reduce((near, p) => (Math.abs(p.alongM - edge.alongM) < Math.abs(near.alongM - edge.alongM) ? p : near))
    out.push(
      row(need, piece, {
        kind: 'track',
        confirms: 'sight-edge',
        at: { lon: edge.lon, lat: edge.lat, azimuthDeg: piece.azimuthDeg, rangeM: edge.rangeM },
        altitudeM: edge.altM,
        floorM: edge.floorM,
        marginM: edge.altM - edge.floorM,
        predicted: 'marginal',
      }),
    )
  }
  return out
}

/** The obstacles behind the rows, on the ground, each once: their height is what the floors rest on. */
function surveys(o: OptionCells, rows: readonly TrialRow[]): TrialRow[] {
  const out: TrialRow[] = []
  for (const r of rows) {
    const { obstacleRangeM: rangeM, obstacle } = r
    if (rangeM === null || !(rangeM > 0) || obstacle === AT_LEAST_EDGE || obstacle === AT_LEAST_VOID) continue
    const at = geodesicDirect(o.place, r.at.azimuthDeg, rangeM)
    const place = { lon: at.lon, lat: at.lat, azimuthDeg: r.at.azimuthDeg, rangeM }
    if (out.some((x) => geodesicInverse(x.at, place).distanceM < SAME_OBSTACLE_M)) continue
    const { sight } = sightOf(o, { ...place, name: '', altM: 0, above: 'ground' })
    out.push({
      ...r,
      kind: 'survey',
      confirms: 'obstacle',
      name: '',
      at: place,
      fromRangeM: null,
      toRangeM: null,
      fromAzimuthDeg: null,
      toAzimuthDeg: null,
      altitudeM: Number.isFinite(sight.surfaceM) ? sight.surfaceM : null,
      floorM: null,
      floorBandM: null,
      marginM: null,
      signalMarginDb: null,
      predicted: null,
    })
  }
  return out
}
