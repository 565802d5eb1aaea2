import { KNIFE_EDGE_FROM, knifeEdgeLossDb } from '../../propagation/index.ts'

/** 2·margin²·d₁ over λ·r·d₂ at which an edge stops to count: 0.78². */
const CLEAR = KNIFE_EDGE_FROM * KNIFE_EDGE_FROM

/**
 * Two-way loss of a target that passes close over its controlling obstacle, dB ≥ 0: knife edge, ν = −m√[2d₁/(λ r d₂)] with the height margin m over
 * the line through the obstacle at d₁, at range r = d₁ + d₂; 0 from 0.78 of clearance on. F never exceeds 1. Source: Recommendation ITU-R P.526
 * §4.1, from memory, corroborated by the exact integral.
 */
export function twoWayEdgeLossDb(marginM: number, rangeM: number, obstacleM: number, wavelengthM: number): number {
  const beyondM = rangeM - obstacleM
  if (!(obstacleM > 0) || !(beyondM > 0)) return 0
  const top = 2 * obstacleM * marginM * marginM
  const bottom = wavelengthM * rangeM * beyondM
  if (marginM > 0 && top >= CLEAR * bottom) return 0
  return 2 * knifeEdgeLossDb(marginM > 0 ? -Math.sqrt(top / bottom) : 0)
}
