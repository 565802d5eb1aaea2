import { describe, expect, it } from 'vitest'
import {
  clutterLevels,
  clutterToNoise,
  fillCellStrength,
  gammaFunction,
  interclutterVisibility,
  LEVEL_RING_M,
  percentileOverMeanDb,
  pointClutter,
} from '../../core/clutter/index.ts'
import { addCells, levelsOfMixture, type Mixture, makeMixture, meanOfMixture } from '../../core/clutter/levels/mixture.ts'
import { sweep } from '../../core/masking/index.ts'
import { CELL, cellCentre, type PolarShape } from '../../core/polar/index.ts'
import { fromDb, toDb } from '../../core/units/index.ts'
import { finish } from '../../core/work/index.ts'
import { testRadar } from '../radar/testRadar.ts'
import { flatCells } from './flatCells.ts'
import { hills, randomNumbers } from './hills.ts'

const levelOfMixture = (x: Mixture, p: number) => levelsOfMixture(x, [p])[0]
const cells = (...parts: [meanDb: number, spread: number, area: number][]) => {
  const x = makeMixture()
  const column = (k: number) => parts.map((part) => part[k])
  addCells(x, Float32Array.from(column(0)), Float32Array.from(column(1)), 0, 0, parts.length, Float64Array.from(column(2)))
  x.whole = column(2).reduce((s, v) => s + v, 0)
  return x
}

describe('levels of a mixture of clutter', () => {
  it.each([0.9, 1, 1.37, 2.5, 3.81, 5.4])('one kind of spread %f: mean and levels of its Weibull distribution', (spread) => {
    const x = cells([31.3, spread, 7])
    expect(meanOfMixture(x)).toBeCloseTo(31.3, 4)
    for (const p of [0.5, 0.9, 0.99])
      expect(Math.abs((levelOfMixture(x, p) ?? Number.NaN) - 31.3 - percentileOverMeanDb(spread, p)), `${p}`).toBeLessThan(0.2)
  })

  it('at a spread of 5.4 the 90 % level lies below the mean', () => expect(levelOfMixture(cells([20, 5.4, 1]), 0.9)).toBeLessThan(20))

  it('counts clutter-free ground as zero', () => {
    const x = cells([20, 2, 1], [Number.NaN, 1, 3])
    expect(meanOfMixture(x)).toBeCloseTo(20 + toDb(0.25), 4)
    // exp[−(xΓ(3)/m)^½]·¼ = 0.1
    expect(levelOfMixture(x, 0.9)).toBeCloseTo(20 + toDb((-Math.log(0.4)) ** 2 / gammaFunction(3)), 1)
    expect(levelOfMixture(x, 0.7)).toBeNull()
    expect(meanOfMixture(makeMixture())).toBeNull()
    expect(levelOfMixture(makeMixture(), 0.9)).toBeNull()
  })

  it('of many kinds solves the sum of their exceedances', () => {
    const parts: [number, number, number][] = [
      [45, 3.2, 2],
      [12, 1.1, 5],
      [28.4, 4.7, 3],
      [60, 1.65, 0.4],
    ]
    const x = cells(...parts)
    for (const p of [0.6, 0.9, 0.99]) {
      const over = (db: number) => {
        let sum = 0
        for (const [mean, a, w] of parts) sum += w * Math.exp(-((fromDb(db - mean) * gammaFunction(1 + a)) ** (1 / a)))
        return sum
      }
      let [lo, hi] = [-100, 120]
      for (let n = 0; n < 60; n++) {
        const mid = (lo + hi) / 2
        if (over(mid) > (1 - p) * 10.4) lo = mid
        else hi = mid
      }
      expect(Math.abs((levelOfMixture(x, p) ?? Number.NaN) - lo), `${p}`).toBeLessThan(0.08)
    }
  })
})

describe('interclutter visibility', () => {
  it('of Rayleigh clutter is 1 − exp(−I(S/D₀ − 1)/C̄)', () => {
    const room = 10 ** 0.7 - 1
    expect(interclutterVisibility(1, 40, 30, 20, 13)).toBeCloseTo(1 - Math.exp(-0.1 * room), 12)
  })
  it('lies between clutters more often the wider they spread, where the mean alone hides the target', () => {
    const seen = [1, 2, 3, 4].map((a) => interclutterVisibility(a, 50, 20, 20, 13))
    for (let n = 1; n < 4; n++) expect(seen[n]).toBeGreaterThan(seen[n - 1])
    expect(interclutterVisibility(3, 50, 20, 13, 13)).toBe(0)
    expect(interclutterVisibility(3, Number.NaN, 0, 14, 13)).toBe(1)
  })
})

describe('clutter by ring and octant', () => {
  const grid: PolarShape = { azimuths: 360, ranges: 400, azimuthStepDeg: 1, rangeStepM: 75 }
  const spread = new Float32Array(360 * 400).fill(1)

  it('is told apart by rings of 5 NM or 10 km and octants about north, known ground only', () => {
    const { mask } = flatCells(grid, 20)
    const cnrDb = new Float32Array(360 * 400).fill(Number.NaN)
    for (let i = 0; i < 360; i++)
      for (let j = 0; j < 400; j++) {
        const octantNorth = i >= 338 || i < 23
        cnrDb[i * 400 + j] = octantNorth ? 50 : j < 130 ? 20 : Number.NaN
        if (i === 180) mask.state[i * 400 + j] = CELL.outside
      }
    const levels = clutterLevels({ grid, cnrDb }, mask, spread, 50, LEVEL_RING_M.km)
    expect(levels.rings.map((r) => [r.fromM, r.toM])).toEqual([
      [0, 10_000],
      [10_000, 20_000],
      [20_000, 30_000],
    ])
    const disc = (Math.PI * 30 ** 2 * 359) / 360
    expect(levels.whole.knownKm2).toBeCloseTo(disc, 0)
    expect(levels.octants.map((o) => o.azimuthDeg)).toEqual([0, 45, 90, 135, 180, 225, 270, 315])
    expect(levels.octants[0].meanDb).toBeCloseTo(50, 2)
    expect(levels.octants[0].over40Pct).toBe(100)
    expect(levels.octants[0].p90Db).toBeCloseTo(50 + percentileOverMeanDb(1, 0.9), 1)
    expect(levels.octants[1].over40Pct).toBe(0)
    expect(levels.octants[1].meanDb).toBeLessThan(20)
    // beyond 9.75 km only the north has clutter, an eighth of the area: 90 % of it is at zero but for that
    expect(levels.rings[2].meanDb).toBeCloseTo(50 + toDb(45 / 359), 1)
    expect(levels.rings[2].p90Db).not.toBeNull()
    expect(levels.sectors[2 * 8 + 3]).toMatchObject({ meanDb: null, p90Db: null, p99Db: null, over40Pct: 0 })
    const sum = levels.sectors.reduce((s, x) => s + x.knownKm2, 0)
    expect(sum).toBeCloseTo(levels.whole.knownKm2, 6)
  })

  it('gives the peak cell by its 99 % level, less short-range sensitivity', () => {
    const { mask } = flatCells(grid, 20)
    const cnrDb = new Float32Array(360 * 400).fill(10)
    cnrDb[90 * 400 + 20] = 60
    cnrDb[200 * 400 + 300] = 55
    const wide = spread.slice()
    wide[200 * 400 + 300] = 4
    expect(clutterLevels({ grid, cnrDb }, mask, wide, 50, LEVEL_RING_M.nm).peak).toMatchObject({
      azimuthDeg: 200,
      rangeM: 300.5 * 75,
      meanDb: 55,
    })
    const lessDb = Float32Array.from({ length: 400 }, (_, j) => (j < 100 ? 40 : 0))
    const { peak } = clutterLevels({ grid, cnrDb }, mask, spread, 50, LEVEL_RING_M.nm, lessDb)
    expect(peak?.p99Db).toBeCloseTo(55 + percentileOverMeanDb(1, 0.99), 2)
  })
})

describe('strength and spread of cells', () => {
  it('equal those of the point at the centre, with sea and urban context', async () => {
    const grid: PolarShape = { azimuths: 720, ranges: 160, azimuthStepDeg: 0.5, rangeStepM: 75 }
    const earth = { effectiveEarthFactor: 4 / 3, earthRadiusM: null }
    const radar = testRadar({ pulseWidthS: 0.5e-6, antenna: { azimuthBeamwidthDeg: 2 } })
    const weather = { gas: 'none', rainRateMmH: 0, rainTopM: 4000, rainExtentM: 15_000, seaState: 5, tideM: -1 } as const
    const { ground, site: place } = await hills()
    const { site, masks } = finish(sweep(ground, place, [60], grid, earth))
    const out = { strengthDb: new Float32Array(720 * 160), spread: new Float32Array(720 * 160) }
    fillCellStrength(site, masks[0], ground.codes, place, 60, radar, { weather }, out)
    const all = finish(clutterToNoise(site, masks[0], ground.codes, place, 60, earth, radar, 0, { weather }))
    const at = pointClutter(ground, place, 60, earth, radar, 0, grid, { weather, sideLobeCnrDb: all.sideLobeCnrDb })
    const random = randomNumbers(9)
    const rows = new Set<string>()
    let compared = 0
    while (compared < 300) {
      const cell = Math.floor(random() * 720 * 160)
      if (masks[0].state[cell] !== CELL.inSight || cell % 160 < 6) continue
      const point = at(cellCentre(place, grid, cell))
      const want = point.strengthDb ?? Number.NaN
      if (Number.isNaN(want)) expect(out.strengthDb[cell]).toBeNaN()
      else expect(Math.abs(out.strengthDb[cell] - want), `${point.rowName} ${cell}`).toBeLessThan(0.03)
      rows.add(point.rowName ?? '')
      compared++
    }
    for (const name of ['sea', 'urban', 'forest high relief']) expect([...rows]).toContain(name)
    const spreads = [...out.spread].filter((_, k) => masks[0].state[k] === CELL.inSight)
    expect(Math.min(...spreads)).toBeGreaterThanOrEqual(1)
    expect(Math.max(...spreads)).toBeLessThan(6)
  })
})
