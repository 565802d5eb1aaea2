import { CELL } from './types.ts'

/** Ground not known there: the ray had crossed a void or left the terrain. Decided here and nowhere else. */
export const isUnknown = (state: number): boolean => state === CELL.beyondVoid || state === CELL.outside
/** Some of the cell's ground is in sight. */
export const isSeen = (state: number): boolean => state === CELL.inSight || state === CELL.partly
/** Known ground of which nothing is in sight. */
export const isMasked = (state: number): boolean => state === CELL.masked || state === CELL.marginal
