import { beforeAll, describe, expect, test } from 'vitest'
import { cellAreasM2, type Figures, finish, type OptionResult } from '../../core/index.ts'
import { allResults, type OpenDemo, openDemo } from './openDemo.ts'

let demo: OpenDemo
let results: OptionResult[]
beforeAll(async () => {
  demo = await openDemo()
  results = allResults(demo.engine)
}, 300_000)

const figures = (candidate: string, heightM: number): Figures =>
  results.find((r) => r.ref.candidate === candidate && r.ref.heightM === heightM)!.figures
const approachPct = (candidate: string, heightM: number) =>
  figures(candidate, heightM).needs.find((n) => n.needId === 'approach')!.inSightPct
/** Candidates, best cover of the approach first. */
const ranking = (heightM: number) => ['A', 'B', 'C'].sort((p, q) => approachPct(q, heightM) - approachPct(p, heightM)).join('')

/** Land in sight beyond 18 km, km². */
function farLandInSightKm2(candidate: string, heightM: number): number {
  const tiltDeg = results.find((r) => r.ref.candidate === candidate)!.ref.tiltDeg
  const { site, mask } = finish(demo.engine.compute({ candidate, heightM, tiltDeg }))
  const { azimuths, ranges, rangeStepM } = site.grid
  const areaM2 = cellAreasM2(site.grid, demo.study.candidates[0].lat)
  let sum = 0
  for (let i = 0; i < azimuths; i++)
    for (let j = Math.ceil(18_000 / rangeStepM); j < ranges; j++) {
      const cell = i * ranges + j
      if (site.groundM[cell] > 0) sum += (mask.inSight[cell] / 65535) * areaM2[j]
    }
  return sum / 1e6
}

describe('the demo is worth a study', () => {
  test('nothing of it is unknown', () => {
    expect(results).toHaveLength(9)
    for (const r of results) expect(r.figures.unknownKm2).toBe(0)
  })

  test('the ranking by the approach turns with mast height: the hilltop leads on low masts and comes last on high ones', () => {
    expect(ranking(10)).toBe('BCA')
    expect(ranking(20)).toBe('ABC')
    expect(approachPct('B', 35)).toBeLessThan(approachPct('A', 35))
    expect(approachPct('B', 35)).toBeLessThan(approachPct('C', 35))
  })

  test('mast height decides at the airfield and hardly matters on the hilltop', () => {
    expect(approachPct('A', 35) - approachPct('A', 10)).toBeGreaterThan(25)
    expect(approachPct('B', 35) - approachPct('B', 10)).toBeLessThan(2)
  })

  test('more mast brings more clutter as well as more cover', () => {
    for (const id of ['A', 'B', 'C']) {
      expect(approachPct(id, 35)).toBeGreaterThan(approachPct(id, 10))
      expect(figures(id, 35).clutterOverKm2.over20).toBeGreaterThan(1.15 * figures(id, 10).clutterOverKm2.over20)
    }
  })

  test('the near ridge keeps the far mountains from the airfield, not from the hilltop', () => {
    const farA = farLandInSightKm2('A', 35)
    const farB = farLandInSightKm2('B', 35)
    expect(farA).toBeLessThan(15)
    expect(farB).toBeGreaterThan(4 * farA)
  })
})
