import { useRef } from 'react'
import { useStore } from 'zustand'
import { redo, renameStudy, undo, undoWords } from '../document/index.ts'
import { Button, CommitField, Menu } from '../ui/index.ts'
import { formatDuration, UNIT_SYSTEM_NAMES } from '../words/index.ts'
import { PrimaryAction } from './PrimaryAction.tsx'
import { useDoc, useGround, useResults, useSave, useSession, useView } from './session/index.ts'

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

/** What runs, how far, time left, and Stop; or Run while edits are held back. */
function Working() {
  const session = useSession()
  const status = useResults((r) => r.status)
  const reading = useGround((g) => g.reading)
  const hold = useView((v) => v.hold)
  const now = reading ?? status
  if (!now)
    return hold ? (
      <span className="working">
        <span className="doing">stopped</span>
        <Button small onPress={session.run}>
          Run
        </Button>
      </span>
    ) : null
  const left =
    status && !reading && status.secondsLeft !== null && status.secondsLeft >= 1 ? ` · ${formatDuration(status.secondsLeft)} left` : ''
  const share = now.total > 0 ? Math.min(1, now.done / now.total) : 0
  return (
    <>
      <span className="working" role="status" aria-live="off">
        <span className="doing">
          {now.doing}
          {left}
        </span>
        {reading ? null : (
          <Button small onPress={session.stop}>
            Stop
          </Button>
        )}
      </span>
      <span className="run-line" style={{ width: `${100 * share}%` }} />
    </>
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

function FileMenu() {
  const session = useSession()
  const picker = useRef<HTMLInputElement>(null)
  return (
    <>
      <Menu
        words="File"
        entries={[
          { id: 'open', words: 'Open…', hint: 'a study, with its files, or a package', run: () => picker.current?.click() },
          { id: 'save', words: 'Save study', hint: 'the .json alone', run: session.saveStudy },
          { id: 'package', words: 'Save package', hint: 'study and files in one .zip', run: () => void session.savePackage() },
          { id: 'new', words: 'New study', run: session.newStudy },
          { id: 'demo', words: 'Open the demo study', run: () => void session.openDemo() },
        ]}
      />
      <input
        ref={picker}
        type="file"
        multiple
        hidden
        data-testid="open-files"
        onChange={(e) => {
          void session.take([...(e.target.files ?? [])])
          e.target.value = ''
        }}
      />
    </>
  )
}

export function TopBar() {
  const { view, study } = useSession()
  const name = useDoc((d) => d.name)
  const units = useView((v) => v.units)
  const theme = useView((v) => v.theme)
  const memoOpen = useView((v) => v.memoOpen)
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
      <FileMenu />
      <Saved />
      <Working />
      <span className="spacer" />
      <Button
        look="quiet"
        onPress={() => set({ units: units === 'nautical' ? 'metric' : 'nautical' })}
        label={`Units: ${UNIT_SYSTEM_NAMES[units]}; press to change`}
      >
        {UNIT_SYSTEM_NAMES[units]}
      </Button>
      <span className="word">true north</span>
      <UndoRedo />
      <Button look="quiet" onPress={() => set({ theme: theme === 'night' ? 'paper' : 'night' })} label={`Sheet: ${theme}; press to change`}>
        {theme}
      </Button>
      <Button look="quiet" className="fold" active={memoOpen} onPress={() => set({ memoOpen: !memoOpen })}>
        memo
      </Button>
      <PrimaryAction />
    </header>
  )
}
