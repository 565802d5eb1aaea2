import { describe, expect, it } from 'vitest'
import { constantGammaDb } from '../../../core/index.ts'
import { type Case, expectCase, titleOf } from '../cases.ts'
import cases from './cases.json'

const all = cases as unknown as Case[]

describe('constant-gamma land clutter', () => {
  it('has all 13 cases', () => expect(all).toHaveLength(13))
  it.each(all.map((c) => [titleOf(c), c] as const))('%s', (_, c) =>
    expect(expectCase(c, { sigma0_dB: constantGammaDb(c.inputs.gamma_dB, c.inputs.grazing_deg) })).toBe(1),
  )
})
