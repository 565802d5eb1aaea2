import { geodesicDirect, type LonLat, WORLD_WIDTH_M, worldXFromLon, worldYFromLat } from '../../../core/index.ts'

/** World metres from an anchor: x east, y south (as pixels run). */
export type Offset = readonly [x: number, y: number]

/** Offset of a place from an anchor, on the turn of the world nearest the anchor. */
export function offsetFrom(anchor: LonLat, at: LonLat): Offset {
  const x = worldXFromLon(at.lon) - worldXFromLon(anchor.lon)
  return [x - WORLD_WIDTH_M * Math.round(x / WORLD_WIDTH_M), worldYFromLat(anchor.lat) - worldYFromLat(at.lat)]
}
const write = (points: readonly Offset[]): string =>
  points.map(([x, y], n) => `${n === 0 ? 'M' : 'L'}${x.toFixed(1)} ${y.toFixed(1)}`).join('')

/** Points of a geodesic arc about a site, from one azimuth clockwise to another (deg, `to` > `from`), at most 4° apart. */
function arc(site: LonLat, rangeM: number, fromDeg: number, toDeg: number): Offset[] {
  const pieces = Math.max(1, Math.ceil((toDeg - fromDeg) / 4))
  return Array.from({ length: pieces + 1 }, (_, n) =>
    offsetFrom(site, geodesicDirect(site, (fromDeg + ((toDeg - fromDeg) * n) / pieces) % 360, rangeM)),
  )
}
/** Circle of equal ground range about a site, as a path in world metres from the site. */
export const ringPath = (site: LonLat, rangeM: number): string => `${write(arc(site, rangeM, 0, 360))}Z`

/** Outline of a need: a ring, or a piece of one between two azimuths clockwise. */
export function sectorPath(site: LonLat, fromRangeM: number, toRangeM: number, sectorDeg: readonly [number, number]): string {
  const width = (((sectorDeg[1] - sectorDeg[0]) % 360) + 360) % 360
  if (width === 0) return ringPath(site, toRangeM) + (fromRangeM > 0 ? ringPath(site, fromRangeM) : '')
  const outer = arc(site, toRangeM, sectorDeg[0], sectorDeg[0] + width)
  const inner: readonly Offset[] = fromRangeM > 0 ? arc(site, fromRangeM, sectorDeg[0], sectorDeg[0] + width).reverse() : [[0, 0]]
  return `${write([...outer, ...inner])}Z`
}
/** The geodesic along an azimuth, drawn at 16 places. */
export const rayPath = (site: LonLat, azimuthDeg: number, rangeM: number): string =>
  write(Array.from({ length: 17 }, (_, n) => offsetFrom(site, geodesicDirect(site, azimuthDeg, (rangeM * n) / 16))))

/** Several lines as one path from an anchor. */
export const linesPath = (anchor: LonLat, lines: readonly (readonly LonLat[])[]): string =>
  lines.map((line) => write(line.map((at) => offsetFrom(anchor, at)))).join('')
