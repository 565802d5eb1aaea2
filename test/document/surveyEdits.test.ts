import { describe, expect, it } from 'vitest'
import { createStudyStore, filesOf, removeSurvey, setSurvey, takeSurvey, undo } from '../../app/document/index.ts'
import { settle } from '../../core/index.ts'
import { sampleDoc } from '../memo/sample.ts'

describe('surveyed horizon of a candidate', () => {
  it('is compared first, taken on request, and gone with its request; every step is undone', () => {
    const store = createStudyStore(sampleDoc)
    const settled = () => settle(store.getState().doc).candidates[0]!.measuredHorizon
    setSurvey(store, 'A', 'horizon-A.csv')
    expect(settled()).toMatchObject({ file: 'horizon-A.csv', used: false })
    expect(filesOf(store.getState().doc)).toContain('horizon-A.csv')
    takeSurvey(store, 'A', true)
    expect(settled()).toMatchObject({ used: true })
    removeSurvey(store, 'A')
    expect(settled()).toBeNull()
    expect(store.getState().doc).toEqual(sampleDoc)
    undo(store)
    expect(settled()).toMatchObject({ file: 'horizon-A.csv', used: true })
    takeSurvey(store, 'A', false)
    expect('useMeasuredHorizon' in store.getState().doc.candidates[0]!).toBe(false)
    for (let n = 0; n < 3; n++) undo(store)
    expect(store.getState().doc).toEqual(sampleDoc)
  })
  it('not taking it is a default, listed; without a survey there is none', () => {
    const doc = {
      ...sampleDoc,
      candidates: sampleDoc.candidates.map((c, i) => (i === 0 ? { ...c, measuredHorizon: { file: 's.csv' } } : c)),
    }
    const paths = (d: typeof doc) => settle(d).defaults.map((x) => x.path).filter((p) => p.endsWith('useMeasuredHorizon')) // biome-ignore format: one line
    expect(paths(doc)).toEqual(['candidates[0].useMeasuredHorizon'])
    expect(paths(sampleDoc)).toEqual([])
  })
})
