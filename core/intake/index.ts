export * from './openTerrain.ts'
export * from './types.ts'
