import { describe, expect, it } from 'vitest'
import { M_PER_NM, rangeForSignalToNoiseM, signalToNoiseDb } from '../../../core/index.ts'
import { sBandRadar, testRadar } from '../../radar/testRadar.ts'
import { type Case, expectCase, titleOf } from '../cases.ts'
import cases from './cases.json'

const all = cases as unknown as Case[]

function compute({ inputs: x }: Case): Record<string, number> {
  const r = testRadar({
    frequencyHz: x.f_Hz,
    peakPowerW: x.Pt_W,
    noiseBandwidthHz: x.B_Hz,
    noiseFigureDb: x.F_dB,
    systemLossDb: x.L_dB,
    antenna: { gainDbi: x.G_dB },
  })
  return x.R_m === undefined
    ? { R_m: rangeForSignalToNoiseM(r, x.sigma_m2, x.snr_dB) }
    : { snr_dB: signalToNoiseDb(r, { rcsM2: x.sigma_m2, slantRangeM: x.R_m }) }
}

describe('radar equation', () => {
  it('has all 3 cases', () => expect(all).toHaveLength(3))
  it.each(all.map((c) => [titleOf(c), c] as const))('%s', (_, c) => expect(expectCase(c, compute(c))).toBeGreaterThan(0))
  it.each([
    [20, 27.11],
    [40, 15.07],
    [60, 8.03],
  ])('1 m² at S band, %i NM: S/N %f dB — arithmetic', (nm, snrDb) =>
    expect(Math.abs(signalToNoiseDb(sBandRadar(), { rcsM2: 1, slantRangeM: nm * M_PER_NM }) - snrDb)).toBeLessThanOrEqual(0.05),
  )
})
