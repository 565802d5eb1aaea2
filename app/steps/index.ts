export { Shell } from './Shell.tsx'
export { type ReadGround, type Session, SessionProvider, startSession } from './session/index.ts'
