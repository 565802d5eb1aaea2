import { type Earth, effectiveRadiusM, type LonLat } from '../../geodesy/index.ts'
import { type SightPoint, sightPoint } from '../../masking/index.ts'
import type { PolarShape } from '../../polar/index.ts'
import type { RadarInput } from '../../radar/index.ts'
import type { Ground, Site } from '../../terrain/index.ts'
import { toDb } from '../../units/index.ts'
import type { LandChoice } from '../land/landRow.ts'
import { weibullSpread } from '../land/weibull.ts'
import type { ModelNote } from '../types.ts'
import { cellClutter, slantSquared } from './cellSums.ts'
import { type ClutterLine, clutterLines } from './clutterLines.ts'
import { optionNotes } from './clutterToNoise.ts'
import {
  choiceOf,
  discretesAt,
  foldedAt,
  type GateCells,
  gateCells,
  lossesOf,
  type PointOption,
  type PointOptions,
  perSquareMetre,
  pointOption,
  rainOf,
  rangeLobesOf,
  sideLobes,
  slantOf,
} from './pointCells.ts'
import { segmentOf } from './segment.ts'

/** Clutter at one place, on its own rays and range; null = undefined. */
export interface PointClutter {
  readonly azimuthDeg: number
  /** Ground and slant range, m. */
  readonly rangeM: number
  readonly slantRangeM: number | null
  /** Table row of the place itself ('sea' for water); null where the ground is unknown. */
  readonly rowName: LandChoice['rowName'] | null
  /** Mean σ°F⁴ of the place itself, dB; null where it is masked, unknown, inside cτ/2, or water the sea model does not assess. */
  readonly strengthDb: number | null
  /** Clutter RCS of the resolution cell centred on the place, without antenna gain, dBsm; null if nothing in it is in sight. */
  readonly rcsDbsm: number | null
  /** Main beam + side-lobe term, dB, and the two apart. */
  readonly cnrDb: number | null
  readonly mainCnrDb: number | null
  readonly sideLobeCnrDb: number | null
  /** What the main beam brings back from the ground, from rain and from discrete echoes, dB over noise. */
  readonly groundCnrDb: number | null
  readonly rainCnrDb: number | null
  readonly discreteCnrDb: number | null
  /** What range side lobes bring into the gate from others, dB over noise. */
  readonly rangeLobeCnrDb: number | null
  /** Second-time-around clutter in the gate, dB over noise; null where none was given. */
  readonly foldedCnrDb: number | null
  /** What suppression leaves of `cnrDb`: each kind of clutter divided by its improvement factor, dB over noise. */
  readonly residueDb: number | null
  /** Area of the whole resolution cell, m², and share of its ground in sight. */
  readonly cellAreaM2: number | null
  readonly shareInSight: number
  /** Weibull spread a_w at that area, power-weighted over the cell. */
  readonly spread: number | null
  /** The factors behind RCS and C/N; adding them gives each. */
  readonly lines: readonly ClutterLine[]
  readonly notes: readonly ModelNote[]
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
  const o = pointOption(g, site, heightM, earth, r, tiltDeg, grid, options)
  const { kernel } = o
  const reach = kernel.length >> 1
  const sideLobeAt = sideLobes(o)

  return (at, sight = sightPoint(g, site, heightM, earth, at)) => {
    const { azimuthDeg, rangeM } = sight
    const nothing = emptyPoint(azimuthDeg, rangeM)
    if (sight.unknown !== null || !(rangeM > 0)) return nothing
    const azimuthsDeg = Array.from(kernel, (_, n) => (azimuthDeg + (n - reach) * grid.azimuthStepDeg + 720) % 360)
    const c = 1 / effectiveRadiusM(earth, site.lat, azimuthDeg)
    const received = segmentOf(o.segments, Math.sqrt(slantSquared(o.cell.antennaM, sight.groundM, rangeM, c)))
    const segment = received ?? o.segments[0]
    if (!segment) return nothing
    const cells = gateCells(o, segment, azimuthsDeg, rangeM)
    const own = choiceOf(o, cells, reach, cells.middle)
    const middle = reach * cells.gate.length + cells.middle
    const slantRangeM = slantOf(o, cells, reach)
    if (!received) return { ...nothing, slantRangeM, rowName: own?.rowName ?? null }

    const sums = sumCell(o, cells, slantRangeM)
    const discrete = discretesAt(o, azimuthDeg, rangeM)
    const folded = foldedAt(o, azimuthDeg, rangeM)
    const main = sums.ground + sums.rain + sums.lobes + discrete
    const sideLobe = sideLobeAt(rangeM)
    const db = (ratio: number): number | null => (ratio > 0 ? toDb(ratio) : null)
    const numbers = {
      azimuthDeg,
      rangeM,
      slantRangeM,
      rowName: own?.rowName ?? null,
      strengthDb: sight.inSight ? (own?.meanDb ?? null) : null,
      rcsDbsm: db(sums.rcsM2),
      cnrDb: db(main + folded + sideLobe.all),
      mainCnrDb: db(main),
      sideLobeCnrDb: db(sideLobe.all),
      groundCnrDb: db(sums.ground),
      rainCnrDb: db(sums.rain),
      discreteCnrDb: db(discrete),
      rangeLobeCnrDb: db(sums.lobes),
      residueDb: db(sums.left + discrete * o.left.discrete + folded * o.left.folded + sideLobe.left),
      foldedCnrDb: db(folded),
      cellAreaM2: sums.areaM2,
      shareInSight: sums.share,
      spread: sums.rcsM2 > 0 ? sums.spread / sums.rcsM2 : null,
    }
    const notes = optionNotes(o, sums.use, earth)
    for (const note of own?.notes ?? []) if (!notes.some((n) => n.about === note.about)) notes.push(note)
    if (g.codes[cells.code[middle]]?.mark === 'default') notes.push({ mark: 'default', about: 'land cover not stated' })
    return { ...numbers, lines: clutterLines({ ...numbers, ...lossesOf(o, cells, reach) }, segment, o.table), notes }
  }
}

/** Sums over the resolution cell: clutter RCS, C/N of ground and rain in the main beam, what is left, share in sight, spread weighted by RCS. */
function sumCell(o: PointOption, cells: GateCells, slantRangeM: number) {
  const { cell, kernel, beamRad, left } = o
  const { gate, segment } = cells
  const { gateM } = segment
  const patterned = new Float64Array(gate.length)
  const plain = new Float64Array(gate.length)
  const residual = new Float64Array(gate.length)
  const use = new Float64Array(cell.strength.sigma.length)
  const areaM2 = slantRangeM * beamRad * gateM * secantOf(o, cells, kernel.length >> 1)
  const sums = { rcsM2: 0, ground: 0, rain: 0, lobes: 0, left: 0, share: 0, spread: 0 }
  for (let n = 0; n < kernel.length; n++) {
    cellClutter(cell, segment, cells, n, { patterned, plain, residual }, use, cells.first)
    const at0 = n * gate.length
    const factor = perSquareMetre(o, cells, n)
    const rain = kernel[n] * rainOf(o, cells, n) * factor
    sums.rain += rain
    sums.lobes += kernel[n] * rangeLobesOf(o, cells, n, patterned, 1)
    sums.left += rain * left.rain + kernel[n] * rangeLobesOf(o, cells, n, residual, left.rain)
    for (let k = cells.first; k < gate.length; k++) {
      const w = kernel[n] * gate[k]
      sums.share += (w * cells.inSight[at0 + k]) / 65535
      if (w === 0 || plain[k] === 0) continue
      sums.rcsM2 += w * plain[k]
      sums.ground += w * patterned[k] * factor
      sums.left += w * residual[k] * factor
      const band = choiceOf(o, cells, n, k)?.band
      if (band) sums.spread += w * plain[k] * weibullSpread(band, areaM2)
    }
  }
  return { ...sums, areaM2, share: sums.share / (beamRad * gateM), use }
}

/** sec ψ of the middle cell of a row, ψ the depression at the ground. */
function secantOf({ cell }: PointOption, cells: GateCells, row: number): number {
  const { middle, gate } = cells
  const rangeM = cells.centresM[middle]
  const tangent = (cell.antennaM - cells.groundM[row * gate.length + middle]) / rangeM - rangeM / (2 * cells.effectiveRadiusM[row])
  return Math.sqrt(1 + tangent * tangent)
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
  groundCnrDb: null,
  rainCnrDb: null,
  discreteCnrDb: null,
  rangeLobeCnrDb: null,
  foldedCnrDb: null,
  residueDb: null,
  cellAreaM2: null,
  shareInSight: 0,
  spread: null,
  lines: [],
  notes: [],
})
