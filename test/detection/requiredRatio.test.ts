import { describe, expect, it } from 'vitest'
import { cfarLossDb, pdCurve, requiredRatio, requiredSnrDb } from '../../core/index.ts'
import { sBandRadar } from '../radar/testRadar.ts'

const task = { pd: 0.8, swerling: 1 as const, statedRatioDb: null }
const canceller = (pulses: number) => ({ kind: 'canceller' as const, statedDb: 0, pulses, stabilityLimitDb: null, bits: null })

describe('required ratio', () => {
  it('counts about twenty pulses for a terminal radar, fewer behind a canceller or a bank', () => {
    const plain = requiredRatio(sBandRadar(), task)
    // 1.3 deg, 1 000 Hz, 12 rpm: common practice has about twenty
    expect(plain.hits).toBeCloseTo((1.3 * 1000) / 72, 9)
    expect(plain.hits).toBeGreaterThan(15)
    expect(plain.hits).toBeLessThan(25)
    expect(plain.pulses).toBeCloseTo(plain.hits, 9)
    expect(requiredRatio(sBandRadar({ suppression: canceller(3) }), task).pulses).toBeCloseTo(plain.hits * 0.514, 9)
    const bank = { ...canceller(8), kind: 'filterBank' as const }
    expect(requiredRatio(sBandRadar({ suppression: bank }), task).pulses).toBeCloseTo(plain.hits / 8, 9)
    expect(requiredRatio(sBandRadar({ suppression: bank, rotationRpm: 60 }), task).pulses).toBe(1)
  })

  it('is exact D₀ plus beam shape 1.24 dB, straddling 1 dB and the loss of the threshold', () => {
    const r = sBandRadar({ cfarReferenceCells: 16 })
    const ratio = requiredRatio(r, task)
    expect(ratio.d0Db).toBeCloseTo(requiredSnrDb(0.8, 1e-6, ratio.pulses, 1), 9)
    expect(ratio.cfarDb).toBeCloseTo(cfarLossDb(16, 1e-6, 0.8), 9)
    expect(ratio.ratioDb).toBeCloseTo(ratio.d0Db + 1.24 + 1 + ratio.cfarDb, 9)
    expect(requiredRatio({ ...r, cfarLossDb: 0.5, straddleLossDb: 0 }, task).ratioDb).toBeCloseTo(ratio.d0Db + 1.24 + 0.5, 9)
    expect(requiredRatio(r, { ...task, statedRatioDb: 13 })).toMatchObject({ ratioDb: 13, by: 'stated' })
  })

  it('asks more for a higher Pd and for a target that fluctuates from scan to scan', () => {
    const of = (pd: number, swerling: 0 | 1 | 2) => requiredRatio(sBandRadar(), { pd, swerling, statedRatioDb: null }).ratioDb
    expect(of(0.9, 1)).toBeGreaterThan(of(0.8, 1) + 2)
    expect(of(0.9, 1)).toBeGreaterThan(of(0.9, 2) + 5)
    expect(of(0.9, 2)).toBeGreaterThan(of(0.9, 0))
  })
})

describe('Pd by signal margin', () => {
  it('is the Pd asked for at margin 0, also where the ratio was stated, and never falls as the margin grows', () => {
    for (const statedRatioDb of [null, 13]) {
      const curve = pdCurve(requiredRatio(sBandRadar(), { ...task, statedRatioDb }))
      expect(curve(0)).toBeCloseTo(0.8, 9)
      let before = 0
      for (let db = -50; db <= 70; db += 0.37) {
        const pd = curve(db)
        expect(pd).toBeGreaterThanOrEqual(before - 1e-12)
        before = pd
      }
      expect(curve(-45)).toBeLessThan(0.001)
      expect(curve(45)).toBeGreaterThan(0.999)
    }
  })
})
