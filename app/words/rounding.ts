/** Values a hair away from a printed step are that step: single-precision results carry about 6e-8 of their size. */
const NOISE = 1.2e-7

/** Printed step `step` at or above `x`; x within single-precision noise of a step stays on it. */
export function roundUp(x: number, step: number): number {
  return stepped(Math.ceil(x / step - noiseOf(x, step)), step)
}
/** Printed step at or below `x`. */
export function roundDown(x: number, step: number): number {
  return stepped(Math.floor(x / step + noiseOf(x, step)), step)
}
/** Printed step nearest to `x`, halves away from zero. */
export function roundNearest(x: number, step: number): number {
  return stepped(Math.sign(x) * Math.round(Math.abs(x) / step + noiseOf(x, step)), step)
}
export type Rounding = 'up' | 'down' | 'nearest'

/** Any of the three by name. */
export function roundTo(x: number, step: number, way: Rounding): number {
  return way === 'up' ? roundUp(x, step) : way === 'down' ? roundDown(x, step) : roundNearest(x, step)
}

/** Decimals that a step needs: 0.25 -> 2, 0.1 -> 1, 10 -> 0. */
export function decimalsOf(step: number): number {
  for (let d = 0; d < 6; d++) if (Math.abs(step * 10 ** d - Math.round(step * 10 ** d)) < 1e-9) return d
  return 6
}

function noiseOf(x: number, step: number): number {
  return Math.min(0.001, (Math.abs(x) * NOISE) / step + 1e-9)
}

function stepped(count: number, step: number): number {
  const value = Number((count * step).toFixed(decimalsOf(step)))
  return value === 0 ? 0 : value
}
