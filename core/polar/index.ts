export * from './cellState.ts'
export * from './polarPlace.ts'
export * from './polarShape.ts'
export * from './types.ts'
