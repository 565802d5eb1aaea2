import { geodesicDirect, geodesicInverse, type LonLat } from '../../geodesy/index.ts'
import { ROAD_CLASSES, type Road, type RoadClass, roadClassOf, VEHICLE_SPEED_KMH, VEHICLE_TOP_M } from '../../obstacles/index.ts'
import { ROAD_PIECE_M } from './types.ts'

/** One piece of road: no longer than 50 m, looked at from its middle. */
export interface RoadPiece {
  readonly from: LonLat
  readonly middle: LonLat
  readonly to: LonLat
  readonly lengthM: number
  /** Direction of the road at the middle, degrees true. */
  readonly courseDeg: number
  /** Index of the road in its list, and its class by index in ROAD_CLASSES. */
  readonly road: number
  readonly roadClass: number
  readonly topM: number
  readonly speedMs: number
  readonly tunnel: boolean
}

const known = new WeakMap<readonly Road[], readonly RoadPiece[]>()

/** Pieces of at most 50 m of every road that carries vehicles; made once for a list of roads. */
export function roadPieces(roads: readonly Road[]): readonly RoadPiece[] {
  let pieces = known.get(roads)
  if (!pieces) {
    pieces = roads.flatMap((road, n) => {
      const roadClass = roadClassOf(road.highway)
      return roadClass === null ? [] : piecesOf(road, n, roadClass)
    })
    known.set(roads, pieces)
  }
  return pieces
}

function piecesOf(road: Road, n: number, roadClass: RoadClass): RoadPiece[] {
  const shared = {
    road: n,
    roadClass: ROAD_CLASSES.indexOf(roadClass),
    topM: VEHICLE_TOP_M[roadClass],
    speedMs: (road.maxspeedKmh ?? VEHICLE_SPEED_KMH[roadClass]) / 3.6,
    tunnel: road.tunnel,
  }
  const out: RoadPiece[] = []
  for (let k = 0; k + 1 < road.path.length; k++) {
    const leg = geodesicInverse(road.path[k], road.path[k + 1])
    if (!(leg.distanceM > 0)) continue
    const count = Math.ceil(leg.distanceM / ROAD_PIECE_M - 1e-9)
    const lengthM = leg.distanceM / count
    const at = (m: number): LonLat & { azimuthDeg: number } => geodesicDirect(road.path[k], leg.azimuthDeg, m)
    let from: LonLat = road.path[k]
    for (let i = 0; i < count; i++) {
      const middle = at((i + 0.5) * lengthM)
      const to: LonLat = i + 1 < count ? at((i + 1) * lengthM) : road.path[k + 1]
      const { lon, lat, azimuthDeg: courseDeg } = middle
      out.push({ ...shared, from, middle: { lon, lat }, to: { lon: to.lon, lat: to.lat }, lengthM, courseDeg })
      from = to
    }
  }
  return out
}
