import { beforeAll, describe, expect, it } from 'vitest'
import { type Ask, finish } from '../../core/index.ts'
import { from, layerNeed, plainGround, uniformLand, type Worked, work } from './plain.ts'

// 5 kHz: the unambiguous range is 29.98 km; a mountain 36 km to the east comes back 6.02 km out
const MOUNTAIN_M = 36_000
let ground: Ask['ground']
let small: Ask['ground']
beforeAll(async () => {
  ground = await plainGround(42_000, (east, north) => (Math.abs(north) < 4000 ? Math.max(0, 900 - 1.5 * Math.abs(east - MOUNTAIN_M)) : 0))
  small = await plainGround(20_000)
})
const radar = (over: object) => ({
  prfHz: [5000],
  instrumentedRangeM: 20_000,
  suppression: { kind: 'stated' as const, statedDb: 30 },
  ...over,
})
const at = (coherentTransmitter: boolean): Worked =>
  work(ground, {
    needs: [layerNeed({ rcsM2: 0.05, toRangeM: 15_000 })],
    radar: radar({ coherentTransmitter }),
    landTable: uniformLand(-35),
    run: { maxRangeM: 20_000 },
  })

describe('clutter of an earlier pulse in the needs', () => {
  it('appears where the true range less c/2f says and counts against the need there, not elsewhere', () => {
    const w = at(false)
    const apparentM = MOUNTAIN_M - 299_792_458 / 10_000
    expect(w.layerAt('second-time-around', 90, apparentM - 150)).toBeGreaterThan(20)
    expect(w.layerAt('second-time-around', 90, 12_000)).toBeNaN()
    expect(w.layerAt('second-time-around', 270, apparentM)).toBeNaN()
    expect(w.result.figures.secondTimeAround.km2).toBeGreaterThan(0.5)
    // a transmitter that is not coherent leaves it unsuppressed: the target over it is lost, its neighbour on the other side is not
    expect(w.layerAt('usable', 90, apparentM - 150)).toBe(2)
    expect(w.layerAt('usable', 270, apparentM - 150)).toBe(3)
    const coherent = at(true)
    expect(coherent.layerAt('usable', 90, apparentM - 150)).toBe(3)
    expect(coherent.result.figures.needs[0].usablePct).toBeGreaterThan(w.result.figures.needs[0].usablePct)
  })

  it('stands in the ledger of that place, and C/N of the map leaves it out', () => {
    const w = at(false)
    const apparentM = MOUNTAIN_M - 299_792_458 / 10_000 - 150
    const ledger = finish(w.answers.ask('ledger', { at: from(90, apparentM), option: w.ref }))
    const folded = ledger.lines.find((l) => l.key === 'n_folded')
    expect(folded?.value).toBeGreaterThan(0)
    const lines = ledger.lines.filter((l) => l.of === 'need_n_residue_to_noise_db' && l.op !== 'info')
    const sum = lines.reduce((s, l) => s + (l.op === 'subtract' ? -1 : 1) * (l.value as number), 0)
    expect(sum).toBeCloseTo(ledger.results.need_n_residue_to_noise_db as number, 6)
    expect(ledger.results.need_n_signal_margin_db).toBeLessThan(0)
    expect(w.layerAt('clutter-to-noise', 90, apparentM)).toBeCloseTo(w.layerAt('clutter-to-noise', 270, apparentM), 0)
  })

  it('is said to be not evaluated where the terrain ends before it could fold', () => {
    const w = work(small, { needs: [layerNeed({ toRangeM: 15_000 })], radar: radar({}), run: { maxRangeM: 19_000 } })
    expect(w.cells.folded).toBeNull()
    expect(w.result.figures.secondTimeAround.km2).toBeNull()
    expect(w.result.figures.secondTimeAround.notEvaluatedBeyondM).toBe(19_050)
  })
})
