import { describe, expect, it } from 'vitest'
import { type Block, buildMemo, cellText, type TableBlock } from '../../app/memo/model/index.ts'
import { CAUTIONS, trialRoute } from '../../app/words/index.ts'
import type { TrialRow } from '../../core/index.ts'
import { sampleMemo } from './sampleMemo.ts'

const NONE = { fromRangeM: null, toRangeM: null, fromAzimuthDeg: null, toAzimuthDeg: null }
const radial: TrialRow = {
  ...NONE,
  kind: 'radial',
  confirms: 'floor',
  needId: 'n1',
  needName: 'Ferry approach',
  name: '',
  at: { lon: 1, lat: 2, azimuthDeg: 118.04, rangeM: 18_520 },
  fromRangeM: 1852,
  toRangeM: 37_040,
  altitudeM: 300,
  floorM: 304.9,
  floorBandM: 8,
  marginM: -4.9,
  signalMarginDb: null,
  predicted: 'marginal',
  obstacle: 'Grey mast',
  obstacleRangeM: 7000,
}
const plan: TrialRow[] = [
  radial,
  { ...radial, kind: 'orbit', confirms: 'horizon', fromRangeM: null, toRangeM: null, fromAzimuthDeg: 30, toAzimuthDeg: 150 },
  { ...radial, ...NONE, kind: 'survey', confirms: 'obstacle', altitudeM: 190, floorM: null, marginM: null, predicted: null },
]
const plain = (s: string): string => s.replaceAll('\u202f', ' ')

describe('trial plan in the memo', () => {
  it('routes in words, in the unit of the face', () => {
    expect(plan.map((r) => plain(trialRoute(r, 'nautical')))).toEqual([
      'Radial 118.0°, 1.0 to 20.0 NM',
      'Orbit at 10.0 NM, 030° to 150°',
      'Survey on the ground',
    ])
    expect(plain(trialRoute({ ...plan[1]!, fromAzimuthDeg: 0, toAzimuthDeg: 360 }, 'metric'))).toBe('Orbit at 18.5 km, all round')
  })
  it('a row each under its need, with place, altitude, floor up, margin down, prediction and what it would confirm; the caution under it', () => {
    const sample = sampleMemo('metric', 40)
    const [first] = sample.results
    const model = buildMemo({ ...sample, results: [{ ...first, figures: { ...first.figures, trialPlan: plan } }] })
    const blocks: readonly Block[] = model.sections.flatMap((s) => s.blocks)
    const table = blocks.find((b): b is TableBlock => b.kind === 'table' && b.id === 'trial-plan')!
    expect(table.rows.map((r) => r.map((c) => plain(cellText(c))))).toEqual([
      [
        '“Ferry approach”\n1 Radial 118.0°, 1.9 to 37.0 km',
        '118.0°, 18.5 km',
        '300',
        '305',
        '−5',
        'marginal',
        'The coverage floor behind the obstacle (Grey mast)',
      ],
      ['2 Orbit at 18.5 km, 030° to 150°', '118.0°, 18.5 km', '300', '305', '−5', 'marginal', 'The horizon azimuth by azimuth (Grey mast)'],
      ['3 Survey on the ground', '118.0°, 18.5 km', '190', '–', '–', '–', 'The height of the obstacle that the floor rests on (Grey mast)'],
    ])
    expect(blocks.some((b) => b.kind === 'caution' && b.texts.includes(CAUTIONS.trialAltitudes))).toBe(true)
  })
})
