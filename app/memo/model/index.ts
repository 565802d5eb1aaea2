export { buildMemo } from './buildMemo.ts'
export { cellText } from './cells.ts'
export * from './ranking.ts'
export * from './types.ts'
