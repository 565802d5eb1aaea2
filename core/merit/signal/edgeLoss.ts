import { elevationTangent } from '../../clutter/index.ts'
import { KNIFE_EDGE_FROM, knifeEdgeLossDb } from '../../propagation/index.ts'

/**
 * Two-way loss of a target that passes close over its controlling obstacle, dB ≥ 0: knife edge, ν = −m√[2d₁/(λ r d₂)] with the height margin m over
 * the line through the obstacle at d₁, at range r = d₁ + d₂; 0 from 0.78 of clearance on. F never exceeds 1. Source: Recommendation ITU-R P.526
 * §4.1, from memory, corroborated by the exact integral.
 */
export function twoWayEdgeLossDb(marginM: number, rangeM: number, obstacleM: number, wavelengthM: number): number {
  const beyondM = rangeM - obstacleM
  if (!(obstacleM > 0) || !(beyondM > 0)) return 0
  const nu = -marginM * Math.sqrt((2 * obstacleM) / (wavelengthM * rangeM * beyondM))
  return nu > KNIFE_EDGE_FROM ? 2 * knifeEdgeLossDb(Math.min(0, nu)) : 0
}

/** A floor this far above the line of the obstacles so far belongs to a new one, m: more than the rounding of stored floors. */
const NEW_OBSTACLE_M = 0.002

/**
 * Follows the controlling obstacle outward along a row of coverage floors: the line to the floor rises where a new one takes over, which lies
 * between the two cell centres or at the nearer side of the cell. `next` takes the cells in order and gives the obstacle's range, m.
 */
export function followObstacle(mastM: number, c: number, rangeStepM: number) {
  let steepest = Number.NEGATIVE_INFINITY
  let obstacleM = 0
  return {
    start(): void {
      steepest = Number.NEGATIVE_INFINITY
      obstacleM = 0
    },
    next(j: number, floorM: number): number {
      const rangeM = (j + 0.5) * rangeStepM
      const tan = elevationTangent(mastM, floorM, rangeM, c)
      if ((tan - steepest) * rangeM > NEW_OBSTACLE_M) {
        steepest = tan
        obstacleM = Math.max(rangeStepM / 2, rangeM - rangeStepM / 2)
      }
      return obstacleM
    },
  }
}
