import { SURVEYED } from '../terrain/index.ts'

/** What a horizon or a controlling point is, where it is not an index into Ground.obstacles. */
export const HORIZON_IS = { terrain: -1, cover: -2, edge: -3, void: -4, surveyed: SURVEYED } as const
/** Said in place of the controlling point where the ray ends before what was asked. */
export const AT_LEAST_EDGE = 'at least: edge of terrain'
export const AT_LEAST_VOID = 'at least: void in terrain'

/** Name of what a survey of the horizon found. */
export const SURVEYED_NAME = 'surveyed'

/** The word for it: 'terrain', 'cover', the obstacle's name, or that the ray ended before. */
export function horizonName(is: number, obstacles: readonly { readonly name: string }[]): string {
  if (is >= 0) return obstacles[is].name
  if (is === HORIZON_IS.edge) return AT_LEAST_EDGE
  if (is === HORIZON_IS.void) return AT_LEAST_VOID
  if (is === HORIZON_IS.surveyed) return SURVEYED_NAME
  return is === HORIZON_IS.cover ? 'cover' : 'terrain'
}
