import { describe, expect, it } from 'vitest'
import {
  bilinear,
  type Crs,
  type GridShape,
  gridPosition,
  InputError,
  nearest,
  planGround,
  postingM,
  sameLattice,
  subShape,
  WGS84,
} from '../../core/index.ts'

const utm33: Crs = { kind: 'projected', epsg: 32633, definition: 'EPSG:32633', name: '', metresPerUnit: 1 }
const grid = (over: Partial<GridShape> = {}): GridShape => ({
  width: 100,
  height: 80,
  crs: utm33,
  x0: 500_000,
  y0: 5_400_000,
  colX: 30,
  colY: 0,
  rowX: 0,
  rowY: -30,
  ...over,
})
const degrees = (over: Partial<GridShape> = {}): GridShape => grid({ crs: WGS84, x0: 10, y0: 50, colX: 0.001, rowY: -0.001, ...over })

describe('bilinear', () => {
  const n = Number.NaN
  const g = { width: 3, height: 3, samples: Float32Array.from([0, 10, 20, 30, 40, 50, 60, 70, n]) }
  it.each([
    [0, 0, 0],
    [1, 1, 40],
    [0.5, 0, 5],
    [0.25, 0.5, 17.5],
    [2, 1, 50],
    [2, 0.5, 35],
    [1.5, 1, 45], // on the row above the void: it has no weight
    [-1e-9, 0, 0],
  ])('at %d, %d', (col, row, want) => expect(bilinear(g, col, row)).toBeCloseTo(want, 6))
  it.each([
    [1.5, 1.5],
    [2, 2],
    [2, 1.01],
    [-0.01, 0],
    [0, 2.01],
    [n, 0],
  ])('no value at %d, %d', (col, row) => expect(bilinear(g, col, row)).toBeNaN())
  it('nearest', () => {
    expect(nearest(g, 0.49, 0.51, -1)).toBe(30)
    expect(nearest(g, 2.6, 0, -1)).toBe(-1)
  })
})

describe('grid positions', () => {
  it.each<[string, GridShape]>([
    ['UTM', grid()],
    ['geographic', degrees()],
    ['rotated', grid({ colX: 25, colY: 12, rowX: 12, rowY: -25 })],
    ['south up', grid({ rowY: 30 })],
    ['web mercator', grid({ crs: { ...utm33, epsg: 3857, definition: 'EPSG:3857' }, x0: 1e6, y0: 6e6 })],
    ['across the antimeridian', degrees({ x0: 179.95 })],
    ['west of it, counted on from 180', degrees({ x0: 350 })],
  ])('%s: there and back', (_, s) => {
    const p = gridPosition(s)
    for (const [col, row] of [
      [0, 0],
      [99, 79],
      [51.25, 3.5],
    ]) {
      const [lon, lat] = p.toLonLat(col, row)
      expect(lon).toBeGreaterThanOrEqual(-180)
      expect(lon).toBeLessThan(180)
      const [c, r] = p.toPixel(lon, lat)
      expect(c).toBeCloseTo(col, 5)
      expect(r).toBeCloseTo(row, 5)
    }
  })
  it('posting in metres', () => {
    const utm = postingM(grid())
    expect(utm.colM).toBeCloseTo(30 / 0.9996, 1)
    expect(utm.meanM).toBeCloseTo(Math.sqrt(utm.colM * utm.rowM), 9)
    const geo = postingM(degrees({ y0: 60 }))
    // 0.001° at 60° north, WGS 84: 55.8 m of longitude, 111.4 m of latitude
    expect(geo.colM).toBeCloseTo(55.8, 0)
    expect(geo.rowM).toBeCloseTo(111.4, 0)
  })
})

describe('lattices', () => {
  const a = grid()
  it('a window lies on the lattice it came from', () => {
    const w = subShape(a, { col: 7, row: -3, width: 5, height: 6 })
    expect(sameLattice(a, w)).toEqual({ col: 7, row: -3 })
    expect(sameLattice(w, a)).toEqual({ col: -7, row: 3 })
  })
  it.each<[string, Partial<GridShape>]>([
    ['half a pixel off', { x0: 500_015 }],
    ['another step', { colX: 30.01 }],
    ['another CRS', { crs: { ...utm33, definition: 'EPSG:32632' } }],
    ['turned', { colY: 0.1 }],
  ])('not the same: %s', (_, over) => expect(sameLattice(a, { ...a, ...over })).toBeNull())
})

describe('the one grid of the ground', () => {
  it('one file: its own lattice, whole', () => expect(planGround([grid()], [])).toEqual(grid()))
  it('several files: the finest lattice over all of them', () => {
    const fine = grid()
    const coarse = grid({ x0: 500_000 - 9_000, y0: 5_402_000, colX: 90, rowY: -90, width: 200, height: 50 })
    const plan = planGround([coarse, fine], [])
    const at = sameLattice(fine, plan)!
    expect(at.col).toBe(-300)
    expect(at.row).toBe(Math.floor(-2000 / 30))
    expect(plan.colX).toBe(30)
    // 199 steps of 90 m: 597 steps of 30 m
    expect(at.col + plan.width - 1).toBeGreaterThanOrEqual(297)
    expect(at.row + plan.height - 1).toBeGreaterThanOrEqual(79)
  })
  it('a neighbour in the next UTM zone is taken in', () => {
    const next = grid({ crs: { ...utm33, epsg: 32634, definition: 'EPSG:32634' }, x0: 60_000, y0: 5_410_000, width: 50, height: 50 })
    const plan = planGround([grid(), next], [])
    const p = gridPosition(plan)
    for (const corner of [
      [0, 0],
      [49, 49],
    ] as const) {
      const [lon, lat] = gridPosition(next).toLonLat(corner[0], corner[1])
      const [col, row] = p.toPixel(lon, lat)
      expect(col).toBeGreaterThanOrEqual(-0.5)
      expect(col).toBeLessThanOrEqual(plan.width - 0.5)
      expect(row).toBeGreaterThanOrEqual(-0.5)
      expect(row).toBeLessThanOrEqual(plan.height - 0.5)
    }
  })
  it('over 64 million cells: the window of the circles and 20 km more', () => {
    const large = degrees({ width: 36_000, height: 36_000, x0: 6, y0: 3, colX: 3 / 36_000, rowY: -3 / 36_000 })
    const plan = planGround([large], [{ lon: 7.5, lat: 1.5, radiusM: 10_000 }])
    const { colM, rowM } = postingM(plan)
    expect(plan.width * colM).toBeGreaterThan(60_000)
    expect(plan.width * colM).toBeLessThan(60_400)
    expect(plan.height * rowM).toBeGreaterThan(60_000)
    expect(sameLattice(large, plan)).not.toBeNull()
  })
  it.each<[string, Parameters<typeof planGround>[1], string]>([
    ['no circle', [], 'terrain-too-large'],
    ['circles too wide', [{ lon: 7.5, lat: 1.5, radiusM: 150_000 }], 'terrain-too-large'],
    ['circles elsewhere', [{ lon: 40, lat: 1.5, radiusM: 10_000 }], 'off-terrain'],
  ])('refused: %s', (_, circles, code) => {
    const large = degrees({ width: 36_000, height: 36_000, x0: 6, y0: 3, colX: 3 / 36_000, rowY: -3 / 36_000 })
    try {
      planGround([large], circles)
      expect.unreachable()
    } catch (e) {
      expect(e).toBeInstanceOf(InputError)
      expect((e as InputError).code).toBe(code)
    }
  })
})
