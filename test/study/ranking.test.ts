import { describe, expect, test } from 'vitest'
import { checkDoc, optionsOf, type StudyDoc, settle } from '../../core/index.ts'
import { minimal, withValue } from './fixture.ts'

const two = (): StudyDoc => ({
  ...minimal(),
  candidates: [...minimal().candidates, { ...minimal().candidates[0], id: 'B', name: 'Quarry' }],
})
const criterion = { figure: 'need_n1_usable_pct', worst: 50, best: 100, weight: 2 }
const found = (doc: unknown) => checkDoc(doc).problems.map((p) => `${p.path}: ${p.found}`)

describe('a rejected candidate', () => {
  test('is listed with its reason and has no options', () => {
    const study = settle(withValue('candidates[1].rejected', 'no road to the top', two()) as StudyDoc)
    expect(study.rejected).toEqual([{ id: 'B', name: 'Quarry', lon: 10, lat: 50, reason: 'no road to the top' }])
    expect(optionsOf(study).map((o) => o.candidate)).toEqual(['A', 'A'])
  })
  test('needs a reason', () => {
    expect(found(withValue('candidates[1].rejected', ' ', two()))).toEqual([
      'candidates[1].rejected: a rejected candidate without a reason',
    ])
  })
})

describe('the ranking of a study', () => {
  test('is kept as stated; without criteria there is none', () => {
    expect(settle(withValue('ranking', { criteria: [criterion] }) as StudyDoc).ranking).toEqual({ criteria: [criterion] })
    expect(settle(withValue('ranking', { criteria: [] }) as StudyDoc).ranking).toBeNull()
    expect(settle(minimal()).ranking).toBeNull()
  })
  test('what cannot rank is refused at its key', () => {
    const ranked = (part: object) => withValue('ranking', { criteria: [{ ...criterion, ...part }] })
    expect(found(ranked({ best: 50 }))).toEqual(['ranking.criteria[0].best: worst and best are both 50'])
    expect(found(ranked({ weight: 0 }))).toEqual(['ranking.criteria[0].weight: weight is 0'])
    expect(found(ranked({ figure: 'Usable %' }))).toEqual(['ranking.criteria[0].figure: figure is "Usable %"'])
    expect(found(withValue('ranking', { criteria: [criterion, criterion] }))).toEqual([
      'ranking.criteria[1].figure: figure "need_n1_usable_pct" is already criterion 1',
    ])
  })
})
