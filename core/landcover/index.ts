export * from './legends.ts'
export * from './types.ts'
