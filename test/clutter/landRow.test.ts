import { describe, expect, it } from 'vitest'
import { BUILT_IN_LAND_TABLE, chooseRow, meanStrengthDb, readLandTable, strengthByCode } from '../../core/clutter/index.ts'
import { TERRAIN_NAMES, type TerrainName } from '../../core/landcover/index.ts'
import { RELIEF } from '../../core/terrain/index.ts'
import { codeOf } from './flatCells.ts'

const S = 3.24e9
const { low, high, mountains, unknown } = RELIEF
const row = (...a: Parameters<typeof chooseRow>) => {
  const c = chooseRow(...a)
  return [c.rowName, c.meanDb]
}

describe('choice of the land table row (table from memory: Billingsley 2002)', () => {
  it.each([
    ['rural', low, 0.1, 'rural low relief', -33],
    ['rural', low, 0.25, 'rural low relief', -32],
    ['rural', low, 0.2499, 'rural low relief', -33],
    ['rural', low, 7.99, 'rural low relief', -25],
    ['rural', high, 3, 'rural high relief', -24],
    ['forest', low, 0.1, 'forest low relief', -39],
    ['forest', low, 5, 'forest low relief', -24],
    ['forest', high, -3, 'forest high relief', -22],
    ['farmland', low, 0.2, 'farmland', -30],
    ['farmland', low, 1.5, 'rural low relief', -27],
    ['farmland', high, 1, 'rural high relief', -27],
    ['open', low, 0.3, 'open ground', -41],
    ['open', high, 7, 'rural high relief', -19],
    ['open', mountains, 2, 'mountains', -20],
    ['forest', mountains, -1, 'mountains', -20],
    ['urban', mountains, 0.5, 'urban', -20],
    ['urban', low, 0.1, 'urban', -20],
    ['water', low, 0.5, 'sea', null],
    ['water', high, -0.5, 'sea', null],
    // ground above the antenna horizontal
    ['rural', low, -0.1, 'rural negative depression', -31],
    ['rural', low, -0.25, 'rural negative depression', -31],
    ['rural', low, -0.3, 'rural negative depression', -27],
    ['rural', low, -9, 'rural negative depression', -26],
    ['open', low, -0.1, 'rural negative depression', -31],
    ['farmland', low, -0.1, 'farmland', -28],
    ['urban', low, -0.1, 'urban', -18],
    ['rural', high, -4, 'rural high relief', -27],
  ] as const)('%s, relief %i, %f° → %s %f dB at S band', (terrain, relief, depressionDeg, name, meanDb) =>
    expect(row(terrain, relief, depressionDeg, S)).toEqual([name, meanDb]),
  )

  it('takes urban over open ground when the context says so, up to 0.25°', () => {
    const context = { urbanOverOpen: true }
    expect(row('urban', low, 0.1, S, context)).toEqual(['urban over open ground', -10])
    expect(row('urban', low, 0.25, S, context)).toEqual(['urban', -20])
    expect(row('rural', low, 0.1, S, context)).toEqual(['rural low relief', -33])
  })

  it('marks steep, negative and unknown relief', () => {
    const marks = (...a: Parameters<typeof chooseRow>) => chooseRow(...a).notes.map((n) => n.mark)
    const about = (...a: Parameters<typeof chooseRow>) =>
      chooseRow(...a)
        .notes.map((n) => n.about)
        .join()
    expect(marks('rural', low, 7.99, S)).toEqual([])
    expect(about('rural', low, 8.01, S)).toContain('γ·sin ψ')
    expect(about('rural', low, 61, S)).toContain('over 60°')
    expect(marks('rural', low, -0.1, S)).toEqual(['from memory'])
    expect(about('rural', low, -0.1, S)).toContain('low confidence')
    expect(about('farmland', low, -0.1, S)).toContain('engineering fallback')
    expect(marks('forest', high, -3, S)).toEqual([])
    expect(marks('rural', unknown, 1, S)).toEqual(['default'])
    expect(marks('water', low, 1, S)).toEqual(['outside model'])
  })

  it('runs over into γ·sin ψ from 8° to 10° depression, linear in dB, ψ with the local slope (γ from memory: Barton 1985)', () => {
    const sine = (deg: number) => 10 * Math.log10(Math.sin((deg * Math.PI) / 180))
    const at = (terrain: TerrainName, relief: number, depressionDeg: number, grazingDeg?: number) =>
      chooseRow(terrain, relief, depressionDeg, S, grazingDeg === undefined ? {} : { grazingDeg }).meanDb
    expect(at('rural', low, 8)).toBeCloseTo(-25, 9)
    expect(at('rural', low, 10)).toBeCloseTo(-15 + sine(10), 9)
    expect(at('farmland', low, 9, 12)).toBeCloseTo((-25 + -15 + sine(12)) / 2, 9)
    expect(at('forest', high, 15, 25)).toBeCloseTo(-10 + sine(25), 9)
    expect(at('rural', high, 15, 25)).toBeCloseTo(-12 + sine(25), 9)
    expect(at('open', mountains, 15, 25)).toBeCloseTo(-5 + sine(25), 9)
    expect(at('urban', low, 30)).toBeCloseTo(-5 + sine(30), 9)
    expect(at('rural', low, 12, -3)).toBeCloseTo(-15 + sine(0.1), 9)
    expect(at('rural', low, 57, 120)).toBeCloseTo(-15, 9)
  })

  it('is linear in log frequency between bands and held beyond', () => {
    const band = BUILT_IN_LAND_TABLE.rows['open ground'][0]
    expect(meanStrengthDb(band, Math.sqrt(1230 * 3240) * 1e6)).toBeCloseTo((-68 - 51) / 2, 9)
    expect(meanStrengthDb(band, 435e6)).toBe(-74)
    expect(meanStrengthDb(band, 50e6)).toBe(-68)
    expect(meanStrengthDb(band, 35e9)).toBe(-42)
  })

  it('is the same by lookup for every terrain, relief and depression', () => {
    const strength = strengthByCode(TERRAIN_NAMES.map(codeOf), 2.1e9)
    let compared = 0
    TERRAIN_NAMES.forEach((terrain, code) => {
      for (const relief of [low, high, mountains, unknown])
        for (let d = -2.013; d < 12; d += 0.0497) {
          const { meanDb } = chooseRow(terrain, relief, d, 2.1e9)
          const got = strength(code, relief, d)
          if (meanDb === null) expect(got).toBeNaN()
          else expect(got).toBeCloseTo(meanDb, 9)
          compared++
        }
    })
    expect(compared).toBeGreaterThan(6000)
    expect(strength(255, low, 1)).toBeNaN()
  })
})

describe('a land table of one’s own', () => {
  const good = () => JSON.parse(JSON.stringify({ ...BUILT_IN_LAND_TABLE, source: 'Survey report 12' }))
  it('is read with its source and marked by hand', () => {
    const t = readLandTable(good(), 'land.json')
    expect([t.source, t.mark]).toEqual(['Survey report 12', 'by hand'])
    expect(t.rows).toEqual(BUILT_IN_LAND_TABLE.rows)
  })
  it.each<[string, (t: ReturnType<typeof good>) => unknown, RegExp]>([
    ['no object', () => [], /land\.json: is not an object/],
    ['frequencies that fall', (t) => ({ ...t, frequenciesMHz: [3, 2] }), /frequenciesMHz/],
    ['no rows', (t) => ({ ...t, rows: null }), /rows: is missing/],
    ['an unknown row', (t) => ({ ...t, rows: { ...t.rows, swamp: [] } }), /rows\.swamp/],
    ['a row left out', (t) => ({ ...t, rows: { ...t.rows, urban: undefined } }), /rows\.urban/],
    ['a gap between bands', (t) => (t.rows.farmland[1].fromDeg = 0.5) && t, /rows\.farmland\[1\]: starts at 0\.5/],
    ['too few strengths', (t) => t.rows.farmland[0].meanDb.pop() && t, /farmland\[0\]\.meanDb/],
    ['a spread of nothing', (t) => Object.assign(t, { x: (t.rows.urban[0].spread1e3 = 0) }), /spread between 0 and 8/],
  ])('refuses %s', (_, spoil, message) => expect(() => readLandTable(spoil(good()), 'land.json')).toThrow(message))
})
