import { CELL } from '../../polar/index.ts'
import type { SettledNeed } from '../../study/index.ts'
import { toDb, wavelengthM } from '../../units/index.ts'
import { antennaM, meanEffectiveRadiusM, type OptionCells, residueOf } from '../optionCells.ts'
import { aboveNoiseDb, roomOverNoiseDb } from '../signal/decibelTables.ts'
import { followObstacle, twoWayEdgeLossDb } from '../signal/edgeLoss.ts'
import { overloadOf } from '../signal/receiverLimits.ts'
import { fillGroundSlants, fillLevelRow, type HeadModel, makeLevelRow, targetSignal } from '../signal/targetSignal.ts'
import { signalLoss } from './lossCause.ts'
import { lossCode } from './needTypes.ts'
import { type NeedSpans, spansOf } from './spans.ts'

/** What a need's check found in each polar cell; every bit that applies is set. LOW: the same at the smaller k. */
export const PLACE = {
  inNeed: 1,
  inSight: 2,
  marginal: 4,
  unknown: 8,
  groundAbove: 16,
  detectable: 32,
  usable: 64,
  lowInSight: 128,
  lowDetectable: 256,
  lowUsable: 512,
} as const

/** A need of kind layer or polygon tested in every cell of one option. Arrays of one value per polar cell; worst of the need's levels. */
export interface NeedCells {
  /** Bits of PLACE; 0 outside the need. */
  readonly place: Uint16Array
  /** Height margin, m: least over the levels of (level − floor); NaN outside the need and where unknown. */
  readonly marginM: Float32Array
  /** S/(C/I+N) less the required ratio, dB; NaN unless in sight at every level. */
  readonly signalDb: Float32Array
  /** Suppression needed and what there is, dB; 0 needed = none needed; NaN unless detectable. */
  readonly neededDb: Float32Array
  readonly availableDb: Float32Array
  /** Why it is not usable: code of LOSS_CAUSES; 0 where usable and outside the need. */
  readonly cause: Uint8Array
  readonly spans: NeedSpans
}

const UNKNOWN = lossCode('unknown')
const OUT_OF_RANGE = lossCode('out-of-range')
const MASKED = lossCode('masked')
const MARGINAL = lossCode('marginal')

/**
 * Tests a layer or polygon need in every cell of an option, at every level above its ground. In sight: level − floor ≥ the floor's error band.
 * Detectable: in sight, heard, and S/N ≥ the required ratio. Usable: detectable and S/(C/I+N) ≥ it. Signal: one pulse after STC, elevation
 * pattern, knife edge near the mask, F never over 1. Clutter: mean of the resolution cell at the target's azimuth and slant range.
 */
export function needCells(o: OptionCells, need: SettledNeed): NeedCells {
  const { azimuths, ranges, rangeStepM } = o.site.grid
  const count = azimuths * ranges
  const places = o.places.find((p) => p.needId === need.id) ?? null
  const spans = spansOf(o.place, o.site.grid, need, places)
  const place = new Uint16Array(count)
  const marginM = new Float32Array(count).fill(Number.NaN)
  const signalDb = new Float32Array(count).fill(Number.NaN)
  const neededDb = new Float32Array(count).fill(Number.NaN)
  const availableDb = new Float32Array(count).fill(Number.NaN)
  const cause = new Uint8Array(count)

  const mast = antennaM(o)
  const radius = meanEffectiveRadiusM(o.site)
  const c = 1 / radius
  const cLow = o.lowK ? 1 / o.lowK.meanRadiusM : 0
  const noiseGainDb = toDb(o.suppression.noiseGain)
  const head: HeadModel = {
    signal: targetSignal(o.radar, o.tiltDeg, need.rcsM2, ranges * rangeStepM * 1.5 + 50_000),
    requiredDb: need.requiredRatioDb,
    noiseGainDb,
    room: roomOverNoiseDb,
  }
  const lambda = wavelengthM(o.radar.frequencyHz)
  const { groundM } = o.site
  const { state, floorM, floorBandM } = o.mask
  const { cnrDb } = o.clutter
  const residue = residueOf(o)
  const overload = overloadOf(o)
  const clearLow = o.lowK?.clearM ?? null
  const aboveSea = need.heightAbove === 'sea'
  const levels = need.levelsM
  const rows = levels.map(() => makeLevelRow(ranges))
  const rowsLow = clearLow ? levels.map(() => makeLevelRow(ranges)) : []
  const fill = (first: number, last: number, from: number) => {
    levels.forEach((level, n) => {
      const ground = aboveSea ? null : groundM
      fillLevelRow(head, rows[n], mast, c, rangeStepM, first, last, level, ground, from)
      if (clearLow) fillLevelRow(head, rowsLow[n], mast, cLow, rangeStepM, first, last, level, ground, from)
    })
  }
  if (aboveSea) fill(0, ranges, 0)
  // Slant ranges of the ground choose the gate a target shares with it.
  const groundSlantM = new Float32Array(ranges)
  const obstacle = followObstacle(mast, c, rangeStepM)

  for (let i = 0; i < azimuths; i++) {
    const pairs = spans.pairs[i]
    if (!pairs) continue
    const from = i * ranges
    const end = pairs[pairs.length - 1]
    if (!aboveSea) fill(pairs[0], end, from)
    fillGroundSlants(groundM, from, pairs[0], end, mast, c, rangeStepM, groundSlantM)
    obstacle.start()
    let pair = 0
    for (let j = 0; j < end; j++) {
      const at = from + j
      const s = state[at]
      const isKnown = s !== CELL.beyondVoid && s !== CELL.outside && s !== 0
      const obstacleM = isKnown ? obstacle.next(j, floorM[at]) : 0
      while (pair < pairs.length && j >= pairs[pair + 1]) pair += 2
      if (j < pairs[pair]) continue
      if (!isKnown) {
        place[at] = PLACE.inNeed | PLACE.unknown
        cause[at] = UNKNOWN
        continue
      }
      const rangeM = (j + 0.5) * rangeStepM
      const ground = groundM[at]
      const floor = floorM[at]
      const band = floorBandM[at]
      let tested = 0
      let seen = 0
      let strong = 0
      let usable = 0
      let seenLow = 0
      let strongLow = 0
      let usableLow = 0
      let marginal = false
      let why = 0
      let least = Number.POSITIVE_INFINITY
      let leastSignal = Number.POSITIVE_INFINITY
      let needed = -1
      let available = 0
      for (let n = 0; n < levels.length; n++) {
        const target = aboveSea ? levels[n] : ground + levels[n]
        if (target < ground) continue
        tested++
        const row = rows[n]
        const margin = target - floor
        if (margin < least) least = margin
        const listens = row.heard[j] === 1
        if (!listens && why === 0) why = OUT_OF_RANGE
        // A target shares the gate of the ground at its own slant range.
        const shift = Math.round((row.slantM[j] - groundSlantM[j]) / rangeStepM)
        const gate = from + Math.min(ranges - 1, Math.max(0, j + shift))
        const cnr = cnrDb[gate]
        const stc = row.stcDb[j]
        const overloaded = overload !== null && cnr - stc + overload.excessDb[gate] > overload.limitDb
        const left = overloaded ? cnr : residue.cells[gate] - residue.lessDb
        const above = left - stc
        if (clearLow && target >= clearLow[at]) {
          seenLow++
          const rowLow = rowsLow[n]
          const edge = twoWayEdgeLossDb(target - clearLow[at] + band, rangeM, obstacleM, lambda)
          const strength = rowLow.headDb[j] - edge
          if (rowLow.heard[j] === 1 && strength >= 0) {
            strongLow++
            if (Number.isNaN(above) || above <= (edge > 0 ? roomOverNoiseDb(strength) - noiseGainDb : rowLow.roomDb[j])) usableLow++
          }
        }
        if (margin < band) {
          const isMarginal = margin > -band
          if (isMarginal) marginal = true
          if (why === 0) why = isMarginal ? MARGINAL : MASKED
          continue
        }
        seen++
        const edge = twoWayEdgeLossDb(margin, rangeM, obstacleM, lambda)
        const strength = row.headDb[j] - edge
        const overDb = strength - aboveNoiseDb(above + noiseGainDb)
        if (overDb < leastSignal) leastSignal = overDb
        if (listens && strength >= 0) {
          strong++
          const room = edge > 0 ? roomOverNoiseDb(strength) - noiseGainDb : row.roomDb[j]
          const wanted = Number.isNaN(cnr) ? 0 : Math.max(0, cnr - stc - room)
          if (wanted > needed) {
            needed = wanted
            available = overloaded ? 0 : Number.isNaN(cnr) ? (o.suppression.uniformDb ?? 0) : cnr - left
          }
        }
        if (overDb >= 0) usable += listens ? 1 : 0
        else if (why === 0) {
          const parts = { headDb: strength, gainDb: row.gainDb[j], stcDb: stc, residueDb: left, noiseGainDb, above: row.above[j] === 1 }
          // what only the loss close over the mask takes away is the mask's
          const free = edge > 0 && row.headDb[j] - aboveNoiseDb(above + noiseGainDb) >= 0
          why = free ? MASKED : signalLoss(parts)
        }
      }
      if (tested === 0) {
        place[at] = PLACE.inNeed | PLACE.groundAbove
        continue
      }
      let bits: number = PLACE.inNeed
      if (seen === tested) bits |= PLACE.inSight
      else if (marginal) bits |= PLACE.marginal
      if (strong === tested) {
        bits |= PLACE.detectable
        neededDb[at] = needed
        availableDb[at] = available
      }
      if (usable === tested) bits |= PLACE.usable
      else cause[at] = why
      if (seenLow === tested) bits |= PLACE.lowInSight
      if (strongLow === tested) bits |= PLACE.lowDetectable
      if (usableLow === tested) bits |= PLACE.lowUsable
      if (seen === tested) signalDb[at] = leastSignal
      marginM[at] = least
      place[at] = bits
    }
  }
  return { place, marginM, signalDb, neededDb, availableDb, cause, spans }
}
