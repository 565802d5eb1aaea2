import { StrictMode } from 'react'
import { createRoot } from 'react-dom/client'
import { App } from './App.tsx'
import { createStudyClient } from './compute/studyClient.ts'
import { startSession } from './steps/index.ts'
import './ui/theme.css'
import './ui/controls.css'
import './steps/steps.css'

const session = await startSession(createStudyClient(), async () => {
  throw new Error('intake is not connected')
})
createRoot(document.getElementById('root') as HTMLElement).render(
  <StrictMode>
    <App session={session} />
  </StrictMode>,
)
