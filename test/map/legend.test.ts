import { describe, expect, test } from 'vitest'
import { classesOf } from '../../app/map/face/Legend.tsx'
import { areaNeedOf } from '../../app/steps/session/runKeeper.ts'
import { LOSS_CAUSES, newStudy } from '../../core/index.ts'

describe('legend of classes', () => {
  test('the three words in their order', () => {
    expect(classesOf('usable', null).map((c) => `${c.value} ${c.words}`)).toEqual(['1 in sight', '2 detectable', '3 usable'])
  })
  test('causes that the need has, with their share rounded up; all of them while that is not known', () => {
    expect(classesOf('cause-of-loss', [{ cause: 'masked', pct: 14.2 }])).toEqual([{ value: 3, words: 'masked', share: '15\u202f%' }])
    expect(classesOf('cause-of-loss', null)).toHaveLength(LOSS_CAUSES.length)
  })
})

test('layers are drawn for a need of an area, whatever need is compared', () => {
  const doc = {
    ...newStudy('x'),
    needs: [
      { id: 'f', kind: 'fixes' as const, file: 'f.csv' },
      { id: 'a', kind: 'layer' as const, heightM: 100 },
      { id: 'p', kind: 'polygon' as const, file: 'p.geojson', heightM: 100 },
    ],
  }
  expect(areaNeedOf(doc, 'f')).toBe('a')
  expect(areaNeedOf(doc, 'p')).toBe('p')
  expect(areaNeedOf({ ...doc, needs: [] }, null)).toBeNull()
})
