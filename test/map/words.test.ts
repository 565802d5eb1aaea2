import { describe, expect, it } from 'vitest'
import { legendMarks, legendStops, placeLine, ringStep, ringText, scaleBar } from '../../app/words/map.ts'

describe('words of the map', () => {
  it('labels the coverage floor in round feet or round metres', () => {
    const stops = [0, 250, 500, 1000, 1500, 2000, 3000]
    const feet = legendStops('coverage-floor', stops, 'nautical')
    expect(feet.unit).toBe('ft')
    expect(feet.labels.map((l) => l.text)).toEqual(['0', '2\u202f000', '4\u202f000', '6\u202f000', '8\u202f000'])
    expect(feet.labels[1]!.at).toBeCloseTo(609.6 / 3000, 6)
    expect(legendStops('coverage-floor', stops, 'metric').labels.map((l) => l.text)).toEqual([
      '0',
      '250',
      '500',
      '1\u202f000',
      '1\u202f500',
      '2\u202f000',
      '3\u202f000',
    ])
  })
  it('draws a round scale bar no longer than it may be', () => {
    for (const px of [0.4, 3, 17, 90, 260, 2000])
      for (const units of ['nautical', 'metric'] as const) {
        const bar = scaleBar(px, 96, units)
        expect(bar.px).toBeLessThanOrEqual(96.01)
        expect(bar.px).toBeGreaterThan(38)
        expect(bar.text).toMatch(/^(1|2|5|0\.5|[125]0|[125]00|[125]\u202f000)\u202f(NM|km|ft|m)$/)
      }
  })
  it('spaces rings by round steps in the unit of the face', () => {
    expect(ringStep(60_000, 'metric', 5)).toBeCloseTo(20_000, 6)
    expect(ringText(20_000, 'metric')).toBe('20\u202fkm')
    expect(ringStep(111_120, 'nautical', 5)).toBeCloseTo(37_040, 6)
    expect(ringText(37_040, 'nautical')).toBe('20\u202fNM')
  })
  it('says each mark once, and those of clutter only where clutter is shown', () => {
    const marks = [
      { mark: 'from memory', about: 'land clutter table: a book' },
      { mark: 'outside model', about: 'sea clutter not assessed' },
      { mark: 'default', about: 'uniform terrain' },
      { mark: 'by hand', about: 'Suppression: as stated for the radar' },
    ]
    expect(legendMarks('clutter-to-noise', marks).warned).toEqual([
      'land table from memory',
      'sea clutter not assessed · outside model',
      'uniform terrain · default',
    ])
    expect(legendMarks('clutter-to-noise', marks).note).not.toContain('memory')
    expect(legendMarks('suppression-needed', marks).warned).toContain('Suppression · by hand')
    expect(legendMarks('coverage-floor', marks).warned).toEqual(['uniform terrain · default'])
  })
  it('says by hand, not from memory, of a land table of the study', () => {
    const { note, warned } = legendMarks('clutter-to-noise', [{ mark: 'by hand', about: 'land clutter table: from the study' }])
    expect(warned).toEqual(['land clutter table · by hand'])
    expect(note).not.toContain('memory')
  })
  it('leaves out what is not known, and says where no ground is known', () => {
    expect(placeLine(118.5, 13_334, 122.5, 'nautical')).toBe('az 118.5° · 7.2\u202fNM · ground 402\u202fft')
    expect(placeLine(118.5, 13_334, null, 'nautical')).toContain('no ground known')
    expect(placeLine(null, null, undefined, 'metric')).toBe('')
  })
})
