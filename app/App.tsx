import { type Session, SessionProvider, Shell } from './steps/index.ts'

export function App({ session }: { session: Session }) {
  return (
    <SessionProvider session={session}>
      <Shell />
    </SessionProvider>
  )
}
