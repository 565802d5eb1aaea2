export type { BeamRay, CutWindow, VerticalCut } from './types.ts'
export { verticalCut } from './verticalCut.ts'
