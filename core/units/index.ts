export * from './constants.ts'
export * from './convert.ts'
