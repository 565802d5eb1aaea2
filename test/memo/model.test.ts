import { describe, expect, it } from 'vitest'
import { type Block, buildMemo, cellText, inOrder, type MemoModel, type TableBlock } from '../../app/memo/model/index.ts'
import { CAUTIONS, NOT_ASSESSED } from '../../app/words/index.ts'
import { sampleResults, sampleStudy } from './sample.ts'
import { sampleMemo } from './sampleMemo.ts'

const input = sampleMemo('nautical', 40)
const model = buildMemo(input)

const flat = (blocks: readonly Block[]): Block[] => blocks.flatMap((b) => (b.kind === 'beside' ? [...flat(b.left), ...flat(b.right)] : [b]))
const blocksOf = (m: MemoModel, id: string): Block[] => flat(m.sections.find((s) => s.id === id)?.blocks ?? [])
const tableOf = (m: MemoModel, section: string, id: string): TableBlock =>
  blocksOf(m, section).find((b): b is TableBlock => b.kind === 'table' && b.id === id)!
const plain = (s: string): string => s.replaceAll('\u202f', ' ')
const textOfTable = (t: TableBlock): string => plain(t.rows.map((r) => r.map(cellText).join(' | ')).join('\n'))
const wordsOf = (m: MemoModel, id: string): string =>
  plain(
    blocksOf(m, id)
      .flatMap((b) => (b.kind === 'paragraph' ? [b.text] : b.kind === 'caution' ? b.texts : b.kind === 'list' ? b.items : []))
      .join('\n'),
  )

describe('the memo', () => {
  it('runs from summary to sources, one section per option, numbered in order', () => {
    expect(model.sections.map((s) => s.id)).toEqual([
      'summary',
      'need',
      'data',
      'candidates',
      'option-A-12-1.5',
      'option-A-24-1.5',
      'option-B-12-1.5',
      'option-B-24-1.5',
      'option-C-24-1.5',
      'comparison',
      'not-assessed',
      'cautions',
      'models',
      'annex',
    ])
    expect(model.sections.map((s) => s.number)).toEqual(model.sections.map((_, i) => i + 1))
  })
  it('says on its first page that it is a draft, what it is not for, and what is not assessed', () => {
    expect(model.draft).toBe('Draft: prediction, not for construction or operation')
    const words = wordsOf(model, 'summary')
    for (const id of ['prediction', 'notForNavigation', 'landTable', 'nearMast', 'sensitive', 'localCodes'] as const)
      expect(words).toContain(CAUTIONS[id])
    for (const n of NOT_ASSESSED) expect(words.toLowerCase()).toContain(n.what.toLowerCase())
  })
  it('leads with the option that misses least of the must needs, and never says pass', () => {
    expect(inOrder(sampleResults)[0].ref).toEqual({ candidate: 'A', heightM: 24, tiltDeg: 1.5 })
    const words = wordsOf(model, 'summary')
    expect(words).toContain('None of the five options computed brings the share asked of every must need into sight.')
    expect(words).toContain('A at 24 m comes nearest: 89 % of Ferry approach in sight (95 % asked)')
    expect(words).toContain('Harbour fixes (needs of fixes are not assessed yet)')
    expect(words).not.toMatch(/\bpass(es|ed)?\b|\busable in\b/)
  })
  it('lists every default of the study and every file with its digest', () => {
    const defaults = textOfTable(tableOf(model, 'data', 'defaults'))
    for (const d of sampleStudy.defaults) expect(defaults).toContain(d.path)
    expect(sampleStudy.defaults.length).toBeGreaterThan(20)
    const files = textOfTable(tableOf(model, 'data', 'files')).replaceAll('\n', '')
    for (const f of input.files) expect(files).toContain(f.name)
    expect(files).toContain(input.files[0].sha256)
  })
  it('marks what is default, from memory and outside a model beside the figures', () => {
    expect(textOfTable(tableOf(model, 'need', 'needs'))).toMatch(/\d dB,\nPd 0\.80, case 1/)
    const figures = textOfTable(tableOf(model, 'option-A-24-1.5', 'figures'))
    expect(figures).toMatch(/Low-angle land table \|.*from memory/)
    expect(figures).toMatch(/Depression over 8°.*outside model/)
    expect(textOfTable(tableOf(model, 'models', 'models'))).toMatch(/land clutter table .*from memory/)
  })
  it('prints numbers on the safe side: C/N up, share in sight down, floor up', () => {
    const figures = textOfTable(tableOf(model, 'option-A-24-1.5', 'figures'))
    expect(figures).toContain('C/N, highest | 72 dB')
    expect(textOfTable(tableOf(model, 'option-A-24-1.5', 'option-sight'))).toContain('Ferry approach | 95 | 89')
    expect(textOfTable(tableOf(model, 'option-A-24-1.5', 'floors'))).toContain('20 NM | 1 700 (500)')
  })
  it('gives each option a map with its legend, a horizon profile and rings, captioned with what they show', () => {
    const figures = blocksOf(model, 'option-B-24-1.5').flatMap((b) => (b.kind === 'figure' ? [b] : []))
    expect(figures.map((f) => f.id)).toEqual(['map', 'horizon', 'rings'])
    expect(figures[0].png).toMatch(/^data:image\/png;base64,/)
    const texts = figures[0].drawing.items.flatMap((i) => (i.kind === 'text' ? [i.text] : []))
    for (const word of ['Clutter-to-noise', '0', '70', 'N', 'A', 'B', 'C', 'land table from memory']) expect(texts).toContain(word)
    expect(plain(figures[1].caption)).toMatch(/^The horizon stands highest at azimuth \d{3}°: 0\.\d\d°, set by cover at 4\.0 NM/)
  })
  it('says of each option where it falls short', () => {
    const short = textOfTable(tableOf(model, 'comparison', 'rejected'))
    expect(short.split('\n')).toHaveLength(5)
    expect(short).toContain('C at 24 m | Ferry approach: 69 % in sight, 95 % asked, worst behind cover at azimuth 104°')
  })
  it('has no line about the built-in land table where the study brings its own', () => {
    const own = buildMemo({ ...input, study: { ...sampleStudy, lowAngleLandTable: 'ours.json' } })
    for (const s of own.sections) expect(wordsOf(own, s.id)).not.toContain(CAUTIONS.landTable)
    expect(textOfTable(tableOf(own, 'models', 'models'))).toContain("The study's own: ours.json")
  })
  it('speaks of options whose every must need is in sight over the share asked', () => {
    const results = sampleResults.map((r) => ({
      ...r,
      figures: { ...r.figures, needs: r.figures.needs.map((n) => (n.needId === 'n1' ? { ...n, requiredPct: 80 } : n)) },
    }))
    const words = wordsOf(buildMemo({ ...input, results }), 'summary')
    expect(words).toContain(
      'Three of five options bring the share asked of every must need into sight; A at 12 m has the least clutter of them',
    )
  })
  it('holds the study alone while nothing is computed', () => {
    const empty = buildMemo({ ...input, results: [], maps: [] })
    expect(wordsOf(empty, 'summary')).toContain('No option has been computed yet')
    expect(empty.sections.map((s) => s.id)).toContain('data')
  })
  it('in the metric system prints no brackets', () => {
    const metric = buildMemo(sampleMemo('metric', 40))
    expect(textOfTable(tableOf(metric, 'option-A-24-1.5', 'figures'))).not.toMatch(/\(/)
  })
})
