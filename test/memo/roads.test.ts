import { describe, expect, it } from 'vitest'
import { type Block, buildMemo, cellText, type TableBlock } from '../../app/memo/model/index.ts'
import { CAUTIONS, figureWords, textOf } from '../../app/words/index.ts'
import type { RoadsFigure } from '../../core/index.ts'
import { sampleMemo } from './sampleMemo.ts'

const NM = 1852
const lengths = (lengthM: number, inSightM: number, seenM: number) => ({ lengthM, inSightM, seenM })
const roads: RoadsFigure = {
  ...lengths(31_000, 9_010, 7_010),
  rcsM2: 30,
  requiredRatioDb: 4.3,
  tunnelM: 1_200,
  unknownM: 0,
  classes: [
    { roadClass: 'motorway', ...lengths(12_000, 5_010, 5_010) },
    { roadClass: 'rail', ...lengths(19_000, 4_000, 2_000) },
  ],
  rings: [
    { fromM: 0, toM: 5 * NM, ...lengths(20_000, 7_010, 7_010), seenByClassM: [5_010, 0, 0, 0, 0, 2_000] },
    { fromM: 5 * NM, toM: 10 * NM, ...lengths(11_000, 2_000, 0), seenByClassM: [0, 0, 0, 0, 0, 0] },
    { fromM: 10 * NM, toM: 15 * NM, ...lengths(0, 0, 0), seenByClassM: [0, 0, 0, 0, 0, 0] },
  ],
  speeds: [
    { fromMs: 0, toMs: 5, seenM: 1_010 },
    { fromMs: 5, toMs: 10, seenM: 6_000 },
  ],
  blindM: 701,
  atHighK: { k: 2.75, ...lengths(31_000, 9_500, 7_500) },
}
const sample = sampleMemo('metric', 40)
const [first] = sample.results
const model = buildMemo({ ...sample, results: [{ ...first, figures: { ...first.figures, roads } }] })
const flat = (blocks: readonly Block[]): Block[] => blocks.flatMap((b) => (b.kind === 'beside' ? [...flat(b.left), ...flat(b.right)] : [b]))
const blocks = flat(model.sections.find((s) => s.option)!.blocks)
const tableOf = (id: string) => blocks.find((b): b is TableBlock => b.kind === 'table' && b.id === id)!
const rowsOf = (id: string) => tableOf(id).rows.map((r) => r.map(cellText))

describe('roads in the memo', () => {
  it('by ring and class, rounded up, with a last row of all; empty rings left out', () => {
    expect(rowsOf('roads').map((r) => r.map((c) => c.replaceAll('\u202f', ' ')))).toEqual([
      ['0 to 9.3 km', '20.0', '7.1', '7.1', 'motorway 5.1, railway 2.0'],
      ['9.3 to 18.5 km', '11.0', '2.0', '0', '–'],
      ['All', '31.0', '9.1', '7.1', 'motorway 5.1, railway 2.0'],
    ])
  })
  it('by radial speed, and what the processing hardly passes', () => {
    expect(rowsOf('road-speeds')).toEqual([
      ['0 to 5', '0 to 18', '1.1'],
      ['5 to 10', '18 to 36', '6.0'],
    ])
    const words = blocks.flatMap((b) => (b.kind === 'paragraph' ? [b.text.replaceAll('\u202f', ' ')] : [])).join(' ')
    expect(words).toContain('Vehicles of 30 m²')
    expect(words).toContain('At k = 4/3 7.1 km are seen, at k = 2.75 7.5 km.')
    expect(words).toContain('In tunnels, not seen: 1.2 km.')
    expect(words).toContain('more than 10 dB under its mean: 0.8 km, 10 % of what is seen.')
  })
  it('its caution stands under it, and nothing of it without roads', () => {
    expect(blocks.some((b) => b.kind === 'caution' && b.texts.includes(CAUTIONS.roads))).toBe(true)
    const without = buildMemo(sample)
    expect(JSON.stringify(without.sections)).not.toContain('"id":"roads"')
  })
  it('its figures have words', () => {
    for (const [key, label] of [
      ['roads_seen_km', 'Roads seen'],
      ['roads_seen_k2_75_km', 'Roads seen, k = 2.75'],
      ['roads_seen_motorway_km', 'Roads seen: motorway'],
      ['roads_blind_pct', 'Roads seen, in the blind zone'],
    ] as const)
      expect(figureWords(key)?.label).toBe(label)
    expect(textOf(figureWords('roads_seen_km')!.format(7.01, 'metric')).replace('\u202f', ' ')).toBe('7.1 km')
  })
})
