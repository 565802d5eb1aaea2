export { type ReadGround, type Session, SessionProvider, startSession } from './session/index.ts'
export { Shell } from './shell/Shell.tsx'
