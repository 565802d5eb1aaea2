import { azimuthKernel, clutterGainTable } from '../antenna/index.ts'
import { depressionAtTerrainDeg, type Earth, type LonLat } from '../geodesy/index.ts'
import { type SightPoint, sightPoint, sweep, sweepRays } from '../masking/index.ts'
import { isUnknown, type PolarShape } from '../polar/index.ts'
import { gateLengthM, minimumRangeM, type RadarInput, radarConstantDb } from '../radar/index.ts'
import { type Ground, RELIEF, type Site, siteGround } from '../terrain/index.ts'
import { fromDb, RAD_PER_DEG, toDb } from '../units/index.ts'
import { finish } from '../work/index.ts'
import { type CellModel, type CellRows, cellClutter, gateWeights, slantSquared } from './cellSums.ts'
import { type ClutterLine, clutterLines } from './clutterLines.ts'
import { type ClutterOptions, clutterToNoise, electricalCentreM, optionNotes, sideLobeShare } from './clutterToNoise.ts'
import { chooseRow, type LandChoice } from './landRow.ts'
import { BUILT_IN_LAND_TABLE } from './landTableData.ts'
import { strengthTable } from './strengthTable.ts'
import type { ModelNote } from './types.ts'
import { weibullSpread } from './weibull.ts'

/** Clutter at one place, on its own rays and range; null = undefined. */
export interface PointClutter {
  readonly azimuthDeg: number
  /** Ground and slant range, m. */
  readonly rangeM: number
  readonly slantRangeM: number | null
  /** Table row of the place itself ('sea' for water); null where the ground is unknown. */
  readonly rowName: LandChoice['rowName'] | null
  /** Mean σ°F⁴ of the place itself, dB; null where it is masked, water, unknown, or inside cτ/2. */
  readonly strengthDb: number | null
  /** Clutter RCS of the resolution cell centred on the place, without antenna gain, dBsm; null if nothing in it is in sight. */
  readonly rcsDbsm: number | null
  /** Main beam + side-lobe term, dB, and the two apart. */
  readonly cnrDb: number | null
  readonly mainCnrDb: number | null
  readonly sideLobeCnrDb: number | null
  /** Area of the whole resolution cell, m², and share of its ground in sight. */
  readonly cellAreaM2: number | null
  readonly shareInSight: number
  /** Weibull spread a_w at that area, power-weighted over the cell. */
  readonly spread: number | null
  /** The factors behind RCS and C/N; adding them gives each. */
  readonly lines: readonly ClutterLine[]
  readonly notes: readonly ModelNote[]
}
export interface PointOptions extends ClutterOptions {
  /** Side-lobe term per gate of the grid, from `clutterToNoise` for the same option; worked out when absent. */
  readonly sideLobeCnrDb?: Float32Array
}
/** Evaluates places of one option one after the other; tables and the side-lobe term are made once. */
export type PointEvaluator = (at: LonLat, sight?: SightPoint) => PointClutter

/**
 * Clutter at places for one option. Equal to the polar cell whose centre the place is: rays at the azimuth of the place ± n steps of the grid,
 * range cells centred on it, the same gate and kernel. Beyond the grid too. Throws InputError for a frequency outside 30 MHz to 40 GHz or a
 * pattern that is refused.
 */
export function pointClutter(
  g: Ground,
  site: Site,
  heightM: number,
  earth: Earth,
  r: RadarInput,
  tiltDeg: number,
  grid: PolarShape,
  options: PointOptions = {},
): PointEvaluator {
  const table = options.landTable ?? BUILT_IN_LAND_TABLE
  const model: CellModel = {
    antennaM: electricalCentreM(site, siteGround(g, site), heightM),
    strength: strengthTable(g.codes, r.frequencyHz, table),
    gain: clutterGainTable(r.antenna, tiltDeg),
    nearestM: minimumRangeM(r),
  }
  const { antennaM, nearestM } = model
  const entries = model.strength.sigma.length
  const constant = fromDb(radarConstantDb(r))
  const gateM = gateLengthM(r)
  const weights = gateWeights(gateM, grid.rangeStepM)
  const half = weights.length >> 1
  const kernel = azimuthKernel(r.antenna.azimuthBeamwidthDeg, grid.azimuthStepDeg)
  const reach = kernel.length >> 1
  const beamRad = r.antenna.azimuthBeamwidthDeg * RAD_PER_DEG
  let gateTerms = options.sideLobeCnrDb
  const beyond = new Map<number, number>()

  /** Cells around a ground range on chosen azimuths, and their gate weights (cells behind the site left out). */
  const around = (azimuthsDeg: number[], rangeM: number) => {
    const offsets = Array.from(weights, (_, k) => k - half).filter((k) => rangeM + k * grid.rangeStepM > 0)
    const centres = offsets.map((k) => rangeM + k * grid.rangeStepM)
    const swept = sweepRays(g, site, heightM, earth, azimuthsDeg, centres, grid.rangeStepM)
    const rows: CellRows = { ...swept, centresM: Float64Array.from(centres) }
    const own = offsets.map((k) => weights[k + half])
    const whole = gateM / own.reduce((s, w) => s + w, 0)
    return { rows, state: swept.state, gate: own.map((w) => w * whole), middle: offsets.indexOf(0) }
  }

  /** Side-lobe term of the gate that holds a ground range, dB; NaN nil. */
  const sideLobeAt = (rangeM: number): number => {
    const j = Math.floor(rangeM / grid.rangeStepM)
    if (j < grid.ranges) {
      gateTerms ??= sideLobesOfGrid(g, site, heightM, earth, r, tiltDeg, grid, options)
      return gateTerms[j]
    }
    const held = beyond.get(j)
    if (held !== undefined) return held
    const azimuths = Array.from({ length: grid.azimuths }, (_, i) => i * grid.azimuthStepDeg)
    const { rows, state, gate, middle } = around(azimuths, (j + 0.5) * grid.rangeStepM)
    const row = new Float64Array(gate.length)
    const use = new Float64Array(entries)
    let sum = 0
    let known = 0
    for (let i = 0; i < azimuths.length; i++) {
      cellClutter(model, rows, i, row, null, use)
      const at = i * gate.length + middle
      if (isUnknown(state[at])) continue
      const r2 = slantSquared(antennaM, rows.groundM[at], rows.centresM[middle], 1 / rows.effectiveRadiusM[i])
      known++
      for (let k = 0; k < gate.length; k++) sum += (gate[k] * row[k]) / (r2 * r2)
    }
    const term = sum > 0 ? toDb(((sum * constant * beamRad) / known) * sideLobeShare(r)) : Number.NaN
    beyond.set(j, term)
    return term
  }

  return (at, sight = sightPoint(g, site, heightM, earth, at)) => {
    const { azimuthDeg, rangeM } = sight
    const nothing = emptyPoint(azimuthDeg, rangeM)
    if (sight.unknown !== null || !(rangeM > 0)) return nothing
    const azimuthsDeg = Array.from(kernel, (_, n) => (azimuthDeg + (n - reach) * grid.azimuthStepDeg + 720) % 360)
    const { rows, state, gate, middle } = around(azimuthsDeg, rangeM)
    const cells = gate.length
    const centre = reach * cells + middle
    const groundM = rows.groundM[centre]
    const c = 1 / rows.effectiveRadiusM[reach]
    const slantRangeM = Math.sqrt(slantSquared(antennaM, groundM, rangeM, c))
    const choiceAt = (cell: number, centreM: number, effRadiusM: number): LandChoice | null => {
      const code = g.codes[rows.code[cell]]
      if (!code) return null
      const depressionDeg = depressionAtTerrainDeg(antennaM - rows.groundM[cell], centreM, effRadiusM)
      return chooseRow(code.terrain, rows.relief[cell] ?? RELIEF.unknown, depressionDeg, r.frequencyHz, {}, table)
    }
    const own = choiceAt(centre, rangeM, rows.effectiveRadiusM[reach])
    if (slantRangeM < nearestM) return { ...nothing, slantRangeM, rowName: own?.rowName ?? null }

    const patterned = new Float64Array(cells)
    const plain = new Float64Array(cells)
    const use = new Float64Array(entries)
    let rcsM2 = 0
    let main = 0
    let share = 0
    let spreadSum = 0
    const depression = (antennaM - groundM) / rangeM - 0.5 * rangeM * c
    const cellAreaM2 = slantRangeM * beamRad * gateM * Math.sqrt(1 + depression * depression)
    for (let n = 0; n < kernel.length; n++) {
      cellClutter(model, rows, n, patterned, plain, use)
      const at0 = n * cells
      const r2 = slantSquared(antennaM, rows.groundM[at0 + middle], rangeM, 1 / rows.effectiveRadiusM[n])
      for (let k = 0; k < cells; k++) {
        const w = kernel[n] * gate[k]
        share += (w * rows.inSight[at0 + k]) / 65535
        rcsM2 += w * plain[k]
        if (!isUnknown(state[at0 + middle])) main += (w * patterned[k] * constant) / (r2 * r2)
        if (plain[k] > 0) {
          const band = choiceAt(at0 + k, rows.centresM[k], rows.effectiveRadiusM[n])?.band
          if (band) spreadSum += w * plain[k] * weibullSpread(band, cellAreaM2)
        }
      }
    }
    share /= beamRad * gateM
    const sideLobe = fromDb(sideLobeAt(rangeM)) || 0
    const total = main + sideLobe
    const db = (ratio: number): number | null => (ratio > 0 ? toDb(ratio) : null)
    const unstated = g.codes[rows.code[centre]]?.mark === 'default'
    const numbers = {
      azimuthDeg,
      rangeM,
      slantRangeM,
      rowName: own?.rowName ?? null,
      strengthDb: sight.inSight ? (own?.meanDb ?? null) : null,
      rcsDbsm: db(rcsM2),
      cnrDb: db(total),
      mainCnrDb: db(main),
      sideLobeCnrDb: db(sideLobe),
      cellAreaM2,
      shareInSight: share,
      spread: rcsM2 > 0 ? spreadSum / rcsM2 : null,
    }
    const notes = optionNotes(model, use, earth)
    for (const note of own?.notes ?? []) if (!notes.some((n) => n.about === note.about)) notes.push(note)
    if (unstated) notes.push({ mark: 'default', about: 'land cover not stated' })
    return { ...numbers, lines: clutterLines(numbers, r, table), notes }
  }
}

/** `pointClutter` for a single place. */
export function clutterAtPoint(
  g: Ground,
  site: Site,
  heightM: number,
  earth: Earth,
  r: RadarInput,
  tiltDeg: number,
  grid: PolarShape,
  at: LonLat,
  options: PointOptions = {},
): PointClutter {
  return pointClutter(g, site, heightM, earth, r, tiltDeg, grid, options)(at)
}

function sideLobesOfGrid(
  g: Ground,
  site: Site,
  heightM: number,
  earth: Earth,
  r: RadarInput,
  tiltDeg: number,
  grid: PolarShape,
  options: ClutterOptions,
): Float32Array {
  const swept = finish(sweep(g, site, [heightM], grid, earth))
  return finish(clutterToNoise(swept.site, swept.masks[0], g.codes, site, heightM, earth, r, tiltDeg, options)).sideLobeCnrDb
}

const emptyPoint = (azimuthDeg: number, rangeM: number): PointClutter => ({
  azimuthDeg,
  rangeM,
  slantRangeM: null,
  rowName: null,
  strengthDb: null,
  rcsDbsm: null,
  cnrDb: null,
  mainCnrDb: null,
  sideLobeCnrDb: null,
  cellAreaM2: null,
  shareInSight: 0,
  spread: null,
  lines: [],
  notes: [],
})
