export * from './hub.ts'
export * from './types.ts'
