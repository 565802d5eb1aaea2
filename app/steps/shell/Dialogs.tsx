import { type ComponentType, lazy, Suspense } from 'react'
import type { OpenDialog } from '../../document/index.ts'
import { useView } from '../session/index.ts'

/** What is asked over the whole page; each comes down on its first use. */
const DIALOGS: Partial<Record<NonNullable<OpenDialog>, ComponentType>> = {
  candidates: lazy(() => import('../forms/CandidatesDialog.tsx').then((m) => ({ default: m.CandidatesDialog }))),
  confirmations: lazy(() => import('../memo/ConfirmationsDialog.tsx').then((m) => ({ default: m.ConfirmationsDialog }))),
  models: lazy(() => import('../memo/ModelsDialog.tsx').then((m) => ({ default: m.ModelsDialog }))),
  fixes: lazy(() => import('../forms/FixesDialog.tsx').then((m) => ({ default: m.FixesDialog }))),
  commands: lazy(() => import('./CommandsDialog.tsx').then((m) => ({ default: m.CommandsDialog }))),
  keys: lazy(() => import('./KeysDialog.tsx').then((m) => ({ default: m.KeysDialog }))),
  north: lazy(() => import('./NorthDialog.tsx').then((m) => ({ default: m.NorthDialog }))),
  obstacles: lazy(() => import('../forms/ObstaclesDialog.tsx').then((m) => ({ default: m.ObstaclesDialog }))),
  pulses: lazy(() => import('../forms/PulsesDialog.tsx').then((m) => ({ default: m.PulsesDialog }))),
  studies: lazy(() => import('./StudiesDialog.tsx').then((m) => ({ default: m.StudiesDialog }))),
  templates: lazy(() => import('../forms/TemplateDialog.tsx').then((m) => ({ default: m.TemplateDialog }))),
}

export function Dialogs() {
  const dialog = useView((v) => v.dialog)
  const Open = dialog === null ? undefined : DIALOGS[dialog]
  return Open ? (
    <Suspense fallback={null}>
      <Open />
    </Suspense>
  ) : null
}
