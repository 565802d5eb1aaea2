import { describe, expect, it } from 'vitest'
import { gateLengthM, RAD_PER_DEG, type RadarInput, toDb } from '../../../core/index.ts'
import { clutterOf, flatCells, uniformTable } from '../../clutter/flatCells.ts'
import { sBandRadar, testRadar } from '../../radar/testRadar.ts'
import { type Case, expectCase, titleOf } from '../cases.ts'
import cases from './cases.json'

const all = cases as unknown as Case[]

/** C/N of the polar cell whose centre lies at a range over flat ground of one strength. */
function atRange(r: RadarInput, strengthDb: number, rangeM: number): number {
  const rangeStepM = rangeM / 100.5
  const cells = flatCells({ azimuths: 1440, ranges: 104, azimuthStepDeg: 0.25, rangeStepM }, 10)
  return clutterOf(cells, r, undefined, uniformTable(strengthDb)).cnrDb[100]
}

describe('clutter-to-noise', () => {
  it('has all 3 cases', () => expect(all).toHaveLength(3))
  it.each(all.map((c) => [titleOf(c), c] as const))('%s', (_, c) => {
    const x = c.inputs
    const r = testRadar({
      frequencyHz: x.f_Hz,
      peakPowerW: x.Pt_W,
      compressedPulseWidthS: (2 * x.dr_m) / 299_792_458,
      pulseWidthS: (2 * x.dr_m) / 299_792_458,
      noiseBandwidthHz: x.B_Hz,
      noiseFigureDb: x.F_dB,
      systemLossDb: x.L_dB,
      antenna: { gainDbi: x.G_dB, azimuthBeamwidthDeg: x.az_deg },
    })
    const areaM2 = x.R_m * x.az_deg * RAD_PER_DEG * gateLengthM(r)
    expect(expectCase(c, { A_m2: areaM2, cnr_dB: atRange(r, x.sigma0F4_dB, x.R_m) })).toBe(2)
  })
  it('S band over −30 dB at 20 km: 70 061 m², 18.5 dBsm, C/N 56.27 dB — arithmetic', () => {
    const r = sBandRadar()
    const areaM2 = 20_000 * r.antenna.azimuthBeamwidthDeg * RAD_PER_DEG * gateLengthM(r)
    expect(areaM2).toBeCloseTo(70_061, 0)
    expect(toDb(areaM2) - 30).toBeCloseTo(18.5, 1)
    expect(Math.abs(atRange(r, -30, 20_000) - 56.27)).toBeLessThanOrEqual(0.05)
  })
})
