import { describe, expect, it } from 'vitest'
import { cosecantGainLossDb, dwellS, elevationGain, gainFromBeamwidthsDbi, gaussianBeam, hitsPerScan, toDb } from '../../../core/index.ts'
import { testRadar } from '../../radar/testRadar.ts'
import { type Case, expectCase, titleOf } from '../cases.ts'
import cases from './cases.json'

const all = cases as unknown as Case[]

function compute({ inputs: x }: Case): Record<string, number> {
  if (x.K !== undefined) return { G_dBi: gainFromBeamwidthsDbi(x.az_deg, x.el_deg, x.K) }
  if (x.rpm !== undefined) return { hits: hitsPerScan(x.az_deg, x.prf_Hz, x.rpm), dwell_ms: 1000 * dwellS(x.az_deg, x.rpm) }
  if (x.offsetOverHPBW !== undefined) {
    const oneWay = toDb(gaussianBeam(x.offsetOverHPBW, 1))
    return { oneWay_dB: oneWay, twoWay_dB: 2 * oneWay }
  }
  const low = x.theta0_deg
  const { antenna } = testRadar({
    antenna: { elevationPattern: 'cosecant-squared', elevationBeamwidthDeg: low, cosecantLimitDeg: x.thetaMax_deg, tiltDeg: low / 2 },
  })
  const patternDb = (deg: number) => toDb(elevationGain(antenna, deg))
  return { gainLoss_dB: cosecantGainLossDb(low, x.thetaMax_deg), patternAt15deg_dB: patternDb(15) - patternDb(low) }
}

describe('antenna', () => {
  it('has all 9 cases', () => expect(all).toHaveLength(9))
  it.each(all.map((c) => [titleOf(c), c] as const))('%s', (_, c) => expect(expectCase(c, compute(c))).toBeGreaterThan(0))
})
