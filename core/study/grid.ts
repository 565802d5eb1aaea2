import { defaultPolarRun, FINEST_DEFAULT_RANGE_STEP_M } from '../polar/index.ts'
import { SPEED_OF_LIGHT_MS } from '../units/index.ts'

/** Range gate of a compressed pulse, m: c·τc/2. */
export const gateOfM = (compressedPulseWidthS: number): number => (SPEED_OF_LIGHT_MS * compressedPulseWidthS) / 2

/** Cells of a polar grid, without refusing any number. */
export const cellsOf = (maxRangeM: number, rangeStepM: number, azimuthStepDeg: number): number =>
  Math.round(360 / azimuthStepDeg) * Math.max(1, Math.ceil(maxRangeM / rangeStepM - 1e-9))

/** The step that divides the circle and is not longer than the one given, deg. */
export const evenStepDeg = (stepDeg: number): number => 360 / Math.ceil(360 / stepDeg - 1e-9)

/** Azimuth step where none is stated, deg: a quarter of the beamwidth, at most 0.25°. */
export const defaultAzimuthStepDeg = (azimuthBeamwidthDeg: number): number => evenStepDeg(Math.min(0.25, azimuthBeamwidthDeg / 4))

/** Range step where none is stated, m: as the polar room has it, for a stated azimuth step. */
export const defaultRangeStepM = (gateM: number, maxRangeM: number, azimuthStepDeg: number): number =>
  defaultPolarRun({ azimuthBeamwidthDeg: 4 * azimuthStepDeg, gateM, maxRangeM }).rangeStepM

/** Longest range step that still shows every gate, m. Under a gate of 15 m the default step is accepted: cells then hold the mean of their gates. */
export const longestRangeStepM = (gateM: number, maxRangeM: number, azimuthStepDeg: number): number =>
  gateM >= FINEST_DEFAULT_RANGE_STEP_M ? gateM : defaultRangeStepM(gateM, maxRangeM, azimuthStepDeg)
