export { type ChangeSide, changeBetween, nullSpacingDeg, sectorChanges } from './changeBetween.ts'
export type * from './types.ts'
