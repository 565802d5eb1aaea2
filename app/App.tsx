import { type Session, SessionProvider, Shell, useFaceNorth } from './steps/index.ts'
import { setFaceNorth } from './words/index.ts'

export function App({ session }: { session: Session }) {
  return (
    <SessionProvider session={session}>
      <Faced />
    </SessionProvider>
  )
}

/** Azimuths are in every corner of the page: it is drawn anew when north changes. */
function Faced() {
  const north = useFaceNorth()
  setFaceNorth(north)
  return <Shell key={north ? JSON.stringify(north) : 'true'} />
}
