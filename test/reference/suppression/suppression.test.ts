import { describe, expect, it } from 'vitest'
import { fromDb, gateLengthM, RAD_PER_DEG, suppressionNeededDb, toDb } from '../../../core/index.ts'
import { testRadar } from '../../radar/testRadar.ts'
import { type Case, expectCase, titleOf } from '../cases.ts'
import cases from './cases.json'

const all = cases as unknown as Case[]

describe('clutter suppression needed', () => {
  it('has both cases', () => expect(all).toHaveLength(2))
  it.each(all.map((c) => [titleOf(c), c] as const))('%s', (_, { inputs: x, ...c }) =>
    expect(
      expectCase({ inputs: x, ...c }, { required_I_dB: suppressionNeededDb(x.cnr_dB, x.snrTargetFreeSpace_dB, x.scnrRequired_dB) }),
    ).toBe(1),
  )
  it('100 m gate, 1.5° beam, −20 dB at 60 km: about 1 500 m², and 1 m² at 13 dB needs about 45 dB — common practice, no source', () => {
    const r = testRadar({ compressedPulseWidthS: 200 / 299_792_458, antenna: { azimuthBeamwidthDeg: 1.5 } })
    const rcsM2 = 60_000 * r.antenna.azimuthBeamwidthDeg * RAD_PER_DEG * gateLengthM(r) * fromDb(-20)
    expect(Math.abs(rcsM2 / 1500 - 1)).toBeLessThan(0.1)
    const snrDb = 60
    const neededDb = suppressionNeededDb(snrDb + toDb(rcsM2), snrDb, 13)
    expect(Math.abs(neededDb - 45)).toBeLessThan(10 * Math.log10(1.1))
  })
})
