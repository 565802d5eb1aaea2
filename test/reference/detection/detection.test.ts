import { describe, expect, it } from 'vitest'
import {
  albersheimSnrDb,
  cfarLossDb,
  cfarMultiplier,
  detectionThreshold,
  probabilityOfDetection,
  requiredSnrDb,
  type SwerlingCase,
  shnidmanSnrDb,
  weibullThresholdDb,
} from '../../../core/index.ts'
import { type Case, expectCase, titleOf } from '../cases.ts'
import cases from './cases.json'

const all = cases as unknown as Case[]
const SWERLING: readonly SwerlingCase[] = [0, 1, 2, 3, 4]
const bySwerling = (snr: (s: SwerlingCase) => number) => Object.fromEntries(SWERLING.map((s) => [`sw${s}_dB`, snr(s)]))

function compute({ topic, inputs: x, expected }: Case): Record<string, number> {
  switch (topic) {
    case 'detection-snr':
      return bySwerling((s) => requiredSnrDb(x.Pd, x.Pfa, x.N, s))
    case 'detection-shnidman':
      return bySwerling((s) => shnidmanSnrDb(x.Pd, x.Pfa, x.N, s))
    case 'detection-threshold':
      return { T: detectionThreshold(x.Pfa, x.N) }
    case 'detection-albersheim':
      return { snr_dB: albersheimSnrDb(x.Pd, x.Pfa, x.N) }
    case 'cfar':
      return {
        alpha: cfarMultiplier(x.Nref, x.Pfa),
        ...Object.fromEntries(
          Object.keys(expected).flatMap((key) => {
            const pd = /^loss_pd([\d.]+)_dB$/.exec(key)
            return pd ? [[key, cfarLossDb(x.Nref, x.Pfa, Number(pd[1]))]] : []
          }),
        ),
      }
    default: {
      const t = weibullThresholdDb(x.aw, x.Pfa)
      return { overMedian_dB: t.overMedianDb, overMean_dB: t.overMeanDb, extraVsRayleigh_dB: t.extraDb }
    }
  }
}

describe('detection', () => {
  it('has every case', () => expect(all.length).toBe(50))
  for (const c of all) it(titleOf(c), () => expect(expectCase(c, compute(c))).toBeGreaterThan(0))
  it('rises with S/N for every case and number of pulses', () => {
    for (const s of SWERLING)
      for (const n of [1, 2.6, 8, 20]) {
        const threshold = detectionThreshold(1e-6, n)
        let before = 0
        for (let snr = -20; snr <= 60; snr += 0.5) {
          const pd = probabilityOfDetection(snr, threshold, n, s)
          expect(pd).toBeGreaterThanOrEqual(before - 1e-12)
          before = pd
        }
        expect(before).toBeGreaterThan(0.999)
      }
  })
})
