import { describe, expect, it } from 'vitest'
import { type Block, buildMemo, cellText, inOrder, type MemoModel, type TableBlock } from '../../app/memo/model/index.ts'
import { CAUTIONS, NOT_ASSESSED } from '../../app/words/index.ts'
import type { FixFigure, NeedFigure } from '../../core/index.ts'
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
  it('runs from summary to annex, the option that comes first in full before the others, numbered in order', () => {
    expect(model.sections.map((s) => s.id)).toEqual([
      'summary',
      'need',
      'comparison',
      'candidates',
      'data',
      'option-A-24-1.5',
      'option-A-12-1.5',
      'option-B-24-1.5',
      'option-B-12-1.5',
      'option-C-24-1.5',
      'confirmed',
      'exposure',
      'not-assessed',
      'cautions',
      'models',
      'every-option',
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
  it('leads with the option that misses least of the must needs, its three shares together, and says pass of none', () => {
    expect(inOrder(sampleResults)[0].ref).toEqual({ candidate: 'A', heightM: 24, tiltDeg: 1.5 })
    const words = wordsOf(model, 'summary')
    expect(words).toContain('None of the five options computed passes every must need, at the k of the study and at k = 1.')
    expect(words).toContain('A at 24 m comes nearest: “Ferry approach” 89 % in sight, 87 % detectable and 80 % usable (95 % asked)')
    expect(words).toContain('“Harbour fixes” (its file has not been read)')
    expect(words).toContain('It comes before A at 12 m because it misses less of the must needs: 17 percentage points against 22.')
    expect(textOfTable(tableOf(model, 'summary', 'met'))).toBe(
      'Ferry approach | must | 95 | 80 | 78 | − 17 | not met\nLow flyers, east | wish | 100 | 58 | 56 | − 44 | not met',
    )
    for (const n of ['A-12', 'B-12']) expect(textOfTable(tableOf(model, `option-${n}-1.5`, 'option-needs'))).not.toMatch(/\bpass/)
    expect(textOfTable(tableOf(model, 'option-A-24-1.5', 'option-nested'))).not.toMatch(/\bpass/)
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
    expect(figures).toMatch(/Low-angle land table from memory/)
    expect(figures).toMatch(/Depression over 8°.*outside model/)
    expect(textOfTable(tableOf(model, 'models', 'models'))).toMatch(/land clutter table .*from memory/)
  })
  it('prints numbers on the safe side: C/N up, share in sight down, floor up', () => {
    const figures = textOfTable(tableOf(model, 'option-A-24-1.5', 'figures'))
    expect(figures).toContain('C/N, highest | 72 dB')
    expect(textOfTable(tableOf(model, 'option-A-24-1.5', 'option-nested'))).toContain('Ferry approach | 89 | 87 | 80 | 88 / 86 / 78 | 95')
    expect(textOfTable(tableOf(model, 'option-A-24-1.5', 'floors'))).toContain('20 NM | 1 700 (500)')
  })
  const figuresOf = (id: string) => blocksOf(model, id).flatMap((b) => (b.kind === 'figure' ? [b] : []))
  it('gives each option a map with its legend and a horizon profile, the first one every figure, numbered in order and captioned with what they show', () => {
    const figures = figuresOf('option-B-24-1.5')
    expect(figures.map((f) => f.id)).toEqual(['map', 'horizon'])
    expect(figuresOf('option-A-24-1.5').map((f) => f.id)).toEqual(['map', 'horizon', 'rings', 'suppression', 'levels'])
    const numbers = model.sections.flatMap((s) => figuresOf(s.id).map((f) => f.number))
    expect(numbers).toEqual(numbers.map((_, i) => i + 1))
    expect(figures[0].png).toMatch(/^data:image\/png;base64,/)
    const texts = figures[0].drawing.items.flatMap((i) => (i.kind === 'text' ? [i.text] : []))
    for (const word of ['Clutter-to-noise', '0', '70', 'N', 'A', 'B', 'C', 'land table from memory']) expect(texts).toContain(word)
    expect(plain(figures[1].caption)).toMatch(/^The horizon stands highest at azimuth \d{3}°: 0\.\d\d°, set by cover at 4\.0 NM/)
  })
  it('says of each option where it falls short', () => {
    const short = textOfTable(tableOf(model, 'comparison', 'rejected'))
    expect(short.split('\n')).toHaveLength(5)
    expect(short).toContain(
      'C at 24 m | “Ferry approach”: 69 % in sight, 67 % detectable and 60 % usable, 95 % asked; most lost: masked 31 %',
    )
  })
  it('has no line about the built-in land table where the study brings its own', () => {
    const own = buildMemo({ ...input, study: { ...sampleStudy, lowAngleLandTable: 'ours.json' } })
    for (const s of own.sections) expect(wordsOf(own, s.id)).not.toContain(CAUTIONS.landTable)
    expect(textOfTable(tableOf(own, 'models', 'models'))).toContain("The study's own: ours.json")
  })
  const withNeed = (change: (n: NeedFigure) => Partial<NeedFigure>): MemoModel =>
    buildMemo({
      ...input,
      results: sampleResults.map((r) => ({
        ...r,
        figures: { ...r.figures, needs: r.figures.needs.map((n) => (n.needId === 'n1' ? { ...n, ...change(n) } : n)) },
      })),
    })
  it('says pass only where both k are known', () => {
    const passing = withNeed((n) => ({ requiredPct: 60, met: true, passes: n.usablePct > 70 }))
    expect(wordsOf(passing, 'summary')).toContain(
      'Recommended: A at 12 m, Lantern Hill. Three of five options pass every must need, at the k of the study and at k = 1; A at 12 m comes first of them',
    )
    expect(textOfTable(tableOf(passing, 'option-A-24-1.5', 'option-needs'))).toMatch(/Ferry approach .*\| passes/)
    expect(textOfTable(tableOf(passing, 'option-C-24-1.5', 'option-needs'))).toMatch(/Ferry approach .*\| met, not at k = 1/)
    const open = withNeed(() => ({ requiredPct: 50, met: true, passes: null, atLowK: null }))
    expect(wordsOf(open, 'summary')).toContain('Five of five options meet every must need at the k of the study')
    expect(textOfTable(tableOf(open, 'option-A-12-1.5', 'option-nested'))).toMatch(/\| not run \| .*met, k = 1 not run yet/)
    for (const s of open.sections.filter((x) => x.option)) expect(wordsOf(open, s.id)).not.toMatch(/as asked/)
  })
  it('gives causes of loss that add up, both margins with their place, and what suppression is there', () => {
    const losses = textOfTable(tableOf(model, 'option-A-24-1.5', 'option-losses'))
    expect(losses).toMatch(/Ferry approach \| Masked 11 %, .*; clutter 9 %/)
    const margins = textOfTable(tableOf(model, 'option-A-24-1.5', 'option-margins'))
    expect(margins).toContain('Ferry approach: height over the floor | −534 ft | 40 ft | 104°, 20.8 NM | cover')
    expect(margins).toContain('Ferry approach: signal over the required ratio | −15 dB | 0 dB | 061°, 6.6 NM | terrain')
    expect(wordsOf(model, 'option-A-24-1.5')).toMatch(
      /Available by kind of clutter: forest 38 dB, rain 38 dB, discrete 38 dB, from an earlier pulse \d+ dB\./,
    )
  })
  it('says of a layer that lies below all known ground that it does, and gives it no shares', () => {
    const under = withNeed((n) => ({
      areaKm2: n.unknownKm2,
      groundAboveKm2: 900,
      inSightPct: 0,
      detectablePct: 0,
      usablePct: 0,
      met: false,
      passes: false,
    }))
    const words = 'the layer lies below all known ground inside its range'
    expect(wordsOf(under, 'option-A-24-1.5')).toContain(`Of “Ferry approach” nothing can be seen from Lantern Hill: ${words}.`)
    expect(wordsOf(under, 'option-A-24-1.5')).not.toContain('Largest cause of loss')
    for (const id of ['option-nested', 'option-losses', 'option-suppression'])
      expect(textOfTable(tableOf(under, 'option-A-12-1.5', id))).toContain(`Ferry approach | ${words}`)
    expect(textOfTable(tableOf(under, 'option-A-24-1.5', 'option-needs'))).toContain(`Ferry approach | ${words}`)
    expect(textOfTable(tableOf(under, 'comparison', 'compare-needs'))).toMatch(/^A at 12 m \| – \|/)
  })
  it('says a caution once in a section, and on the page of an option where it stands', () => {
    for (const s of model.sections) {
      const texts = blocksOf(model, s.id).flatMap((b) => (b.kind === 'caution' ? b.texts : []))
      expect(new Set(texts).size, s.id).toBe(texts.length)
    }
    expect(wordsOf(model, 'option-B-24-1.5')).toContain('Every caution under the figures of A Lantern Hill at 24 m holds for these too.')
  })
  it('gives the option beside the map in full, with its trial plan, whichever comes first', () => {
    const ref = { candidate: 'B', heightM: 24, tiltDeg: 1.5 }
    const own = buildMemo(input, ref)
    expect(own.sections.filter((s) => s.blocks.length > 0).map((s) => s.id)).toEqual(['summary', 'option-B-24-1.5'])
    for (const id of ['option-nested', 'option-margins', 'option-losses', 'option-suppression', 'floors'])
      expect(tableOf(own, 'option-B-24-1.5', id), id).toBeDefined()
  })
  it('gives the horizon of a candidate every 5° from each of its masts', () => {
    const table = tableOf(model, 'annex', 'horizon-A')
    expect(table.rows).toHaveLength(36)
    expect(table.columns.flatMap((c) => (c.group === undefined ? [] : [plain(c.group)]))).toEqual([
      '12 m',
      '12 m',
      '24 m',
      '24 m',
      '12 m',
      '12 m',
      '24 m',
      '24 m',
    ])
    const azimuths = table.rows.flatMap((r) => [cellText(r[0]), cellText(r[6])])
    expect(new Set(azimuths).size).toBe(72)
    expect(azimuths).toContain('355')
    const turned = buildMemo({ ...input, study: { ...sampleStudy, declination: { valueDeg: 3.2, date: '2026-12-01', model: 'WMM2025' } } })
    expect(tableOf(turned, 'annex', 'horizon-A').rows[0].slice(0, 2).map(cellText)).toEqual(['000', '357'])
    expect(wordsOf(turned, 'annex')).toContain('magnetic (°M), declination 3.2° E on 2026-12-01 (WMM2025)')
  })
  it('works out the required ratio from D₀ and its losses', () => {
    const { required } = sampleStudy.needs[0]
    const row = tableOf(model, 'need', 'ratios').rows[0].map(cellText)
    expect(Number(row[7])).toBeCloseTo(required.d0Db + required.beamShapeDb + required.straddleDb + required.cfarDb, 0)
    expect(Number(row[7])).toBeGreaterThanOrEqual(required.ratioDb)
  })
  it('lists fixes worst first and a track by stretch', () => {
    const fix = (name: string, marginM: number): FixFigure => ({
      name,
      lon: -121.2,
      lat: -38.4,
      azimuthDeg: 104,
      rangeM: 20_000,
      slantRangeM: 20_000,
      altM: 300,
      altAglM: 200,
      floorM: 300 - marginM,
      floorAglM: 200 - marginM,
      floorBandM: 5,
      marginM,
      visible: marginM > 0 ? 'yes' : 'no',
      snrDb: 20,
      signalMarginDb: 4.9,
      pd: 0.917,
      detectable: marginM > 0,
      usable: marginM > 0,
      visibleLowK: null,
      detectableLowK: null,
      usableLowK: null,
      cause: marginM > 0 ? null : 'masked',
      obstacle: 'cover',
      obstacleRangeM: 7_000,
    })
    const fixes = withNeed(() => ({ measure: 'fixes', amount: 2, fixes: [fix('Low one', -42.2), fix('High one', 61)] }))
    const table = textOfTable(tableOf(fixes, 'option-A-24-1.5', 'fixes')).split('\n')
    expect(table[0]).toMatch(/^Low one \| 104°, 10\.8 NM .*\| masked \| cover$/)
    expect(table[1]).toMatch(/\| 4 \| 0\.91 \| usable \| cover$/)
    const stretch = { tangential: false, blind: false, fromRangeM: 9_000, toRangeM: 5_000, fromAltM: 300, toAltM: 250 }
    const track = withNeed(() => ({
      measure: 'length',
      amount: 10,
      track: {
        lengthM: 10_000,
        pieces: [],
        segments: [
          { ...stretch, fromM: 0, toM: 4_000, cause: null },
          { ...stretch, fromM: 4_000, toM: 10_000, cause: 'clutter', tangential: true },
        ],
        longestGapM: 6_000,
        longestGapS: 100,
        tangentialM: 6_000,
        blindM: 0,
        seenFrom: null,
        lostAt: null,
      },
    }))
    expect(textOfTable(tableOf(track, 'option-A-24-1.5', 'track'))).toContain('clutter, tangential')
    expect(wordsOf(track, 'option-A-24-1.5')).toContain('longest gap 3.3 NM (6.0 km), 1 min 40 s')
  })
  it('gives a keep-clear distance with its limit and basis beside the caution, and none where the aperture is not stated', () => {
    expect(wordsOf(model, 'exposure')).toContain('No keep-clear distance is given')
    const antenna = { ...sampleStudy.radar.antenna, apertureWidthM: 4, apertureHeightM: 1.5 }
    const stated = buildMemo({ ...input, study: { ...sampleStudy, radar: { ...sampleStudy.radar, antenna } } })
    const table = textOfTable(tableOf(stated, 'exposure', 'exposure'))
    expect(table).toMatch(/^Keep clear, antenna stopped, main beam \| \d+ m from memory\nAntenna turning/)
    expect(table).toContain('Pulse-peak limits | not assessed')
    for (const id of ['exposure', 'structure'] as const) expect(wordsOf(stated, 'exposure')).toContain(CAUTIONS[id])
    expect(textOfTable(tableOf(stated, 'option-A-24-1.5', 'figures'))).toMatch(/Keep clear, antenna stopped \| \d+ m from memory/)
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
