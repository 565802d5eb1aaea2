import { DEG_PER_RAD, RAD_PER_DEG } from '../units/index.ts'

// Straight rays over a sphere of the effective radius `effRadiusM` (factor k included). Heights are above its surface (MSL), m; ranges m;
// angles degrees. `effRadiusM` Infinity is flat earth. Exact plane geometry, no small-angle step unless said.

/** versine: 1 − cos x without loss of digits. */
const versine = (x: number): number => {
  const s = Math.sin(x / 2)
  return 2 * s * s
}

/** Elevation angle at the antenna toward a point at a ground range > 0: tan e = ((R+h)cos φ − (R+hₐ)) / ((R+h) sin φ), φ = range / R. */
export function elevationAngleDeg(antennaM: number, targetM: number, groundRangeM: number, effRadiusM: number): number {
  if (effRadiusM === Number.POSITIVE_INFINITY) return Math.atan2(targetM - antennaM, groundRangeM) * DEG_PER_RAD
  const phi = groundRangeM / effRadiusM
  const r2 = effRadiusM + targetM
  return Math.atan2(targetM - antennaM - r2 * versine(phi), r2 * Math.sin(phi)) * DEG_PER_RAD
}

/** Straight-line distance from antenna to a point: √[(R+h₁)² + (R+h₂)² − 2(R+h₁)(R+h₂)cos φ]. */
export function slantRangeM(antennaM: number, targetM: number, groundRangeM: number, effRadiusM: number): number {
  const dh = targetM - antennaM
  if (effRadiusM === Number.POSITIVE_INFINITY) return Math.hypot(dh, groundRangeM)
  return Math.sqrt(dh * dh + 2 * (effRadiusM + antennaM) * (effRadiusM + targetM) * versine(groundRangeM / effRadiusM))
}

/** Height of a straight ray above the sphere at a ground range; elevation at the antenna between −90 and 90, range short of where it ends. */
export function heightOnRayM(antennaM: number, elevationDeg: number, groundRangeM: number, effRadiusM: number): number {
  const e = elevationDeg * RAD_PER_DEG
  if (effRadiusM === Number.POSITIVE_INFINITY) return antennaM + groundRangeM * Math.tan(e)
  const phi = groundRangeM / effRadiusM
  // (R+hₐ)·cos e / cos(e+φ) − R, with cos e − cos(e+φ) = 2 sin(e + φ/2) sin(φ/2)
  const rise = (2 * Math.sin(e + phi / 2) * Math.sin(phi / 2)) / Math.cos(e + phi)
  return antennaM + (effRadiusM + antennaM) * rise
}

/** Coverage floor of one ray at a ground range, m MSL: the height of the ray there. */
export const floorAtGroundRange = heightOnRayM

/** Coverage floor of one ray at a slant range, m MSL: √[(R+hₐ)² + s² + 2 s (R+hₐ) sin e] − R. */
export function floorAtSlantRange(antennaM: number, elevationDeg: number, slantM: number, effRadiusM: number): number {
  const sinE = Math.sin(elevationDeg * RAD_PER_DEG)
  if (effRadiusM === Number.POSITIVE_INFINITY) return antennaM + slantM * sinE
  const r1 = effRadiusM + antennaM
  const more = slantM * (slantM + 2 * r1 * sinE)
  return antennaM + more / (Math.sqrt(r1 * r1 + more) + r1)
}

/**
 * Depression angle at the illuminated ground: between the ray and the local horizontal of the smooth sphere there, slope not included;
 * h/r − r/2R (small angles, the convention of the low-angle land clutter data). `heightDifferenceM` = antenna minus ground.
 */
export const depressionAtTerrainDeg = (heightDifferenceM: number, groundRangeM: number, effRadiusM: number): number =>
  (heightDifferenceM / groundRangeM - groundRangeM / (2 * effRadiusM)) * DEG_PER_RAD

/** Depression below the horizontal at the antenna, small angles: h/r + r/2R. */
export const depressionAtAntennaDeg = (heightDifferenceM: number, groundRangeM: number, effRadiusM: number): number =>
  (heightDifferenceM / groundRangeM + groundRangeM / (2 * effRadiusM)) * DEG_PER_RAD

/** Distance at which two heights above a smooth sphere just see each other: √(2R h₁) + √(2R h₂); heights >= 0. */
export const horizonDistanceM = (firstM: number, secondM: number, effRadiusM: number): number =>
  Math.sqrt(2 * effRadiusM * firstM) + Math.sqrt(2 * effRadiusM * secondM)

/** How far a level line from a point stands above the sphere after a ground range (earth bulge), small angles: r²/2R. */
export const earthDropM = (groundRangeM: number, effRadiusM: number): number => (groundRangeM * groundRangeM) / (2 * effRadiusM)
