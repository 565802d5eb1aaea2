import { InputError } from '../errors/index.ts'
import type { PolarShape } from './types.ts'

/** A polar grid larger than this is refused. */
export const MAX_POLAR_CELLS = 16_000_000
/** Range cells are never made finer than this by default, m: shorter gates share a cell, which holds their mean. */
export const FINEST_DEFAULT_RANGE_STEP_M = 15

/** What a polar grid is asked for: outer ground range and steps, m and degrees. */
export interface PolarRun {
  readonly maxRangeM: number
  readonly rangeStepM: number
  readonly azimuthStepDeg: number
}

/**
 * The grid of a run: a whole number of azimuths (the step is narrowed to 360/n, never widened) and enough range cells to reach maxRangeM.
 * Steps and range must be above 0; more than 16 million cells is refused with an InputError.
 */
export function polarShape(run: PolarRun): PolarShape {
  const azimuths = Math.max(1, Math.ceil(360 / run.azimuthStepDeg - 1e-9))
  const ranges = Math.max(1, Math.ceil(run.maxRangeM / run.rangeStepM - 1e-9))
  if (!(azimuths * ranges <= MAX_POLAR_CELLS)) {
    const wider = run.rangeStepM * Math.ceil((azimuths * ranges) / MAX_POLAR_CELLS)
    throw new InputError({
      code: 'polar-grid-too-large',
      place: 'run',
      found: `${azimuths} azimuths × ${ranges} range cells are more than 16 million cells`,
      remedy: `give run.rangeStepM ${wider} or a shorter run.maxRangeM`,
    })
  }
  return { azimuths, ranges, azimuthStepDeg: 360 / azimuths, rangeStepM: run.rangeStepM }
}

/**
 * Steps where the study states none: azimuth step 360/ceil(360/min(0.25°, beamwidth/4)); range step half a gate but at least 15 m, doubled until the
 * grid has at most 16 million cells; range as given (the instrumented range).
 */
export function defaultPolarRun(o: { azimuthBeamwidthDeg: number; gateM: number; maxRangeM: number }): PolarRun {
  const azimuths = Math.ceil(360 / Math.min(0.25, o.azimuthBeamwidthDeg / 4) - 1e-9)
  let rangeStepM = Math.max(o.gateM / 2, FINEST_DEFAULT_RANGE_STEP_M)
  while (azimuths * Math.ceil(o.maxRangeM / rangeStepM - 1e-9) > MAX_POLAR_CELLS) rangeStepM *= 2
  return { maxRangeM: o.maxRangeM, rangeStepM, azimuthStepDeg: 360 / azimuths }
}

/** Azimuths of a coarse picture while something is dragged, and of the finer one while it is held still. */
const MOVING_AZIMUTHS = 180
const STILL_AZIMUTHS = 720
/** Range cells those azimuths are meant for: a grid with more gets fewer azimuths, so that the time stays the same. */
const PREVIEW_RANGES = 800

/** The grid of a coarse picture: fewer azimuths, every range cell. `still`: nothing moves, so the picture may take four times as long. */
export function previewShape(grid: PolarShape, still: boolean): PolarShape {
  const wanted = (still ? STILL_AZIMUTHS : MOVING_AZIMUTHS) * Math.min(1, PREVIEW_RANGES / grid.ranges)
  const azimuths = Math.min(grid.azimuths, Math.max(60, Math.round(wanted)))
  return { ...grid, azimuths, azimuthStepDeg: 360 / azimuths }
}

/** Number of cells. */
export const cellCount = (grid: PolarShape): number => grid.azimuths * grid.ranges
/** Outer ground range of the grid, m. */
export const outerRangeM = (grid: PolarShape): number => grid.ranges * grid.rangeStepM
/** Azimuth of the centre of column i, degrees true. */
export const azimuthOf = (grid: PolarShape, i: number): number => i * grid.azimuthStepDeg
/** Ground range of the centre of ring j, m. */
export const rangeOf = (grid: PolarShape, j: number): number => (j + 0.5) * grid.rangeStepM
/** Ring that holds a ground range, or -1 beyond the grid; ring j is [j, j+1) steps. */
export function ringOf(grid: PolarShape, groundRangeM: number): number {
  const j = Math.floor(groundRangeM / grid.rangeStepM)
  return j >= 0 && j < grid.ranges ? j : -1
}
/** Azimuth column nearest to an azimuth (any angle, degrees). */
export function azimuthIndexOf(grid: PolarShape, azimuthDeg: number): number {
  const i = Math.round(azimuthDeg / grid.azimuthStepDeg) % grid.azimuths
  return i < 0 ? i + grid.azimuths : i
}
/** Index of the cell that holds an azimuth and ground range, or -1 beyond the grid. */
export function cellAt(grid: PolarShape, azimuthDeg: number, groundRangeM: number): number {
  const j = ringOf(grid, groundRangeM)
  return j < 0 ? -1 : azimuthIndexOf(grid, azimuthDeg) * grid.ranges + j
}
