import { describe, expect, it } from 'vitest'
import {
  effectiveEarthFactor,
  gasLossDbKm,
  rainLaw,
  rainLaws,
  rainLossDbKm,
  refractivity,
  refractivityShortForm,
  saturationPressureHpa,
  twoWayGasLossDb,
  vapourPressureHpa,
} from '../../../core/index.ts'
import { type Case, expectCase, titleOf } from '../cases.ts'
import cases from './cases.json'

const all = cases as unknown as Case[]

function compute({ id, topic, inputs: x }: Case): Record<string, number | null> {
  if (topic === 'gas-attenuation') {
    if (id === 'gas-path-flat') return { twoWay_dB: twoWayGasLossDb({ oxygenDbKm: x.gamma_dBkm, waterDbKm: 0 }, 0, 0, x.R_km * 1000) }
    const g = gasLossDbKm(x.f_GHz, { dryPressureHpa: x.pDry_hPa, temperatureK: x.T_K, vapourGM3: x.rho_gm3 })
    return { gammaO_dBkm: g.oxygenDbKm, gammaW_dBkm: g.waterDbKm, total_dBkm: g.oxygenDbKm + g.waterDbKm }
  }
  if (topic === 'rain-attenuation') {
    if (x.elev_deg !== undefined) {
      const law = rainLaw(x.f_GHz, x.elev_deg, x.tilt_deg)
      return { k: law.k, alpha: law.alpha, gamma_dBkm: rainLossDbKm(law, x.R_mmh) }
    }
    const { horizontal: h, vertical: v } = rainLaws(x.f_GHz)
    return {
      kH: h.k,
      alphaH: h.alpha,
      kV: v.k,
      alphaV: v.alpha,
      gammaH_10mmh_dBkm: rainLossDbKm(h, 10),
      gammaH_25mmh_dBkm: rainLossDbKm(h, 25),
      gammaV_25mmh_dBkm: rainLossDbKm(v, 25),
      gammaH_50mmh_dBkm: rainLossDbKm(h, 50),
    }
  }
  if (x.dNdh_perkm !== undefined) return { k: effectiveEarthFactor(x.dNdh_perkm) }
  return {
    es_hPa: saturationPressureHpa(x.t_C, x.P_hPa),
    e_hPa: vapourPressureHpa(x.t_C, x.P_hPa, x.RH_pct),
    N: refractivity(x.t_C, x.P_hPa, x.RH_pct),
    N_4810form: refractivityShortForm(x.t_C, x.P_hPa, x.RH_pct),
  }
}

describe('atmosphere', () => {
  it('has every case', () => expect(all.length).toBe(43))
  for (const c of all) it(titleOf(c), () => expect(expectCase(c, compute(c))).toBeGreaterThan(0))
})
