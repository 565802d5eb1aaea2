import { geodesicDirect, effectiveRadiusM as radiusOf } from '../../geodesy/index.ts'
import { type SightProfile, sightAlong, sightPoint } from '../../masking/index.ts'
import { stcDb } from '../../radar/index.ts'
import type { SettledNeed } from '../../study/index.ts'
import { SPEED_OF_LIGHT_MS } from '../../units/index.ts'
import type { Work } from '../../work/index.ts'
import { conesOf } from '../needs/cone.ts'
import { lossCode } from '../needs/needTypes.ts'
import { judgePlace, MEAN_RESPONSE, type PlaceModel, placeModel, visibleFrom } from '../needs/places/placeCheck.ts'
import { antennaM, type OptionCells } from '../optionCells.ts'
import { pdOf } from '../signal/pdOf.ts'
import { beamRays } from './beamRays.ts'
import { type DiffractedLoss, diffractedLoss } from './diffracted.ts'
import type { CutWindow, VerticalCut } from './types.ts'

const SHOWN_PD = [0.5, 0.8, 0.9] as const
/** A diffracted echo this far under the lowest contour is no longer followed down, dB. */
const FOLLOWED_DB = 15
const LEAST_TOP_M = 1000

/**
 * The plane over one azimuth: margin, S/N, Pd and cause of loss of the need's target at every range and height, each column on its own ray with
 * the same radar equation, pattern, short-range sensitivity, propagation, clutter and suppression as fixes of a need. Under the coverage floor the
 * two-way loss of diffraction over the profile takes the place of the knife edge (Recommendation ITU-R P.526 §4.5.2, from memory).
 */
export function* verticalCut(o: OptionCells, need: SettledNeed, w: CutWindow): Work<VerticalCut> {
  const { columns, rows, azimuthDeg } = w
  const mast = antennaM(o)
  const radiusM = radiusOf(o.earth, o.place.lat, azimuthDeg)
  const rangeM = Float64Array.from({ length: columns }, (_, i) => w.fromRangeM + ((i + 0.5) * (w.toRangeM - w.fromRangeM)) / columns)
  const profile = sightAlong(o.ground, o.place, o.heightM, o.earth, azimuthDeg, w.toRangeM)
  const diffracted = diffractedLoss(o, profile)
  const [low, high] = heights(w, need, profile, mast)
  const heightM = Float64Array.from({ length: rows }, (_, k) => low + ((high - low) * k) / (rows - 1))
  const contours = contoursOf(need)
  const model = placeModel(o, need)
  const curve = pdOf(need.required)
  const out = {
    marginDb: new Float32Array(columns * rows).fill(Number.NaN),
    snrDb: new Float32Array(columns * rows).fill(Number.NaN),
    pdAt: new Float32Array(columns * rows).fill(Number.NaN),
    cause: new Uint8Array(columns * rows),
  }
  const byColumn = (): Float64Array => new Float64Array(columns).fill(Number.NaN)
  const lines = { groundM: byColumn(), surfaceM: byColumn(), floorM: byColumn(), floorBandM: byColumn(), obstacleM: byColumn() }
  const obstacle: string[] = []
  const lowestDb = contours[0].marginDb - FOLLOWED_DB
  for (let i = 0; i < columns; i++) {
    const at = geodesicDirect(o.place, azimuthDeg, rangeM[i])
    const sight = sightPoint(o.ground, o.place, o.heightM, o.earth, at)
    obstacle.push(sight.unknown === null ? sight.controlling.obstacle : '')
    if (sight.unknown === null) {
      lines.groundM[i] = sight.groundM
      lines.surfaceM[i] = sight.surfaceM
      lines.floorM[i] = sight.floorM
      lines.floorBandM[i] = sight.floorBandM
      lines.obstacleM[i] = sight.controlling.rangeM
    }
    fillColumn({ model, sight, heightM, diffracted, lowestDb, pdOf: curve }, out, i * rows)
    yield { done: i + 1, total: columns }
  }
  const { radar } = o
  const stc = stcReach(o, w.toRangeM)
  return {
    azimuthDeg,
    needId: need.id,
    needName: need.name,
    rcsM2: need.rcsM2,
    swerling: need.swerling,
    pd: need.pd,
    antennaM: mast,
    effectiveRadiusM: radiusM,
    rangeM,
    heightM,
    ...out,
    ...lines,
    obstacle,
    contours,
    rays: beamRays(o, rangeM, radiusM),
    levels: levelsOf(need, rangeM, lines.groundM),
    cones: need.kind === 'layer' || need.kind === 'polygon' ? conesOf(o, need) : [],
    stcToM: stc.toM,
    stcMaxDb: stc.maxDb,
    nearestM: (SPEED_OF_LIGHT_MS * (radar.pulseWidthS + (radar.recoveryS ?? 0))) / 2,
    instrumentedM: radar.instrumentedRangeM,
  }
}

interface Column {
  readonly model: PlaceModel
  readonly sight: ReturnType<typeof sightPoint>
  readonly heightM: Float64Array
  readonly diffracted: DiffractedLoss
  readonly lowestDb: number
  readonly pdOf: (marginDb: number) => number
}
const UNKNOWN = lossCode('unknown')

/** One column from the top down: below the floor the diffracted echo is followed until it is far too weak. */
function fillColumn(
  c: Column,
  out: Pick<{ -readonly [K in keyof VerticalCut]: VerticalCut[K] }, 'marginDb' | 'snrDb' | 'pdAt' | 'cause'>,
  from: number,
): void {
  const { model, sight, heightM } = c
  let lost = false
  for (let k = heightM.length - 1; k >= 0; k--) {
    const n = from + k
    const altM = heightM[k]
    if (sight.unknown !== null) {
      out.cause[n] = UNKNOWN
      continue
    }
    if (altM < sight.groundM) continue
    const visible = visibleFrom(sight, altM)
    const { cause, heard, residueDb, marginDb: placeDb, snrDb, edgeDb } = judgePlace(model, sight, altM, visible, MEAN_RESPONSE)
    out.cause[n] = cause
    out.pdAt[n] = heard && visible === 'yes' && residueDb !== null ? c.pdOf(placeDb) : 0
    if (!heard || lost || residueDb === null) continue
    // the place carries the knife edge of its mask; under the floor that gives way to the profile's own loss
    const marginM = altM - sight.floorM
    const changeDb = marginM >= 0 ? 0 : edgeDb - 2 * c.diffracted(sight.rangeM, altM, sight.groundM)
    const marginDb = placeDb + changeDb
    lost = marginM < 0 && marginDb < c.lowestDb
    out.marginDb[n] = marginDb
    out.snrDb[n] = snrDb + changeDb
  }
}

/** Margins at which Pd crosses what is shown, by halving; the need's own stands at 0 dB. */
function contoursOf(need: SettledNeed): VerticalCut['contours'] {
  const curve = pdOf(need.required)
  const own = curve(0)
  const marginOf = (pd: number): number => {
    let low = -40
    let high = 60
    for (let n = 0; n < 40; n++) {
      const middle = (low + high) / 2
      if (curve(middle) < pd) low = middle
      else high = middle
    }
    return (low + high) / 2
  }
  const others = SHOWN_PD.filter((pd) => Math.abs(pd - own) > 0.005).map((pd) => ({ pd, marginDb: marginOf(pd), ofNeed: false }))
  return [...others, { pd: own, marginDb: 0, ofNeed: true }].sort((a, b) => a.marginDb - b.marginDb)
}

function heights(w: CutWindow, need: SettledNeed, p: SightProfile, mast: number): [number, number] {
  let low = mast
  let highest = mast
  for (let i = 0; i < p.groundM.length; i++) {
    if (p.groundM[i] < low) low = p.groundM[i]
    if (p.surfaceM[i] > highest) highest = p.surfaceM[i]
  }
  const levels = need.levelsM.map((m) => (need.heightAbove === 'sea' ? m : highest + m))
  const from = w.fromHeightM ?? Math.floor(low)
  const top = w.toHeightM ?? Math.max(1.5 * Math.max(0, ...levels), highest + LEAST_TOP_M)
  return [from, Math.max(from + 10, top)]
}

function levelsOf(need: SettledNeed, rangeM: Float64Array, groundM: Float64Array): VerticalCut['levels'] {
  const aboveSea = need.heightAbove === 'sea'
  return need.levelsM.map((levelM) => ({
    levelM,
    aboveSea,
    heightM: rangeM.map((r, i) => (r < need.fromRangeM || r > need.toRangeM ? Number.NaN : aboveSea ? levelM : groundM[i] + levelM)),
  }))
}

/** How far short-range sensitivity reaches, and its most, dB. */
function stcReach({ radar }: OptionCells, toM: number): { toM: number | null; maxDb: number } {
  if (radar.stc.kind === 'none') return { toM: null, maxDb: 0 }
  let last: number | null = null
  let maxDb = 0
  for (let n = 1; n <= 400; n++) {
    const db = stcDb(radar, (n * toM) / 400)
    if (db > 0.05) last = (n * toM) / 400
    if (db > maxDb) maxDb = db
  }
  return { toM: last, maxDb }
}
