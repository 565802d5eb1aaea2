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

/** What must be detected, and where. */
export function NeedStep() {
  const { study } = useSession()
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
      {need.file ? <NeedFile file={need.file} kind={need.kind} /> : null}
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

function NeedFile({ file, kind }: { file: string; kind: NeedDoc['kind'] }) {
  const missing = useGround((g) => g.missing.includes(file))
  return (
    <p className="small ink-3">
      {kind}: {file} {missing ? <Mark>not here: drop it on the page</Mark> : null}
    </p>
  )
}
