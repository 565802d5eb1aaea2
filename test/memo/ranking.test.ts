import { describe, expect, it } from 'vitest'
import { type Block, buildMemo, cellText, inOrder, type MemoInput, type TableBlock } from '../../app/memo/model/index.ts'
import { rankOptions, settle } from '../../core/index.ts'
import { sampleDoc, sampleResults } from './sample.ts'
import { sampleMemo } from './sampleMemo.ts'

const sampleInput = sampleMemo('nautical')
const doc = {
  ...sampleDoc,
  candidates: [
    ...sampleDoc.candidates,
    { id: 'D', name: 'Old fort', lon: -121.3, lat: -38.45, mastHeightsM: [24], rejected: 'Protected site.' },
  ],
  ranking: {
    criteria: [
      { figure: 'ground_in_sight_km2', worst: 0, best: 6000, weight: 2 },
      { figure: 'mast_height_m', worst: 40, best: 0, weight: 1 },
    ],
  },
}
const input: MemoInput = { ...sampleInput, doc, study: settle(doc), results: sampleResults }
const blocks = (i: MemoInput): readonly Block[] => buildMemo(i).sections.find((s) => s.id === 'comparison')!.blocks
const table = (i: MemoInput, id: string) => blocks(i).find((b): b is TableBlock => b.kind === 'table' && b.id === id)

describe('the comparison of a study with a ranking', () => {
  it('lists what is weighed, with the stated values and the share of each weight', () => {
    const rows = table(input, 'ranking-criteria')!.rows.map((r) => r.map((c) => cellText(c).replaceAll('\u202f', ' ')))
    // 6 000 km² over 1.852² km² to the square mile
    expect(rows[0]).toEqual(['1', 'Ground in sight', '0 NM²', '1 749.32 NM²', '2', '67 %'])
    expect(rows[1]).toEqual(['2', 'Mast height', '40 m', '0 m', '1', '33 %'])
  })
  it('orders options by score, those that fail a must need below all that pass', () => {
    const { options } = rankOptions(sampleResults, doc.ranking)
    const rows = table(input, 'ranking-scores')!.rows
    expect(rows.map((r) => Number.parseInt(cellText(r[0]), 10))).toEqual(options.map((o) => o.rank))
    expect(new Set(options.map((o) => o.rank)).size).toBe(sampleResults.length)
    expect(inOrder(sampleResults, doc.ranking).map((r) => r.ref)).toEqual(options.map((o) => o.ref))
    expect(rows.map((r) => /^pass/.test(cellText(r[2])))).toEqual(options.map((o) => o.passes === true))
  })
  it('says which weight changes which rank', () => {
    const rows = table(input, 'ranking-effects')!.rows
    expect(rows).toHaveLength(2)
    for (const r of rows) for (const c of r.slice(1)) expect(cellText(c)).toMatch(/no rank changes|\d to \d/)
  })
  it('lists the rejected candidate with its reason and nowhere else', () => {
    expect(table(input, 'rejected-candidates')!.rows.map((r) => r.map(cellText))).toEqual([['D Old fort', 'Protected site.']])
    expect(buildMemo(input).sections.some((s) => s.id.startsWith('option-D'))).toBe(false)
  })
  it('has neither where the study states none', () => {
    for (const id of ['ranking-criteria', 'ranking-scores', 'ranking-effects', 'rejected-candidates'])
      expect(table(sampleInput, id)).toBeUndefined()
  })
})
