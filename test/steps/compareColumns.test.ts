import { describe, expect, test } from 'vitest'
import { columnGroups, marginalPctOf, NEED_COLUMNS } from '../../app/steps/compare/columns.ts'
import { verdictOf } from '../../app/words/index.ts'
import type { NeedFigure } from '../../core/index.ts'

const figure = (part: Partial<NeedFigure>) => part as NeedFigure

describe('comparison of options', () => {
  test('passes only where the smaller k is known too', () => {
    expect(verdictOf(figure({ met: true, passes: true }))).toBe('passes')
    expect(verdictOf(figure({ met: true, passes: null }))).toBe('met, k = 1 not run yet')
    expect(verdictOf(figure({ met: true, passes: false }))).toBe('met, not at k = 1')
    expect(verdictOf(figure({ met: false, passes: null }))).toBe('not met')
  })
  test('in sight, detectable and usable stand together, in this order, with the marginal share beside them', () => {
    expect(NEED_COLUMNS.slice(0, 4).map((c) => c.id)).toEqual(['inSight', 'detectable', 'usable', 'marginal'])
    expect(columnGroups(NEED_COLUMNS)[0]).toEqual({ group: 'Share of the need', span: 4 })
  })
  test('the marginal share is one of the area, and unknown for fixes and tracks', () => {
    expect(marginalPctOf(figure({ areaKm2: 400, marginalKm2: 10 }))).toBe(2.5)
    expect(marginalPctOf(figure({ areaKm2: 0, marginalKm2: 0 }))).toBeNull()
  })
})
