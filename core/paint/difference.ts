import { geodesicInverse, type LonLat } from '../geodesy/index.ts'
import type { PolarShape } from '../polar/index.ts'
import { RAD_PER_DEG } from '../units/index.ts'
import { type ControlGrid, controlGrid, tileSidePx } from './controlGrid.ts'
import { groundPerPx } from './mercator.ts'
import { LEAP_PX, type Located, locate } from './polar.ts'
import type { Ramp, View } from './types.ts'

/** One of two layers whose difference is painted: values by index i * ranges + j, NaN where there is none to take a difference of. */
export interface DifferenceSide {
  readonly grid: PolarShape
  readonly site: LonLat
  readonly values: Float32Array
  /** What stands beyond the grid's range; NaN = nothing is known there. */
  readonly outside: number
}
interface Side extends Located {
  readonly values: Float32Array
  readonly outside: number
  readonly plane: ControlGrid
  readonly exactWithinM: number
}

/**
 * Paints a − b over a view as straight RGBA, 0 where one of the two has no value or the difference is smaller than `deadBand`. The two grids may stand at
 * different places: each pixel is looked up in both, in the cell it lies in, as `paintPolar` does.
 * @param opacity of the colours, 0…1
 */
export function paintDifference(
  a: DifferenceSide,
  b: DifferenceSide,
  deadBand: number,
  ramp: Ramp,
  view: View,
  out: Uint32Array,
  opacity = 0.86,
): void {
  out.fill(0, 0, view.width * view.height)
  const pxM = groundPerPx(view)
  const side = Math.min(tileOf(a, pxM), tileOf(b, pxM))
  const [first, second] = [a, b].map((s) => settled(s, view, side, pxM)) as [Side, Side]
  const alpha = Math.round(255 * Math.min(1, Math.max(0, opacity)))
  const source = (view.night && ramp.rgbaNight) || ramp.rgba
  const colours = Uint32Array.from(source, (c) => ((c & 0xffffff) | (alpha << 24)) >>> 0)
  const scale = 255 / (ramp.high - ramp.low)
  const { columns, rows } = first.plane
  for (let tj = 0; tj < rows; tj++)
    for (let ti = 0; ti < columns; ti++) {
      const x0 = ti * side
      const y0 = tj * side
      const count = Math.min(view.width, x0 + side) - x0
      const y1 = Math.min(view.height, y0 + side)
      for (let py = y0; py < y1; py++) {
        const f = (py + 0.5 - y0) / side
        const inFirst = rowOf(first, tj, ti, f, side, count)
        const inSecond = rowOf(second, tj, ti, f, side, count)
        if (!inFirst && !inSecond) continue
        for (let n = 0, at = py * view.width + x0; n < count; n++, at++) {
          const inside = (inFirst && first.rangeAt[n]! >= 0) || (inSecond && second.rangeAt[n]! >= 0)
          if (!inside) continue
          const off = valueAt(first, n, inFirst) - valueAt(second, n, inSecond)
          if (!(Math.abs(off) >= deadBand)) continue
          const c = (off - ramp.low) * scale
          out[at] = colours[c >= 255 ? 255 : c <= 0 ? 0 : c | 0]!
        }
      }
    }
}

const tileOf = (s: DifferenceSide, pxM: number): number => tileSidePx(pxM, s.site.lat, Math.max(s.grid.rangeStepM / 8, pxM / 20))

function settled(s: DifferenceSide, view: View, side: number, pxM: number): Side {
  const { grid, values, outside, site } = s
  const plane = controlGrid(view, side, (lon, lat, to) => {
    const { azimuthDeg, distanceM } = geodesicInverse(site, { lon, lat })
    to[0] = distanceM * Math.sin(azimuthDeg * RAD_PER_DEG)
    to[1] = distanceM * Math.cos(azimuthDeg * RAD_PER_DEG)
  })
  return {
    grid,
    values,
    outside,
    plane,
    maxRangeM: grid.ranges * grid.rangeStepM,
    exactWithinM: LEAP_PX * pxM * Math.sqrt(1 / (grid.azimuthStepDeg * RAD_PER_DEG)),
    rangeAt: new Float64Array(128),
    azimuthAt: new Float64Array(128),
  }
}

/** Places of one row of pixels of a tile; false when none lies in range. */
function rowOf(s: Side, tj: number, ti: number, f: number, side: number, count: number): boolean {
  const { a, b, columns } = s.plane
  const n = tj * (columns + 1) + ti
  const below = n + columns + 1
  const ea = a[n]! + f * (a[below]! - a[n]!)
  const na = b[n]! + f * (b[below]! - b[n]!)
  const de = (a[n + 1]! + f * (a[below + 1]! - a[n + 1]!) - ea) / side
  const dn = (b[n + 1]! + f * (b[below + 1]! - b[n + 1]!) - na) / side
  return locate(s, ea + de / 2, na + dn / 2, de, dn, count, s.exactWithinM)
}
function valueAt(s: Side, n: number, inRange: boolean): number {
  const r = s.rangeAt[n]!
  if (!inRange || r < 0) return s.outside
  return s.values[(s.azimuthAt[n]! | 0) * s.grid.ranges + (r | 0)]!
}
