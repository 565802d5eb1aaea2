import { beforeAll, describe, expect, it } from 'vitest'
import { type Ask, type CellLedger, fillLayer, finish, readPlaces } from '../../core/index.ts'
import { from, layerNeed, plainGround, type Worked, work } from './plain.ts'

const NEED = layerNeed({ heightM: 300, heightAbove: 'sea' })
const radar = { suppression: { kind: 'stated' as const, statedDb: 110 }, frequencyHz: 2.8e9 }
let lake: Ask['ground']
let coast: Ask['ground']
beforeAll(async () => {
  lake = await plainGround(26_000, () => 0, 'water')
  // water west of the radar, forest hills to the east
  coast = await plainGround(26_000, (e) => (e > 0 ? 40 * (1 - Math.cos(e / 900)) : 0), 'water')
  const { shape } = coast
  const code = Uint8Array.from({ length: coast.heightM.length }, (_, at) => (at % shape.width > shape.width / 2 ? 1 : 0))
  coast = { ...coast, code, codes: [...coast.codes, { terrain: 'forest', coverHeightM: 15, sourceClass: null, mark: null }] }
})
/** Values of a layer of the first need along one azimuth, by range cell. */
function along(w: Worked, azimuthDeg: number): Float32Array {
  const { grid } = w.cells.site
  const values = new Float32Array(w.cells.site.groundM.length)
  fillLayer('signal-margin', w.cells, w.engine.needOnShow(undefined), values)
  const i = Math.round(azimuthDeg / grid.azimuthStepDeg)
  return values.slice(i * grid.ranges, (i + 1) * grid.ranges)
}
const option = (ground: Ask['ground'], over = {}): Worked =>
  work(ground, { needs: [NEED], radar, candidate: { mastHeightsM: [15] }, atmosphere: { seaState: 0 }, ...over })

describe('lobing in the cells of a need', () => {
  it('nulls take S/N away, peaks add nothing: margins lie under those over land that does not reflect', async () => {
    const wet = option(lake)
    const dry = option(await plainGround(26_000, () => 0, 'farmland'))
    let lost = 0
    let same = 0
    const [over0, under0] = [along(wet, 40), along(dry, 40)]
    for (let j = 40; j < 150; j++) {
      const over = over0[j] - under0[j]
      expect(over).toBeLessThan(0.05)
      if (over < -3) lost++
      else if (over > -0.05) same++
    }
    expect(lost).toBeGreaterThan(10)
    expect(same).toBeGreaterThan(20)
  })

  it('a cell, the fix at its centre and the ledger agree to 0.05 dB, over water and over hills', () => {
    const places = Array.from({ length: 60 }, (_, n) => {
      const i = (n * 97) % 1108
      const j = 30 + ((n * 53) % 125)
      return { i, j, at: from(i * (360 / 1108), (j + 0.5) * 150) }
    })
    const rows = places.map((p, n) => `P${n},${p.at.lon},${p.at.lat},300`)
    const file = readPlaces(['name,lon,lat,alt_m_msl', ...rows].join('\n'), {
      id: 'f',
      kind: 'fixes',
      file: 'f.csv',
      heightM: null,
      heightAbove: 'sea',
      qnhHpa: null,
    })
    const w = option(coast, {
      needs: [NEED, { id: 'f', kind: 'fixes', file: 'f.csv', rcsM2: 1 }],
      places: [file],
      run: { maxRangeM: 25_000, rangeStepM: 150, azimuthStepDeg: 360 / 1108 },
    })
    const margins = new Float32Array(w.cells.site.groundM.length)
    fillLayer('signal-margin', w.cells, w.engine.needOnShow(undefined), margins)
    const fixes = w.result.figures.needs[1].fixes!
    let compared = 0
    let lobed = 0
    let worst = 0
    for (const [n, p] of places.entries()) {
      const cell = margins[p.i * w.cells.site.grid.ranges + p.j]
      const fix = fixes.find((f) => f.name === `P${n}`)!
      if (Number.isNaN(cell) || fix.signalMarginDb === null || fix.visible !== 'yes') continue
      worst = Math.max(worst, Math.abs(cell - fix.signalMarginDb))
      compared++
      if (n % 6 !== 0) continue
      const ledger = finish(w.answers.ask('ledger', { at: p.at, option: w.ref })) as CellLedger
      const of = 'need_n_signal_to_noise_db'
      const sum = ledger.lines
        .filter((l) => l.of === of && typeof l.value === 'number')
        .reduce((s, l) => s + (l.op === 'subtract' ? -1 : l.op === 'info' ? 0 : 1) * (l.value as number), 0)
      expect(sum).toBeCloseTo(ledger.results[of] as number, 6)
      expect(Math.abs((fix.snrDb as number) - (ledger.results[of] as number))).toBeLessThan(0.05)
      const line = ledger.lines.find((l) => l.key === 'n_lobing')
      if (!line) continue
      lobed++
      expect(line.source).toContain('Kerr')
      expect(['from memory', 'outside model']).toContain(line.mark)
    }
    console.log(`cell against fix with lobing: ${compared} places, worst ${worst.toFixed(4)} dB; ${lobed} ledgers with lobing`)
    expect(compared).toBeGreaterThan(25)
    expect(lobed).toBeGreaterThan(2)
    expect(worst).toBeLessThanOrEqual(0.05)
  })

  it('raising the mast from 15 to 25 m draws the nulls together in elevation', () => {
    const nullsAt = (mast: number): number => {
      const w = option(lake, { candidate: { mastHeightsM: [mast] }, needs: [layerNeed({ heightM: 900, heightAbove: 'sea' })] })
      let count = 0
      let before = 0
      let last = 0
      const margins = along(w, 40)
      for (let j = 40; j < 150; j++) {
        const m = margins[j] + 40 * Math.log10(j + 0.5)
        if (m > last + 0.3 && before < 0) count++
        before = m - last
        last = m
      }
      return count
    }
    expect(nullsAt(25)).toBeGreaterThan(nullsAt(15))
  })

  it('what only a null takes away is named so, at cells and at fixes', () => {
    const weak = { ...radar, peakPowerW: 800 }
    const w = option(lake, { radar: weak })
    const causes = w.result.figures.needs[0].losses.map((l) => l.cause)
    expect(causes).toContain('lobing')
  })
})
