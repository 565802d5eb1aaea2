export { readObstacles } from './readObstacles.ts'
export { readRoads } from './readRoads.ts'
export * from './types.ts'
