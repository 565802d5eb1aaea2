import type { Earth } from '../../geodesy/index.ts'
import { type SiteCells, sweep } from '../../masking/index.ts'
import { CELL, cellAreasM2, type Held, MAX_POLAR_CELLS, type PolarShape } from '../../polar/index.ts'
import type { RadarInput } from '../../radar/index.ts'
import type { Ground, Site } from '../../terrain/index.ts'
import { fromDb, SPEED_OF_LIGHT_MS } from '../../units/index.ts'
import { share, type Work } from '../../work/index.ts'
import { slantSquared } from '../cells/cellSums.ts'
import { centresOf, clutterToNoise, electricalCentreM } from '../cells/clutterToNoise.ts'
import type { ClutterOptions } from '../cells/optionModel.ts'
import { discreteEchoes } from '../discretes/discreteEchoes.ts'
import { unambiguousRangeM } from './foldedRange.ts'

/** Second-time-around clutter of one option: what comes back from beyond the unambiguous range into each gate. */
export interface FoldedCells extends Held {
  readonly kind: 'folded'
  readonly heightM: number
  readonly tiltDeg: number
  /** Σ_{n≥1} C(R + n·c/2f) over noise per cell, ratio, before STC and suppression; the worst PRF that has to be usable, or the mean of them when pulses are staggered. */
  readonly ratio: Float32Array
  /** How far it was looked for, m, and to which slant range the ground is known on every azimuth. */
  readonly foldRangeM: number
  readonly evaluatedToM: number
}
/** Cells of the far grid: a bound on memory (about 31 bytes a cell while it is worked out). */
const FAR_CELLS = 2_000_000

/** Grid on which far clutter is worked out: the azimuths of the near grid, its range step times a whole number. */
export function farGrid(near: PolarShape, foldRangeM: number): PolarShape {
  const most = Math.min(FAR_CELLS, MAX_POLAR_CELLS) / near.azimuths
  const times = Math.max(1, Math.ceil(foldRangeM / near.rangeStepM / most))
  const rangeStepM = near.rangeStepM * times
  return { ...near, rangeStepM, ranges: Math.ceil(foldRangeM / rangeStepM - 1e-9) }
}

/**
 * Clutter from beyond the unambiguous range, folded into the gates of a polar grid: a sweep of its own out to `foldRangeM` (slant, taken as
 * ground range there), clutter with the strength, losses and elevation gain of the true place, then summed at the apparent slant range for each
 * PRF. Gates past c/2f of a PRF do not exist for it. STC of the apparent range is the reader's. `evaluatedToM` falls short of `foldRangeM` where
 * terrain ends or a void lies. Throws as `clutterToNoise`.
 */
export function* foldedClutter(
  g: Ground,
  site: Site,
  heightM: number,
  earth: Earth,
  r: RadarInput,
  tiltDeg: number,
  near: Pick<SiteCells, 'grid' | 'groundM' | 'effectiveRadiusM' | 'siteGroundM'>,
  foldRangeM: number,
  options: ClutterOptions = {},
): Work<FoldedCells> {
  const grid = farGrid(near.grid, foldRangeM)
  const swept = yield* share(sweep(g, site, [heightM], grid, earth, { heightToSee: false }), 0, 0.7, 1)
  const discretes = options.discretes ? discreteEchoes(g, site, heightM, earth, foldRangeM) : []
  const { landTable, weather } = options
  const clutter = yield* share(
    clutterToNoise(swept.site, swept.masks[0], g.codes, site, heightM, earth, r, tiltDeg, {
      ...(landTable ? { landTable } : {}),
      ...(weather ? { weather } : {}),
      discretes,
    }),
    0.7,
    0.95,
    1,
  )
  const far: FarClutter = { grid, ratio: clutter.cnrDb.map((db) => fromDb(db) || 0) }
  const ratio = new Float32Array(near.grid.azimuths * near.grid.ranges)
  const one = r.prfMode === 'pulseStagger' ? null : new Float32Array(near.grid.ranges)
  const slants = new Float64Array(near.grid.ranges)
  const needed = r.prfMode === 'dwellStagger' ? (r.dwellsNeeded ?? r.prfHz.length) : r.prfHz.length
  for (let i = 0; i < near.grid.azimuths; i++) {
    slantsOfRow(near, i, electricalCentreM(site, near.siteGroundM, heightM), slants)
    const row = ratio.subarray(i * near.grid.ranges, (i + 1) * near.grid.ranges)
    for (const prfHz of r.prfHz) {
      if (!one) foldRow(far, i, slants, unambiguousRangeM(prfHz), 1 / r.prfHz.length, row)
      else if (needed === r.prfHz.length) {
        foldRow(far, i, slants, unambiguousRangeM(prfHz), 1, one.fill(0))
        for (let j = 0; j < row.length; j++) if (one[j] > row[j]) row[j] = one[j]
      }
    }
    if (needed < r.prfHz.length) foldDwells(far, i, slants, r, needed, row)
    if (i % 64 === 63) yield { done: 0.95 + (0.05 * i) / near.grid.azimuths, total: 1 }
  }
  return {
    kind: 'folded',
    version: 1,
    key: options.key ?? '',
    grid: near.grid,
    heightM,
    tiltDeg,
    ratio,
    foldRangeM,
    evaluatedToM: Math.min(foldRangeM, knownToM(swept.masks[0].state, grid)),
  }
}

/** Clutter-to-noise of a grid that reaches beyond the unambiguous range, ratio; 0 where there is none or it is not known. */
export interface FarClutter {
  readonly grid: PolarShape
  readonly ratio: Float32Array
}

/**
 * Adds to the gates of azimuth i the clutter that folds into them, each term times `times`: Σ_{n≥1} C(R + n·step), R the apparent slant range of
 * the gate (m), step = c/2f. Nothing folds into a gate at or beyond the step.
 */
export function foldRow(far: FarClutter, i: number, slantsM: Float64Array, stepM: number, times: number, out: Float32Array): void {
  const { ranges, rangeStepM } = far.grid
  for (let j = 0; j < out.length; j++) {
    if (!(slantsM[j] < stepM)) continue
    for (let n = 1; ; n++) {
      const k = Math.floor((slantsM[j] + n * stepM) / rangeStepM)
      if (k >= ranges) break
      out[j] += times * far.ratio[i * ranges + k]
    }
  }
}

/**
 * Clutter folded into the gates of azimuth i on the PRF that decides when `needed` of them must be usable: the needed-lowest of those on which the gate
 * is not under a later pulse, the highest where fewer are left.
 */
export function foldDwells(
  far: FarClutter,
  i: number,
  slantsM: Float64Array,
  r: Pick<RadarInput, 'prfHz' | 'pulseWidthS' | 'recoveryS'>,
  needed: number,
  out: Float32Array,
): void {
  const pulseM = (SPEED_OF_LIGHT_MS * r.pulseWidthS) / 2
  const blindM = pulseM + (SPEED_OF_LIGHT_MS * (r.recoveryS ?? 0)) / 2
  const dwells = r.prfHz.map((prfHz) => {
    const stepM = unambiguousRangeM(prfHz)
    const row = new Float32Array(out.length)
    foldRow(far, i, slantsM, stepM, 1, row)
    return { stepM, row }
  })
  const levels: number[] = []
  for (let j = 0; j < out.length; j++) {
    levels.length = 0
    for (const { stepM, row } of dwells) {
      const apparent = slantsM[j] % stepM
      const eclipsed = slantsM[j] + pulseM > stepM && (apparent < blindM || apparent > stepM - pulseM)
      if (!eclipsed) levels.push(row[j])
    }
    levels.sort((a, b) => a - b)
    out[j] = levels[Math.min(needed, levels.length) - 1] ?? 0
  }
}

/** Slant range of the gates on one azimuth, m; ground range where the ground is not known: echoes fold in there all the same. */
function slantsOfRow(near: Pick<SiteCells, 'grid' | 'groundM' | 'effectiveRadiusM'>, i: number, antennaM: number, out: Float64Array): void {
  const centres = centresOf(near.grid)
  for (let j = 0; j < out.length; j++) {
    const ground = near.groundM[i * out.length + j]
    out[j] = Number.isNaN(ground) ? centres[j] : Math.sqrt(slantSquared(antennaM, ground, centres[j], 1 / near.effectiveRadiusM[i]))
  }
}

/** Nearest range at which some azimuth is no longer known, m. */
function knownToM(state: Uint8Array, { azimuths, ranges, rangeStepM }: PolarShape): number {
  for (let j = 0; j < ranges; j++) for (let i = 0; i < azimuths; i++) if (state[i * ranges + j] >= CELL.beyondVoid) return j * rangeStepM
  return ranges * rangeStepM
}

/** The figure of an option. */
export interface SecondTimeAround {
  /** Area of the gates where folded clutter stands over the noise, km²; null where that is not known: none found, and not all looked at. */
  readonly km2: number | null
  /** Where terrain ends sooner than folded clutter is looked for, m; null where all was evaluated. Words: "not evaluated beyond … km". */
  readonly notEvaluatedBeyondM: number | null
}

/** Second-time-around area of an option on the grid, for the ground of the site's latitude. */
export function secondTimeAround(f: FoldedCells, siteLatDeg: number): SecondTimeAround {
  const { azimuths, ranges } = f.grid
  const areas = cellAreasM2(f.grid, siteLatDeg)
  let m2 = 0
  for (let i = 0; i < azimuths; i++) for (let j = 0; j < ranges; j++) if (f.ratio[i * ranges + j] > 1) m2 += areas[j]
  const whole = f.evaluatedToM >= f.foldRangeM
  return { km2: m2 === 0 && !whole ? null : m2 / 1e6, notEvaluatedBeyondM: whole ? null : f.evaluatedToM }
}
