import { type ComponentType, lazy, Suspense, useEffect, useLayoutEffect, useState } from 'react'
import { useStore } from 'zustand'
import { redo, type StepId, undo } from '../../document/index.ts'
import { createMapHub } from '../../map/hub.ts'
import { Button } from '../../ui/Button.tsx'
import { Caution, Notice } from '../../ui/Marks.tsx'
import { cautionsForLayer, STEP_WORDS } from '../../words/index.ts'
import { MemoAside } from '../memo/MemoAside.tsx'
import { MapSlot, RulerSlot } from '../panes/MapSlot.tsx'
import { StripSlot } from '../panes/StripSlot.tsx'
import { useDoc, useSession, useView } from '../session/index.ts'
import { Dialogs } from './Dialogs.tsx'
import { FaultBoundary } from './FaultBoundary.tsx'
import { StepIndex } from './StepIndex.tsx'
import { TopBar } from './TopBar.tsx'
import { useDrop } from './useDrop.ts'

/** Forms come down after the page stands: each on its first use. */
const FORMS: Record<StepId, ComponentType> = {
  ground: lazy(() => import('../forms/GroundStep.tsx').then((m) => ({ default: m.GroundStep }))),
  radar: lazy(() => import('../forms/RadarStep.tsx').then((m) => ({ default: m.RadarStep }))),
  need: lazy(() => import('../forms/NeedStep.tsx').then((m) => ({ default: m.NeedStep }))),
  candidates: lazy(() => import('../forms/CandidatesStep.tsx').then((m) => ({ default: m.CandidatesStep }))),
  compare: lazy(() => import('../compare/CompareStep.tsx').then((m) => ({ default: m.CompareStep }))),
  memo: lazy(() => import('../memo/MemoStep.tsx').then((m) => ({ default: m.MemoStep }))),
}
/** Steps whose form takes the whole sheet beside the ruler. */
const WHOLE_SHEET: ReadonlySet<StepId> = new Set(['compare', 'memo'])

/** The page: index, form, horizon strip, map, ruler, memo column. */
export function Shell() {
  const { view } = useSession()
  const step = useView((v) => v.step)
  const formOpen = useView((v) => v.formOpen)
  const memoOpen = useView((v) => v.memoOpen)
  const theme = useView((v) => v.theme)
  const layer = useView((v) => v.layer)
  const [hub] = useState(createMapHub)
  const dragging = useDrop()
  useKeys()
  const name = useDoc((d) => d.name)
  useLayoutEffect(() => {
    document.documentElement.dataset.theme = theme
  }, [theme])
  useEffect(() => {
    document.title = `${name} · Sightfell`
  }, [name])
  const Form = FORMS[step]
  const whole = WHOLE_SHEET.has(step)
  return (
    <div className="shell" data-step={step} data-form={formOpen ? 'open' : 'closed'} data-memo={memoOpen ? 'open' : 'closed'}>
      <FaultBoundary>
        <TopBar />
      </FaultBoundary>
      <FaultBoundary>
        <StepIndex />
      </FaultBoundary>
      <section className={whole ? 'sheet' : 'form'} aria-label={STEP_WORDS[step].name} tabIndex={whole ? 0 : undefined}>
        <header>
          <h2>{STEP_WORDS[step].name}</h2>
          {whole ? null : (
            <Button small look="quiet" className="fold" onPress={() => view.getState().set({ formOpen: false })}>
              fold
            </Button>
          )}
        </header>
        <FaultBoundary key={step}>
          <Suspense fallback={null}>
            <Form />
          </Suspense>
        </FaultBoundary>
      </section>
      <section className="strip" aria-label="Horizon">
        <FaultBoundary>
          <StripSlot hub={hub} />
        </FaultBoundary>
      </section>
      <main className="map">
        <FaultBoundary>
          <MapSlot hub={hub} />
        </FaultBoundary>
        <Notices />
      </main>
      <section className="ruler-column" aria-label="Mast">
        <FaultBoundary>
          <RulerSlot hub={hub} />
        </FaultBoundary>
        <div className="ruler-cautions">
          {cautionsForLayer(layer).map((c) => (
            <Caution key={c}>{c}</Caution>
          ))}
        </div>
      </section>
      <aside className="memo" aria-label="Memo of the option on show">
        <Button small look="quiet" className="fold" label="Close the memo column" onPress={() => view.getState().set({ memoOpen: false })}>
          close
        </Button>
        <FaultBoundary>
          <MemoAside />
        </FaultBoundary>
      </aside>
      <FaultBoundary>
        <Dialogs />
      </FaultBoundary>
      {dragging ? <div className="drop-veil">Drop terrain, land cover, obstacles, roads, a study or a package</div> : null}
    </div>
  )
}

function Notices() {
  const { notices } = useSession()
  const shown = useStore(notices, (n) => n.shown)
  if (shown.length === 0) return null
  return (
    <div className="notices">
      {shown.map((n) => (
        <Notice key={n.id} tone={n.tone} onClose={() => notices.getState().close(n.id)}>
          {n.text}
        </Notice>
      ))}
    </div>
  )
}

/** Fields that undo their own typing; a checkbox or a radio button has none. */
const TEXT_FIELDS = 'textarea, input:not([type=checkbox]):not([type=radio]), [contenteditable=true]'

/** Ctrl+K finds a command, Ctrl+/ lists the keys, Ctrl+S saves; Ctrl+Z and Ctrl+Shift+Z (or Ctrl+Y) undo and redo, unless a text field is being edited. */
function useKeys() {
  const { study, view, saveStudy } = useSession()
  useEffect(() => {
    const onKey = (e: KeyboardEvent) => {
      if (!(e.ctrlKey || e.metaKey) || e.altKey) return
      const key = e.key.toLowerCase()
      if (key === 's') {
        e.preventDefault()
        saveStudy()
        return
      }
      if (key === 'k' || key === '/') {
        e.preventDefault()
        // a table in hand may hold what is not saved yet: it is closed by its own buttons
        if (document.querySelector('.edit-table')) return
        view.getState().set({ dialog: key === 'k' ? 'commands' : 'keys' })
        return
      }
      if (key !== 'z' && key !== 'y') return
      if (e.target instanceof HTMLElement && e.target.closest(TEXT_FIELDS)) return
      e.preventDefault()
      if (key === 'y' || e.shiftKey) redo(study)
      else undo(study)
    }
    window.addEventListener('keydown', onKey)
    return () => window.removeEventListener('keydown', onKey)
  }, [study, view, saveStudy])
}
