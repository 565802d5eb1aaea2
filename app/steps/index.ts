export { type ReadGround, type Session, SessionProvider, startSession, useFaceNorth } from './session/index.ts'
export { Shell } from './shell/Shell.tsx'
