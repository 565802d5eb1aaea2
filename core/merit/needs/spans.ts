import { geodesicInverse, type LonLat } from '../../geodesy/index.ts'
import { gaussianRadiusM, type PolarShape, ringAreaM2 } from '../../polar/index.ts'
import type { SettledNeed } from '../../study/index.ts'
import { RAD_PER_DEG, wrap360 } from '../../units/index.ts'
import { splitLegs } from './places/legs.ts'
import type { NeedPlaces, PolygonRing } from './places/types.ts'

/** Range cells that a need takes on each azimuth: pairs of first cell and the one after the last; null where it takes none. */
export interface NeedSpans {
  readonly pairs: readonly (Int32Array | null)[]
  /** Area of the need beyond the end of the grid, m²: never evaluated, so unknown. */
  readonly beyondM2: number
}

/** Is an azimuth inside a sector [from, to] clockwise? A sector of 360° or more holds all. */
export function inSector(azimuthDeg: number, sector: readonly [number, number]): boolean {
  const width = sector[1] - sector[0]
  if (width >= 360 || width === 0) return true
  return wrap360(azimuthDeg - sector[0]) <= wrap360(width)
}

/** Longest piece of a polygon's edge that is taken as straight around the site, m. */
const STRAIGHT_EDGE_M = 1000

/** Cells whose centre lies in a need of kind layer or polygon. */
export function spansOf(site: LonLat, grid: PolarShape, need: SettledNeed, places: NeedPlaces | null): NeedSpans {
  const { azimuths, ranges, azimuthStepDeg, rangeStepM } = grid
  const rings = need.kind === 'polygon' ? (places?.rings ?? []).map((r) => aroundSite(site, r)) : null
  const endM = ranges * rangeStepM
  const radius = gaussianRadiusM(site.lat)
  const slice = (fromM: number, toM: number): number => (toM > fromM ? ringAreaM2(fromM, toM, radius) / azimuths : 0)
  let beyondM2 = 0
  const pairs = Array.from({ length: azimuths }, (_, i): Int32Array | null => {
    const azimuthDeg = i * azimuthStepDeg
    if (!inSector(azimuthDeg, need.sectorDeg)) return null
    const out: number[] = []
    for (const [a, b] of rings ? insideOf(rings, azimuthDeg) : [[0, Number.POSITIVE_INFINITY] as const]) {
      const fromM = Math.max(a, need.fromRangeM)
      const toM = Math.min(b, need.toRangeM)
      const first = Math.max(0, Math.ceil(fromM / rangeStepM - 0.5))
      const last = Math.min(ranges, Math.ceil(toM / rangeStepM - 0.5))
      if (first < last) out.push(first, last)
      if (toM > endM + rangeStepM / 2) beyondM2 += slice(Math.max(endM, fromM), toM)
    }
    return out.length > 0 ? Int32Array.from(out) : null
  })
  return { pairs, beyondM2 }
}

/** One ring in the plane around the site: east and north, m, by azimuth and geodesic distance, so that rays stay straight. */
interface PlaneRing {
  readonly feature: number
  readonly x: Float64Array
  readonly y: Float64Array
}
function aroundSite(site: LonLat, ring: PolygonRing): PlaneRing {
  const path = splitLegs(ring.path, STRAIGHT_EDGE_M)
  const x = new Float64Array(path.length)
  const y = new Float64Array(path.length)
  path.forEach((p, n) => {
    const { azimuthDeg, distanceM } = geodesicInverse(site, p)
    x[n] = distanceM * Math.sin(azimuthDeg * RAD_PER_DEG)
    y[n] = distanceM * Math.cos(azimuthDeg * RAD_PER_DEG)
  })
  return { feature: ring.feature, x, y }
}

/** Stretches of a ray inside the polygons, m: inside a feature by even and odd (holes are rings of their own), inside any of several. */
function insideOf(rings: readonly PlaneRing[], azimuthDeg: number): [number, number][] {
  const dx = Math.sin(azimuthDeg * RAD_PER_DEG)
  const dy = Math.cos(azimuthDeg * RAD_PER_DEG)
  const crossings = new Map<number, number[]>()
  for (const { feature, x, y } of rings) {
    const own = crossings.get(feature) ?? []
    crossings.set(feature, own)
    for (let n = 0; n < x.length; n++) {
      const m = n + 1 < x.length ? n + 1 : 0
      const side0 = dx * y[n] - dy * x[n]
      const side1 = dx * y[m] - dy * x[m]
      if (side0 > 0 === side1 > 0) continue
      const t = side0 / (side0 - side1)
      const along = dx * (x[n] + t * (x[m] - x[n])) + dy * (y[n] + t * (y[m] - y[n]))
      if (along > 0) own.push(along)
    }
  }
  const stretches: [number, number][] = []
  for (const list of crossings.values()) {
    const marks = list.sort((a, b) => a - b)
    if (marks.length % 2 === 1) marks.unshift(0)
    for (let n = 0; n + 1 < marks.length; n += 2) stretches.push([marks[n], marks[n + 1]])
  }
  stretches.sort((a, b) => a[0] - b[0])
  const merged: [number, number][] = []
  for (const s of stretches) {
    const last = merged[merged.length - 1]
    if (last && s[0] <= last[1]) last[1] = Math.max(last[1], s[1])
    else merged.push([...s])
  }
  return merged
}
