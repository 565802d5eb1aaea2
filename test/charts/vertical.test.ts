import { describe, expect, it } from 'vitest'
import {
  type Contour,
  contourOf,
  csvOf,
  type Point,
  profileCsv,
  svgOf,
  verticalChart,
  verticalCsv,
  verticalTitle,
} from '../../app/charts/index.ts'
import { lossCode, type VerticalCut } from '../../core/index.ts'
import { sampleProfile } from '../memo/sample.ts'

const field = (columns: number, rows: number, f: (i: number, k: number) => number) => ({
  columns,
  rows,
  values: Float64Array.from({ length: columns * rows }, (_, n) => f(Math.floor(n / rows), n % rows)),
})
const areaOf = (ring: readonly Point[]): number =>
  ring.reduce((sum, [x, y], n) => {
    const [u, v] = ring[(n + 1) % ring.length]
    return sum + (x * v - u * y) / 2
  }, 0)
const areas = (c: Contour): number[] => c.rings.map(areaOf)

describe('contours', () => {
  it('a slope is cut where it reaches the threshold, to the fraction of a cell', () => {
    const c = contourOf(
      field(11, 5, (i) => i),
      3.25,
    )
    expect(c.rings.length).toBe(1)
    expect(areas(c)[0]).toBeCloseTo((10 - 3.25) * 4, 9)
    expect(c.lines.length).toBe(1)
    for (const [x] of c.lines[0]) expect(x).toBeCloseTo(3.25, 9)
  })
  it('a hill is one ring of about its area, a hole in it runs the other way', () => {
    const distance = (i: number, k: number): number => Math.hypot(i - 20, k - 20)
    const hill = contourOf(
      field(41, 41, (i, k) => 15 - distance(i, k)),
      3,
    )
    expect(areas(hill).length).toBe(1)
    expect(areas(hill)[0]).toBeCloseTo(Math.PI * 144, -1)
    const crater = contourOf(
      field(41, 41, (i, k) => Math.min(15 - distance(i, k), distance(i, k) - 5)),
      0,
    )
    const [outer, inner] = areas(crater).sort((a, b) => b - a)
    expect(outer).toBeCloseTo(Math.PI * 225, -1)
    expect(inner).toBeLessThan(0)
    // straight pieces lie inside a round hole
    expect(-inner).toBeLessThan(Math.PI * 25)
    expect(-inner).toBeGreaterThan(0.97 * Math.PI * 25)
  })
  it('nothing over the threshold is no ring, all of it is the whole grid, and no number counts as below', () => {
    expect(
      contourOf(
        field(4, 4, () => 0),
        1,
      ),
    ).toEqual({ rings: [], lines: [] })
    const all = contourOf(
      field(4, 6, () => 2),
      1,
    )
    expect(areas(all)).toEqual([15])
    expect(all.lines).toEqual([])
    const half = contourOf(
      field(9, 3, (i) => (i < 4 ? Number.NaN : 5)),
      1,
    )
    expect(areas(half)[0]).toBeCloseTo(4 * 2, 9)
  })
})

/** A plane without physics: a margin that falls with range, a floor that rises from 12 km on, the last kilometres unknown. */
function sampleCut(): VerticalCut {
  const columns = 40
  const rows = 30
  const rangeM = Float64Array.from({ length: columns }, (_, i) => (i + 0.5) * 1000)
  const heightM = Float64Array.from({ length: rows }, (_, k) => k * 100)
  const floorM = rangeM.map((r) => (r > 36_000 ? Number.NaN : r < 12_000 ? 50 : 50 + (r - 12_000) * 0.05))
  const marginDb = new Float32Array(columns * rows)
  const cause = new Uint8Array(columns * rows)
  const pdAt = new Float32Array(columns * rows)
  for (let n = 0; n < columns * rows; n++) {
    const [i, k] = [Math.floor(n / rows), n % rows]
    marginDb[n] = Number.isNaN(floorM[i]) ? Number.NaN : 20 - 40 * Math.log10(rangeM[i] / 8000)
    const hidden = heightM[k] < floorM[i]
    cause[n] = Number.isNaN(floorM[i]) ? lossCode('unknown') : hidden ? lossCode('masked') : marginDb[n] < 0 ? lossCode('too-weak') : 0
    pdAt[n] = hidden ? 0 : Math.min(1, Math.max(0, 0.8 + 0.02 * marginDb[n]))
  }
  return {
    azimuthDeg: 104,
    needId: 'n',
    needName: 'Low cover',
    rcsM2: 1,
    swerling: 1,
    pd: 0.8,
    antennaM: 80,
    effectiveRadiusM: 8_494_667,
    rangeM,
    heightM,
    marginDb,
    snrDb: marginDb.map((m) => m + 13),
    pdAt,
    cause,
    groundM: rangeM.map((r) => (r > 36_000 ? Number.NaN : 40)),
    surfaceM: rangeM.map((r) => (r > 36_000 ? Number.NaN : 40)),
    floorM,
    floorBandM: rangeM.map(() => 10),
    obstacle: Array.from(rangeM, (r) => (r > 36_000 ? '' : 'Harl Edge')),
    obstacleM: rangeM.map(() => 12_000),
    contours: [
      { pd: 0.5, marginDb: -6, ofNeed: false },
      { pd: 0.8, marginDb: 0, ofNeed: true },
      { pd: 0.9, marginDb: 4, ofNeed: false },
    ],
    rays: [{ is: 'peak', beam: '', elevationDeg: 2, heightM: rangeM.map((r) => 80 + r * Math.tan(0.035)) }],
    levels: [{ levelM: 1500, aboveSea: true, heightM: rangeM.map(() => 1500) }],
    cones: [{ levelM: 1500, radiusM: 2100 }],
    stcToM: 9000,
    stcMaxDb: 20,
    nearestM: 150,
    instrumentedM: 38_000,
  }
}

describe('range-height diagram', () => {
  const input = { cut: sampleCut(), width: 700, height: 320, system: 'nautical', size: 12 } as const
  it('looks as it did', async () => {
    const svg = svgOf(verticalChart(input).drawing)
    expect(svg).not.toMatch(/NaN|Infinity|undefined/)
    await expect(`${svg}\n`).toMatchFileSnapshot('snapshots/vertical.svg')
  })
  it('rays are straight, the earth falls away under them, and a place reads back', () => {
    const { frame, sampleAt } = verticalChart(input)
    const [x, y] = frame.place(30_000, 1500)
    expect(frame.heightAt(frame.range.invert(x), y)).toBeCloseTo(1500, 6)
    expect(y - frame.place(0, 1500)[1]).toBeGreaterThan(2)
    const straight = [10_000, 20_000, 30_000].map((r) => frame.place(r, 80 + r * 0.02 + (r * r) / (2 * 8_494_667))[1])
    expect(straight[1]).toBeCloseTo((straight[0] + straight[2]) / 2, 6)
    expect(sampleAt(...(frame.place(20_500, 1100) as [number, number]))).toEqual({ column: 20, row: 11 })
    expect(sampleAt(0, 0)).toBeNull()
  })
  it('the title tells how far the need is met, rounded down', () => {
    // margin 0 at 8 km · 10^0.5 = 25.3 km: the last column in it is at 24.5 km
    expect(verticalTitle(input.cut, 'metric')).toBe(
      'Low cover, 1\u202fm², Swerling 1, azimuth 104.0°: usable to 24.5\u202fkm at some height',
    )
  })
  it('names target level, cone, floor and what the receiver does', () => {
    const said = verticalChart(input).drawing.items.flatMap((i) => (i.kind === 'text' ? [i.text] : []))
    for (const words of ['Pd 0.80, asked for', 'cone of silence 1.2\u202fNM', 'coverage floor, Harl Edge', 'unknown', 'masked'])
      expect(said).toContain(words)
    expect(said.some((t) => t.startsWith('short-range sensitivity ends'))).toBe(true)
  })
})

describe('charts as tables', () => {
  it('the plane: one line per range and height with the words of the outcome', () => {
    const lines = verticalCsv(sampleCut()).trim().split('\n')
    expect(lines[0]).toBe(
      'azimuth_deg,range_m,height_m_msl,coverage_floor_m_msl,signal_to_noise_db,signal_margin_db,probability_of_detection,outcome',
    )
    expect(lines.length).toBe(1 + 40 * 30)
    expect(lines[1]).toBe('104.00,500,0.0,50.0,81.16,68.16,0.000,masked')
    expect(lines[lines.length - 1]).toBe('104.00,39500,2900.0,,,,,unknown')
  })
  it('the profile with its ray and Fresnel radius', () => {
    const p = sampleProfile()
    const lines = profileCsv(p).trim().split('\n')
    expect(lines.length).toBe(1 + p.distM.length)
    expect(lines[0]).toBe(
      'azimuth_deg,range_m,ground_m_msl,surface_m_msl,coverage_floor_m_msl,floor_band_m,sight,ray_m_msl,fresnel_radius_m',
    )
    // √(0.107 · 22 350² / 44 700) at the middle of the ray to the last known floor, 44.7 km
    expect(lines[1 + 74].split(',')[8]).toBe(Math.sqrt((0.107 * 22_200 * 22_500) / 44_700).toFixed(2))
  })
  it('commas, quotes and missing numbers', () => {
    expect(
      csvOf([
        { head: 'a', values: ['x,y', 'say "z"'] },
        { head: 'b_m', values: [1.239, null], decimals: 2 },
      ]),
    ).toBe('a,b_m\n"x,y",1.24\n"say ""z""",\n')
  })
})
