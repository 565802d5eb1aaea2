/** Geometry of one ray of the polar grid that all levels of a need share; filled again for each azimuth. Arrays by range cell. */
export interface RayRow {
  /** Range of the controlling obstacle, m; 0 before the first. */
  readonly obstacleM: Float32Array
  /** Slant range of the ground itself, m. */
  readonly groundSlantM: Float32Array
  // invariants of the site, by range cell
  readonly rangeM: Float64Array
  readonly chord2: Float64Array
  readonly perSine: Float64Array
  readonly tanHalf: Float64Array
}

/** A floor this far above the line of the obstacles so far belongs to a new one, m: more than the rounding of stored floors. */
const NEW_OBSTACLE_M = 0.002

/** Scratch for the rays of one site; `c` = 1 / effective earth radius, 0 = flat. */
export function makeRayRow(ranges: number, rangeStepM: number, mastM: number, c: number): RayRow {
  const rangeM = Float64Array.from({ length: ranges }, (_, j) => (j + 0.5) * rangeStepM)
  const phi = (r: number): number => r * c
  return {
    obstacleM: new Float32Array(ranges),
    groundSlantM: new Float32Array(ranges),
    rangeM,
    chord2: rangeM.map((r) => (1 + mastM * c) * (c === 0 ? r * r : (2 * Math.sin(phi(r) / 2)) ** 2 / (c * c))),
    perSine: rangeM.map((r) => (c === 0 ? 1 / r : c / Math.sin(phi(r)))),
    tanHalf: rangeM.map((r) => Math.tan(phi(r) / 2)),
  }
}

/**
 * Fills cells 0 … end−1. The controlling obstacle is followed outward: the line to the coverage floor rises where a new one takes over, which lies
 * between the two cell centres or at the nearer side of the cell. Cells without a floor (unknown ground) keep the one before.
 */
export function fillRayRow(
  row: RayRow,
  floorM: Float32Array,
  groundM: Float32Array,
  from: number,
  end: number,
  mastM: number,
  c: number,
  rangeStepM: number,
): void {
  const { obstacleM, groundSlantM, rangeM, chord2, perSine, tanHalf } = row
  let steepest = Number.NEGATIVE_INFINITY
  let obstacle = 0
  for (let j = 0; j < end; j++) {
    const floor = floorM[from + j]
    // tangent of elevation to the floor; 1/(1+hc) to second order
    const tan = (floor - mastM) * perSine[j] * (1 - floor * c) - tanHalf[j]
    if ((tan - steepest) * rangeM[j] > NEW_OBSTACLE_M) {
      steepest = tan
      obstacle = Math.max(rangeStepM / 2, rangeM[j] - rangeStepM / 2)
    }
    obstacleM[j] = obstacle
    const ground = groundM[from + j]
    const d = mastM - ground
    groundSlantM[j] = Math.sqrt(d * d + (1 + ground * c) * chord2[j])
  }
}
