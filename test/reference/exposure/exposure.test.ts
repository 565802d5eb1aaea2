import { describe, expect, it } from 'vitest'
import {
  exposureRangeM,
  fieldRegionsM,
  keepClear,
  localExposureLimits,
  powerDensityWm2,
  wholeBodyExposureLimits,
} from '../../../core/index.ts'
import { type Case, expectCase, titleOf } from '../cases.ts'
import cases from './cases.json'

const all = cases as unknown as Case[]

function compute({ inputs: x }: Case): Record<string, number> {
  if (x.D_m !== undefined) {
    const r = fieldRegionsM(x.D_m, x.f_Hz)
    return { R_m: r.farFieldM, Rnf_quarter_m: r.nearFieldM, Rff_0p6_m: r.transitionM }
  }
  if (x.S_Wm2 !== undefined) return { R_m: exposureRangeM(x.Pavg_W, x.G_dBi, x.S_Wm2) }
  if (x.Pavg_W !== undefined) return { S_Wm2: powerDensityWm2(x.Pavg_W, x.G_dBi, x.R_m) }
  const local = localExposureLimits(x.f_GHz)
  const whole = wholeBodyExposureLimits(x.f_GHz)
  return {
    local6min_public_Wm2: local.publicWm2,
    local6min_occ_Wm2: local.occupationalWm2,
    wholeBody30min_public_Wm2: whole.publicWm2,
    wholeBody30min_occ_Wm2: whole.occupationalWm2,
  }
}

describe('RF exposure', () => {
  it('has every case', () => expect(all.length).toBe(15))
  for (const c of all) it(titleOf(c), () => expect(expectCase(c, compute(c))).toBeGreaterThan(0))
  it('arithmetic: 750 kW at a duty of 0.23 % and 45.5 dBi, far field, factor 1, gives 697.9 m at 10 W/m² and 312.1 m at 50', () => {
    expect(Math.abs(exposureRangeM(1725, 45.5, 10) - 697.9)).toBeLessThanOrEqual(0.5)
    expect(Math.abs(exposureRangeM(1725, 45.5, 50) - 312.1)).toBeLessThanOrEqual(0.5)
  })
  it('never answers less than the far-field formula, and says when it lies inside the near field', () => {
    const k = keepClear({
      averagePowerW: 1725,
      gainDbi: 45.5,
      frequencyHz: 2.75e9,
      apertureWidthM: 8.8,
      apertureHeightM: 8.8,
      limitWm2: 10,
      reflectionFactor: 1,
    })
    expect(k.stoppedM).toBeGreaterThanOrEqual(k.farFieldFormulaM)
    expect(k.insideNearField).toBe(true)
  })
})
