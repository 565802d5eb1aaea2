import type { GroundCode } from '../landcover/index.ts'
import type { Obstacle, Road } from '../obstacles/index.ts'
import { bilinear, type GridPosition, type GridShape, gridPosition, postingM } from '../raster/index.ts'
import type { Work } from '../work/index.ts'
import { buildRelief } from './relief.ts'
import type { Survey } from './survey/types.ts'
import type { Ground, Site } from './types.ts'

/** What a ground is made of: one grid of heights, and on the same posts an index into `codes` (null: codes[0] everywhere). */
export interface GroundParts {
  readonly serial: number
  readonly shape: GridShape
  /** m MSL, NaN = void. */
  readonly heightM: Float32Array
  readonly code: Uint8Array | null
  readonly codes: readonly GroundCode[]
  readonly obstacles: readonly Obstacle[]
  readonly roads?: readonly Road[]
  readonly surveys?: readonly Survey[]
  /** 90 % linear error, m. */
  readonly verticalErrorM: number
}

/** Builds the ground: adds relief and posting. Arrays are kept, not copied. RangeError when their lengths disagree with the shape. */
export function* buildGround(parts: GroundParts): Work<Ground> {
  const posts = parts.shape.width * parts.shape.height
  if (parts.heightM.length !== posts) throw new RangeError(`heightM has ${parts.heightM.length} posts, its shape ${posts}`)
  if (parts.code && parts.code.length !== posts) throw new RangeError(`code has ${parts.code.length} posts, its shape ${posts}`)
  if (parts.codes.length === 0 || parts.codes.length > 255) throw new RangeError(`1 to 255 ground codes, not ${parts.codes.length}`)
  const relief = yield* buildRelief(parts.shape, parts.heightM)
  return { ...parts, roads: parts.roads ?? [], surveys: parts.surveys ?? [], relief, postingM: postingM(parts.shape).meanM }
}

const positions = new WeakMap<GridShape, GridPosition>()
/** gridPosition of the ground's shape, made once. */
export function positionOf(g: Ground): GridPosition {
  let p = positions.get(g.shape)
  if (!p) positions.set(g.shape, (p = gridPosition(g.shape)))
  return p
}

/** Bilinear ground at a place, m MSL; NaN outside the terrain and beside a void. */
export function groundAt(g: Ground, lon: number, lat: number): number {
  const [col, row] = positionOf(g).toPixel(lon, lat)
  return bilinear({ width: g.shape.width, height: g.shape.height, samples: g.heightM }, col, row)
}
/** Ground height of a candidate, m MSL: the stated one, else bilinear; NaN where there is neither. */
export const siteGround = (g: Ground, site: Site): number => site.groundHeightM ?? groundAt(g, site.lon, site.lat)

/** Index into g.codes at a pixel position (nearest post); 255 outside the terrain and at a void. */
export function codeAt(g: Ground, col: number, row: number): number {
  const c = Math.round(col)
  const r = Math.round(row)
  if (!(c >= 0 && r >= 0 && c < g.shape.width && r < g.shape.height)) return 255
  const at = r * g.shape.width + c
  return Number.isNaN(g.heightM[at]) ? 255 : g.code ? g.code[at] : 0
}
