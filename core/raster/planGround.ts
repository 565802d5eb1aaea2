import { InputError } from '../errors/index.ts'
import { geodesicDirect } from '../geodesy/index.ts'
import { subShape, type Window } from './lattice.ts'
import { gridPosition, postingM } from './position.ts'
import type { GridShape } from './types.ts'

/** Terrain is taken whole up to this many cells; above, only the window around the candidates. */
export const WHOLE_CELLS = 64e6
/** Most cells a window may have: 600 MB of heights. */
export const WINDOW_CELLS = 150e6
/** Terrain kept beyond every candidate's circle, m. */
const MARGIN_M = 20_000

export interface Circle {
  readonly lon: number
  readonly lat: number
  readonly radiusM: number
}

/**
 * The one grid all terrain is read into: CRS and posting of the finest file; the whole extent of all files up to 64 million cells, else the window
 * that holds every circle and 20 km more. Throws InputError when that is still too much, or when no circle meets the terrain.
 */
export function planGround(heads: readonly GridShape[], circles: readonly Circle[]): GridShape {
  const finest = heads.reduce((best, h) => (postingM(h).meanM < postingM(best).meanM * 0.999 ? h : best))
  const whole = heads.reduce<Box>((box, h) => (h === finest ? join(box, ownBox(h)) : join(box, boxOf(finest, edgeOf(h)))), NOWHERE)
  const wholeWindow = windowOf(whole)
  if (wholeWindow.width * wholeWindow.height <= WHOLE_CELLS) return subShape(finest, wholeWindow)
  const size = `${Math.round((wholeWindow.width * wholeWindow.height) / 1e6)} million cells`
  if (circles.length === 0)
    throw new InputError({
      code: 'terrain-too-large',
      found: `the terrain has ${size}, more than the 64 million that are read whole`,
      remedy: 'place a candidate first, or cut the raster to the area of interest',
    })
  const wanted = circles.reduce<Box>((box, c) => join(box, boxOf(finest, rim(c))), NOWHERE)
  const window = windowOf(meet(wanted, whole))
  if (window.width <= 0 || window.height <= 0)
    throw new InputError({ code: 'off-terrain', found: 'no candidate lies on the terrain', remedy: 'check positions and rasters' })
  if (window.width * window.height > WINDOW_CELLS)
    throw new InputError({
      code: 'terrain-too-large',
      found: `the candidates' circles and 20 km more need ${Math.round((window.width * window.height) / 1e6)} million of ${size}`,
      remedy: 'shorten run.maxRangeM, split the study, or give a coarser raster (150 million cells at most)',
    })
  return subShape(finest, window)
}

interface Box {
  readonly left: number
  readonly top: number
  readonly right: number
  readonly bottom: number
}
const NOWHERE: Box = { left: Infinity, top: Infinity, right: -Infinity, bottom: -Infinity }
const join = (a: Box, b: Box): Box => ({
  left: Math.min(a.left, b.left),
  top: Math.min(a.top, b.top),
  right: Math.max(a.right, b.right),
  bottom: Math.max(a.bottom, b.bottom),
})
const meet = (a: Box, b: Box): Box => ({
  left: Math.max(a.left, b.left),
  top: Math.max(a.top, b.top),
  right: Math.min(a.right, b.right),
  bottom: Math.min(a.bottom, b.bottom),
})
const ownBox = (s: GridShape): Box => ({ left: 0, top: 0, right: s.width - 1, bottom: s.height - 1 })
/** Whole pixels around a box of pixel centres; a hundredth of a pixel over is rounding. */
const windowOf = (b: Box): Window => {
  const col = Math.floor(b.left + 0.01)
  const row = Math.floor(b.top + 0.01)
  return { col, row, width: Math.ceil(b.right - 0.01) - col + 1, height: Math.ceil(b.bottom - 0.01) - row + 1 }
}

function boxOf(grid: GridShape, places: Iterable<readonly [number, number]>): Box {
  const p = gridPosition(grid)
  let box = NOWHERE
  for (const [lon, lat] of places) {
    const [col, row] = p.toPixel(lon, lat)
    if (Number.isFinite(col) && Number.isFinite(row)) box = join(box, { left: col, top: row, right: col, bottom: row })
  }
  return box
}
/** Places along the outermost pixel centres of a raster. */
function* edgeOf(shape: GridShape): Iterable<[number, number]> {
  const p = gridPosition(shape)
  const STEPS = 32
  for (let i = 0; i <= STEPS; i++) {
    const col = ((shape.width - 1) * i) / STEPS
    const row = ((shape.height - 1) * i) / STEPS
    yield p.toLonLat(col, 0)
    yield p.toLonLat(col, shape.height - 1)
    yield p.toLonLat(0, row)
    yield p.toLonLat(shape.width - 1, row)
  }
}
/** Places around a circle and its margin. */
function* rim(c: Circle): Iterable<[number, number]> {
  for (let azimuth = 0; azimuth < 360; azimuth += 5) {
    const at = geodesicDirect(c, azimuth, c.radiusM + MARGIN_M)
    yield [at.lon, at.lat]
  }
}
