import { StrictMode } from 'react'
import { createRoot } from 'react-dom/client'
import { App } from './App.tsx'
import { makeGroundReader } from './compute/intakeClient.ts'
import { createStudyClient } from './compute/studyClient.ts'
import { startSession } from './steps/index.ts'
import './ui/theme.css'
import './ui/controls.css'
import './ui/fields.css'
import './steps/steps.css'

// the map's own code comes down while the session starts
void import('./map/index.ts')
const session = await startSession(createStudyClient(), makeGroundReader())
createRoot(document.getElementById('root') as HTMLElement).render(
  <StrictMode>
    <App session={session} />
  </StrictMode>,
)

/** A while after the page stands, so that nothing waits for it: the build's own files are kept for days without a network. */
const KEEP_AFTER_MS = 8000
if (import.meta.env.PROD && 'serviceWorker' in navigator)
  setTimeout(() => navigator.serviceWorker.register(`${import.meta.env.BASE_URL}offline.js`).catch(() => {}), KEEP_AFTER_MS)
