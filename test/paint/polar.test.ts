import { describe, expect, it } from 'vitest'
import { geodesicDirect, geodesicInverse } from '../../core/geodesy/index.ts'
import { lonLatAtPixel, makeRamp, paintPolar, pixelAtLonLat, type View, worldXFromLon, worldYFromLat } from '../../core/paint/index.ts'
import { CELL, type PolarShape } from '../../core/polar/index.ts'

const site = { lon: -25.7, lat: 62.2 }
const viewAt = (centre: { lon: number; lat: number }, width: number, height: number, worldPerPx: number, night = false): View => ({
  width,
  height,
  worldX: worldXFromLon(centre.lon) - (width / 2) * worldPerPx,
  worldY: worldYFromLat(centre.lat) + (height / 2) * worldPerPx,
  worldPerPx,
  night,
})
const polar = (ranges: number, rangeStepM: number, azimuths = 1440): PolarShape => ({
  azimuths,
  ranges,
  azimuthStepDeg: 360 / azimuths,
  rangeStepM,
})
/** Ramp whose colour number is the value itself. */
const counting = {
  stops: [0, 255],
  rgba: Uint32Array.from({ length: 256 }, (_, n) => (0xff000000 | n) >>> 0),
  low: 0,
  high: 255,
  below: 'bare',
} as const
const blank = (g: PolarShape) => ({
  values: new Float32Array(g.azimuths * g.ranges).fill(Number.NaN),
  state: new Uint8Array(g.azimuths * g.ranges).fill(CELL.inSight),
})

describe('painting a polar grid', () => {
  it('puts every pixel into its own cell, to a quarter of a cell at 100 km and over', () => {
    const grid = polar(1600, 75)
    const { values, state } = blank(grid)
    for (let i = 0; i < grid.azimuths; i++) for (let j = 0; j < grid.ranges; j++) values[i * grid.ranges + j] = (i * 7 + j) % 256
    const view = viewAt({ lon: -24.6, lat: 62.9 }, 600, 500, 330)
    const out = new Uint32Array(view.width * view.height)
    paintPolar(grid, site, values, state, counting, view, out, { opacity: 1 })
    let checked = 0
    let far = 0
    for (let py = 3; py < view.height; py += 11)
      for (let px = 2; px < view.width; px += 13) {
        const at = geodesicInverse(site, lonLatAtPixel(view, px + 0.5, py + 0.5))
        const jAt = at.distanceM / grid.rangeStepM
        const iAt = at.azimuthDeg / grid.azimuthStepDeg + 0.5
        if (jAt >= grid.ranges) {
          expect(out[py * view.width + px]).toBe(0)
          continue
        }
        // within a quarter of a cell of a border either side is right
        const clear = (v: number) => Math.abs(v - Math.round(v)) > 0.25
        if (!clear(jAt) || !clear(iAt)) continue
        const want = ((Math.floor(iAt) % grid.azimuths) * 7 + Math.floor(jAt)) % 256
        expect(out[py * view.width + px]! & 255).toBe(want)
        checked++
        if (at.distanceM > 100_000) far++
      }
    expect(checked).toBeGreaterThan(250)
    expect(far).toBeGreaterThan(30)
  })

  it('draws a lone cell where the geodesic says it lies, north of the wrap of azimuth and beside it', () => {
    const grid = polar(100, 1000, 360)
    for (const i of [0, 1, 359, 180]) {
      const { values, state } = blank(grid)
      values[i * grid.ranges + 50] = 200
      const middle = geodesicDirect(site, i, 50_500)
      const view = viewAt(middle, 500, 500, 20)
      const out = new Uint32Array(view.width * view.height)
      paintPolar(grid, site, values, state, counting, view, out, { opacity: 1 })
      const [px, py] = pixelAtLonLat(view, middle)
      expect(out[Math.floor(py) * view.width + Math.floor(px)]! & 255).toBe(200)
      const painted = out.reduce((n, c) => n + (c === 0 ? 0 : 1), 0)
      const cellPx = (1000 * 50_500 * (Math.PI / 180)) / (20 * Math.cos((middle.lat * Math.PI) / 180)) ** 2
      expect(Math.abs(painted / cellPx - 1)).toBeLessThan(0.02)
    }
  })

  it('keeps bare, masked, marginal and unknown ground apart, and hatch fixed to the world', () => {
    const grid = polar(40, 1000, 360)
    const { values, state } = blank(grid)
    for (let i = 0; i < 360; i++)
      state.fill([CELL.inSight, CELL.masked, CELL.marginal, CELL.beyondVoid][Math.floor(i / 90)]!, i * 40, i * 40 + 40)
    const view = viewAt(site, 200, 200, 400)
    const out = new Uint32Array(view.width * view.height)
    const ramp = makeRamp('warm', [0, 70], 'bare')
    paintPolar(grid, site, values, state, ramp, view, out)
    const patch = (x: number, y: number) =>
      new Set([0, 1, 2, 3, 4, 5, 6, 7].flatMap((u) => [0, 1, 2, 3, 4, 5, 6, 7].map((v) => out[(y + v) * 200 + x + u]!)))
    expect([...patch(130, 60)]).toEqual([0])
    const kinds = [patch(130, 130), patch(60, 130), patch(60, 60)]
    for (const kind of kinds) expect(kind.size).toBeGreaterThan(1)
    expect(new Set(kinds.map((k) => [...k].sort().join())).size).toBe(3)
    // moved by a whole number of pixels the picture moves with it
    const moved = { ...view, worldX: view.worldX + 3 * view.worldPerPx, worldY: view.worldY - 5 * view.worldPerPx }
    const again = new Uint32Array(out.length)
    paintPolar(grid, site, values, state, ramp, moved, again)
    let same = 0
    let all = 0
    for (let y = 20; y < 180; y++) for (let x = 20; x < 180; x++, all++) if (again[(y - 5) * 200 + x - 3] === out[y * 200 + x]) same++
    expect(same / all).toBeGreaterThan(0.995)
    // hatching switched off leaves only the unknown
    paintPolar(grid, site, values, state, ramp, view, out, { hatchMasked: false })
    expect([...patch(130, 130)]).toEqual([0])
    expect(patch(60, 60).size).toBeGreaterThan(1)
  })

  it('interpolates wide cells between valid neighbours, never into bare ground', () => {
    const grid = polar(10, 1000, 8)
    const { values, state } = blank(grid)
    for (let i = 0; i < 8; i++) for (let j = 0; j < 6; j++) values[i * 10 + j] = 20 * j + 10
    const view = viewAt(site, 400, 400, 100)
    const out = new Uint32Array(view.width * view.height)
    paintPolar(grid, site, values, state, counting, view, out, { opacity: 1, smooth: true })
    const shades = new Set(out)
    expect(shades.size).toBeGreaterThan(80)
    let worst = 0
    for (let py = 0; py < 400; py += 7)
      for (let px = 0; px < 400; px += 7) {
        const r = geodesicInverse(site, lonLatAtPixel(view, px + 0.5, py + 0.5)).distanceM
        const got = out[py * 400 + px]!
        if (Math.abs(r - 6000) < 60) continue
        if (r > 6000) expect(got).toBe(0)
        else worst = Math.max(worst, Math.abs((got & 255) - Math.min(110, Math.max(10, r / 50))))
      }
    expect(worst).toBeLessThan(2.5)
    paintPolar(grid, site, values, state, counting, view, out, { opacity: 1 })
    expect(new Set(out).size).toBe(7)
  })
})
