import { type FloorFigure, M_PER_NM, type NeedDoc, type NeedFigure, type OptionResult, type StudyDoc } from '../../../core/index.ts'

/** Ground range of the floor that stands for an option in comparisons. */
export const FLOOR_RANGE_M = 20 * M_PER_NM

/** The floor figure nearest to 20 NM; undefined when none was computed. */
export function floorNear(result: OptionResult, rangeM = FLOOR_RANGE_M): FloorFigure | undefined {
  return [...result.figures.floors].sort((a, b) => Math.abs(a.rangeM - rangeM) - Math.abs(b.rangeM - rangeM))[0]
}
/** The figure of a need, or of the first need that is assessed. */
export function needOf(result: OptionResult, needId: string | null): NeedFigure | undefined {
  const assessed = result.figures.needs.filter((n) => n.notAssessed === null)
  return assessed.find((n) => n.needId === needId) ?? assessed[0]
}
export const isAssessed = (result: OptionResult, needId: string): boolean =>
  result.figures.needs.some((n) => n.needId === needId && n.notAssessed === null)
/** Needs of the study, must needs first, otherwise as it lists them. */
export const needsInOrder = (doc: StudyDoc): NeedDoc[] =>
  [...(doc.needs ?? [])].sort((a, b) => Number(a.must === false) - Number(b.must === false))
