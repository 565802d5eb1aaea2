import { describe, expect, test } from 'vitest'
import {
  coverageOf,
  mustNeedsPass,
  type NeedFigure,
  nonDominated,
  type RankingDoc,
  type Rated,
  rankOptions,
  utility,
} from '../../core/index.ts'

const need = (part: Partial<NeedFigure>): NeedFigure =>
  ({ needId: 'n1', must: true, notAssessed: null, met: true, passes: true, measure: 'area', ...part }) as NeedFigure
const option = (candidate: string, flat: Record<string, number | null>, needs: NeedFigure[] = [need({})]): Rated => ({
  ref: { candidate, heightM: 20, tiltDeg: 0 },
  figures: { needs, flat },
})
const RANKING: RankingDoc = {
  criteria: [
    { figure: 'usable_pct', worst: 50, best: 100, weight: 3 },
    { figure: 'clutter_km2', worst: 40, best: 0, weight: 2 },
  ],
}
const names = (r: ReturnType<typeof rankOptions>) => r.options.map((o) => `${o.rank} ${o.ref.candidate}`)

describe('utility', () => {
  test('straight between the stated worst and best, held outside, whichever is larger', () => {
    expect(utility(75, 50, 100)).toBe(0.5)
    expect(utility(10, 40, 0)).toBe(0.75)
    expect(utility(20, 50, 100)).toBe(0)
    expect(utility(-5, 40, 0)).toBe(1)
  })
})

describe('score', () => {
  test('is the weighted mean of the utilities', () => {
    // A: u 0.8 and 0.25, (3·0.8 + 2·0.25)/5 = 0.58; B: u 0.4 and 1, (3·0.4 + 2·1)/5 = 0.64
    const r = rankOptions([option('A', { usable_pct: 90, clutter_km2: 30 }), option('B', { usable_pct: 70, clutter_km2: 0 })], RANKING)
    expect(names(r)).toEqual(['1 B', '2 A'])
    expect(r.options[0].score).toBeCloseTo(0.64, 12)
    expect(r.options[1].score).toBeCloseTo(0.58, 12)
    expect(r.options[1].criteria.map((c) => [c.u, c.share])).toEqual([
      [0.8, 0.6],
      [0.25, 0.4],
    ])
  })
  test('an option that fails a must need ranks below all that pass, one with an open k between them, a wish does not count', () => {
    const all = { usable_pct: 100, clutter_km2: 0 }
    const poor = { usable_pct: 55, clutter_km2: 39 }
    const r = rankOptions(
      [
        option('fails', all, [need({ met: false, passes: false })]),
        option('atOneK', all, [need({ met: true, passes: false })]),
        option('open', all, [need({ passes: null })]),
        option('wish', poor, [need({}), need({ needId: 'n2', must: false, met: false, passes: false })]),
        option('passes', poor),
      ],
      RANKING,
    )
    expect(names(r)).toEqual(['1 wish', '1 passes', '3 open', '4 fails', '4 atOneK'])
  })
  test('without a figure there is no score, and the option comes last of its group', () => {
    const r = rankOptions([option('A', { usable_pct: null, clutter_km2: 0 }), option('B', { usable_pct: 50, clutter_km2: 40 })], RANKING)
    expect(names(r)).toEqual(['1 B', '2 A'])
    expect(r.options.map((o) => o.score)).toEqual([0, null])
  })
  test('the mast height itself may be a criterion: less is better', () => {
    const tall = { ...option('B', { usable_pct: 90 }), ref: { candidate: 'B', heightM: 40, tiltDeg: 0 } }
    const r = rankOptions([tall, option('A', { usable_pct: 90 })], {
      criteria: [{ figure: 'mast_height_m', worst: 40, best: 0, weight: 1 }],
    })
    expect(r.options.map((o) => [o.ref.candidate, o.score])).toEqual([
      ['A', 0.5],
      ['B', 0],
    ])
  })
  test('a need that is not assessed neither passes nor fails', () => {
    expect(mustNeedsPass({ needs: [need({ notAssessed: 'file not read', met: false, passes: false })] })).toBe(true)
    expect(mustNeedsPass({ needs: [need({ met: false, passes: null })] })).toBe(false)
  })
})

describe('weights times 0.8 and 1.2', () => {
  const two = [option('A', { usable_pct: 90, clutter_km2: 30 }), option('B', { usable_pct: 70, clutter_km2: 0 })]
  test('say which weight changes which rank', () => {
    // weight of the first times 1.2: A 3.6·0.8 + 2·0.25 = 3.38, B 3.6·0.4 + 2 = 3.44: holds; second times 0.8: A 2.8, B 2.8: a tie
    const { effects } = rankOptions(two, RANKING)
    expect(effects.map((e) => [e.figure, e.factor, e.changes.map((c) => `${c.ref.candidate} ${c.from} to ${c.to}`)])).toEqual([
      ['usable_pct', 0.8, []],
      ['usable_pct', 1.2, []],
      ['clutter_km2', 0.8, ['A 2 to 1']],
      ['clutter_km2', 1.2, []],
    ])
  })
  test('a larger first weight turns the ranking', () => {
    // A 4.2·0.8 + 2·0.25 = 3.86, B 4.2·0.4 + 2 = 3.68
    const nearer = { criteria: [{ ...RANKING.criteria[0], weight: 3.5 }, RANKING.criteria[1]] }
    const { options, effects } = rankOptions(two, nearer)
    // A 3.5·0.8 + 0.5 = 3.3, B 3.5·0.4 + 2 = 3.4
    expect(options[0].ref.candidate).toBe('B')
    expect(effects[1].changes.map((c) => `${c.ref.candidate} ${c.from} to ${c.to}`)).toEqual(['B 1 to 2', 'A 2 to 1'])
  })
})

describe('coverage against clutter', () => {
  test('each need counts with its area; one need of an area alone where it is named', () => {
    const of = (needId: string, areaKm2: number, usablePct: number, shortKm2: number) =>
      need({ needId, areaKm2, usablePct, suppression: { shortKm2 } as NeedFigure['suppression'] })
    const needs = [of('n1', 300, 90, 4), of('n2', 100, 50, 2), need({ needId: 'fixes', measure: 'fixes', areaKm2: 0, usablePct: 0 })]
    expect(coverageOf({ needs }, null)).toEqual({ usablePct: 80, shortKm2: 6 })
    expect(coverageOf({ needs }, 'n2')).toEqual({ usablePct: 50, shortKm2: 2 })
    expect(coverageOf({ needs: [needs[2]] }, null)).toBeNull()
  })
  test('no other option gives as much for as little', () => {
    const points = [
      { gain: 90, cost: 5 },
      { gain: 80, cost: 1 },
      { gain: 80, cost: 2 },
      { gain: 90, cost: 5 },
      { gain: 95, cost: 9 },
    ]
    expect(nonDominated(points)).toEqual([true, true, false, true, true])
  })
})
