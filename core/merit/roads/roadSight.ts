import { type Earth, geodesicInverse } from '../../geodesy/index.ts'
import { clearanceAt } from '../../masking/index.ts'
import { finish, type Work } from '../../work/index.ts'
import type { OptionCells } from '../optionCells.ts'
import { type RoadPiece, roadPieces } from './pieces.ts'
import { HIGH_K } from './types.ts'

/** Sight of the top of a vehicle on a piece. */
export const ROAD_SIGHT = { masked: 0, inSight: 1, unknown: 2, beyond: 3 } as const
/** What no tilt and no radar changes of the pieces of all roads, from one mast. */
export interface RoadSight {
  readonly pieces: readonly RoadPiece[]
  /** The study's own earth, and that of the larger k where it differs. */
  readonly earths: readonly Earth[]
  /** A value of ROAD_SIGHT by earth, then piece; a piece in a tunnel is masked. */
  readonly sight: readonly Uint8Array[]
  readonly rangeM: Float64Array
  /** Top of the vehicle, m MSL. */
  readonly topM: Float64Array
  /** Azimuth at the radar, and at the piece of the ray from the radar, degrees true. */
  readonly azimuthDeg: Float64Array
  readonly azimuthAtPieceDeg: Float64Array
}

/** Rays of roads depend on the mast alone: kept with the mask they belong to. */
const kept = new WeakMap<object, RoadSight>()
/** Pieces between two yields. */
const PIECES_PER_TURN = 20

/** Earths that roads are counted at: the study's own, and k = 2.75 where that is larger. */
function earthsOf({ earth }: OptionCells): Earth[] {
  const k = earth.effectiveEarthFactor
  return k > 0 && k < HIGH_K ? [earth, { ...earth, effectiveEarthFactor: HIGH_K }] : [earth]
}

/** Looks at every piece of road within range on its own ray, at both k on one tracing; done once for a mast. */
export function* seeRoads(o: OptionCells): Work<RoadSight> {
  const held = kept.get(o.mask)
  if (held) return held
  const pieces = roadPieces(o.ground.roads)
  const n = pieces.length
  const earths = earthsOf(o)
  const { ranges, rangeStepM } = o.site.grid
  const made: RoadSight = {
    pieces,
    earths,
    sight: earths.map(() => new Uint8Array(n)),
    rangeM: new Float64Array(n),
    topM: new Float64Array(n),
    azimuthDeg: new Float64Array(n),
    azimuthAtPieceDeg: new Float64Array(n),
  }
  for (let i = 0; i < n; i++) {
    lookAt(o, made, i, ranges * rangeStepM)
    if (i % PIECES_PER_TURN === 0) yield { done: i, total: n }
  }
  kept.set(o.mask, made)
  return made
}
/** The same without slices. */
export const roadSight = (o: OptionCells): RoadSight => finish(seeRoads(o))

function lookAt(o: OptionCells, out: RoadSight, i: number, farthestM: number): void {
  const piece = out.pieces[i]
  const { distanceM } = geodesicInverse(o.place, piece.middle)
  out.rangeM[i] = distanceM
  if (distanceM > farthestM) {
    for (const s of out.sight) s[i] = ROAD_SIGHT.beyond
    return
  }
  if (piece.tunnel) return
  const clear = clearanceAt(o.ground, o.place, o.heightM, out.earths, piece.middle)
  out.azimuthDeg[i] = clear.azimuthDeg
  out.azimuthAtPieceDeg[i] = clear.azimuthAtPlaceDeg
  out.topM[i] = clear.groundM + piece.topM
  out.sight.forEach((s, e) => {
    const floorM = clear.floorsM[e]
    s[i] = Number.isNaN(floorM) ? ROAD_SIGHT.unknown : out.topM[i] >= floorM ? ROAD_SIGHT.inSight : ROAD_SIGHT.masked
  })
}
