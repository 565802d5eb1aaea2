import { beforeAll, describe, expect, it } from 'vitest'
import { figureWords } from '../../app/words/index.ts'
import type { Ask } from '../../core/index.ts'
import { layerNeed, plainGround, studyOf, uniformLand, type Worked, work } from './plain.ts'

let hilly: Ask['ground']
beforeAll(async () => {
  hilly = await plainGround(26_000, (e, n) => 60 * Math.sin(e / 1700) * Math.cos(n / 2300) + (Math.hypot(e - 9000, n) < 1500 ? 150 : 0))
})
const needs = [layerNeed({ heightM: 150 })]
const radar = { suppression: { kind: 'stated' as const, statedDb: 25 }, antenna: { ...studyOf({ needs }).radar.antenna, sidelobeDb: -200 } }
const option = (k?: number): Worked =>
  work(hilly, { needs, radar, landTable: uniformLand(-30), ...(k === undefined ? {} : { atmosphere: { effectiveEarthFactor: k } }) })

describe('clutter at k = 2.75', () => {
  it('stands beside the figures at the study’s k and equals a study at 2.75', () => {
    const { figures } = option().result
    const own = option(2.75).result.figures
    const high = figures.atHighK!
    expect(high.k).toBe(2.75)
    expect(own.atHighK).toBeNull()
    for (const level of ['over0', 'over20', 'over40', 'over60'] as const)
      expect(high.clutterOverKm2[level]).toBeCloseTo(own.clutterOverKm2[level], 6)
    // more ground comes into sight
    expect(high.clutterOverKm2.over0).toBeGreaterThan(figures.clutterOverKm2.over0)
    const [need] = own.needs
    expect(high.suppression).toEqual([
      {
        needId: 'n',
        name: need.name,
        p50Db: need.suppression.p50Db,
        p90Db: need.suppression.p90Db,
        p99Db: need.suppression.p99Db,
        shortKm2: need.suppression.shortKm2,
      },
    ])
    expect(high.secondTimeAroundKm2).toBe(own.secondTimeAround.km2)
    console.log(
      `ground over 0 dB: ${figures.clutterOverKm2.over0.toFixed(0)} km² at 4/3, ${high.clutterOverKm2.over0.toFixed(0)} km² at 2.75`,
    )
  })

  it('is in the flat figures under names with words of their own', () => {
    const { flat } = option().result.figures
    const keys = Object.keys(flat).filter((key) => key.includes('k2_75') && !key.startsWith('roads'))
    expect(keys).toHaveLength(10)
    for (const key of keys) {
      expect(flat[key] === null || Number.isFinite(flat[key]), key).toBe(true)
      expect(figureWords(key)?.label, key).toContain('k = 2.75')
    }
  })

  it('comes after the figures of every option, not before', () => {
    const w = work(hilly, { needs, radar, candidate: { mastHeightsM: [20, 50] } })
    const serials = w.engine.results().map((r) => r.serial)
    expect(serials).toEqual([3, 4])
    expect(w.engine.results().every((r) => r.figures.atHighK !== null)).toBe(true)
  })
})
