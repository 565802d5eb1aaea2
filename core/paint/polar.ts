import { geodesicInverse, type LonLat } from '../geodesy/index.ts'
import { CELL, type PolarShape } from '../polar/index.ts'
import { RAD_PER_DEG } from '../units/index.ts'
import { classMarkAt, classMarkColour } from './classPatterns.ts'
import { controlGrid, tileSidePx } from './controlGrid.ts'
import { PATTERN_PX, statePatterns } from './hatch.ts'
import { groundPerPx } from './mercator.ts'
import type { PolarPaint, Ramp, View } from './types.ts'

/** A cell larger than this on the screen is interpolated (smooth layers only), px. */
const SMOOTH_FROM_PX = 3
const TWO_PI = 2 * Math.PI
/** Azimuth and range are reckoned once per so many pixels, linear between. */
export const LEAP_PX = 8

/** Where the pixels of a row lie in a polar grid. */
export interface Located {
  readonly grid: PolarShape
  readonly maxRangeM: number
  /** Per pixel of a tile's row: range in cells (-1 = out of range) and azimuth in cells, whole = a cell's border. */
  readonly rangeAt: Float64Array
  readonly azimuthAt: Float64Array
}
/** What the inner loops read, settled once per painting. */
interface Brush extends Located {
  readonly values: Float32Array
  readonly state: Uint8Array
  readonly out: Uint32Array
  readonly low: number
  readonly scale: number
  readonly holdBelow: boolean
  /** 256 colours, then 256 for each state with marks: a value's colour under the mark. */
  readonly colours: Uint32Array
  /** Per state × pattern place: colour on bare ground. */
  readonly bare: Uint32Array
  /** Per state × pattern place: offset into `colours`, 0 where no mark lies. */
  readonly marked: Uint16Array
  /** Per class × pattern place: offset into `colours` of what lies under the class's own mark; null = plain colours. */
  readonly classMarks: Uint16Array | null
}

/**
 * Paints values of a polar grid over a view as straight (not premultiplied) RGBA, 0 where nothing is to be seen.
 * NaN is bare ground; a state's pattern is drawn over bare ground and over colours alike. Nothing outside the grid's range is touched but cleared.
 * Azimuth and range of a pixel come from exact geodesics at tile corners, bilinear between: within 1/8 cell or 1/20 px.
 * `values` and `state`: index i * ranges + j. `out`: width × height of the view.
 */
export function paintPolar(
  grid: PolarShape,
  site: LonLat,
  values: Float32Array,
  state: Uint8Array,
  ramp: Ramp,
  view: View,
  out: Uint32Array,
  how: PolarPaint = {},
): void {
  out.fill(0, 0, view.width * view.height)
  const pxM = groundPerPx(view)
  const side = tileSidePx(pxM, site.lat, Math.max(grid.rangeStepM / 8, pxM / 20))
  const plane = controlGrid(view, side, (lon, lat, to) => {
    const { azimuthDeg, distanceM } = geodesicInverse(site, { lon, lat })
    to[0] = distanceM * Math.sin(azimuthDeg * RAD_PER_DEG)
    to[1] = distanceM * Math.cos(azimuthDeg * RAD_PER_DEG)
  })
  const brush = makeBrush(grid, values, state, ramp, view, out, how)
  const stepAzRad = grid.azimuthStepDeg * RAD_PER_DEG
  const smoothRanges = how.smooth === true && grid.rangeStepM > SMOOTH_FROM_PX * pxM
  const smoothFromM = how.smooth ? (SMOOTH_FROM_PX * pxM) / stepAzRad : Number.POSITIVE_INFINITY
  // Linear over a leap of pixels is wrong by leap²/8r² rad: exact pixel by pixel where that is more than an eighth of a cell.
  const exactWithinM = LEAP_PX * pxM * Math.sqrt(1 / stepAzRad)
  const { a, b, columns, rows } = plane
  // Hatch is fixed to the world: the pattern's phase is the world's own pixel number.
  const phaseX = Math.round(view.worldX / view.worldPerPx) & (PATTERN_PX - 1)
  const phaseY = Math.round(-view.worldY / view.worldPerPx) & (PATTERN_PX - 1)
  for (let tj = 0; tj < rows; tj++)
    for (let ti = 0; ti < columns; ti++) {
      const n = tj * (columns + 1) + ti
      const s = n + columns + 1
      const near = nearestM(a[n]!, b[n]!, a[n + 1]!, b[n + 1]!, a[s]!, b[s]!, a[s + 1]!, b[s + 1]!)
      if (near > brush.maxRangeM) continue
      const reach = Math.hypot(a[n]!, b[n]!) + Math.hypot(a[s + 1]! - a[n]!, b[s + 1]! - b[n]!)
      const smooth = smoothRanges || reach > smoothFromM
      const x0 = ti * side
      const y0 = tj * side
      const x1 = Math.min(view.width, x0 + side)
      const y1 = Math.min(view.height, y0 + side)
      for (let py = y0; py < y1; py++) {
        const f = (py + 0.5 - y0) / side
        const ea = a[n]! + f * (a[s]! - a[n]!)
        const na = b[n]! + f * (b[s]! - b[n]!)
        const de = (a[n + 1]! + f * (a[s + 1]! - a[n + 1]!) - ea) / side
        const dn = (b[n + 1]! + f * (b[s + 1]! - b[n + 1]!) - na) / side
        const count = x1 - x0
        if (!locate(brush, ea + de / 2, na + dn / 2, de, dn, count, exactWithinM)) continue
        const at = py * view.width + x0
        const row = ((py + phaseY) & (PATTERN_PX - 1)) * PATTERN_PX
        if (brush.classMarks) spanClasses(brush, brush.classMarks, at, count, row, x0 + phaseX)
        else if (smooth) spanSmooth(brush, at, count, row, x0 + phaseX, smoothRanges, smoothFromM / grid.rangeStepM)
        else spanNearest(brush, at, count, row, x0 + phaseX)
      }
    }
}

/** Lower bound of the distance from the origin to a quadrilateral given by its corners (0 when it may hold the origin). */
function nearestM(x0: number, y0: number, x1: number, y1: number, x2: number, y2: number, x3: number, y3: number): number {
  const dx = Math.max(0, Math.min(x0, x1, x2, x3), -Math.max(x0, x1, x2, x3))
  const dy = Math.max(0, Math.min(y0, y1, y2, y3), -Math.max(y0, y1, y2, y3))
  return Math.hypot(dx, dy)
}

function makeBrush(
  grid: PolarShape,
  values: Float32Array,
  state: Uint8Array,
  ramp: Ramp,
  view: View,
  out: Uint32Array,
  how: PolarPaint,
): Brush {
  const patterns = statePatterns(view.night)
  const alpha = Math.round(255 * Math.min(1, Math.max(0, how.opacity ?? 0.86)))
  const source = (view.night && ramp.rgbaNight) || ramp.rgba
  const states = 8
  const colours = new Uint32Array(256 * (states + 2))
  for (let n = 0; n < 256; n++) colours[n] = ((source[n]! & 0xffffff) | (alpha << 24)) >>> 0
  const bare = new Uint32Array(states * PATTERN_PX * PATTERN_PX)
  const marked = new Uint16Array(bare.length)
  for (const [st, p] of patterns) {
    const unknown = st === CELL.beyondVoid || st === CELL.outside
    if (!unknown && how.hatchMasked === false) continue
    bare.set(p.bare, st * p.bare.length)
    for (let n = 0; n < p.mark.length; n++) marked[st * p.mark.length + n] = p.mark[n]! > 0.1 ? 256 * (st + 1) : 0
    // A mark over a colour darkens it on paper and lightens it at night, by a third.
    const to = view.night ? 255 : 0
    const mix = (c: number) => Math.round(c + (to - c) * 0.34)
    for (let n = 0; n < 256; n++) {
      const c = source[n]!
      colours[256 * (st + 1) + n] = ((alpha << 24) | (mix((c >>> 16) & 255) << 16) | (mix((c >>> 8) & 255) << 8) | mix(c & 255)) >>> 0
    }
  }
  const classMarks = how.patterns ? new Uint16Array((how.patterns.length + 1) * PATTERN_PX * PATTERN_PX) : null
  if (classMarks && how.patterns) {
    const under = 256 * (states + 1)
    how.patterns.forEach((name, n) => {
      for (let y = 0; y < PATTERN_PX; y++)
        for (let x = 0; x < PATTERN_PX; x++) if (classMarkAt(name, x, y)) classMarks[((n + 1) * PATTERN_PX + y) * PATTERN_PX + x] = under
    })
    for (let n = 0; n < 256; n++) {
      const c = source[n]!
      const [r, g, b] = classMarkColour(c & 255, (c >>> 8) & 255, (c >>> 16) & 255)
      colours[under + n] = ((alpha << 24) | (b << 16) | (g << 8) | r) >>> 0
    }
  }
  return {
    grid,
    values,
    state,
    out,
    classMarks,
    low: ramp.low,
    scale: 255 / (ramp.high - ramp.low),
    holdBelow: ramp.below === 'hold',
    colours,
    bare,
    marked,
    maxRangeM: grid.ranges * grid.rangeStepM,
    rangeAt: new Float64Array(128),
    azimuthAt: new Float64Array(128),
  }
}

/** arctangent of 0..1, within 1e-5 rad (minimax polynomial in t²). */
const atanOfUnit = (t: number): number => {
  const q = t * t
  return t * (0.99997726 + q * (-0.33262347 + q * (0.19354346 + q * (-0.11643287 + q * (0.05265332 - q * 0.0117212)))))
}
/** Azimuth of (east, north), 0..2π clockwise from north. */
const azimuthRad = (east: number, north: number): number => {
  const e = Math.abs(east)
  const n = Math.abs(north)
  let az = e <= n ? atanOfUnit(e / (n + 1e-30)) : Math.PI / 2 - atanOfUnit(n / e)
  if (north < 0) az = Math.PI - az
  return east < 0 ? TWO_PI - az : az
}

/** Range and azimuth, in cells, of `count` pixels in a row from (east, north) m in steps of (de, dn). False when none is in range. */
export function locate(k: Located, east: number, north: number, de: number, dn: number, count: number, exactWithinM: number): boolean {
  const { rangeAt, azimuthAt, maxRangeM } = k
  const { azimuths } = k.grid
  const perStep = 1 / k.grid.rangeStepM
  const perAz = 1 / (k.grid.azimuthStepDeg * RAD_PER_DEG)
  const ranges = k.grid.ranges
  let any = false
  let r0 = Math.hypot(east, north)
  let az0 = azimuthRad(east, north) * perAz
  for (let n = 0; n < count; n += LEAP_PX) {
    const e1 = east + de * LEAP_PX
    const n1 = north + dn * LEAP_PX
    const r1 = Math.hypot(e1, n1)
    const az1 = azimuthRad(e1, n1) * perAz
    const end = Math.min(count, n + LEAP_PX)
    if (Math.min(r0, r1) > maxRangeM + Math.abs(r1 - r0)) rangeAt.fill(-1, n, end)
    else if (Math.min(r0, r1) > exactWithinM) {
      let turn = az1 - az0
      if (turn > azimuths / 2) turn -= azimuths
      else if (turn < -azimuths / 2) turn += azimuths
      const dAz = turn / LEAP_PX
      const dR = ((r1 - r0) * perStep) / LEAP_PX
      let r = r0 * perStep
      let az = az0 + 0.5
      for (let m = n; m < end; m++, r += dR, az += dAz) {
        rangeAt[m] = r < ranges ? r : -1
        azimuthAt[m] = az >= azimuths ? az - azimuths : az < 0 ? az + azimuths : az
      }
      any = true
    } else {
      for (let m = n, e = east, t = north; m < end; m++, e += de, t += dn) {
        const r = Math.sqrt(e * e + t * t) * perStep
        const az = azimuthRad(e, t) * perAz + 0.5
        rangeAt[m] = r < ranges ? r : -1
        azimuthAt[m] = az >= azimuths ? az - azimuths : az
      }
      any = true
    }
    east = e1
    north = n1
    r0 = r1
    az0 = az1
  }
  return any
}

function spanNearest(k: Brush, at: number, count: number, patternRow: number, patternX: number): void {
  const { values, state, out, low, scale, holdBelow, colours, marked, bare, rangeAt, azimuthAt } = k
  const { ranges } = k.grid
  for (let n = 0; n < count; n++, at++, patternX++) {
    const r = rangeAt[n]!
    if (r < 0) continue
    const cell = (azimuthAt[n]! | 0) * ranges + (r | 0)
    const v = values[cell]!
    const place = ((state[cell]! & 7) << 6) | patternRow | (patternX & 7)
    if (v >= low || (holdBelow && v < low)) {
      const c = (v - low) * scale
      out[at] = colours[(c >= 255 ? 255 : c <= 0 ? 0 : c | 0) + marked[place]!]!
    } else out[at] = bare[place]!
  }
}

/** As spanNearest for classes with patterns: a cell without a class shows its state. */
function spanClasses(k: Brush, marks: Uint16Array, at: number, count: number, patternRow: number, patternX: number): void {
  const { values, state, out, low, scale, colours, bare, rangeAt, azimuthAt } = k
  const { ranges } = k.grid
  for (let n = 0; n < count; n++, at++, patternX++) {
    const r = rangeAt[n]!
    if (r < 0) continue
    const cell = (azimuthAt[n]! | 0) * ranges + (r | 0)
    const v = values[cell]!
    const place = patternRow | (patternX & 7)
    if (v >= low) out[at] = colours[Math.min(255, ((v - low) * scale) | 0) + marks[((v | 0) << 6) | place]!]!
    else out[at] = bare[((state[cell]! & 7) << 6) | place]!
  }
}

/** As spanNearest, with values interpolated along range and, from a range on, across azimuth. The cell a pixel lies in decides whether it is bare, and its state. */
function spanSmooth(
  k: Brush,
  at: number,
  count: number,
  patternRow: number,
  patternX: number,
  alongRange: boolean,
  acrossFrom: number,
): void {
  const { values, state, out, low, scale, holdBelow, colours, marked, bare, rangeAt, azimuthAt } = k
  const { azimuths, ranges } = k.grid
  for (let n = 0; n < count; n++, at++, patternX++) {
    const r = rangeAt[n]!
    if (r < 0) continue
    const i = azimuthAt[n]! | 0
    const j = r | 0
    const cell = i * ranges + j
    let v = values[cell]!
    const place = ((state[cell]! & 7) << 6) | patternRow | (patternX & 7)
    const across = r > acrossFrom
    if ((alongRange || across) && !Number.isNaN(v)) {
      const fj = r - j - 0.5
      const fi = azimuthAt[n]! - i - 0.5
      const wj = alongRange ? Math.abs(fj) : 0
      const wi = across ? Math.abs(fi) : 0
      const dj = fj < 0 ? (j > 0 ? -1 : 0) : j + 1 < ranges ? 1 : 0
      const beside = fi < 0 ? (i > 0 ? cell - ranges : cell + (azimuths - 1) * ranges) : i + 1 < azimuths ? cell + ranges : j
      const c = values[cell + dj]!
      const d = values[beside]!
      const e = values[beside + dj]!
      if (!Number.isNaN(c + d + e)) v = ((1 - wi) * v + wi * d) * (1 - wj) + ((1 - wi) * c + wi * e) * wj
      else v = mean4(v, c, d, e, wi, wj)
    }
    if (v >= low || (holdBelow && v < low)) {
      const m = (v - low) * scale
      out[at] = colours[(m >= 255 ? 255 : m <= 0 ? 0 : m | 0) + marked[place]!]!
    } else out[at] = bare[place]!
  }
}

/** Bilinear mean over those of the neighbours c (along range), d (across), e (both) that are valid. */
function mean4(v: number, c: number, d: number, e: number, wi: number, wj: number): number {
  const wc = Number.isNaN(c) ? 0 : (1 - wi) * wj
  const wd = Number.isNaN(d) ? 0 : wi * (1 - wj)
  const we = Number.isNaN(e) ? 0 : wi * wj
  const wv = (1 - wi) * (1 - wj)
  let sum = wv * v
  if (wc > 0) sum += wc * c
  if (wd > 0) sum += wd * d
  if (we > 0) sum += we * e
  return sum / (wv + wc + wd + we)
}
