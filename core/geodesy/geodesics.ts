import * as module from 'geographiclib-geodesic'
import { wrap360 } from '../units/index.ts'
import { normalLon } from './longitude.ts'
import type { LonLat } from './types.ts'

// The package is a UMD file: Node gives it as `default`, a bundler as named exports.
type Library = Pick<typeof module, 'Geodesic'>
const { Geodesic } = ((module as unknown as { default?: Library }).default ?? module) as Library
const wgs84 = Geodesic.WGS84
const POSITION = Geodesic.LATITUDE | Geodesic.LONGITUDE

/** Geodesic from one point in one direction, for many distances. */
export interface GeodesicLine {
  /** Position at a distance along the line, m; longitude in [-180, 180). */
  at(distanceM: number): LonLat
  /** The same without making an object: out[0] = lon (wrapped), out[1] = lat. */
  into(distanceM: number, out: Float64Array | number[]): void
}

/**
 * Direct problem on WGS 84: where a distance (m) along an azimuth (degrees, true) leads, and the forward azimuth (0..360) there.
 * Valid everywhere; source: Karney, Algorithms for geodesics, J. Geodesy 87 (2013), through GeographicLib.
 */
export function geodesicDirect(from: LonLat, azimuthDeg: number, distanceM: number): LonLat & { azimuthDeg: number } {
  const r = wgs84.Direct(from.lat, from.lon, azimuthDeg, distanceM, Geodesic.STANDARD)
  return { lon: normalLon(r.lon2!), lat: r.lat2!, azimuthDeg: wrap360(r.azi2!) }
}

/**
 * Inverse problem on WGS 84: azimuth at `from` toward `to`, distance (m), and the forward azimuth at `to`, degrees 0..360.
 * Converges for every pair, antipodes included; source as for geodesicDirect.
 */
export function geodesicInverse(from: LonLat, to: LonLat): { azimuthDeg: number; distanceM: number; azimuthAtToDeg: number } {
  const r = wgs84.Inverse(from.lat, from.lon, to.lat, to.lon, Geodesic.STANDARD)
  return { azimuthDeg: wrap360(r.azi1!), distanceM: r.s12!, azimuthAtToDeg: wrap360(r.azi2!) }
}

/** One geodesic prepared once, for rays with many control points. Same accuracy as geodesicDirect. */
export function geodesicLine(from: LonLat, azimuthDeg: number): GeodesicLine {
  const line = wgs84.DirectLine(from.lat, from.lon, azimuthDeg, 1, Geodesic.LATITUDE | Geodesic.LONGITUDE | Geodesic.DISTANCE_IN)
  return {
    at(distanceM) {
      const p = line.Position(distanceM, POSITION)
      return { lon: normalLon(p.lon2!), lat: p.lat2! }
    },
    into(distanceM, out) {
      const p = line.Position(distanceM, POSITION)
      out[0] = normalLon(p.lon2!)
      out[1] = p.lat2!
    },
  }
}
