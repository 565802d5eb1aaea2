import type { LonLat } from '../geodesy/index.ts'
import { RAD_PER_DEG } from '../units/index.ts'
import type { View } from './types.ts'

/** Radius of the web mercator sphere, m (EPSG:3857: the WGS 84 semi-major axis). */
export const MERCATOR_RADIUS_M = 6_378_137
/** Once round the world, m. */
export const WORLD_WIDTH_M = 2 * Math.PI * MERCATOR_RADIUS_M
/** Web mercator is cut off here, deg. */
export const MERCATOR_LIMIT_DEG = 85.051129

/** Longitude (deg, any turn) to web mercator x, m. */
export const worldXFromLon = (lonDeg: number): number => lonDeg * RAD_PER_DEG * MERCATOR_RADIUS_M
/** Latitude (deg, held inside ±85.05) to web mercator y, m, north positive. */
export const worldYFromLat = (latDeg: number): number => {
  const lat = Math.min(MERCATOR_LIMIT_DEG, Math.max(-MERCATOR_LIMIT_DEG, latDeg))
  return Math.asinh(Math.tan(lat * RAD_PER_DEG)) * MERCATOR_RADIUS_M
}
/** Web mercator x (m) to longitude, deg; not wrapped. */
export const lonFromWorldX = (x: number): number => x / MERCATOR_RADIUS_M / RAD_PER_DEG
/** Web mercator y (m) to latitude, deg. */
export const latFromWorldY = (y: number): number => Math.atan(Math.sinh(y / MERCATOR_RADIUS_M)) / RAD_PER_DEG

/** Ground metres per web mercator metre at a latitude (sphere; within 0.7 % of the ellipsoid's). */
export const groundPerWorld = (latDeg: number): number => Math.cos(latDeg * RAD_PER_DEG)
/** Ground metres per pixel in the middle of a view. */
export const groundPerPx = (v: View): number => v.worldPerPx * groundPerWorld(latFromWorldY(v.worldY - (v.height / 2) * v.worldPerPx))

/** Position (px, py) in pixels, corner of the first pixel = (0, 0), to WGS 84; longitude wrapped to [-180, 180). */
export function lonLatAtPixel(v: View, px: number, py: number): LonLat {
  const lon = lonFromWorldX(v.worldX + px * v.worldPerPx)
  return { lon: lon - 360 * Math.floor((lon + 180) / 360), lat: latFromWorldY(v.worldY - py * v.worldPerPx) }
}
/** WGS 84 position to pixels of a view; the turn of the world nearest the view's middle is taken. */
export function pixelAtLonLat(v: View, at: LonLat): readonly [px: number, py: number] {
  const middle = v.worldX + (v.width / 2) * v.worldPerPx
  const x = worldXFromLon(at.lon)
  const turned = x - WORLD_WIDTH_M * Math.round((x - middle) / WORLD_WIDTH_M)
  return [(turned - v.worldX) / v.worldPerPx, (v.worldY - worldYFromLat(at.lat)) / v.worldPerPx]
}
/** The view of a size that shows a box of web mercator metres whole, with a margin in pixels. */
export function viewOfBox(
  box: { readonly west: number; readonly south: number; readonly east: number; readonly north: number },
  size: { readonly width: number; readonly height: number },
  marginPx: number,
  night: boolean,
): View {
  const width = Math.max(1, size.width - 2 * marginPx)
  const height = Math.max(1, size.height - 2 * marginPx)
  const worldPerPx = Math.max((box.east - box.west) / width, (box.north - box.south) / height, 1e-3)
  return {
    width: size.width,
    height: size.height,
    worldX: (box.west + box.east) / 2 - (size.width / 2) * worldPerPx,
    worldY: (box.south + box.north) / 2 + (size.height / 2) * worldPerPx,
    worldPerPx,
    night,
  }
}
