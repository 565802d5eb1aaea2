/** WGS 84 position, degrees. */
export interface LonLat {
  readonly lon: number
  readonly lat: number
}
/** A coordinate reference system as plain data, so that it crosses threads; `crsTransform` gives its functions. */
export interface Crs {
  readonly kind: 'geographic' | 'projected'
  /** EPSG code where known. */
  readonly epsg: number | null
  /** Definition for the projection library: 'EPSG:32611' or a definition string. */
  readonly definition: string
  readonly name: string
  /** Metres per unit of a projected axis; 1 for geographic (axes in degrees). */
  readonly metresPerUnit: number
}
/** Earth for radar rays: factor k, and either one radius or (null) the radius of curvature along each azimuth at the site. */
export interface Earth {
  readonly effectiveEarthFactor: number
  readonly earthRadiusM: number | null
}
