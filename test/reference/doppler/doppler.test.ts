import { describe, expect, it } from 'vitest'
import {
  blindSpeedMs,
  cancellerImprovementDb,
  clutterCovariance,
  type FilterWindow,
  filterGain,
  gaussianCorrelation,
  MS_PER_KT,
  movingSpreadMs,
  phaseLimitDb,
  quantisationLimitDb,
  rainSpreadMs,
  scanningCorrelation,
  scanningSpreadOverPrf,
  smallSpreadImprovementDb,
  staggerFirstBlind,
  toDb,
  unambiguousRangeM,
  vegetationCorrelation,
  vegetationSpectrum,
  wavelengthM,
} from '../../../core/index.ts'
import { type Case, expectCase, titleOf } from '../cases.ts'
import cases from './cases.json'

const all = cases as unknown as Case[]

function compute({ topic, inputs: x, expected }: Case): Record<string, number> {
  switch (topic) {
    case 'mti-scan-limit':
      return {
        sigma_over_prf: scanningSpreadOverPrf(x.hitsPerBeamwidth),
        I_dB: smallSpreadImprovementDb(x.pulsesInCanceller, scanningSpreadOverPrf(x.hitsPerBeamwidth)),
      }
    case 'mti-gaussian': {
      const rho = gaussianCorrelation(x.sigma_v_mps, wavelengthM(x.f_Hz))
      const sigmaHz = (2 * x.sigma_v_mps) / wavelengthM(x.f_Hz)
      const exact = (n: number) => cancellerImprovementDb(n, rho, 1 / x.prf_Hz)
      return {
        sigma_f_Hz: sigmaHz,
        I2_dB: exact(2),
        I3_dB: exact(3),
        I4_dB: exact(4),
        I2_smallSigma_dB: smallSpreadImprovementDb(2, sigmaHz / x.prf_Hz),
        I3_smallSigma_dB: smallSpreadImprovementDb(3, sigmaHz / x.prf_Hz),
      }
    }
    case 'icm-exponential': {
      const spectrum = vegetationSpectrum(x.wind_mph / 2.23694, x.f_GHz * 1e9)
      const rho = vegetationCorrelation(spectrum, wavelengthM(x.f_GHz * 1e9))
      return {
        dcac_r: spectrum.fixedOverMoving,
        r_dB: toDb(spectrum.fixedOverMoving),
        beta_spm: spectrum.slopeSPerM,
        sigma_v_ac_mps: movingSpreadMs(spectrum),
        I2_dB: cancellerImprovementDb(2, rho, 1 / x.prf_Hz),
        I3_dB: cancellerImprovementDb(3, rho, 1 / x.prf_Hz),
      }
    }
    case 'mti-stability':
      return { I_dB: x.bits !== undefined ? quantisationLimitDb(x.bits) : phaseLimitDb(x.dphi_rad ?? (x.dphi_deg * Math.PI) / 180) }
    case 'blind-speed': {
      const v = blindSpeedMs(x.f_Hz, x.prf_Hz)
      return { v1_mps: v, v1_knots: v / MS_PER_KT, Ru_km: unambiguousRangeM(x.prf_Hz) / 1000 }
    }
    case 'stagger':
      return {
        firstBlindOverUniform: staggerFirstBlind(x.ratios),
        firstBlind_mps: staggerFirstBlind(x.ratios) * blindSpeedMs(x.f_Hz, x.avgPrf_Hz),
      }
    case 'rain-doppler': {
      const s = rainSpreadMs(x.R_m, x.elHPBW_deg, x.k_shear_mps_per_km, x.sigma_turb)
      return { sigma_shear_mps: s.shearMs, sigma_v_mps: s.totalMs }
    }
    default: {
      const m = clutterCovariance(x.N, (lag) => Math.exp(-2 * (Math.PI * x.sigmaOverPrf * lag) ** 2), x.whiteFloorRelClutter)
      return Object.fromEntries(
        Object.keys(expected).map((key) => {
          const [, window, filter] = /^(\w+)_f(\d+)over\d+_dB$/.exec(key) as RegExpExecArray
          return [key, filterGain(window as FilterWindow, x.N, Number(filter) / x.N, m).improvementDb]
        }),
      )
    }
  }
}

describe('doppler', () => {
  it('has every case', () => expect(all.length).toBe(32))
  for (const c of all) it(titleOf(c), () => expect(expectCase(c, compute(c))).toBeGreaterThan(0))
  it('common practice, no source: terminal radar at 12 rpm, 1 000 Hz and 1.4° has about twenty hits, and S-band scanning of the order of ten knots', () => {
    const hits = (1.4 * 1000) / (6 * 12)
    expect(hits).toBeGreaterThan(15)
    expect(hits).toBeLessThan(25)
    const sigmaMs = (scanningSpreadOverPrf(hits) * 1000 * wavelengthM(2.8e9)) / 2
    // full width some tens of dB down: about ±4.5 standard deviations at −44 dB
    const fullWidthKt = (9 * sigmaMs) / MS_PER_KT
    expect(fullWidthKt).toBeGreaterThan(5)
    expect(fullWidthKt).toBeLessThan(20)
    expect(scanningCorrelation(hits, 1000)(1e-3)).toBeGreaterThan(0.99)
  })
})
