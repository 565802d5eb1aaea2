import {
  type Earth,
  type GridPosition,
  type GridShape,
  type Ground,
  geodesicInverse,
  geodesicLine,
  gridPosition,
  isUnknown,
  type LonLat,
  postingM,
  type Site,
  sweepRays,
  type Work,
} from '../../../core/index.ts'

/** What one mast height sees, cell by cell of a lattice. */
export interface SightRaster {
  /** Per cent of the cell's known ground in sight, 0 and 100 only where exact; 255 no data. */
  readonly inSightPct: Uint8Array
  /** Coverage floor at the sample nearest the cell's centre, m MSL; NaN no data. */
  readonly floorM: Float32Array
}
export const NO_PERCENT = 255

/** Rays halve in number each time the range halves, this many times. */
const HALVINGS = 10
/** Rays evaluated together. */
const BATCH = 256
/** Control points of a ray: straight in pixels between them to a tenth of a pixel. */
const CONTROL_M = 2000

/**
 * Sight over a lattice, by rays laid closer than half a cell everywhere: every ray is cut into pieces of half a cell, the share in sight of each piece is
 * exact (from the crossings), and a cell takes the mean of the pieces whose centres lie in it. So a cell far out, narrower than the azimuth step of the
 * polar grid, is still seen for itself.
 */
export function* sightRaster(g: Ground, site: Site, heightM: number, earth: Earth, maxRangeM: number, shape: GridShape): Work<SightRaster> {
  const { colM, rowM } = postingM(shape)
  const pieceM = Math.min(colM, rowM) / 2
  const position = gridPosition(shape)
  const reachM = Math.min(maxRangeM, farthestM(shape, position, site))
  const pieces = Math.max(1, Math.ceil(reachM / pieceM - 1e-9))
  const unit = 2 ** HALVINGS
  const rays = unit * Math.max(1, Math.ceil((2 * Math.PI * reachM) / pieceM / unit))
  const cells = shape.width * shape.height
  const sum = new Uint32Array(cells)
  const count = new Uint16Array(cells)
  const floorM = new Float32Array(cells).fill(Number.NaN)
  const offCentre = new Uint8Array(cells).fill(255)
  // Rays by level: level 0 are the odd ones and serve the outer half, level 1 every second odd one and the outer three quarters, …
  let done = 0
  for (let level = 0; level <= HALVINGS; level++) {
    const first = level === HALVINGS ? 0 : 2 ** level
    const step = level === HALVINGS ? unit : 2 ** (level + 1)
    const nearest = level === HALVINGS ? 0 : Math.floor(pieces / 2 ** (level + 1))
    const centres = Array.from({ length: pieces - nearest }, (_, k) => (nearest + k + 0.5) * pieceM)
    const total = level === HALVINGS ? rays / unit : rays / step
    for (let at = 0; at < total; at += BATCH) {
      const azimuths = Array.from({ length: Math.min(BATCH, total - at) }, (_, k) => ((first + (at + k) * step) * 360) / rays)
      const swept = sweepRays(g, site, heightM, earth, azimuths, centres, pieceM)
      azimuths.forEach((azimuthDeg, i) => {
        layRay(position, site, azimuthDeg, centres, (k, col, row) => {
          const c = Math.round(col)
          const r = Math.round(row)
          if (c < 0 || r < 0 || c >= shape.width || r >= shape.height) return
          const from = i * centres.length + k
          if (isUnknown(swept.state[from] as number)) return
          const to = r * shape.width + c
          if (count[to] === 65535) return
          sum[to] = (sum[to] as number) + (swept.inSight[from] as number)
          count[to] = (count[to] as number) + 1
          const off = Math.min(254, Math.round(360 * ((col - c) ** 2 + (row - r) ** 2)))
          if (off >= (offCentre[to] as number)) return
          offCentre[to] = off
          floorM[to] = swept.floorM[from] as number
        })
      })
      done += azimuths.length
      yield { done, total: rays }
    }
  }
  const inSightPct = new Uint8Array(cells)
  for (let n = 0; n < cells; n++) inSightPct[n] = percent(sum[n] as number, count[n] as number)
  return { inSightPct, floorM }
}

/** Mean of 16-bit shares as whole per cent; 0 and 100 only where exact. */
function percent(sum: number, count: number): number {
  if (count === 0) return NO_PERCENT
  if (sum === 0) return 0
  const pct = (100 * sum) / (65535 * count)
  return pct >= 100 ? 100 : Math.min(99, Math.max(1, Math.round(pct)))
}

/** Range of the farthest corner, m, and a cell more. */
function farthestM(shape: GridShape, position: GridPosition, site: LonLat): number {
  const line = (col: number, row: number): number => {
    const [lon, lat] = position.toLonLat(col, row)
    return geodesicInverse(site, { lon, lat }).distanceM
  }
  const right = shape.width - 0.5
  const low = shape.height - 0.5
  return Math.max(line(-0.5, -0.5), line(right, -0.5), line(-0.5, low), line(right, low))
}

/** Pixel positions along a geodesic at ascending ranges. */
function layRay(
  position: GridPosition,
  site: LonLat,
  azimuthDeg: number,
  rangesM: readonly number[],
  visit: (k: number, col: number, row: number) => void,
): void {
  const line = geodesicLine(site, azimuthDeg)
  const pixel = (rangeM: number): [number, number] => {
    const { lon, lat } = line.at(rangeM)
    return position.toPixel(lon, lat)
  }
  let from = 0
  let [c0, r0] = pixel(0)
  let to = 0
  let [c1, r1] = [c0, r0]
  rangesM.forEach((rangeM, k) => {
    if (rangeM > to) {
      from = Math.floor(rangeM / CONTROL_M) * CONTROL_M
      ;[c0, r0] = from === to ? [c1, r1] : pixel(from)
      to = from + CONTROL_M
      ;[c1, r1] = pixel(to)
    }
    const t = (rangeM - from) / CONTROL_M
    visit(k, c0 + t * (c1 - c0), r0 + t * (r1 - r0))
  })
}
