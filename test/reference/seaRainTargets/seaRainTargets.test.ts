import { describe, expect, it } from 'vitest'
import {
  gaussianVolumeM3,
  georgiaTechStrengthDb,
  rainReflectivity,
  rainReflectivityDb,
  reflectivityFactor,
  seaStrengthDb,
  shipRcsM2,
  toDb,
} from '../../../core/index.ts'
import { type Case, expectCase, titleOf } from '../cases.ts'
import cases from './cases.json'

const all = cases as unknown as Case[]

function compute({ topic, inputs: x }: Case): Record<string, number> {
  switch (topic) {
    case 'sea-nrl':
      return { sigma0_dB: seaStrengthDb(x.f_GHz, x.grazing_deg, x.seaState, x.pol) }
    case 'land-gtri':
      return { sigma0_dB: georgiaTechStrengthDb({ a: x.A, b: x.B, c: x.C, d: x.D }, x.grazing_deg, x.sigma_h_m, x.lambda_m) }
    case 'rcs':
      return { sigma_m2: shipRcsM2(x.f_MHz * 1e6, x.displacement_kt) }
    default: {
      if (x.tau_s !== undefined) {
        const volume = gaussianVolumeM3(x.R_m, x.az_deg, x.el_deg, x.tau_s)
        return { V_m3: volume, sigma_m2_at2p8GHz_10mmh: volume * rainReflectivity(2.8e9, 10) }
      }
      const f = x.f_GHz * 1e9
      return {
        Z_mm6m3: reflectivityFactor(x.R_mmh),
        dBZ: toDb(reflectivityFactor(x.R_mmh)),
        eta_m2_m3: rainReflectivity(f, x.R_mmh),
        eta_dB: rainReflectivityDb(f, x.R_mmh),
      }
    }
  }
}

describe('sea, rain, higher-angle land, targets', () => {
  it('has every case', () => expect(all.length).toBe(42))
  for (const c of all) it(titleOf(c), () => expect(expectCase(c, compute(c))).toBeGreaterThan(0))
})
