import { useState } from 'react'
import { useStore } from 'zustand'
import { type ListedStudy, renameStudy } from '../../document/index.ts'
import { Button, CommitField, Dialog } from '../../ui/index.ts'
import { sentenceOf, useDoc, useSession } from '../session/index.ts'

const when = new Intl.DateTimeFormat('en-GB', { day: 'numeric', month: 'short', year: 'numeric', hour: '2-digit', minute: '2-digit' })

/** Studies on this machine: the open one first; open, rename, duplicate, delete. */
export function StudiesDialog() {
  const session = useSession()
  const { view, study, studies, notices } = session
  const listed = useStore(studies.list, (l) => l.studies)
  const open = useDoc((d) => d)
  const [gone, setGone] = useState<{ name: string; undo: () => Promise<void> } | null>(null)
  const close = () => view.getState().set({ dialog: null })
  const guarded = (work: Promise<unknown>) => void work.catch((error) => notices.getState().say(sentenceOf(error), 'bad'))
  return (
    <Dialog
      title="Studies on this machine"
      open
      wide
      onClose={close}
      actions={
        <>
          <Button onPress={() => void session.newStudy().then(close)}>New study</Button>
          <Button onPress={close}>Close</Button>
        </>
      }
    >
      {gone ? (
        <div className="row add" role="status">
          <span className="ink-2">{gone.name} is deleted</span>
          <Button
            small
            onPress={() => {
              guarded(gone.undo())
              setGone(null)
            }}
          >
            Undo
          </Button>
        </div>
      ) : null}
      <ul className="study-list">
        <li>
          <Name label="Name of the open study" name={open.name} onName={(name) => renameStudy(study, name)} />
          <span className="ink-3 small">{`open, ${counts(open)}`}</span>
          <div className="row">
            <Button small label={`Duplicate ${open.name}`} onPress={() => guarded(session.duplicateOpen())}>
              Duplicate
            </Button>
          </div>
        </li>
        {listed.map((s) => (
          <li key={s.id}>
            <Name label={`Name of ${s.doc.name}`} name={s.doc.name} onName={(name) => guarded(studies.rename(s.id, name))} />
            <span className="ink-3 small">{`${when.format(s.at)}, ${counts(s.doc)}`}</span>
            <div className="row">
              <Button small label={`Open ${s.doc.name}`} onPress={() => void session.openListed(s.id).then(close)}>
                Open
              </Button>
              <Button small label={`Duplicate ${s.doc.name}`} onPress={() => guarded(studies.duplicate(s.id))}>
                Duplicate
              </Button>
              <Button
                small
                look="quiet"
                label={`Delete ${s.doc.name}`}
                onPress={() => guarded(studies.remove(s.id).then((undo) => setGone({ name: s.doc.name, undo })))}
              >
                Delete
              </Button>
            </div>
          </li>
        ))}
      </ul>
      {listed.length === 0 ? <p className="ink-2">Another study that you open or begin puts this one here</p> : null}
    </Dialog>
  )
}
const counts = (doc: ListedStudy['doc']): string => {
  const n = doc.candidates.length
  return n === 0 ? 'no candidate' : `${n} candidate${n > 1 ? 's' : ''}`
}

function Name({ label, name, onName }: { label: string; name: string; onName: (name: string) => void }) {
  return (
    <CommitField
      label={label}
      hideLabel
      ariaLabel={label}
      text={name}
      shape="wide"
      onCommit={(text) => {
        if (text.trim() === '') return 'give the study a name'
        onName(text.trim())
        return null
      }}
    />
  )
}
