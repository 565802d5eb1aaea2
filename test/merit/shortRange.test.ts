import { beforeAll, describe, expect, it } from 'vitest'
import {
  type Ask,
  detectionThreshold,
  M_PER_NM,
  type NeedPlaces,
  probabilityOfDetection,
  signalToNoiseDb,
  slantRangeM,
} from '../../core/index.ts'
import { from, plainGround, uniformLand, type Worked, work } from './plain.ts'

// "STC on and off: Pd of 1 m² at 2, 5, 10, 20 NM both ways."
let ground: Ask['ground']
beforeAll(async () => {
  ground = await plainGround(42_000)
})
const RANGES_NM = [2, 5, 10, 20]
const ALT_M = 600
const places: NeedPlaces = {
  needId: 'n',
  kind: 'fixes',
  rings: [],
  places: RANGES_NM.map((nm) => ({ ...from(90, nm * M_PER_NM), name: `${nm} NM`, altM: ALT_M, above: 'sea' as const })),
}
/** Smaller than the task's set, so that sensitivity decides inside 20 NM. Clutter far down: noise alone. */
const small = (stc: object): Worked =>
  work(ground, {
    needs: [{ id: 'n', kind: 'fixes', file: 'fixes.csv', rcsM2: 1, pd: 0.8 }],
    places: [places],
    landTable: uniformLand(-200),
    radar: { peakPowerW: 4000, stc: { kind: 'none', ...stc } },
    run: { maxRangeM: 40_000 },
  })
const STC = { kind: 'rtoFourth', cornerM: 22_000, maxDb: 48 }
const pdBy = (w: Worked) => RANGES_NM.map((nm) => w.result.figures.needs[0].fixes!.find((f) => f.name === `${nm} NM`)!)

describe('Pd of 1 m² with short-range sensitivity on and off', () => {
  it('at 2, 5, 10, 20 NM agrees with exact detection of the same S/N', () => {
    const off = small({})
    const on = small(STC)
    const { required } = off.result.figures.needs[0]
    const threshold = detectionThreshold(required.pfa, required.pulses)
    const lossDb = required.ratioDb - required.d0Db
    const radius = (4 / 3) * 6_371_000
    const table = RANGES_NM.map((nm, n) => {
      const slantM = slantRangeM(150, ALT_M, nm * M_PER_NM, radius)
      const snrDb = signalToNoiseDb(off.cells.radar, { rcsM2: 1, slantRangeM: slantM })
      const stcDb = slantM < 22_000 ? Math.min(48, 40 * Math.log10(22_000 / slantM)) : 0
      const exact = (attenuationDb: number) => probabilityOfDetection(snrDb - attenuationDb - lossDb, threshold, required.pulses, 1)
      const [without, wanting] = [pdBy(off)[n], pdBy(on)[n]]
      expect(without.pd).toBeCloseTo(exact(0), 2)
      expect(wanting.pd).toBeCloseTo(exact(stcDb), 2)
      return { nm, off: without.pd as number, on: wanting.pd as number }
    })
    console.log(table.map((t) => `${t.nm} NM: Pd ${t.off.toFixed(3)} without, ${t.on.toFixed(3)} with STC`).join('; '))
    // without STC closer is better; with it the near ones are brought down to the corner's S/N, the far one is untouched
    for (let n = 1; n < 4; n++) expect(table[n].off).toBeLessThan(table[n - 1].off)
    for (let n = 0; n < 3; n++) expect(table[n].on).toBeLessThan(table[n].off)
    expect(table[3].on).toBeCloseTo(table[3].off, 9)
    expect(table[1].on).toBeCloseTo(table[2].on, 1)
  })

  it('a target lost to it alone is told so; the figure of the need counts it', () => {
    const off = small({})
    const on = small({ ...STC, cornerM: 45_000, maxDb: 60 })
    expect(off.result.figures.needs[0].usablePct).toBe(75)
    expect(off.result.figures.needs[0].fixes![0]).toMatchObject({ name: '20 NM', visible: 'yes', usable: false, cause: 'too-weak' })
    const lost = on.result.figures.needs[0]
    expect(lost.usablePct).toBe(0)
    expect(lost.losses.map((l) => [l.cause, l.amount])).toEqual([
      ['short-range-sensitivity', 3],
      ['too-weak', 1],
    ])
  })
})
