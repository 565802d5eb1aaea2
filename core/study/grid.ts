import { SPEED_OF_LIGHT_MS } from '../units/index.ts'

/** Most cells a polar grid may have. */
export const MOST_CELLS = 16_000_000
/** Finest range step taken without being asked, m; also the gate under which cells hold the mean of their gates. */
export const FINEST_DEFAULT_STEP_M = 15

/** Range gate of a compressed pulse, m: c·τc/2. */
export const gateOfM = (compressedPulseWidthS: number): number => (SPEED_OF_LIGHT_MS * compressedPulseWidthS) / 2

/** Cells of a polar grid. */
export const cellCount = (maxRangeM: number, rangeStepM: number, azimuthStepDeg: number): number =>
  Math.round(360 / azimuthStepDeg) * Math.max(1, Math.ceil(maxRangeM / rangeStepM - 1e-9))

/** The step that divides the circle and is not longer than the one given, deg. */
export const evenStepDeg = (stepDeg: number): number => 360 / Math.ceil(360 / stepDeg - 1e-9)

/** Azimuth step where none is stated, deg: a quarter of the beamwidth, at most 0.25°. */
export const defaultAzimuthStepDeg = (azimuthBeamwidthDeg: number): number => evenStepDeg(Math.min(0.25, azimuthBeamwidthDeg / 4))

/** Range step where none is stated, m: half a gate but not under 15 m, doubled until the grid has at most 16 million cells. */
export function defaultRangeStepM(gateM: number, maxRangeM: number, azimuthStepDeg: number): number {
  let step = Math.max(gateM / 2, FINEST_DEFAULT_STEP_M)
  while (cellCount(maxRangeM, step, azimuthStepDeg) > MOST_CELLS) step *= 2
  return step
}

/** Longest range step that still shows every gate, m. Under a gate of 15 m the default step is accepted: cells then hold the mean of their gates. */
export const longestRangeStepM = (gateM: number, maxRangeM: number, azimuthStepDeg: number): number =>
  gateM >= FINEST_DEFAULT_STEP_M ? gateM : defaultRangeStepM(gateM, maxRangeM, azimuthStepDeg)
