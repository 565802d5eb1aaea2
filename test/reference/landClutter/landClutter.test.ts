import { describe, expect, it } from 'vitest'
import { BUILT_IN_LAND_TABLE, chooseRow, type LandRow, meanOverMedianDb, RELIEF } from '../../../core/index.ts'
import { type Case, titleOf } from '../cases.ts'
import cases from './cases.json'
import table from './table.json'

const all = cases as unknown as Case[]
const ROW_OF: Record<string, LandRow> = {
  'ruralLowRelief.general': 'rural low relief',
  'ruralLowRelief.continuousForest': 'forest low relief',
  'ruralLowRelief.openFarmland': 'farmland',
  'ruralLowRelief.desertMarshGrassland': 'open ground',
  'ruralHighRelief.general': 'rural high relief',
  'ruralHighRelief.continuousForest': 'forest high relief',
  'ruralHighRelief.mountains': 'mountains',
  'urban.general': 'urban',
  'urban.onOpenLowRelief': 'urban over open ground',
}

describe('X-band low-angle land clutter', () => {
  it('has all 11 cases', () => expect(all).toHaveLength(11))
  it.each(all.map((c) => [titleOf(c), c] as const))('%s', (_, { inputs: x, expected }) => {
    const mean = x.median_dB + meanOverMedianDb(x.aw)
    expect(Math.abs(mean - Number(expected.meanFromMedian_dB))).toBeLessThanOrEqual(0.0006)
    expect(Math.abs(mean - Number(expected.tabulatedMean_dB))).toBeLessThanOrEqual(1.6)
  })
})

describe('the built-in multifrequency table (from memory: Billingsley 2002; TR-916, 1991)', () => {
  const source = table.lowAngleLandWeibull
  const copied = (bands: (typeof source.rows)['urban.general']) =>
    bands.map((b) => ({
      fromDeg: b.deprLo_deg,
      toDeg: b.deprHi_deg,
      meanDb: b.mean_dB_VHF_UHF_L_S_X,
      spread1e3: b.aw_1e3,
      spread1e6: b.aw_1e6,
    }))
  it('is a true copy of all 9 rows, 24 bands', () => {
    expect(Object.keys(source.rows).sort()).toEqual(Object.keys(ROW_OF).sort())
    let bands = 0
    for (const [key, rows] of Object.entries(source.rows)) {
      expect(BUILT_IN_LAND_TABLE.rows[ROW_OF[key]], key).toEqual(copied(rows as never))
      bands += rows.length
    }
    expect(bands).toBe(24)
    expect(BUILT_IN_LAND_TABLE.frequenciesMHz).toEqual(Object.values(source.frequencies_MHz))
  })
  it('keeps the 3 low-confidence bands of negative depression, lowest first', () => {
    const negative = copied(source.negativeDepression_LOW_CONFIDENCE['ruralLowRelief.general'] as never)
    expect(BUILT_IN_LAND_TABLE.rows['rural negative depression']).toEqual(negative.reverse())
  })
  it('agrees with the X-band table in general rural and urban ground to 3 dB, band by band', () => {
    let compared = 0
    for (const [name, terrain, relief] of [
      ['lowRelief', 'rural', RELIEF.low],
      ['highRelief', 'rural', RELIEF.high],
      ['urban', 'urban', RELIEF.low],
    ] as const)
      for (const [lo, hi, , , meanDb] of table.lowAngleLandXBand.rows[name]) {
        const choice = chooseRow(terrain, relief, (lo + hi) / 2, 9.2e9)
        expect(Math.abs((choice.meanDb ?? Number.NaN) - meanDb), `${name} ${lo}–${hi}`).toBeLessThanOrEqual(3)
        compared++
      }
    expect(compared).toBe(17)
  })
})
