export * from './change/index.ts'
export { needFigures, optionFigures } from './figures.ts'
export { floorFigures, RING_WIDTH_M } from './groundFigures.ts'
export { hasHighK, highKFigure, withHighK } from './highK.ts'
export { ladderHeightsM, ladderOf, ladderValuesOf, type Rung, rung } from './ladder.ts'
export * from './measured/index.ts'
export { type NeedCells, needCells } from './needs/needCells.ts'
export { cellsOfNeed, isAreaNeed } from './needs/needFigure.ts'
export { PLACE } from './needs/place.ts'
export { type PlacesRequest, readPlaces } from './needs/places/readPlaces.ts'
export type { NeedPlace, NeedPlaces, PolygonRing } from './needs/places/types.ts'
export { inSector } from './needs/spans.ts'
export {
  antennaM,
  isLowK,
  LOW_K,
  type LowKCells,
  meanEffectiveRadiusM,
  type OptionCells,
  plusRatioDb,
  type ResidueCells,
  residueOf,
} from './optionCells.ts'
export * from './ranking/index.ts'
export * from './roads/index.ts'
export { aboveNoiseDb } from './signal/decibelTables.ts'
export { twoWayEdgeLossDb } from './signal/edgeLoss.ts'
export { type Lobe, type LobeModel, type LobePlace, lobeAt, lobeModel } from './signal/lobing/index.ts'
export { pdOf } from './signal/pdOf.ts'
export { receiverLinearRangeDb } from './signal/receiverLimits.ts'
export { echoAt, type TargetEcho, type TargetSignal, targetSignal } from './signal/targetSignal.ts'
export * from './trialPlan/index.ts'
export * from './types.ts'
export { type BeamRay, type CutWindow, type VerticalCut, verticalCut } from './vertical/index.ts'
