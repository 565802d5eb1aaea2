import { beforeAll, describe, expect, it } from 'vitest'
import { type Ask, PLACE as BITS, finish, needCells } from '../../core/index.ts'
import { from, layerNeed, plainGround, uniformLand, work } from './plain.ts'

// "Is a 1 m² aircraft visible over land clutter at 20 km if I = 28 or 48 dB?" on a plain of −30 dB everywhere.
let ground: Ask['ground']
beforeAll(async () => {
  ground = await plainGround(24_000)
})
const LAND = uniformLand(-30)
// D₀ 13 dB with all losses in it; 19.95 to 20.05 km is one ring of cells
const need = layerNeed({ heightM: 60, requiredRatioDb: 13, fromRangeM: 19_900, toRangeM: 20_100 })
const stated = (statedDb: number) =>
  work(ground, {
    needs: [need],
    landTable: LAND,
    radar: { suppression: { kind: 'stated', statedDb } },
    run: { maxRangeM: 22_000, rangeStepM: 75 },
  })

describe('a 1 m² aircraft over land clutter at 20 km', () => {
  it('needs 31.5 dB: 28 dB falls 3.5 dB short, 48 dB leaves 16.5 dB', () => {
    const { result, cells, engine } = stated(28)
    // C/N 56.27 dB, S/N 37.8 dB: the hand check of the radar equation
    const checked = needCells(cells, engine.needOnShow('n')!)
    const { ranges, rangeStepM } = cells.site.grid
    const cell = 40 * ranges + Math.floor(20_000 / rangeStepM)
    expect(cells.clutter.cnrDb[cell]).toBeGreaterThan(56.2)
    expect(cells.clutter.cnrDb[cell]).toBeLessThan(56.4)
    expect(checked.neededDb[cell]).toBeGreaterThan(31.3)
    expect(checked.neededDb[cell]).toBeLessThan(31.7)
    expect(28 - checked.neededDb[cell]).toBeCloseTo(-3.5, 0)
    expect(48 - checked.neededDb[cell]).toBeCloseTo(16.5, 0)
    const { suppression } = result.figures.needs[0]
    expect(suppression.p50Db).toBeGreaterThan(31)
    expect(suppression.p50Db).toBeLessThan(32)
    expect(suppression.shortP90Db).toBeGreaterThan(3.2)
    expect(suppression.shortP90Db).toBeLessThan(3.8)
  })

  it('no with 28 dB, yes with 48 dB, in every cell of the ring', () => {
    const no = stated(28).result.figures.needs[0]
    const yes = stated(48).result.figures.needs[0]
    expect(no).toMatchObject({ inSightPct: 100, detectablePct: 100, usablePct: 0, met: false, passes: false })
    expect(no.losses).toEqual([expect.objectContaining({ cause: 'clutter', pct: 100 })])
    expect(no.suppression.shortKm2).toBeCloseTo(no.areaKm2, 9)
    expect(yes).toMatchObject({ inSightPct: 100, detectablePct: 100, usablePct: 100, met: true, passes: true })
    expect(yes.suppression.shortKm2).toBe(0)
    expect(yes.losses).toEqual([])
    // the signal margin cannot pass S/N less D₀
    expect(yes.signal.worstDb).toBeGreaterThan(15)
    expect(yes.signal.worstDb).toBeLessThan(16.5)
  })

  it('a canceller gives what its kinds of clutter allow: farmland in wind through three pulses', () => {
    const { result } = work(ground, {
      needs: [need],
      landTable: LAND,
      radar: { suppression: { kind: 'canceller', pulses: 3, stabilityLimitDb: 50, bits: 14 } },
      run: { maxRangeM: 22_000, rangeStepM: 75 },
    })
    const { suppressionBy, needs } = result.figures
    const farmland = suppressionBy.rows.find((r) => r.about === 'farmland')!
    expect(needs[0].suppression.availableDb).toBeCloseTo(farmland.improvementDb, 1)
    expect(needs[0].usablePct).toBe(farmland.improvementDb > (needs[0].suppression.p50Db as number) ? 100 : 0)
    expect(suppressionBy.uniformDb).toBeNull()
  })

  it('a receiver that clutter drives out of its linear range suppresses nothing there', () => {
    const worked = work(ground, {
      needs: [need],
      landTable: LAND,
      radar: { suppression: { kind: 'stated', statedDb: 48 }, receiverLinearRangeDb: 50 },
      run: { maxRangeM: 22_000, rangeStepM: 75 },
    })
    expect(worked.result.figures.needs[0].usablePct).toBe(0)
    expect(worked.result.figures.marks.some((m) => m.about.startsWith('receiver limits'))).toBe(true)
    const bits = needCells(worked.cells, worked.engine.needOnShow('n')!).place
    expect(bits.filter((b) => (b & BITS.detectable) !== 0 && (b & BITS.usable) === 0).length).toBeGreaterThan(1000)
  })

  it('the ledger of that place carries the same numbers', () => {
    const { answers, ref } = stated(28)
    const { results } = finish(answers.ask('ledger', { at: from(13, 20_000), option: ref }))
    expect(results.clutter_to_noise_db).toBeCloseTo(56.27, 1)
    expect(results.need_n_signal_to_noise_db).toBeCloseTo(56.27 - 18.45, 1)
    expect(results.need_n_residue_to_noise_db).toBeCloseTo(28.27, 1)
    expect(results.need_n_suppression_needed_db).toBeCloseTo(31.5, 1)
    expect(results.need_n_signal_margin_db).toBeCloseTo(37.82 - 28.28 - 13, 1)
  })
})

describe('an area CFAR over spiky clutter', () => {
  it('stands higher by the spread of the cell: the margin falls by the threshold rise where clutter decides', () => {
    const of = (detector: 'noise' | 'areaCfar') =>
      work(ground, {
        needs: [need],
        landTable: LAND,
        radar: { detector, suppression: { kind: 'stated', statedDb: 28 } },
        run: { maxRangeM: 22_000, rangeStepM: 75 },
      })
    const plain = of('noise')
    const area = of('areaCfar')
    const place = { at: from(13, 20_000), option: plain.ref }
    const [a, b] = [plain, area].map((w) => finish(w.answers.ask('ledger', place)))
    const rise = b.lines.find((l) => l.key === 'n_threshold_rise')?.value as number
    // farmland at 0.1° of depression and a 70 000 m² cell: a_w about 3.8, exponential clutter at Pfa 1e-6 would need 19.4 dB less
    expect(rise).toBeGreaterThan(17)
    expect(rise).toBeLessThan(22)
    const [over, under] = [a, b].map((l) => l.results.need_n_signal_margin_db as number)
    expect(over - under).toBeCloseTo(rise, 1)
    expect(area.layerAt('signal-margin', 13, 20_000)).toBeCloseTo(under, 0)
    expect((b.results.need_n_suppression_needed_db as number) - (a.results.need_n_suppression_needed_db as number)).toBeCloseTo(rise, 6)
  })
})
