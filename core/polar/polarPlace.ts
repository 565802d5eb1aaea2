import { geodesicDirect, geodesicInverse, type LonLat, radiusOfCurvatureM } from '../geodesy/index.ts'
import { azimuthOf, cellAt, rangeOf } from './polarShape.ts'
import type { PolarShape } from './types.ts'

/** True azimuth (0..360) and ground range (m) of a place from the site: WGS 84 geodesic. */
export function polarFromLonLat(site: LonLat, at: LonLat): { azimuthDeg: number; rangeM: number } {
  const g = geodesicInverse(site, at)
  return { azimuthDeg: g.azimuthDeg, rangeM: g.distanceM }
}
/** Place at an azimuth and ground range from the site. */
export function lonLatFromPolar(site: LonLat, azimuthDeg: number, rangeM: number): LonLat {
  const { lon, lat } = geodesicDirect(site, azimuthDeg, rangeM)
  return { lon, lat }
}
/** Centre of a cell (index i * ranges + j). */
export const cellCentre = (site: LonLat, grid: PolarShape, cell: number): LonLat =>
  lonLatFromPolar(site, azimuthOf(grid, Math.floor(cell / grid.ranges)), rangeOf(grid, cell % grid.ranges))
/** Cell that holds a place, or -1 beyond the grid. */
export function cellOfLonLat(site: LonLat, grid: PolarShape, at: LonLat): number {
  const p = polarFromLonLat(site, at)
  return cellAt(grid, p.azimuthDeg, p.rangeM)
}

/** Radius of the sphere with the ellipsoid's Gaussian curvature at a latitude, √(M·N), m. */
export const gaussianRadiusM = (latDeg: number): number => Math.sqrt(radiusOfCurvatureM(latDeg, 0) * radiusOfCurvatureM(latDeg, 90))

/**
 * Area of one cell of each ring, m²: geodesic ring 2πR²(cos φ₁ − cos φ₂) shared by the azimuths, φ = ground range / R, on the sphere of Gaussian
 * curvature at the site (within 1 in 10⁵ of the ellipsoid to 100 km).
 */
export function cellAreasM2(grid: PolarShape, siteLatDeg: number): Float64Array {
  const r = gaussianRadiusM(siteLatDeg)
  const out = new Float64Array(grid.ranges)
  for (let j = 0; j < grid.ranges; j++) out[j] = ringAreaM2(j * grid.rangeStepM, (j + 1) * grid.rangeStepM, r) / grid.azimuths
  return out
}
/** Area between two ground ranges on a sphere of radius r, m²; the difference of cosines written so that it keeps its digits. */
export const ringAreaM2 = (fromM: number, toM: number, radiusM: number): number =>
  4 * Math.PI * radiusM * radiusM * Math.sin((fromM + toM) / (2 * radiusM)) * Math.sin((toM - fromM) / (2 * radiusM))
