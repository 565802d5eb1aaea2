/** Cell (i, j) = azimuth i*step (centre), range (j+0.5)*step; index i * ranges + j. */
export interface PolarShape {
  readonly azimuths: number
  readonly ranges: number
  readonly azimuthStepDeg: number
  readonly rangeStepM: number
}
export const CELL = { inSight: 1, partly: 2, masked: 3, marginal: 4, beyondVoid: 5, outside: 6 } as const
export type CellState = (typeof CELL)[keyof typeof CELL]
/** What a cached polar result carries; `key` = canonical JSON of exactly what went in. */
export interface Held {
  readonly version: 1
  readonly key: string
  readonly grid: PolarShape
}
