import { elevationAngleDeg } from '../geodesy/index.ts'
import { RAD_PER_DEG } from '../units/index.ts'
import { REFERENCE_ATMOSPHERE } from './refractivity.ts'

/** Refractivity N(h) = N₀·exp(−h/H): value at sea level, N units, and scale height, m. */
export interface ExponentialAir {
  readonly surfaceN: number
  readonly scaleHeightM: number
}
const STEP_M = 1000

/**
 * Height, m MSL, at a ground range (m, ≥ 0) of the ray that leaves an antenna (m MSL) at an elevation (deg, −89 to 89) through air whose refractivity
 * falls off exponentially, over a sphere of the earth's own radius (m, no factor k). Snell's law in spherical layers, n·r·cos θ constant, integrated by
 * fourth-order Runge–Kutta in steps of 1 km at most. NaN where the ray would stand upright. Source: mathematics; reference air N₀ = 315, H = 7.35 km
 * from memory (Recommendation ITU-R P.453).
 */
export function heightOnExponentialRay(
  antennaM: number,
  elevationDeg: number,
  groundRangeM: number,
  earthRadiusM: number,
  air: ExponentialAir = REFERENCE_ATMOSPHERE,
): number {
  const { surfaceN, scaleHeightM } = air
  const steps = Math.max(1, Math.ceil(groundRangeM / STEP_M))
  const dPhi = groundRangeM / steps / earthRadiusM
  let h = antennaM
  let theta = elevationDeg * RAD_PER_DEG
  const rise = (at: number, angle: number): number => (earthRadiusM + at) * Math.tan(angle)
  const turn = (at: number): number => {
    const n = 1e-6 * surfaceN * Math.exp(-at / scaleHeightM)
    return 1 - ((earthRadiusM + at) * n) / (scaleHeightM * (1 + n))
  }
  for (let k = 0; k < steps; k++) {
    const h1 = rise(h, theta)
    const t1 = turn(h)
    const h2 = rise(h + (dPhi / 2) * h1, theta + (dPhi / 2) * t1)
    const t2 = turn(h + (dPhi / 2) * h1)
    const h3 = rise(h + (dPhi / 2) * h2, theta + (dPhi / 2) * t2)
    const t3 = turn(h + (dPhi / 2) * h2)
    const h4 = rise(h + dPhi * h3, theta + dPhi * t3)
    const t4 = turn(h + dPhi * h3)
    h += (dPhi / 6) * (h1 + 2 * h2 + 2 * h3 + h4)
    theta += (dPhi / 6) * (t1 + 2 * t2 + 2 * t3 + t4)
    if (!(Math.abs(theta) < Math.PI / 2)) return Number.NaN
  }
  return h
}

/**
 * How far the ray toward a target (m MSL) at a ground range (m) comes out over it in the reference exponential air, m: height of the exponential ray that
 * leaves at the same elevation as the straight one over the effective radius, less the target's. Positive: the constant k bends too much.
 */
export function exponentialDifferenceM(
  antennaM: number,
  targetM: number,
  groundRangeM: number,
  earthRadiusM: number,
  effectiveRadiusM: number,
): number {
  const elevationDeg = elevationAngleDeg(antennaM, targetM, groundRangeM, effectiveRadiusM)
  return heightOnExponentialRay(antennaM, elevationDeg, groundRangeM, earthRadiusM) - targetM
}
