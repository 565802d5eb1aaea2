import { describe, expect, it } from 'vitest'
import { meanOverMedianDb, percentileOfMean, percentileOverMeanDb, sdOverMeanDb, weibullSpread } from '../../../core/index.ts'
import { type Case, expectCase, titleOf } from '../cases.ts'
import cases from './cases.json'

const all = cases as unknown as Case[]

function compute({ inputs: x }: Case): Record<string, number> {
  if (x.cellArea_m2 !== undefined) return { aw: weibullSpread({ spread1e3: x.aw_1e3, spread1e6: x.aw_1e6 }, x.cellArea_m2) }
  if (x.mean_dB === undefined) return { meanOverMedian_dB: meanOverMedianDb(x.aw), sdOverMean_dB: sdOverMeanDb(x.aw) }
  const level = (p: number) => x.mean_dB + percentileOverMeanDb(x.aw, p)
  return { p50_dB: level(0.5), p70_dB: level(0.7), p90_dB: level(0.9), p99_dB: level(0.99), percentileOfMean: percentileOfMean(x.aw) }
}

describe('Weibull spread of land clutter', () => {
  it('has all 15 cases', () => expect(all).toHaveLength(15))
  it.each(all.map((c) => [titleOf(c), c] as const))('%s', (_, c) => expect(expectCase(c, compute(c))).toBeGreaterThan(0))
})
