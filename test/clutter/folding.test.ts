import { beforeAll, describe, expect, it } from 'vitest'
import {
  apparentRangeM,
  clutterToNoise,
  defaultFoldRangeM,
  type FoldedCells,
  foldedClutter,
  foldRow,
  pointClutter,
  secondTimeAround,
  trueRangesM,
} from '../../core/clutter/index.ts'
import { type SightCells, type SiteCells, sweep } from '../../core/masking/index.ts'
import { cellCentre, isUnknown, type PolarShape } from '../../core/polar/index.ts'
import type { Ground, Site } from '../../core/terrain/index.ts'
import { fromDb, M_PER_NM, SPEED_OF_LIGHT_MS, toDb } from '../../core/units/index.ts'
import { finish } from '../../core/work/index.ts'
import { testRadar } from '../radar/testRadar.ts'
import { hills } from './hills.ts'

describe('range ambiguity', () => {
  it('95 NM at 1 000 Hz appears at 14.06 NM; at 1 100 Hz elsewhere', () => {
    expect(apparentRangeM(95 * M_PER_NM, 1000) / M_PER_NM).toBeCloseTo(14.06, 2)
    expect(apparentRangeM(95 * M_PER_NM, 1100) / M_PER_NM).toBeCloseTo(95 - 73.58, 2)
    expect(apparentRangeM(40 * M_PER_NM, 1000) / M_PER_NM).toBeCloseTo(40, 9)
  })

  it('mountains to 200 NM: the list of true ranges behind one gate, by PRF', () => {
    const nm = (prf: number) => trueRangesM(14.06 * M_PER_NM, prf, 200 * M_PER_NM).map((r) => Math.round((r / M_PER_NM) * 10) / 10)
    expect(nm(1000)).toEqual([14.1, 95, 175.9])
    expect(nm(1100)).toEqual([14.1, 87.6, 161.2])
  })

  it('is looked for out to c/2f of the lowest PRF and the instrumented range', () =>
    expect(defaultFoldRangeM({ prfHz: [1100, 1000], instrumentedRangeM: 110_000 })).toBeCloseTo(SPEED_OF_LIGHT_MS / 2000 + 110_000, 6))

  it('puts a mountain at 95 NM into the gate at 14.06 NM and no other, and twice round at 175.9 NM', () => {
    const grid: PolarShape = { azimuths: 4, ranges: 2000, azimuthStepDeg: 90, rangeStepM: 200 }
    const ratio = new Float32Array(4 * 2000)
    const put = (nm: number, value: number) => {
      ratio[2 * 2000 + Math.floor((nm * M_PER_NM) / 200)] = value
    }
    put(95, 1000)
    put(175.94, 10)
    const slants = Float64Array.from({ length: 1000 }, (_, j) => (j + 0.5) * 200)
    const out = new Float32Array(1000)
    foldRow({ grid, ratio }, 2, slants, SPEED_OF_LIGHT_MS / 2000, 1, out)
    const gates = Array.from(out, (v, j) => [j, v]).filter(([, v]) => v > 0)
    const sum = gates.reduce((s, [, v]) => s + v, 0)
    expect(sum).toBe(1010)
    for (const [j] of gates) expect(((j + 0.5) * 200) / M_PER_NM).toBeCloseTo(14.06, 0)
    // gates past c/2f do not exist
    expect(out.subarray(Math.ceil(SPEED_OF_LIGHT_MS / 2000 / 200)).every((v) => v === 0)).toBe(true)
  })
})

describe('folded clutter of an option', () => {
  const NEAR: PolarShape = { azimuths: 720, ranges: 100, azimuthStepDeg: 0.5, rangeStepM: 75 }
  const EARTH = { effectiveEarthFactor: 4 / 3, earthRadiusM: null }
  // c/2f = 6 km and 5 km: the hills of the test ground fold twice
  const PRFS = [SPEED_OF_LIGHT_MS / 12_000, SPEED_OF_LIGHT_MS / 10_000]
  const radar = (over: Parameters<typeof testRadar>[0] = {}) =>
    testRadar({ pulseWidthS: 0.5e-6, prfHz: PRFS, ...over, antenna: { azimuthBeamwidthDeg: 2, sidelobeDb: -28 } })
  let g: Ground
  let place: Site
  let site: SiteCells
  let mask: SightCells
  const fold = (over: Parameters<typeof testRadar>[0] = {}, foldRangeM = 15_000): FoldedCells =>
    finish(foldedClutter(g, place, 40, EARTH, radar(over), 1, site, foldRangeM))
  beforeAll(async () => {
    ;({ ground: g, site: place } = await hills())
    const swept = finish(sweep(g, place, [40], NEAR, EARTH))
    site = swept.site
    mask = swept.masks[0]
  })

  it('is the sum of the clutter of the true places for one PRF, the worst of several, their mean when staggered', () => {
    const grid = { ...NEAR, ranges: 200 }
    const swept = finish(sweep(g, place, [40], grid, EARTH))
    const far = finish(clutterToNoise(swept.site, swept.masks[0], g.codes, place, 40, EARTH, radar(), 1)).cnrDb
    const [first, second] = PRFS.map((f) => fold({ prfHz: [f] }).ratio)
    const worst = fold().ratio
    const mean = fold({ prfMode: 'pulseStagger' }).ratio
    let compared = 0
    for (let i = 0; i < 720; i += 7)
      for (let j = 10; j < 76; j += 9) {
        const at = i * 100 + j
        const byHand = (stepCells: number, ranges: number) => {
          let sum = 0
          for (let k = j + stepCells; k < ranges; k += stepCells) sum += fromDb(far[i * 200 + k]) || 0
          return sum
        }
        // slant and ground range differ by less than half a cell at these heights only on level ground: compare where they do
        const slant = Math.hypot((j + 0.5) * 75, site.siteGroundM + 40 - site.groundM[at])
        if (Math.floor(slant / 75) !== j || isUnknown(mask.state[at])) continue
        const six = byHand(80, 200)
        expect(Math.abs(first[at] - six)).toBeLessThanOrEqual(1e-4 * six)
        expect(worst[at]).toBe(Math.max(first[at], second[at]))
        expect(Math.abs(mean[at] - (first[at] + second[at]) / 2)).toBeLessThanOrEqual(1e-5 * mean[at])
        compared++
      }
    expect(compared).toBeGreaterThan(500)
  })

  it('dwell to dwell, the PRF that decides when fewer than all are needed: the lowest of two for one, the worst for both', () => {
    const over = { prfMode: 'dwellStagger' } as const
    const [first, second, both, one] = [
      fold({ prfHz: [PRFS[0]] }),
      fold({ prfHz: [PRFS[1]] }),
      fold({ ...over, dwellsNeeded: 2 }),
      fold({ ...over, dwellsNeeded: 1 }),
    ]
    const pulseM = (SPEED_OF_LIGHT_MS * 0.5e-6) / 2
    let compared = 0
    for (let cell = 0; cell < one.ratio.length; cell += 7) {
      expect(one.ratio[cell]).toBeLessThanOrEqual(both.ratio[cell])
      expect(both.ratio[cell]).toBe(Math.max(first.ratio[cell], second.ratio[cell]))
      const rangeM = ((cell % NEAR.ranges) + 0.5) * NEAR.rangeStepM
      // away from gates under a later pulse
      if (Math.min(...[5000, 6000].map((u) => Math.abs(rangeM - u))) < pulseM + 200 || first.ratio[cell] === second.ratio[cell]) continue
      expect(one.ratio[cell]).toBe(Math.min(first.ratio[cell], second.ratio[cell]))
      compared++
    }
    expect(compared).toBeGreaterThan(300)
    expect(fold(over).ratio).toEqual(both.ratio)
  })

  it('says where the terrain ends: not evaluated beyond, never 0', () => {
    const far = fold({}, 60_000)
    expect(far.evaluatedToM).toBeGreaterThan(3_000)
    expect(far.evaluatedToM).toBeLessThan(18_100)
    expect(secondTimeAround(far, place.lat).notEvaluatedBeyondM).toBe(far.evaluatedToM)
    const nothing = { ...far, ratio: new Float32Array(far.ratio.length) }
    expect(secondTimeAround(nothing, place.lat)).toEqual({ km2: null, notEvaluatedBeyondM: far.evaluatedToM })
    const whole = { ...nothing, evaluatedToM: 60_000 }
    expect(secondTimeAround(whole, place.lat)).toEqual({ km2: 0, notEvaluatedBeyondM: null })
  })

  it('adds to C/N and, less its own improvement, to the residue; at a point as in the cell', () => {
    const folded = fold()
    const improvementDb = { byCode: [20, 20, 20, 20, 20], sea: 20, rain: 20, discrete: 20, folded: 3 }
    const run = (options: object) =>
      finish(clutterToNoise(site, mask, g.codes, place, 40, EARTH, radar(), 1, { improvementDb, ...options }))
    const plain = run({})
    const all = run({ foldedRatio: folded.ratio })
    const { sideLobeCnrDb, sideLobeResidueDb } = all
    const options = { improvementDb, foldedRatio: folded.ratio, sideLobeCnrDb, sideLobeResidueDb }
    const at = pointClutter(g, place, 40, EARTH, radar(), 1, NEAR, options)
    let compared = 0
    for (let cell = 23; cell < folded.ratio.length && compared < 40; cell += 1033) {
      if (!(folded.ratio[cell] > 0) || isUnknown(mask.state[cell]) || Number.isNaN(plain.cnrDb[cell])) continue
      expect(all.cnrDb[cell]).toBeCloseTo(toDb(fromDb(plain.cnrDb[cell]) + folded.ratio[cell]), 3)
      expect(all.residueDb[cell]).toBeCloseTo(toDb(fromDb(plain.residueDb[cell]) + folded.ratio[cell] / fromDb(3)), 3)
      const point = at(cellCentre(place, NEAR, cell))
      expect(Math.abs((point.cnrDb ?? Number.NaN) - all.cnrDb[cell])).toBeLessThanOrEqual(0.05)
      expect(Math.abs((point.residueDb ?? Number.NaN) - all.residueDb[cell])).toBeLessThanOrEqual(0.05)
      expect(point.lines.map((l) => l.key)).toContain('folded')
      compared++
    }
    expect(compared).toBe(40)
  })
})
