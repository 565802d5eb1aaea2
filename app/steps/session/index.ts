export * from './context.tsx'
export type { ReadGround } from './groundKeeper.ts'
export { sentenceOf } from './notices.ts'
export { type Session, startSession } from './session.ts'
