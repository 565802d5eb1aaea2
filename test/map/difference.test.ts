import { describe, expect, it } from 'vitest'
import { differenceOn } from '../../app/map/difference.ts'
import { againstWords, differenceEnds, differenceStops, differenceTitle, formatDifference } from '../../app/words/index.ts'
import { differenceInfo, LAYER_IDS, type Probe } from '../../core/index.ts'

const A = { candidate: 'A', heightM: 20, tiltDeg: 0 }
const B = { candidate: 'B', heightM: 30, tiltDeg: 0 }
const plain = (text: string) => text.replaceAll('\u202f', ' ')

describe('a layer against a second option', () => {
  it('is a difference unless two maps are asked for or the layer is one of names', () => {
    const show = { option: A, layer: 'clutter-to-noise' as const, need: null, against: B }
    expect(differenceOn(show)).toBe(B)
    expect(differenceOn({ ...show, beside: 'maps' })).toBeNull()
    expect(differenceOn({ ...show, layer: 'cause-of-loss' })).toBeNull()
    expect(differenceOn({ ...show, against: null })).toBeNull()
    expect(LAYER_IDS.filter((l) => differenceInfo(l) === null)).toEqual(['cause-of-loss'])
  })
  it('says at both ends what the colour means for the first option; warm is where more comes back or less is seen', () => {
    expect(differenceTitle('clutter-to-noise', 'A at 20 m', 'B at 30 m')).toBe('Clutter-to-noise, A at 20 m less B at 30 m')
    expect(differenceEnds('clutter-to-noise', 'A')).toEqual(['less comes back for A', 'more comes back for A'])
    expect(differenceEnds('coverage-floor', 'A')).toEqual(['more seen for A', 'less seen for A'])
    expect(differenceEnds('usable', 'A')).toEqual(['less seen for A', 'more seen for A'])
    expect(differenceEnds('suppression-needed', 'A')).toEqual(['less needed for A', 'more needed for A'])
  })
  it('has signed round stops in the unit of the face', () => {
    expect(differenceStops('clutter-to-noise', 'nautical').labels.map((l) => l.text)).toEqual([
      '−30',
      '−20',
      '−10',
      '0',
      '+10',
      '+20',
      '+30',
    ])
    const feet = differenceStops('coverage-floor', 'nautical')
    expect(feet.unit).toBe('ft')
    expect(feet.labels.map((l) => plain(l.text))).toEqual(['−4 000', '−2 000', '0', '+2 000', '+4 000'])
    // 2 000 ft are 609.6 m, of 1 500 m to each side
    expect(feet.labels[3].at).toBeCloseTo(0.5 + 609.6 / 3000, 9)
  })
  it('the read-out says by how much, or what the second option has instead', () => {
    const probe = { layer: 'clutter-to-noise', value: 34.2, against: { word: null, value: 22.4 } as Probe, difference: 11.8 } as Probe
    expect(plain(againstWords(probe, 'B at 30 m', 'metric'))).toBe('+12 dB against B at 30 m')
    const masked = { ...probe, difference: null, against: { word: 'masked', value: null } as Probe }
    expect(plain(againstWords(masked, 'B at 30 m', 'metric'))).toBe('B at 30 m: masked')
    expect(plain(formatDifference('coverage-floor', -30.48, 'nautical').value)).toBe('−100')
  })
})
