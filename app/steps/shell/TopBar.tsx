import { lazy, Suspense } from 'react'
import { useStore } from 'zustand'
import { redo, renameStudy, undo, undoWords } from '../../document/index.ts'
import { Button } from '../../ui/Button.tsx'
import { CommitField } from '../../ui/CommitField.tsx'
import { declinationWords, UNIT_SYSTEM_NAMES } from '../../words/index.ts'
import { useDoc, useFaceNorth, useSave, useSession, useView } from '../session/index.ts'
import { PrimaryAction } from './PrimaryAction.tsx'
import { RunLine } from './Working.tsx'

const FileMenu = lazy(() => import('./FileMenu.tsx').then((m) => ({ default: m.FileMenu })))
const clock = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' })

function Saved() {
  const { state, at, trouble } = useSave((s) => s)
  const words =
    state === 'failed'
      ? `not saved: ${trouble}`
      : state === 'saving'
        ? 'saving'
        : at === null
          ? 'kept in this browser'
          : `saved ${clock.format(at)}`
  return (
    <span className={state === 'failed' ? 'saved failed' : 'saved'} role="status">
      {words}
    </span>
  )
}

function UndoRedo() {
  const { study } = useSession()
  useStore(study, (s) => s.doc)
  useStore(study.temporal, (t) => t.futureStates.length)
  const words = undoWords(study)
  return (
    <>
      <Button look="quiet" disabled={words.undo === null} onPress={() => undo(study)}>
        {words.undo ? `undo: ${words.undo}` : 'undo'}
      </Button>
      {words.redo ? (
        <Button look="quiet" onPress={() => redo(study)} label={`redo: ${words.redo}`}>
          redo
        </Button>
      ) : null}
    </>
  )
}

export function TopBar() {
  const { view, study } = useSession()
  const name = useDoc((d) => d.name)
  const units = useView((v) => v.units)
  const theme = useView((v) => v.theme)
  const memoOpen = useView((v) => v.memoOpen)
  const north = useFaceNorth()
  const set = view.getState().set
  return (
    <header className="top">
      <h1 className="brand">Sightfell</h1>
      <div className="study-name">
        <CommitField
          label="Study name"
          hideLabel
          ariaLabel="Study name"
          text={name}
          shape="wide"
          onCommit={(text) => {
            if (text.trim() === '') return 'give the study a name'
            renameStudy(study, text.trim())
            return null
          }}
        />
      </div>
      <Suspense fallback={<span className="word">File</span>}>
        <FileMenu />
      </Suspense>
      <Saved />
      <RunLine />
      <span className="spacer" />
      <Button
        look="quiet"
        className="switch"
        onPress={() => set({ units: units === 'nautical' ? 'metric' : 'nautical' })}
        label={`Units: ${UNIT_SYSTEM_NAMES[units]}; press to change`}
      >
        {UNIT_SYSTEM_NAMES[units]}
      </Button>
      <Button
        look="quiet"
        className="switch"
        onPress={() => set({ dialog: 'north' })}
        label={`Azimuths from ${north ? 'magnetic' : 'true'} north; press to change`}
      >
        {north ? `mag. north, ${declinationWords(north.valueDeg)}` : 'true north'}
      </Button>
      <UndoRedo />
      <Button
        look="quiet"
        className="switch"
        onPress={() => set({ theme: theme === 'night' ? 'paper' : 'night' })}
        label={`Sheet: ${theme}; press to change`}
      >
        {theme}
      </Button>
      <Button look="quiet" className="fold" active={memoOpen} onPress={() => set({ memoOpen: !memoOpen })}>
        memo
      </Button>
      <PrimaryAction />
    </header>
  )
}
