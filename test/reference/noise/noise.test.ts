import { describe, expect, it } from 'vitest'
import { noiseDbw, T0_K } from '../../../core/index.ts'
import { testRadar } from '../../radar/testRadar.ts'
import { type Case, expectCase, titleOf } from '../cases.ts'
import cases from './cases.json'

const all = cases as unknown as Case[]

describe('thermal noise', () => {
  it('has all 3 cases', () => expect(all).toHaveLength(3))
  it.each(all.map((c) => [titleOf(c), c] as const))('%s', (_, c) => {
    expect(c.inputs.T0_K).toBe(T0_K)
    const r = testRadar({ noiseBandwidthHz: c.inputs.B_Hz, noiseFigureDb: c.inputs.F_dB })
    expect(expectCase(c, { dBm: noiseDbw(r) + 30 })).toBe(1)
  })
})
