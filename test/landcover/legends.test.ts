import { describe, expect, it } from 'vitest'
import { groundCodes, type Legend, legendCodes, uniformCode } from '../../core/index.ts'

const brief = (legend: Legend, c: number): string => {
  const [g] = legendCodes(legend, [c, 999])
  return `${g.terrain} ${g.coverHeightM}${g.mark ? ` ${g.mark}` : ''}`
}
// our own choice of terrain and cover height, not a published table
const TABLE: Record<'worldcover' | 'nlcd' | 'corine', Record<string, number[]>> = {
  worldcover: {
    'forest 15': [10, 95],
    'rural 2': [20],
    'open 0': [30, 60, 70, 90, 100],
    'farmland 0': [40],
    'urban 8': [50],
    'water 0': [80],
    'rural 0 default': [0, 55],
  },
  nlcd: {
    'forest 15': [41, 42, 43, 90],
    'rural 2': [51, 52, 21],
    'open 0': [31, 71, 72, 73, 74, 95, 12],
    'farmland 0': [81, 82],
    'urban 8': [22, 23, 24],
    'water 0': [11],
    'rural 0 default': [0, 127],
  },
  corine: {
    'forest 15': [311, 312, 313],
    'forest 8': [244],
    'rural 2': [324],
    'rural 4': [141, 142],
    'open 0': [321, 322, 323, 331, 335, 411, 412, 421, 423],
    'farmland 0': [211, 213, 231, 243],
    'urban 8': [111, 112, 133],
    'water 0': [511, 523],
    'rural 0 default': [999],
  },
}

describe('legends', () => {
  for (const legend of ['worldcover', 'nlcd', 'corine'] as const)
    it(legend, () => {
      for (const [want, classes] of Object.entries(TABLE[legend]))
        for (const c of classes) expect(`${c}: ${brief({ legend }, c)}`).toBe(`${c}: ${want}`)
    })
  it('CORINE by position in the nomenclature', () => {
    const got = legendCodes({ legend: 'corine' }, [1, 23, 25, 44, 48]).map((g) => g.terrain)
    expect(got).toEqual(['urban', 'forest', 'forest', 'water', 'rural'])
  })
  it("the study's own classes come first, and alone with a legend of its own", () => {
    const classes = { '10': { terrain: 'open', coverHeightM: 1.5 } } as const
    expect(brief({ legend: 'worldcover', classes }, 10)).toBe('open 1.5')
    expect(brief({ legend: 'custom', classes }, 10)).toBe('open 1.5')
    expect(brief({ legend: 'custom', classes }, 20)).toBe('rural 0 default')
  })
})

describe('codes of the ground', () => {
  const outside = uniformCode('farmland', null)
  it('cells beyond the class raster take the uniform terrain', () => {
    const { code, codes } = groundCodes({ codes: Uint8Array.from([0, 1, 255, 0]), classes: [80, 10] }, { legend: 'worldcover' }, outside)
    expect([...code]).toEqual([0, 1, 2, 0])
    expect(codes.map((c) => c.terrain)).toEqual(['water', 'forest', 'farmland'])
    expect(codes[1].sourceClass).toBe(10)
  })
  it('no code is added where none is needed; there is always one', () => {
    expect(groundCodes({ codes: Uint8Array.from([0, 0]), classes: [80] }, { legend: 'worldcover' }, outside).codes).toHaveLength(1)
    expect(groundCodes({ codes: Uint8Array.from([255, 255]), classes: [] }, { legend: 'worldcover' }, outside).codes).toEqual([outside])
  })
})
