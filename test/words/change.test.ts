import { describe, expect, it } from 'vitest'
import { formatMetPct, pairWords, sectorWords } from '../../app/words/index.ts'

const plain = (text: string) => text.replaceAll('\u202f', ' ')

describe('words of a change', () => {
  it('one number where it stays the same at the face, two with an arrow where not', () => {
    expect(plain(pairWords({ before: 61.2, after: 61.4 }, (v) => formatMetPct(v)))).toBe('61 %')
    expect(plain(pairWords({ before: 61.2, after: 96.9 }, (v) => formatMetPct(v)))).toBe('61 → 96 %')
    expect(plain(pairWords({ before: null, after: 96.9 }, (v) => formatMetPct(v)))).toBe('– → 96 %')
  })
  it('a sector says from where to where, by how much and behind what', () => {
    const sector = { fromDeg: 87.6, toDeg: 92.4, mostDeg: 1.876, atDeg: 90, obstacle: 'Quay crane', rangeM: 1200 }
    expect(plain(sectorWords(sector, 'metric'))).toBe('azimuth 087.6° to 092.4°, up to 1.88° higher, behind Quay crane at 1.2 km')
    const all = { ...sector, fromDeg: 0, toDeg: 360, mostDeg: -0.05, obstacle: 'terrain', rangeM: Number.NaN }
    expect(plain(sectorWords(all, 'metric'))).toBe('all round, up to 0.05° lower, then terrain')
  })
})
