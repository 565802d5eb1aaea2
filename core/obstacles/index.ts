export { readObstacles } from './readObstacles.ts'
export { readRoads } from './readRoads.ts'
export * from './roadClass.ts'
export * from './types.ts'
