import { Fragment } from 'react'
import type { NeedDoc } from '../../../core/index.ts'
import { addNeed, removeNeed, setField } from '../../document/index.ts'
import { Button, Check, CommitField, Mark, Menu } from '../../ui/index.ts'
import { EMPTY_WORDS, NEED_KINDS } from '../../words/index.ts'
import { useDoc, useGround, useSession } from '../session/index.ts'
import { Flight, Heights, Reach, type SetPart, Target } from './needParts.tsx'
import { Problems } from './Problems.tsx'
import { Remarks } from './Remarks.tsx'
import { useFilePicker } from './useFilePicker.tsx'

const FROM_FILE = NEED_KINDS.filter((k): k is (typeof NEED_KINDS)[number] & { id: 'fixes' | 'track' | 'polygon' } => k.id !== 'layer')

const TYPED = FROM_FILE.filter((k) => k.id !== 'polygon')

/** What must be detected, and where. */
export function NeedStep() {
  const { study, view } = useSession()
  const needs = useDoc((d) => d.needs ?? NONE)
  const pickers = {
    fixes: useFilePicker('fixes', '.csv'),
    track: useFilePicker('track', '.csv'),
    polygon: useFilePicker('polygon', '.geojson,.json'),
  }
  return (
    <>
      {needs.length === 0 ? (
        <div className="empty">
          <h3>{EMPTY_WORDS.need.title}</h3>
          <p className="ink-2">{EMPTY_WORDS.need.reason}</p>
        </div>
      ) : null}
      {needs.map((need, i) => (
        <Need key={need.id} need={need} at={i} />
      ))}
      <Remarks about={['needs']} />
      <div className="row">
        <Button onPress={() => addNeed(study)}>Add a layer need</Button>
        <Menu words="Add from a file" entries={FROM_FILE.map((k) => ({ ...k, run: pickers[k.id].open }))} />
        <Menu
          words="Enter places"
          entries={TYPED.map((k) => ({ id: k.id, words: k.words, run: () => view.getState().set({ dialog: 'fixes', dialogFor: k.id }) }))}
        />
        {FROM_FILE.map((k) => (
          <Fragment key={k.id}>{pickers[k.id].input}</Fragment>
        ))}
      </div>
    </>
  )
}
const NONE: NeedDoc[] = []

function Need({ need, at }: { need: NeedDoc; at: number }) {
  const { study } = useSession()
  const title = need.name ?? need.id
  const path = `needs[${at}]`
  const set: SetPart = (key, value) => setField(study, `${path}.${key}`, value, `changed ${title}`)
  const parts = { need, path, at, set }
  return (
    <section className="card need">
      <div className="head">
        <div className="need-name">
          <CommitField
            label="Name"
            hideLabel
            ariaLabel={`Name of ${title}`}
            text={title}
            shape="wide"
            onCommit={(text) => {
              set('name', text.trim() || undefined)
              return null
            }}
          />
        </div>
        <Button small look="quiet" label={`Remove ${title}`} onPress={() => removeNeed(study, need.id)}>
          remove
        </Button>
      </div>
      {need.file ? <NeedFile file={need.file} need={need} /> : null}
      <Problems where={(p) => p.startsWith(path)} />
      <Check value={need.must ?? true} onChange={(v) => set('must', v)}>
        Must be met
      </Check>
      {need.kind === 'layer' || need.kind === 'polygon' ? <Heights {...parts} /> : null}
      {need.kind === 'layer' ? <Reach {...parts} /> : null}
      {need.kind === 'fixes' || need.kind === 'track' ? <Flight {...parts} /> : null}
      <Target {...parts} />
    </section>
  )
}

function NeedFile({ file, need }: { file: string; need: NeedDoc }) {
  const { view } = useSession()
  const missing = useGround((g) => g.missing.includes(file))
  const asTable = need.kind !== 'polygon' && /\.csv$/i.test(file) && !missing
  return (
    <div className="card-line">
      <span className="small ink-3">
        {need.kind}: {file} {missing ? <Mark>not here: drop it on the page</Mark> : null}
      </span>
      {asTable ? (
        <Button
          small
          look="quiet"
          label={`Edit ${file} as a table`}
          onPress={() => view.getState().set({ dialog: 'fixes', dialogFor: need.id })}
        >
          edit
        </Button>
      ) : null}
    </div>
  )
}
