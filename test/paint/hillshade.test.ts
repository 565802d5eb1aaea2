import { describe, expect, it } from 'vitest'
import { WGS84 } from '../../core/geodesy/index.ts'
import {
  layOver,
  makeRamp,
  paintHillshade,
  paintMap,
  pixelAtLonLat,
  SHEET_RGB,
  type View,
  worldXFromLon,
  worldYFromLat,
} from '../../core/paint/index.ts'
import { CELL } from '../../core/polar/index.ts'
import type { RasterGrid } from '../../core/raster/index.ts'

/** Geographic raster of `size`² posts, 0.001° apart, north first, its middle at 20° E 50° N. */
const raster = (size: number, height: (col: number, row: number) => number, flip = false): RasterGrid => {
  const step = 0.001
  const samples = new Float32Array(size * size)
  for (let row = 0; row < size; row++)
    for (let col = 0; col < size; col++) samples[(flip ? size - 1 - row : row) * size + col] = height(col, row)
  const half = ((size - 1) / 2) * step
  return {
    width: size,
    height: size,
    crs: WGS84,
    x0: 20 - half,
    y0: flip ? 50 - half : 50 + half,
    colX: step,
    colY: 0,
    rowX: 0,
    rowY: flip ? step : -step,
    samples,
  }
}
const view = (night = false, worldPerPx = 150): View => ({
  width: 300,
  height: 300,
  worldX: worldXFromLon(20) - 150 * worldPerPx,
  worldY: worldYFromLat(50) + 150 * worldPerPx,
  worldPerPx,
  night,
})
const paint = (g: RasterGrid, v: View, water: Parameters<typeof paintHillshade>[3] = null) => {
  const out = new Uint32Array(v.width * v.height)
  paintHillshade(g, v, out, water)
  return out
}
const grey = (c: number) => ((c & 255) + ((c >>> 8) & 255) + ((c >>> 16) & 255)) / 3
const middle = (out: Uint32Array, dx = 0, dy = 0) => out[(150 + dy) * 300 + 150 + dx]!

describe('shaded ground', () => {
  it('lights the slopes that face north-west and darkens those that face south-east, whichever way rows run', () => {
    for (const flip of [false, true]) {
      const tone = (east: number, south: number) =>
        grey(
          middle(
            paint(
              raster(101, (c, r) => 20 * (c * east * Math.cos((50 * Math.PI) / 180) + r * south), flip),
              view(),
            ),
          ),
        )
      const level = tone(0, 0)
      expect(tone(1, 1)).toBeGreaterThan(level + 5)
      expect(tone(-1, -1)).toBeLessThan(level - 15)
      expect(Math.abs(tone(1, -1) - tone(-1, 1))).toBeLessThan(6)
    }
  })
  it('gives a cone of equal slope equal light to west and north, though its cells are narrower east to west', () => {
    const eastM = 0.001 * 111_229 * Math.cos((50 * Math.PI) / 180)
    const northM = 0.001 * 111_229
    const west = grey(
      middle(
        paint(
          raster(101, (c) => 0.3 * c * eastM),
          view(false, 90),
        ),
      ),
    )
    const north = grey(
      middle(
        paint(
          raster(101, (_, r) => 0.3 * r * northM),
          view(false, 90),
        ),
      ),
    )
    expect(Math.abs(west - north)).toBeLessThan(2)
  })
  it('leaves voids and everything outside the raster transparent, at every scale', () => {
    const g = raster(101, (c, r) => (c > 60 && r > 60 ? Number.NaN : 100))
    for (const scale of [40, 150, 600]) {
      const out = paint(g, view(false, scale))
      const [px, py] = pixelAtLonLat(view(false, scale), { lon: 20.03, lat: 49.97 })
      expect(middle(out) >>> 24).toBe(255)
      expect(out[Math.floor(py) * 300 + Math.floor(px)] ?? 0).toBe(0)
      const [ox, oy] = pixelAtLonLat(view(false, scale), { lon: 20.0506, lat: 50 })
      const beyond = out[Math.floor(oy) * 300 + Math.ceil(ox)]
      if (ox < 299) expect(beyond).toBe(0)
    }
  })
  it('draws water bluer than land: level ground at 0 m, or what land cover calls water', () => {
    const coast = raster(101, (c) => (c < 50 ? 0 : 10))
    const out = paint(coast, view())
    const blue = (c: number) => ((c >>> 16) & 255) - (c & 255)
    expect(blue(middle(out, -25))).toBeGreaterThan(0)
    expect(blue(middle(out, 25))).toBeLessThan(0)
    const below = paint(
      raster(101, () => -40),
      view(),
    )
    expect(blue(middle(below))).toBeLessThan(0)
    const code = new Uint8Array(101 * 101)
    for (let n = 0; n < code.length; n++) code[n] = n % 101 < 50 ? 3 : 1
    const lake = paint(
      raster(101, () => 230),
      view(),
      { code, isWater: Uint8Array.from({ length: 256 }, (_, n) => (n === 3 ? 1 : 0)) },
    )
    expect(blue(middle(lake, -25))).toBeGreaterThan(0)
    expect(blue(middle(lake, 25))).toBeLessThan(0)
  })
  it('is dark at night', () =>
    expect(
      grey(
        middle(
          paint(
            raster(101, () => 10),
            view(true),
          ),
        ),
      ),
    ).toBeLessThan(60))
})

describe('one picture of ground and layer', () => {
  it('is opaque, shows the sheet where nothing is known and the layer where it is', () => {
    const grid = { azimuths: 360, ranges: 20, azimuthStepDeg: 1, rangeStepM: 100 }
    const layer = {
      grid,
      site: { lon: 20, lat: 50 },
      values: new Float32Array(7200).fill(70),
      state: new Uint8Array(7200).fill(CELL.inSight),
      ramp: makeRamp('warm', [0, 70], 'bare'),
      how: { opacity: 1 },
    }
    const out = new Uint32Array(300 * 300)
    paintMap(
      raster(41, () => 10),
      layer,
      view(),
      out,
    )
    expect(out.every((c) => c >>> 24 === 255)).toBe(true)
    expect(middle(out)).toBe(layer.ramp.rgba[255])
    const [r, g, b] = SHEET_RGB.day
    expect(out[0]).toBe(((255 << 24) | (b << 16) | (g << 8) | r) >>> 0)
  })
  it('lays colours over each other by their alpha', () => {
    const under = Uint32Array.of(0xff000000, 0xff0000ff)
    layOver(Uint32Array.of(0x80ffffff, 0), under, 2)
    expect(under[0]! & 255).toBe(128)
    expect(under[1]).toBe(0xff0000ff)
  })
})
