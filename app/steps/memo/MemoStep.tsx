import { useMemo } from 'react'
import { optionKey, studyOptions } from '../../document/index.ts'
import { Button, Caution, ProgressBar } from '../../ui/index.ts'
import { CAUTIONS, CONFIRMED_WORDS } from '../../words/index.ts'
import { useDoc, useResults, useSession } from '../session/index.ts'
import { MemoPages } from './MemoPages.tsx'
import { useMemoExport } from './useMemoExport.ts'
import { useMemoModel } from './useMemoModel.ts'

/** The memo as it stands: its state, its text, and the PDF. */
export function MemoStep() {
  const { view } = useSession()
  const model = useMemoModel()
  const { progress } = useMemoExport()
  const doc = useDoc((d) => d)
  const options = useMemo(() => studyOptions(doc), [doc])
  const done = useResults((r) => options.filter((o) => r.byOption.has(optionKey(o))).length)
  return (
    <div className="memo-step">
      <p className="ink-2">
        State: draft, not signed. {done} of {options.length} options are in it
        {done < options.length ? '; the others join as they are computed' : ''}
      </p>
      <Caution>{CAUTIONS.sensitive}</Caution>
      <div className="row">
        <Button onPress={() => view.getState().set({ dialog: 'confirmations' })}>{CONFIRMED_WORDS.add}</Button>
        <Button onPress={() => view.getState().set({ dialog: 'models' })}>Models and sources</Button>
      </div>
      {progress ? (
        <ProgressBar doing="Painting maps and writing the PDF" done={progress.done} total={progress.total} secondsLeft={null} />
      ) : null}
      {model ? (
        <MemoPages model={model} />
      ) : (
        <div className="empty">
          <h3>Nothing to report yet</h3>
          <p className="ink-2">The memo is written from computed options: it takes a ground, a radar and a candidate</p>
          <Button onPress={() => view.getState().set({ step: 'ground' })}>Go to Ground</Button>
        </div>
      )}
    </div>
  )
}
