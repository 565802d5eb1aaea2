import { createContext, type ReactNode, useContext } from 'react'
import { useStore } from 'zustand'
import type { StudyDoc } from '../../../core/index.ts'
import type { GroundState, ResultsState, SaveState, ViewState } from '../../document/index.ts'
import type { FaceNorth } from '../../words/index.ts'
import type { Session } from './session.ts'

const Context = createContext<Session | null>(null)
export const SessionProvider = ({ session, children }: { session: Session; children: ReactNode }) => (
  <Context.Provider value={session}>{children}</Context.Provider>
)
export function useSession(): Session {
  const session = useContext(Context)
  if (!session) throw new Error('outside a session')
  return session
}
/** The slice of a store that a component shows; it renders again only when that slice changes. */
export const useDoc = <T,>(pick: (doc: StudyDoc) => T): T => useStore(useSession().study, (s) => pick(s.doc))
export const useView = <T,>(pick: (view: ViewState) => T): T => useStore(useSession().view, pick)
export const useResults = <T,>(pick: (results: ResultsState) => T): T => useStore(useSession().results, pick)
export const useGround = <T,>(pick: (ground: GroundState) => T): T => useStore(useSession().ground, pick)
export const useSave = <T,>(pick: (save: SaveState) => T): T => useStore(useSession().save, pick)

/** The declination azimuths at the face are turned by; null while they are true. */
export function useFaceNorth(): FaceNorth | null {
  const stated = useDoc((d) => d.declination) ?? null
  return useView((v) => v.north) === 'magnetic' ? stated : null
}
