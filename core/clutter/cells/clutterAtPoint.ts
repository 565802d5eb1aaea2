import { azimuthKernel } from '../../antenna/index.ts'
import { depressionAtTerrainDeg, type Earth, type LonLat } from '../../geodesy/index.ts'
import { type SightPoint, sightPoint } from '../../masking/index.ts'
import { isUnknown, type PolarShape } from '../../polar/index.ts'
import type { RadarInput } from '../../radar/index.ts'
import type { Ground, Site } from '../../terrain/index.ts'
import { toDb } from '../../units/index.ts'
import { chooseRow, type LandChoice } from '../land/landRow.ts'
import { weibullSpread } from '../land/weibull.ts'
import type { ModelNote } from '../types.ts'
import { cellClutter, slantSquared } from './cellSums.ts'
import { type ClutterLine, clutterLines } from './clutterLines.ts'
import { optionNotes } from './clutterToNoise.ts'
import { type GateCells, gateCells, type PointOption, type PointOptions, pointOption, sideLobes } from './pointCells.ts'

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
  const { model } = o
  const kernel = azimuthKernel(r.antenna.azimuthBeamwidthDeg, grid.azimuthStepDeg)
  const reach = kernel.length >> 1
  const sideLobeAt = sideLobes(o, options)

  return (at, sight = sightPoint(g, site, heightM, earth, at)) => {
    const { azimuthDeg, rangeM } = sight
    const nothing = emptyPoint(azimuthDeg, rangeM)
    if (sight.unknown !== null || !(rangeM > 0)) return nothing
    const azimuthsDeg = Array.from(kernel, (_, n) => (azimuthDeg + (n - reach) * grid.azimuthStepDeg + 720) % 360)
    const cells = gateCells(o, azimuthsDeg, rangeM)
    const own = choiceOf(o, cells, reach, cells.middle)
    const middle = reach * cells.gate.length + cells.middle
    const slantRangeM = slantOf(o, cells, reach)
    if (!(slantRangeM >= model.nearestM)) return { ...nothing, slantRangeM, rowName: own?.rowName ?? null }

    const sums = sumCell(o, cells, kernel, slantRangeM)
    const sideLobe = sideLobeAt(rangeM)
    const db = (ratio: number): number | null => (ratio > 0 ? toDb(ratio) : null)
    const numbers = {
      azimuthDeg,
      rangeM,
      slantRangeM,
      rowName: own?.rowName ?? null,
      strengthDb: sight.inSight ? (own?.meanDb ?? null) : null,
      rcsDbsm: db(sums.rcsM2),
      cnrDb: db(sums.main + sideLobe.all),
      mainCnrDb: db(sums.main),
      sideLobeCnrDb: db(sideLobe.all),
      residueDb: db(sums.left + sideLobe.left),
      cellAreaM2: sums.areaM2,
      shareInSight: sums.share,
      spread: sums.rcsM2 > 0 ? sums.spread / sums.rcsM2 : null,
    }
    const notes = optionNotes(model, sums.use, earth)
    for (const note of own?.notes ?? []) if (!notes.some((n) => n.about === note.about)) notes.push(note)
    if (g.codes[cells.code[middle]]?.mark === 'default') notes.push({ mark: 'default', about: 'land cover not stated' })
    return { ...numbers, lines: clutterLines(numbers, r, o.table), notes }
  }
}

/** Slant range to the middle cell of a row, m; NaN where its ground is unknown. */
function slantOf({ model }: PointOption, cells: GateCells, row: number): number {
  const { middle, gate } = cells
  const groundM = cells.groundM[row * gate.length + middle]
  return Math.sqrt(slantSquared(model.antennaM, groundM, cells.centresM[middle], 1 / cells.effectiveRadiusM[row]))
}

/** Row of the land table one cell takes; null where its ground code is unknown. */
function choiceOf({ g, model, r, table }: PointOption, cells: GateCells, row: number, k: number): LandChoice | null {
  const at = row * cells.gate.length + k
  const code = g.codes[cells.code[at]]
  if (!code) return null
  const depressionDeg = depressionAtTerrainDeg(model.antennaM - cells.groundM[at], cells.centresM[k], cells.effectiveRadiusM[row])
  return chooseRow(code.terrain, cells.relief[at], depressionDeg, r.frequencyHz, {}, table)
}

/** Sums over the resolution cell: clutter RCS, its C/N in the main beam, share in sight, spread weighted by RCS, table entries in use. */
function sumCell(o: PointOption, cells: GateCells, kernel: Float64Array, slantRangeM: number) {
  const { model, constant, gateM, beamRad } = o
  const { gate, middle } = cells
  const patterned = new Float64Array(gate.length)
  const plain = new Float64Array(gate.length)
  const residual = new Float64Array(gate.length)
  const use = new Float64Array(model.strength.sigma.length)
  const areaM2 = slantRangeM * beamRad * gateM * secantOf(o, cells, kernel.length >> 1)
  let [rcsM2, main, left, share, spread] = [0, 0, 0, 0, 0]
  for (let n = 0; n < kernel.length; n++) {
    cellClutter(model, cells, n, { patterned, plain, residual }, use)
    const at0 = n * gate.length
    const perRange4 = isUnknown(cells.state[at0 + middle]) ? 0 : constant / slantOf(o, cells, n) ** 4
    for (let k = 0; k < gate.length; k++) {
      const w = kernel[n] * gate[k]
      share += (w * cells.inSight[at0 + k]) / 65535
      if (plain[k] === 0) continue
      rcsM2 += w * plain[k]
      main += w * patterned[k] * perRange4
      left += w * residual[k] * perRange4
      const band = choiceOf(o, cells, n, k)?.band
      if (band) spread += w * plain[k] * weibullSpread(band, areaM2)
    }
  }
  return { areaM2, rcsM2, main, left, share: share / (beamRad * gateM), spread, use }
}

/** sec ψ of the middle cell of a row, ψ the depression at the ground. */
function secantOf({ model }: PointOption, cells: GateCells, row: number): number {
  const { middle, gate } = cells
  const rangeM = cells.centresM[middle]
  const tangent = (model.antennaM - cells.groundM[row * gate.length + middle]) / rangeM - rangeM / (2 * cells.effectiveRadiusM[row])
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
  residueDb: null,
  cellAreaM2: null,
  shareInSight: 0,
  spread: null,
  lines: [],
  notes: [],
})
