export { type RoadPiece, roadPieces } from './pieces.ts'
export { type RoadSight, seeRoads } from './roadSight.ts'
export { roadLines, roadsFigure } from './roadsFigure.ts'
export * from './types.ts'
