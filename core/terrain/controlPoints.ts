import { geodesicInverse, geodesicLine, type LonLat } from '../geodesy/index.ts'
import type { GridPosition, GridShape } from '../raster/index.ts'

// Rays in pixels: the geodesic is followed exactly at control points every 1 km (500 m where posts are under 5 m) and is straight between them.

const SPACING_M = 1000
const FINE_SPACING_M = 500
const FINE_POSTING_M = 5
/** Agreement asked of the harmonic series with the direct problem, pixels. */
const SERIES_TOLERANCE_PX = 1e-5
const SERIES_NODES = [16, 32, 64]

/** Control points of one ray: pixel position at each distance. */
export interface ControlPoints {
  count: number
  readonly distM: Float64Array
  readonly col: Float64Array
  readonly row: Float64Array
}
export interface ControlSource {
  readonly points: ControlPoints
  /** How far rays are followed, m: maxRangeM, or a little past the terrain's farthest corner. */
  readonly reachM: number
  /** Puts the control points of one azimuth (degrees true) into `points`. */
  fill(azimuthDeg: number): void
}

/** Control points this little outside the outermost posts are put on them: a ray along the last line of posts, rounding, pixels. */
const EDGE_SLACK_PX = 0.02

/** Sets a control point; false when it lies outside the raster. */
export function setInside(points: ControlPoints, m: number, col: number, row: number, shape: GridShape): boolean {
  const c = Math.min(Math.max(col, 0), shape.width - 1)
  const r = Math.min(Math.max(row, 0), shape.height - 1)
  const inside = Math.abs(c - col) <= EDGE_SLACK_PX && Math.abs(r - row) <= EDGE_SLACK_PX
  points.col[m] = inside ? c : col
  points.row[m] = inside ? r : row
  return inside
}

/** Distance past which no ray from the site can still be over the raster, m. */
function farthestM(shape: GridShape, position: GridPosition, site: LonLat): number {
  let far = 0
  for (const fc of [0, 0.5, 1])
    for (const fr of [0, 0.5, 1]) {
      const [lon, lat] = position.toLonLat(fc * (shape.width - 1), fr * (shape.height - 1))
      if (!Number.isFinite(lon) || !Number.isFinite(lat)) return Number.POSITIVE_INFINITY
      far = Math.max(far, geodesicInverse(site, { lon, lat }).distanceM)
    }
  return far * 1.05 + 2 * SPACING_M
}

/**
 * Control points by the direct problem. `start` is the site's own pixel position, used for the first point. A ray's list ends with the first point that
 * lies outside the raster.
 */
export function directControl(
  shape: GridShape,
  position: GridPosition,
  site: LonLat,
  start: readonly [number, number],
  maxRangeM: number,
  postingM: number,
): ControlSource {
  const reachM = Math.min(maxRangeM, farthestM(shape, position, site))
  const spacingM = postingM < FINE_POSTING_M ? FINE_SPACING_M : SPACING_M
  const n = Math.max(1, Math.ceil(reachM / spacingM))
  const distM = Float64Array.from({ length: n + 1 }, (_, m) => Math.min(m * spacingM, reachM))
  const points: ControlPoints = { count: 0, distM, col: new Float64Array(n + 1), row: new Float64Array(n + 1) }
  points.col[0] = start[0]
  points.row[0] = start[1]
  const at = [0, 0]
  return {
    points,
    reachM,
    fill(azimuthDeg) {
      const line = geodesicLine(site, azimuthDeg)
      let m = 1
      for (; m <= n; m++) {
        line.into(distM[m], at)
        const [col, row] = position.toPixel(at[0], at[1])
        if (!setInside(points, m, col, row, shape)) {
          m++
          break
        }
      }
      points.count = m
    },
  }
}

/**
 * The same for a whole fan of rays: at each control distance the pixel position is a smooth periodic function of azimuth, so a short Fourier series through
 * a few exact azimuths gives it to 1e-5 pixel. Falls back on `direct` where it does not (a pole within reach, the edge of a projection).
 */
export function fanControl(shape: GridShape, position: GridPosition, site: LonLat, direct: ControlSource): ControlSource {
  for (const nodes of SERIES_NODES) {
    const series = fitSeries(position, site, direct, nodes)
    if (series && worstError(series, position, site, nodes) <= SERIES_TOLERANCE_PX) return seriesSource(shape, series)
  }
  return direct
}

interface Series {
  readonly reachM: number
  readonly distM: Float64Array
  readonly start: readonly [number, number]
  readonly harmonics: number
  /** Per control point: constant, then cosine and sine terms, of col then of row. */
  readonly terms: Float64Array
}

function fitSeries(position: GridPosition, site: LonLat, direct: ControlSource, nodes: number): Series | null {
  const n = direct.points.distM.length - 1
  const harmonics = nodes / 2 - 1
  const stride = 2 * (1 + 2 * harmonics)
  const { distM } = direct.points
  const terms = new Float64Array((n + 1) * stride)
  const half = stride / 2
  const at = [0, 0]
  for (let k = 0; k < nodes; k++) {
    const theta = (2 * Math.PI * k) / nodes
    const line = geodesicLine(site, (360 * k) / nodes)
    for (let m = 1; m <= n; m++) {
      line.into(distM[m], at)
      const [col, row] = position.toPixel(at[0], at[1])
      if (!Number.isFinite(col) || !Number.isFinite(row)) return null
      const base = m * stride
      terms[base] += col / nodes
      terms[base + half] += row / nodes
      for (let h = 1; h <= harmonics; h++) {
        const c = (2 * Math.cos(h * theta)) / nodes
        const s = (2 * Math.sin(h * theta)) / nodes
        terms[base + 2 * h - 1] += col * c
        terms[base + 2 * h] += col * s
        terms[base + half + 2 * h - 1] += row * c
        terms[base + half + 2 * h] += row * s
      }
    }
  }
  return { reachM: direct.reachM, distM, start: [direct.points.col[0], direct.points.row[0]], harmonics, terms }
}

/** Cosines and sines of the multiples of one azimuth. */
function multiples(azimuthDeg: number, harmonics: number, cos: Float64Array, sin: Float64Array): void {
  const a = (azimuthDeg * Math.PI) / 180
  for (let h = 1; h <= harmonics; h++) {
    cos[h] = Math.cos(h * a)
    sin[h] = Math.sin(h * a)
  }
}
function evaluate(terms: Float64Array, base: number, harmonics: number, cos: Float64Array, sin: Float64Array): number {
  let v = terms[base]
  for (let h = 1; h <= harmonics; h++) v += terms[base + 2 * h - 1] * cos[h] + terms[base + 2 * h] * sin[h]
  return v
}

/** Worst difference from the direct problem midway between the fitted azimuths, at the farthest and the middle distance, pixels. */
function worstError(s: Series, position: GridPosition, site: LonLat, nodes: number): number {
  const n = s.distM.length - 1
  const stride = s.terms.length / (n + 1)
  const cos = new Float64Array(s.harmonics + 1)
  const sin = new Float64Array(s.harmonics + 1)
  const at = [0, 0]
  let worst = 0
  for (let k = 0; k < nodes; k++) {
    const azimuthDeg = (360 * (k + 0.5)) / nodes
    multiples(azimuthDeg, s.harmonics, cos, sin)
    const line = geodesicLine(site, azimuthDeg)
    for (const m of [Math.max(1, n >> 1), n]) {
      line.into(s.distM[m], at)
      const [col, row] = position.toPixel(at[0], at[1])
      const dc = evaluate(s.terms, m * stride, s.harmonics, cos, sin) - col
      const dr = evaluate(s.terms, m * stride + stride / 2, s.harmonics, cos, sin) - row
      worst = Math.max(worst, Math.abs(dc), Math.abs(dr))
    }
  }
  return worst
}

function seriesSource(shape: GridShape, s: Series): ControlSource {
  const n = s.distM.length - 1
  const stride = s.terms.length / (n + 1)
  const points: ControlPoints = { count: 0, distM: s.distM, col: new Float64Array(n + 1), row: new Float64Array(n + 1) }
  points.col[0] = s.start[0]
  points.row[0] = s.start[1]
  const cos = new Float64Array(s.harmonics + 1)
  const sin = new Float64Array(s.harmonics + 1)
  return {
    points,
    reachM: s.reachM,
    fill(azimuthDeg) {
      multiples(azimuthDeg, s.harmonics, cos, sin)
      let m = 1
      for (; m <= n; m++) {
        const col = evaluate(s.terms, m * stride, s.harmonics, cos, sin)
        const row = evaluate(s.terms, m * stride + stride / 2, s.harmonics, cos, sin)
        if (!setInside(points, m, col, row, shape)) {
          m++
          break
        }
      }
      points.count = m
    },
  }
}
