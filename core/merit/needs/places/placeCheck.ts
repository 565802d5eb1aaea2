import { type Earth, elevationAngleDeg, effectiveRadiusM as radiusOf, slantRangeM } from '../../../geodesy/index.ts'
import { type SightPoint, sightPoint } from '../../../masking/index.ts'
import { cellAt } from '../../../polar/index.ts'
import type { SettledNeed } from '../../../study/index.ts'
import { RAD_PER_DEG, toDb, wavelengthM } from '../../../units/index.ts'
import { antennaM, type OptionCells, plusRatioDb, residueOf } from '../../optionCells.ts'
import { aboveNoiseDb } from '../../signal/decibelTables.ts'
import { twoWayEdgeLossDb } from '../../signal/edgeLoss.ts'
import { type LobeModel, type LobePlace, lobeAt, lobeModel } from '../../signal/lobing/index.ts'
import { pdOf } from '../../signal/pdOf.ts'
import { overloadOf, thresholdRiseOf } from '../../signal/receiverLimits.ts'
import { echoAt, type TargetEcho, type TargetSignal, targetSignal } from '../../signal/targetSignal.ts'
import { type SignalParts, signalLoss, signalMarginDb } from '../lossCause.ts'
import { type FixFigure, lossCauseAt, lossCode } from '../needTypes.ts'
import type { NeedPlace } from './types.ts'

/** Sight of a place at the study's k and, where cover is worked out at it, at the smaller one. */
export interface PlaceSight {
  readonly sight: SightPoint
  readonly low: SightPoint | null
}
/** Rays of places do not depend on tilt, need or radar: kept with the mask they belong to. */
const kept = new WeakMap<object, Map<string, PlaceSight>>()
const keyOf = (p: { lon: number; lat: number }): string => `${p.lon},${p.lat}`

export function sightOf(o: OptionCells, at: NeedPlace): PlaceSight {
  const owner = o.lowK ?? o.mask
  let own = kept.get(owner)
  if (!own) {
    own = new Map()
    kept.set(owner, own)
  }
  const key = keyOf(at)
  let found = own.get(key)
  if (!found) {
    found = {
      sight: sightPoint(o.ground, o.place, o.heightM, o.earth, at),
      low: o.lowK ? sightPoint(o.ground, o.place, o.heightM, o.lowK.earth, at) : null,
    }
    own.set(key, found)
  }
  return found
}

/** Target height at a place, m MSL; NaN where it stands on unknown ground. */
export const heightAt = (at: NeedPlace, groundM: number): number => (at.above === 'sea' ? at.altM : groundM + at.altM)

export type Visible = FixFigure['visible']
/** In sight by the error band: above the floor by at least it, below by at least it, or between. */
export function visibleFrom(s: SightPoint, targetM: number): Visible {
  if (s.unknown !== null || !Number.isFinite(targetM)) return 'unknown'
  const margin = targetM - s.floorM
  return margin >= s.floorBandM ? 'yes' : margin > -s.floorBandM ? 'marginal' : 'no'
}

/** What holds for every place of a need. */
export interface PlaceModel {
  readonly o: OptionCells
  readonly need: SettledNeed
  readonly signal: TargetSignal
  readonly noiseGainDb: number
  /** null where nothing in the ground reflects. */
  readonly lobes: LobeModel | null
}
export function placeModel(o: OptionCells, need: SettledNeed): PlaceModel {
  const { ranges, rangeStepM } = o.site.grid
  const signal = targetSignal(
    o.radar,
    o.atmosphere,
    o.tiltDeg,
    need.rcsM2,
    Math.max(ranges * rangeStepM, o.radar.instrumentedRangeM) * 1.5 + 50_000,
  )
  return { o, need, signal, noiseGainDb: toDb(o.suppression.noiseGain), lobes: lobeModel(o.ground, o.radar, o.atmosphere) }
}

/** Response of the processing to the target's own speed, dB over its mean: on the echo, or on the improvement of a bank. */
export interface Response {
  readonly echoDb: number
  readonly residueDb: number
}
export const MEAN_RESPONSE: Response = { echoDb: 0, residueDb: 0 }

interface Echo {
  readonly at: TargetEcho
  readonly slantM: number
  /** Loss close over the mask, and of direct and reflected ray together where it is clear, dB. */
  readonly edgeDb: number
  readonly lobeDb: number
  /** S/N with those losses, less the required ratio, with a bank's gain, dB. */
  readonly headDb: number
}
function echoOf(m: PlaceModel, s: SightPoint, targetM: number, radiusM: number, earth = m.o.earth): Echo {
  const { o, signal, need } = m
  const mast = antennaM(o)
  const slantM = slantRangeM(mast, targetM, s.rangeM, radiusM)
  const tan = Math.tan(elevationAngleDeg(mast, targetM, s.rangeM, radiusM) * RAD_PER_DEG)
  const echo = echoAt(signal, mast, targetM, s.rangeM, slantM, tan)
  const edgeDb = twoWayEdgeLossDb(targetM - s.floorM, s.rangeM, s.controlling.rangeM, wavelengthM(o.radar.frequencyHz))
  const lobe = m.lobes && edgeDb === 0 && targetM >= s.floorM ? lobeAt(m.lobes, lobePlaceOf(o, earth), signal, s, targetM, slantM) : null
  const lobeDb = lobe ? Math.max(0, -lobe.factorDb) : 0
  return { at: echo, slantM, edgeDb, lobeDb, headDb: echo.snrDb - edgeDb - lobeDb - need.requiredRatioDb + m.noiseGainDb }
}

const lobePlaceOf = (o: OptionCells, raysEarth: Earth): LobePlace => ({
  ground: o.ground,
  place: o.place,
  heightM: o.heightM,
  antennaM: antennaM(o),
  earth: o.earth,
  raysEarth,
  rangeStepM: o.site.grid.rangeStepM,
})

/** Clutter of the resolution cell a target shares: residue over noise before STC, dB, NaN where none; null beyond the grid, where nothing was worked out. */
function residueAt(o: OptionCells, s: SightPoint, slantM: number, stcDb: number): number | null {
  const { grid, groundM } = o.site
  const own = cellAt(grid, s.azimuthDeg, s.rangeM)
  if (own < 0) return null
  const row = Math.floor(own / grid.ranges) * grid.ranges
  const j = own - row
  const groundSlantM = slantRangeM(antennaM(o), groundM[own], s.rangeM, o.site.effectiveRadiusM[row / grid.ranges])
  const shift = Number.isFinite(groundSlantM) ? Math.round((slantM - groundSlantM) / grid.rangeStepM) : 0
  const gate = row + Math.min(grid.ranges - 1, Math.max(0, j + shift))
  const overload = overloadOf(o)
  const { cnrDb, left, lessDb, folded, foldedLeft, riseDb } = residueOf(o, thresholdRiseOf(o))
  const rise = riseDb ? riseDb[gate] : 0
  const echo = folded ? folded[gate] : 0
  const cnr = echo > 0 ? plusRatioDb(cnrDb[gate], echo) : cnrDb[gate]
  if (overload && cnr - stcDb + 0.1 * overload.excessTenths[gate] > overload.limitDb) return cnr + rise
  const residue = left[gate] - lessDb
  return (echo > 0 ? plusRatioDb(residue, echo * foldedLeft) : residue) + rise
}

/** What one place is to one option, in numbers. */
export interface PlaceVerdict {
  readonly slantM: number
  /** Loss close over the mask that is in the ratios, dB. */
  readonly edgeDb: number
  /** S/N of one pulse after short-range sensitivity, dB. */
  readonly snrDb: number
  /** Residue of the resolution cell over noise, dB; null beyond the grid. */
  readonly residueDb: number | null
  /** S/(C/I+N) less the required ratio, dB. */
  readonly marginDb: number
  readonly heard: boolean
  readonly detectable: boolean
  readonly usable: boolean
  /** Code of LOSS_CAUSES; 0 = usable. */
  readonly cause: number
}
/** A place on known ground with a target at a height, m MSL. */
export function judgePlace(m: PlaceModel, sight: SightPoint, targetM: number, visible: Visible, response: Response): PlaceVerdict {
  const { o } = m
  const echo = echoOf(m, sight, targetM, radiusOf(o.earth, o.place.lat, sight.azimuthDeg))
  const { heard, stcDb } = echo.at
  const residueDb = residueAt(o, sight, echo.slantM, stcDb)
  const parts: SignalParts = {
    headDb: echo.headDb,
    gainDb: echo.at.gainDb,
    stcDb,
    residueDb: residueDb ?? Number.NaN,
    noiseGainDb: m.noiseGainDb,
    above: echo.at.above,
    echoResponseDb: response.echoDb,
    residueResponseDb: response.residueDb,
  }
  const marginDb = signalMarginDb(parts)
  const detectable = visible === 'yes' && heard && echo.headDb >= 0
  const usable = detectable && residueDb !== null && marginDb >= 0
  const cause = usable
    ? 0
    : !heard
      ? OUT_OF_RANGE
      : visible !== 'yes'
        ? visible === 'marginal'
          ? MARGINAL
          : MASKED
        : residueDb === null
          ? UNKNOWN
          : echo.edgeDb > 0 && signalMarginDb({ ...parts, headDb: echo.headDb + echo.edgeDb }) >= 0
            ? MASKED
            : signalLoss(parts)
  return {
    slantM: echo.slantM,
    edgeDb: echo.edgeDb,
    snrDb: echo.headDb + m.need.requiredRatioDb - m.noiseGainDb,
    residueDb,
    marginDb,
    heard,
    detectable,
    usable,
    cause,
  }
}
const OUT_OF_RANGE = lossCode('out-of-range')
const MARGINAL = lossCode('marginal')
const MASKED = lossCode('masked')
const UNKNOWN = lossCode('unknown')

/** One place against one option on its own ray. */
export function checkPlace(m: PlaceModel, at: NeedPlace, seen: PlaceSight, response: Response = MEAN_RESPONSE): FixFigure {
  const { sight, low } = seen
  const base = { name: at.name, lon: at.lon, lat: at.lat, azimuthDeg: sight.azimuthDeg, rangeM: sight.rangeM }
  const targetM = heightAt(at, sight.groundM)
  const visible = visibleFrom(sight, targetM)
  const finite = (x: number): number | null => (Number.isFinite(x) ? x : null)
  const altM = finite(targetM)
  if (visible === 'unknown')
    return {
      ...base,
      ...NOTHING,
      altM,
      altAglM: finite(targetM - sight.groundM),
      visible,
      visibleLowK: low && 'unknown',
      detectableLowK: low && false,
      usableLowK: low && false,
      cause: 'unknown',
    }
  const { slantM, snrDb, residueDb, marginDb, detectable, usable, cause } = judgePlace(m, sight, targetM, visible, response)
  return {
    ...base,
    slantRangeM: slantM,
    altM,
    altAglM: targetM - sight.groundM,
    floorM: sight.floorM,
    floorAglM: sight.floorM - sight.groundM,
    floorBandM: sight.floorBandM,
    marginM: targetM - sight.floorM,
    visible,
    snrDb,
    signalMarginDb: residueDb === null ? null : marginDb,
    pd: residueDb === null || visible !== 'yes' ? null : pdOf(m.need.required)(marginDb),
    detectable,
    usable,
    ...atLowK(m, targetM, low, residueDb, response),
    cause: lossCauseAt(cause),
    obstacle: sight.controlling.obstacle,
    obstacleRangeM: sight.controlling.rangeM,
  }
}

function atLowK(
  m: PlaceModel,
  targetM: number,
  low: SightPoint | null,
  residueDb: number | null,
  response: Response,
): Pick<FixFigure, 'visibleLowK' | 'detectableLowK' | 'usableLowK'> {
  const { o } = m
  if (!low || !o.lowK) return { visibleLowK: null, detectableLowK: null, usableLowK: null }
  const visibleLowK = visibleFrom(low, targetM)
  if (visibleLowK !== 'yes') return { visibleLowK, detectableLowK: false, usableLowK: false }
  const echo = echoOf(m, low, targetM, radiusOf(o.lowK.earth, o.place.lat, low.azimuthDeg), o.lowK.earth)
  const detectableLowK = echo.at.heard && echo.headDb >= 0
  const over =
    residueDb === null
      ? Number.NEGATIVE_INFINITY
      : echo.headDb + response.echoDb - aboveNoiseDb(residueDb - response.residueDb - echo.at.stcDb + m.noiseGainDb)
  return { visibleLowK, detectableLowK, usableLowK: detectableLowK && over >= 0 }
}

const NOTHING = {
  slantRangeM: null,
  floorM: null,
  floorAglM: null,
  floorBandM: null,
  marginM: null,
  snrDb: null,
  signalMarginDb: null,
  pd: null,
  detectable: false,
  usable: false,
  obstacle: '',
  obstacleRangeM: null,
} as const
