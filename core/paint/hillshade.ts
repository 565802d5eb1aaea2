import { gridPosition, type RasterGrid } from '../raster/index.ts'
import { controlGrid, tileSidePx } from './controlGrid.ts'
import { groundPerPx, latFromWorldY } from './mercator.ts'
import type { View, WaterCodes } from './types.ts'

/** A part of the raster thinned to about one post per pixel, shaded. */
interface Shaded {
  readonly col0: number
  readonly row0: number
  readonly stride: number
  readonly columns: number
  readonly rows: number
  /** 0 = void, 1..255 = light. */
  readonly tone: Uint8Array
  /** 0 = land, 255 = water. */
  readonly water: Uint8Array
}
/** d(col, row) per metre east and north on the ground, at the view's middle. */
interface Jacobian {
  readonly colE: number
  readonly rowE: number
  readonly colN: number
  readonly rowN: number
}

/**
 * Paints the ground as shaded relief in the greys of paper (or of night), as opaque RGBA; voids and everything outside the raster stay 0 (transparent).
 * Slope from the raster's own posts, turned to true east and north, lit from the north-west; gentle ground is drawn steeper the further the view is zoomed out.
 * Water is where `water` says so; without it, where the ground is level at exactly 0 m.
 * Rasters finer than the view are thinned on a lattice that does not move with the view.
 */
export function paintHillshade(g: RasterGrid, view: View, out: Uint32Array, water: WaterCodes | null = null): void {
  out.fill(0, 0, view.width * view.height)
  const pxM = groundPerPx(view)
  const midLat = latFromWorldY(view.worldY - (view.height / 2) * view.worldPerPx)
  const at = gridPosition(g)
  const side = tileSidePx(pxM, midLat, pxM / 8)
  const nodes = controlGrid(view, side, (lon, lat, to) => {
    const [col, row] = at.toPixel(lon, lat)
    to[0] = Number.isFinite(col) ? col : -1e9
    to[1] = Number.isFinite(row) ? row : -1e9
  })
  const jacobian = jacobianOf(nodes, pxM)
  const shaded = shade(g, nodes, jacobian, pxM, water)
  if (!shaded) return
  const land = tones(view.night ? NIGHT_TONES : DAY_TONES)
  const sea = tones(view.night ? NIGHT_WATER : DAY_WATER)
  const { a, b, columns, rows } = nodes
  const { stride } = shaded
  const last = columns + 1
  for (let tj = 0; tj < rows; tj++)
    for (let ti = 0; ti < columns; ti++) {
      const n = tj * last + ti
      const s = n + last
      const x0 = ti * side
      const y0 = tj * side
      const y1 = Math.min(view.height, y0 + side)
      const x1 = Math.min(view.width, x0 + side)
      for (let py = y0; py < y1; py++) {
        const f = (py + 0.5 - y0) / side
        const ca = a[n]! + f * (a[s]! - a[n]!)
        const ra = b[n]! + f * (b[s]! - b[n]!)
        const dc = (a[n + 1]! + f * (a[s + 1]! - a[n + 1]!) - ca) / side / stride
        const dr = (b[n + 1]! + f * (b[s + 1]! - b[n + 1]!) - ra) / side / stride
        const c = (ca - shaded.col0) / stride + dc / 2
        const r = (ra - shaded.row0) / stride + dr / 2
        span(shaded, land, sea, c, r, dc, dr, out, py * view.width + x0, py * view.width + x1)
      }
    }
}

function span(
  k: Shaded,
  land: Uint32Array,
  sea: Uint32Array,
  col: number,
  row: number,
  dc: number,
  dr: number,
  out: Uint32Array,
  from: number,
  to: number,
): void {
  const { columns, rows, tone, water } = k
  const maxC = columns - 1
  const maxR = rows - 1
  for (let at = from; at < to; at++, col += dc, row += dr) {
    // half a post beyond the outermost centres still belongs to the raster
    if (col < -0.5 || row < -0.5 || col > maxC + 0.5 || row > maxR + 0.5) continue
    const c = Math.max(0, Math.min(maxC, col))
    const r = Math.max(0, Math.min(maxR, row))
    const i = c | 0
    const j = r | 0
    const u = c - i
    const v = r - j
    const n = j * columns + i
    const e = i < maxC ? 1 : 0
    const s = j < maxR ? columns : 0
    const p = tone[n]!
    const q = tone[n + e]!
    const t = tone[n + s]!
    const w = tone[n + s + e]!
    if (p !== 0 && q !== 0 && t !== 0 && w !== 0) {
      const light = (p + u * (q - p)) * (1 - v) + (t + u * (w - t)) * v
      const wet = water[n]! + water[n + e]! + water[n + s]! + water[n + s + e]!
      if (wet === 0) out[at] = land[(light + 0.5) | 0]!
      else if (wet === 1020) out[at] = sea[(light + 0.5) | 0]!
      else {
        const share = (water[n]! * (1 - u) + water[n + e]! * u) * (1 - v) + (water[n + s]! * (1 - u) + water[n + s + e]! * u) * v
        out[at] = (share > 127 ? sea : land)[(light + 0.5) | 0]!
      }
    } else {
      const near = n + (u >= 0.5 ? e : 0) + (v >= 0.5 ? s : 0)
      if (tone[near] !== 0) out[at] = (water[near] ? sea : land)[tone[near]!]!
    }
  }
}

function jacobianOf(nodes: { columns: number; rows: number; stepPx: number; a: Float64Array; b: Float64Array }, pxM: number): Jacobian {
  const i = Math.max(0, (nodes.columns >> 1) - 1)
  const j = Math.max(0, (nodes.rows >> 1) - 1)
  const n = j * (nodes.columns + 1) + i
  const s = n + nodes.columns + 1
  const perM = 1 / (nodes.stepPx * pxM)
  return {
    colE: (nodes.a[n + 1]! - nodes.a[n]!) * perM,
    rowE: (nodes.b[n + 1]! - nodes.b[n]!) * perM,
    colN: -(nodes.a[s]! - nodes.a[n]!) * perM,
    rowN: -(nodes.b[s]! - nodes.b[n]!) * perM,
  }
}

function shade(
  g: RasterGrid,
  nodes: { a: Float64Array; b: Float64Array },
  J: Jacobian,
  pxM: number,
  waterCodes: WaterCodes | null,
): Shaded | null {
  let c0 = Number.POSITIVE_INFINITY
  let c1 = Number.NEGATIVE_INFINITY
  let r0 = Number.POSITIVE_INFINITY
  let r1 = Number.NEGATIVE_INFINITY
  for (let n = 0; n < nodes.a.length; n++) {
    c0 = Math.min(c0, nodes.a[n]!)
    c1 = Math.max(c1, nodes.a[n]!)
    r0 = Math.min(r0, nodes.b[n]!)
    r1 = Math.max(r1, nodes.b[n]!)
  }
  const perM2 = Math.abs(J.colE * J.rowN - J.colN * J.rowE)
  const stride = Math.max(1, Math.round(Math.sqrt(perM2) * pxM))
  const firstC = Math.max(0, (Math.floor(c0 / stride) - 1) * stride)
  const firstR = Math.max(0, (Math.floor(r0 / stride) - 1) * stride)
  const columns = Math.min(Math.floor((g.width - 1 - firstC) / stride), Math.ceil((c1 - firstC) / stride) + 1) + 1
  const rows = Math.min(Math.floor((g.height - 1 - firstR) / stride), Math.ceil((r1 - firstR) / stride) + 1) + 1
  if (!(columns > 0 && rows > 0)) return null
  const heights = thin(g.samples, g.width, firstC, firstR, stride, columns, rows)
  const tone = new Uint8Array(columns * rows)
  const water = new Uint8Array(columns * rows)
  // Relief looks flatter the coarser the picture: lift it gently with the size of what one pixel shows.
  const exaggeration = Math.min(8, Math.max(1, 1.1 * (Math.max(pxM, 1 / Math.sqrt(perM2)) / 20) ** 0.45))
  const det = J.colE * J.rowN - J.colN * J.rowE
  const unit = exaggeration / stride
  // d height / d east = d height / d col * colE + d height / d row * rowE, per ground metre
  const gCE = J.colE * unit
  const gRE = J.rowE * unit
  const gCN = J.colN * unit
  const gRN = J.rowN * unit
  for (let j = 0; j < rows; j++) {
    const up = j > 0 ? -columns : 0
    const down = j + 1 < rows ? columns : 0
    for (let i = 0; i < columns; i++) {
      const n = j * columns + i
      const z = heights[n]!
      if (Number.isNaN(z)) continue
      const left = i > 0 ? -1 : 0
      const right = i + 1 < columns ? 1 : 0
      const zl = heights[n + left]!
      const zr = heights[n + right]!
      const zu = heights[n + up]!
      const zd = heights[n + down]!
      const dc = difference(zl, z, zr, left !== 0 && right !== 0 ? 0.5 : 1)
      const dr = difference(zu, z, zd, up !== 0 && down !== 0 ? 0.5 : 1)
      const p = dc * gCE + dr * gRE
      const q = dc * gCN + dr * gRN
      const light = (0.5 * p - 0.5 * q + Math.SQRT1_2) / Math.sqrt(1 + p * p + q * q)
      tone[n] = light <= 0 ? 1 : 1 + ((light * 254) | 0)
      if (waterCodes === null) {
        if (z === 0 && zl === 0 && zr === 0 && zu === 0 && zd === 0) water[n] = 255
      } else if (waterCodes.isWater[waterCodes.code[(firstR + j * stride) * g.width + firstC + i * stride]!]) water[n] = 255
    }
  }
  return det === 0 ? null : { col0: firstC, row0: firstR, stride, columns, rows, tone, water }
}

/** Central difference per post, one-sided beside a void; `perTwo` = 0.5 where both neighbours are there. */
function difference(before: number, here: number, after: number, perTwo: number): number {
  if (Number.isNaN(before)) return Number.isNaN(after) ? 0 : after - here
  return Number.isNaN(after) ? here - before : (after - before) * perTwo
}

/** Every stride-th post, from (firstC, firstR). */
function thin(z: Float32Array, width: number, firstC: number, firstR: number, stride: number, columns: number, rows: number): Float32Array {
  const out = new Float32Array(columns * rows)
  for (let j = 0, n = 0; j < rows; j++) {
    let at = (firstR + j * stride) * width + firstC
    for (let i = 0; i < columns; i++, n++, at += stride) out[n] = z[at]!
  }
  return out
}

type Tone = readonly [light: number, r: number, g: number, b: number]
/** Light 0.71 is level ground. */
const DAY_TONES: readonly Tone[] = [
  [0, 128, 126, 119],
  [0.45, 190, 186, 176],
  [0.71, 232, 227, 216],
  [1, 252, 249, 243],
]
const NIGHT_TONES: readonly Tone[] = [
  [0, 10, 12, 14],
  [0.45, 27, 31, 34],
  [0.71, 43, 49, 53],
  [1, 78, 87, 92],
]
const DAY_WATER: readonly Tone[] = [
  [0, 190, 201, 204],
  [0.71, 214, 223, 226],
  [1, 228, 235, 237],
]
const NIGHT_WATER: readonly Tone[] = [
  [0, 14, 22, 27],
  [0.71, 22, 32, 39],
  [1, 32, 44, 52],
]
/** 256 opaque colours by light. */
function tones(stops: readonly Tone[]): Uint32Array {
  const table = new Uint32Array(256)
  for (let n = 0; n < 256; n++) {
    const light = n / 255
    let k = 0
    while (k < stops.length - 2 && light > stops[k + 1]![0]) k++
    const [la, ...pa] = stops[k]!
    const [lb, ...pb] = stops[k + 1]!
    const f = Math.min(1, Math.max(0, (light - la) / (lb - la)))
    const mix = (c: 0 | 1 | 2) => Math.round(pa[c]! + f * (pb[c]! - pa[c]!))
    table[n] = ((255 << 24) | (mix(2) << 16) | (mix(1) << 8) | mix(0)) >>> 0
  }
  return table
}
