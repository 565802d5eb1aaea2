import { type Session, SessionProvider, Shell, useFaceNorth } from './steps/index.ts'
import { setFaceNorth } from './words/index.ts'

export function App({ session }: { session: Session }) {
  return (
    <SessionProvider session={session}>
      <Faced />
    </SessionProvider>
  )
}

/** Azimuths are in every corner of the page: all of it renders again when north changes, and keeps its state. */
function Faced() {
  const north = useFaceNorth()
  setFaceNorth(north)
  return <Shell />
}
