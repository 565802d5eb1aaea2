export { floorBand } from './floorBand.ts'
export { horizonAt } from './horizon.ts'
export { type SightPoint, sightPoint } from './sightPoint.ts'
export * from './types.ts'
