import type { Figures } from '../types.ts'

/** Both axes of one option: what is gained and what it costs. */
export interface GainAndCost {
  readonly gain: number
  readonly cost: number
}
/**
 * Coverage and clutter of one option: usable share of the needs of an area, each by its area, %, against their area where more suppression is needed
 * than there is, km². Of one need where `needId` names one of an area, else of all.
 * @returns null where no need of an area is assessed
 */
export function coverageOf(figures: Pick<Figures, 'needs'>, needId: string | null): { usablePct: number; shortKm2: number } | null {
  const areas = figures.needs.filter((n) => n.notAssessed === null && n.measure === 'area')
  const chosen = areas.filter((n) => n.needId === needId)
  const needs = chosen.length > 0 ? chosen : areas
  const areaKm2 = needs.reduce((sum, n) => sum + n.areaKm2, 0)
  if (areaKm2 === 0) return null
  return {
    usablePct: needs.reduce((sum, n) => sum + n.usablePct * n.areaKm2, 0) / areaKm2,
    shortKm2: needs.reduce((sum, n) => sum + n.suppression.shortKm2, 0),
  }
}
/** Which of the points no other beats: none has at least as much gain at no more cost, and more of one or less of the other. Equal points all stay. */
export function nonDominated(points: readonly GainAndCost[]): boolean[] {
  return points.map((p) => !points.some((q) => q.gain >= p.gain && q.cost <= p.cost && (q.gain > p.gain || q.cost < p.cost)))
}
