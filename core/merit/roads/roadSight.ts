import { type Earth, geodesicInverse } from '../../geodesy/index.ts'
import { topSight } from '../../masking/index.ts'
import { finish, type Work } from '../../work/index.ts'
import type { OptionCells } from '../optionCells.ts'
import { type RoadPiece, roadPieces } from './pieces.ts'
import { HIGH_K } from './types.ts'

/** What no mast, no tilt and no radar changes of the pieces of all roads, from one site. */
export interface RoadSight {
  readonly pieces: readonly RoadPiece[]
  /** The study's own earth, and that of the larger k where it differs. */
  readonly earths: readonly Earth[]
  /**
   * By earth, then piece: lowest mast that sees the top of a vehicle, m; Infinity in a tunnel and where what stands there hides it, NaN where the
   * ground is not known. 0 beyond the range of the study.
   */
  readonly lowestMastM: readonly Float64Array[]
  readonly rangeM: Float64Array
  /** Top of the vehicle, m MSL. */
  readonly topM: Float64Array
  /** Azimuth at the radar, and at the piece of the ray from the radar, degrees true. */
  readonly azimuthDeg: Float64Array
  readonly azimuthAtPieceDeg: Float64Array
}

/** Rays of roads depend on the site alone: kept with the cells of it. */
const kept = new WeakMap<object, RoadSight>()
/** Pieces between two yields. */
const PIECES_PER_TURN = 20

/** Earths that roads are counted at: the study's own, and k = 2.75 where that is larger. */
function earthsOf({ earth }: OptionCells): Earth[] {
  const k = earth.effectiveEarthFactor
  return k > 0 && k < HIGH_K ? [earth, { ...earth, effectiveEarthFactor: HIGH_K }] : [earth]
}

/** Looks at every piece of road within range on its own ray, at both k on one tracing; done once for all masts of a site. */
export function* seeRoads(o: OptionCells): Work<RoadSight> {
  const held = kept.get(o.site)
  if (held) return held
  const pieces = roadPieces(o.ground.roads)
  const n = pieces.length
  const earths = earthsOf(o)
  const { ranges, rangeStepM } = o.site.grid
  const made: RoadSight = {
    pieces,
    earths,
    lowestMastM: earths.map(() => new Float64Array(n)),
    rangeM: new Float64Array(n),
    topM: new Float64Array(n),
    azimuthDeg: new Float64Array(n),
    azimuthAtPieceDeg: new Float64Array(n),
  }
  for (let i = 0; i < n; i++) {
    lookAt(o, made, i, ranges * rangeStepM)
    if (i % PIECES_PER_TURN === 0) yield { done: i, total: n }
  }
  kept.set(o.site, made)
  return made
}
/** The same without slices. */
export const roadSight = (o: OptionCells): RoadSight => finish(seeRoads(o))

function lookAt(o: OptionCells, out: RoadSight, i: number, farthestM: number): void {
  const piece = out.pieces[i]
  const { distanceM } = geodesicInverse(o.place, piece.middle)
  out.rangeM[i] = distanceM
  if (distanceM > farthestM) return
  if (piece.tunnel) {
    for (const lowest of out.lowestMastM) lowest[i] = Number.POSITIVE_INFINITY
    return
  }
  const top = topSight(o.ground, o.place, out.earths, piece.middle, piece.topM)
  out.azimuthDeg[i] = top.azimuthDeg
  out.azimuthAtPieceDeg[i] = top.azimuthAtPlaceDeg
  out.topM[i] = top.topM
  out.lowestMastM.forEach((lowest, e) => {
    lowest[i] = top.lowestMastM[e]
  })
}
