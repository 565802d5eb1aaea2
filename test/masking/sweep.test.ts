import { describe, expect, it } from 'vitest'
import { geodesicInverse } from '../../core/geodesy/index.ts'
import { heightToSeeCells, makeSweepArrays, sightPoint, sweep, sweepRays, sweepResult, sweepShare } from '../../core/masking/index.ts'
import { CELL, cellCentre, isUnknown, type PolarShape, previewShape } from '../../core/polar/index.ts'
import { type Ground, RELIEF } from '../../core/terrain/index.ts'
import { finish } from '../../core/work/index.ts'
import { FARMLAND, FOREST, FOUR_THIRDS, geographicShape, groundOn, placeAt, seeded, siteAt, utmShape } from '../terrain/grounds.ts'

const HEIGHTS = [12, 4, 40]
const hills = (c: number, r: number): number =>
  90 * Math.abs(Math.sin(c / 17) * Math.cos(r / 23)) + 60 * Math.sin((c + r) / 41) + 4 * Math.sin(c * 1.3) * Math.cos(r * 1.7)

/** Hills with woods, two obstacles, a void and an edge within reach. */
async function busyGround(): Promise<Ground> {
  const shape = await utmShape(420, 360, 30)
  const random = seeded(4)
  const code = Uint8Array.from({ length: 420 * 360 }, (_, i) => (Math.sin((i % 420) / 15) + Math.cos(i / 420 / 11) > 1 ? 1 : 0))
  const bare = groundOn(shape, hills)
  const obstacle = (name: string, path: [number, number][], heightM: number, widthM: number) => ({
    name,
    path: path.map(([c, r]) => placeAt(bare, c, r)),
    heightM,
    topM: null,
    widthM,
    rcsM2: null,
    verticalErrorM: 2,
  })
  const heights = (c: number, r: number): number => (c > 330 && c < 336 && r > 60 && r < 70 ? Number.NaN : hills(c, r) + random())
  return groundOn(shape, heights, {
    code,
    codes: [FARMLAND, FOREST],
    obstacles: [
      obstacle('Tower', [[240, 150]], 80, 60),
      obstacle(
        'Dyke',
        [
          [120, 120],
          [150, 260],
        ],
        12,
        5,
      ),
    ],
  })
}
const GRID: PolarShape = { azimuths: 240, ranges: 130, azimuthStepDeg: 1.5, rangeStepM: 50 }

describe('sweep', () => {
  it('gives each cell what its centre has on its own ray: 4 000 cells, every height', async () => {
    const g = await busyGround()
    const site = siteAt(g, 205.4, 180.7, { clearingRadiusM: 80 })
    const { site: s, masks } = finish(sweep(g, site, HEIGHTS, GRID, FOUR_THIRDS))
    expect(masks.map((m) => m.heightM)).toEqual(HEIGHTS)
    const states = new Set<number>()
    let compared = 0
    let blocked = 0
    for (let cell = 0; cell < GRID.azimuths * GRID.ranges; cell += 8) {
      const at = cellCentre(site, GRID, cell)
      for (const m of masks) {
        const p = sightPoint(g, site, m.heightM, FOUR_THIRDS, at)
        states.add(m.state[cell])
        if (p.unknown) {
          expect(m.state[cell]).toBe(p.unknown === 'void' ? CELL.beyondVoid : CELL.outside)
          expect([m.floorM[cell], s.groundM[cell], s.heightToSeeM[cell]]).toEqual([Number.NaN, Number.NaN, Number.NaN])
          expect([s.code[cell], s.relief[cell], m.inSight[cell]]).toEqual([255, RELIEF.unknown, 0])
          continue
        }
        // an obstacle narrower than the fan still blocks one of its rays: a place beside it does not know
        if (Math.abs(m.floorM[cell] - p.floorM) > 0.01 && m.floorM[cell] > p.floorM && m.floorBandM[cell] < 10 * 3) {
          blocked++
          continue
        }
        compared++
        expect(Math.abs(m.floorM[cell] - p.floorM)).toBeLessThan(0.01)
        expect(Math.abs(m.floorBandM[cell] / p.floorBandM - 1)).toBeLessThan(1e-3)
        expect(Math.abs(s.groundM[cell] - p.groundM)).toBeLessThan(0.002)
        expect([s.code[cell], s.relief[cell]]).toEqual([p.code, p.relief])
        expect(Math.abs(s.slopePermille[cell] - 1000 * p.slope)).toBeLessThan(2)
        expect(Math.abs(s.heightToSeeM[cell] - p.heightToSeeM)).toBeLessThan(0.3 + 0.02 * p.heightToSeeM)
        if (m.inSight[cell] === 0) expect(p.inSight).toBe(false)
        if (m.inSight[cell] === 65535) expect(p.inSight).toBe(true)
        if (m.state[cell] === CELL.marginal) expect(p.marginal).toBe(true)
      }
    }
    expect([...states].sort()).toEqual([1, 2, 3, 4, 5, 6])
    expect(compared).toBeGreaterThan(9000)
    expect(blocked).toBeLessThan(60)
  })

  it('gives the same whatever heights are swept together, and a taller mast never less', async () => {
    const g = await busyGround()
    const site = siteAt(g, 205.4, 180.7, { clearingRadiusM: 80 })
    const { masks } = finish(sweep(g, site, HEIGHTS, GRID, FOUR_THIRDS))
    for (const m of masks) {
      const alone = finish(sweep(g, site, [m.heightM], GRID, FOUR_THIRDS)).masks[0]
      let worst = 0
      for (let i = 0; i < alone.inSight.length; i++) {
        worst = Math.max(worst, Math.abs(alone.inSight[i] - m.inSight[i]))
        if (!isUnknown(m.state[i])) expect(Math.abs(alone.floorM[i] - m.floorM[i])).toBeLessThan(1e-3)
      }
      expect(worst).toBeLessThanOrEqual(1)
      expect(alone.horizon.map((h) => h.elevationDeg.toFixed(6))).toEqual(m.horizon.map((h) => h.elevationDeg.toFixed(6)))
    }
    const [mid, low, high] = masks
    for (let i = 0; i < mid.inSight.length; i++) {
      expect(low.inSight[i]).toBeLessThanOrEqual(mid.inSight[i] + 1)
      expect(mid.inSight[i]).toBeLessThanOrEqual(high.inSight[i] + 1)
    }
  })

  it('shares of cells in sight add up to what a fine sampling of places sees', async () => {
    const g = groundOn(await utmShape(300, 300, 30), hills)
    const site = siteAt(g, 150.2, 149.6)
    const grid: PolarShape = { azimuths: 12, ranges: 20, azimuthStepDeg: 30, rangeStepM: 200 }
    const { masks } = finish(sweep(g, site, [10], grid, FOUR_THIRDS))
    let partly = 0
    for (let cell = 0; cell < 240; cell += 3) {
      const share = masks[0].inSight[cell] / 65535
      const [i, j] = [Math.floor(cell / 20), cell % 20]
      const fine: PolarShape = { azimuths: 12, ranges: 20 * 80, azimuthStepDeg: 30, rangeStepM: 2.5 }
      let seen = 0
      for (let k = 0; k < 80; k++) if (sightPoint(g, site, 10, FOUR_THIRDS, cellCentre(site, fine, i * 1600 + j * 80 + k)).inSight) seen++
      if (share > 0.01 && share < 0.99) partly++
      expect(Math.abs(share - seen / 80)).toBeLessThan(0.03)
    }
    expect(partly).toBeGreaterThan(10)
  })

  it('is the same in two shares taken turn about, and without height to see, made later', async () => {
    const g = await busyGround()
    const site = siteAt(g, 205.4, 180.7, { clearingRadiusM: 80 })
    const alone = finish(sweep(g, site, HEIGHTS, GRID, FOUR_THIRDS))
    const options = { heightToSee: false }
    const arrays = makeSweepArrays(GRID, HEIGHTS, options, true)
    const shares = [sweepShare(g, site, FOUR_THIRDS, arrays), sweepShare(g, site, FOUR_THIRDS, arrays)]
    let turns = 0
    while (!shares.map((share) => share.next().done).every(Boolean)) turns++
    expect(turns).toBeGreaterThan(0)
    const shared = sweepResult(arrays, alone.site.siteGroundM, g.obstacles, options)
    expect(shared.masks.map((m) => [...m.state])).toEqual(alone.masks.map((m) => [...m.state]))
    expect(shared.masks.map((m) => [...m.floorM])).toEqual(alone.masks.map((m) => [...m.floorM]))
    expect(shared.masks.map((m) => m.horizon)).toEqual(alone.masks.map((m) => m.horizon))
    expect([...shared.site.groundM]).toEqual([...alone.site.groundM])
    expect(shared.site.heightToSeeM).toHaveLength(0)
    expect([...finish(heightToSeeCells(g, site, GRID, FOUR_THIRDS))]).toEqual([...alone.site.heightToSeeM])
  })

  it('reports its work and may be stopped', async () => {
    const g = groundOn(await utmShape(300, 300, 30), hills)
    const work = sweep(g, siteAt(g, 150, 150), [10, 20], { ...GRID, azimuths: 1440, azimuthStepDeg: 0.25, ranges: 80 }, FOUR_THIRDS)
    const first = work.next()
    expect(first.done).toBe(false)
    if (!first.done) expect(first.value.done / first.value.total).toBeLessThan(0.15)
  })

  it('works across the antimeridian and below sea level, one candidate height stated', () => {
    const g = groundOn(geographicShape(700, 500, 180, -18, 1 / 1200, 1 / 1200), (c, r) => hills(c, r) - 300)
    const site = siteAt(g, 350.5, 250.5, { groundHeightM: -120 })
    const { site: s, masks } = finish(sweep(g, site, [30], { ...GRID, rangeStepM: 150 }, FOUR_THIRDS))
    expect(s.siteGroundM).toBe(-120)
    expect(masks[0].state.every((x) => x !== CELL.beyondVoid)).toBe(true)
    for (let cell = 5; cell < GRID.azimuths * GRID.ranges; cell += 997) {
      const p = sightPoint(g, site, 30, FOUR_THIRDS, cellCentre(site, GRID.rangeStepM === 150 ? GRID : { ...GRID, rangeStepM: 150 }, cell))
      if (!p.unknown) expect(Math.abs(masks[0].floorM[cell] - p.floorM)).toBeLessThan(0.01)
    }
  })
})

describe('chosen rays and the preview', () => {
  it('hold what the sweep holds', async () => {
    const g = await busyGround()
    const site = siteAt(g, 205.4, 180.7, { clearingRadiusM: 80 })
    const { site: s, masks } = finish(sweep(g, site, [12], GRID, FOUR_THIRDS))
    const tower = geodesicInverse(site, g.obstacles[0].path[0]).azimuthDeg
    const azimuths = [0, 33, 147, 300, 301.5].filter((a) => Math.abs(a - tower) > 5)
    const rays = sweepRays(
      g,
      site,
      12,
      FOUR_THIRDS,
      azimuths,
      Array.from({ length: GRID.ranges }, (_, j) => (j + 0.5) * GRID.rangeStepM),
      GRID.rangeStepM,
    )
    azimuths.forEach((azimuthDeg, n) => {
      const from = (azimuthDeg / GRID.azimuthStepDeg) * GRID.ranges
      for (let j = 0; j < GRID.ranges; j++) {
        const [a, b] = [n * GRID.ranges + j, from + j]
        expect([rays.state[a], rays.code[a], rays.relief[a]]).toEqual([masks[0].state[b], s.code[b], s.relief[b]])
        expect(Math.abs(rays.inSight[a] - masks[0].inSight[b])).toBeLessThanOrEqual(20)
        expect(Math.abs(rays.slopePermille[a] - s.slopePermille[b])).toBeLessThanOrEqual(1)
        if (isUnknown(rays.state[a])) continue
        expect(Math.abs(rays.groundM[a] - s.groundM[b])).toBeLessThan(0.001)
        expect(Math.abs(rays.floorM[a] - masks[0].floorM[b])).toBeLessThan(0.005)
      }
    })
    const grid = previewShape(GRID, false)
    expect(grid).toMatchObject({ azimuths: 180, azimuthStepDeg: 2, ranges: 130 })
    const coarse = finish(sweep(g, site, [12], grid, FOUR_THIRDS, { heightToSee: false })).masks[0]
    for (let j = 0; j < GRID.ranges; j++) expect(coarse.state[21 * 130 + j]).toBe(masks[0].state[28 * 130 + j])
    expect(previewShape(GRID, true)).toEqual(GRID)
    expect(previewShape({ ...GRID, azimuths: 1440, ranges: 1600 }, false).azimuths).toBe(90)
  })
  it('take overlapping and shifted cells', async () => {
    const g = groundOn(await utmShape(300, 300, 30), hills)
    const site = siteAt(g, 150, 150)
    const a = sweepRays(g, site, 10, FOUR_THIRDS, [10], [1000, 1040, 1080], 80)
    const b = sweepRays(g, site, 10, FOUR_THIRDS, [10], [1040], 80)
    expect([a.inSight[1], a.floorM[1], a.groundM[1]]).toEqual([b.inSight[0], b.floorM[0], b.groundM[0]])
    expect(sweepRays(g, site, 10, FOUR_THIRDS, [10], [20], 80).inSight[0]).toBeGreaterThan(0)
  })
})
