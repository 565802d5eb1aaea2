import { useState } from 'react'
import { type ConfirmationDoc, checkDoc, limitOf, type StudyDoc } from '../../../core/index.ts'
import { addConfirmation, removeConfirmation } from '../../document/index.ts'
import { Button, CommitField, Dialog, Notice, NumberField, Select } from '../../ui/index.ts'
import { CONFIRMED_WORDS, formatMast, textOf } from '../../words/index.ts'
import { faceOf } from '../forms/fields.tsx'
import { useDoc, useSession, useView } from '../session/index.ts'

const { parts, hints } = CONFIRMED_WORDS
const NO_NEED = ''

/** What was measured on site or in trial: entered whole, or not at all. */
export function ConfirmationsDialog() {
  const { study, view } = useSession()
  const doc = useDoc((d) => d)
  const system = useView((v) => v.units)
  const shown = useView((v) => v.option)
  const options = doc.candidates.flatMap((c) => c.mastHeightsM.map((heightM) => ({ candidate: c.id, heightM, id: `${c.id}|${heightM}` })))
  const [option, setOption] = useState(shown ? `${shown.candidate}|${shown.heightM}` : (options[0]?.id ?? ''))
  const [part, setPart] = useState<Partial<ConfirmationDoc>>({})
  const [why, setWhy] = useState<readonly string[]>([])
  const take = (more: Partial<ConfirmationDoc>) => setPart((p) => ({ ...p, ...more }))
  const close = () => view.getState().set({ dialog: null })
  const text = (key: 'place' | 'who' | 'when' | 'method' | 'result', label: string, hint?: string) => (
    <CommitField
      label={label}
      text={part[key] ?? ''}
      placeholder={hint}
      shape="long"
      onCommit={(typed) => {
        take({ [key]: typed.trim() || undefined })
        return null
      }}
    />
  )
  const enter = () => {
    const of = options.find((o) => o.id === option)
    if (!of) return
    const { candidate, heightM } = of
    const entry = { candidate, heightM, ...stated(part) }
    const wrong = troublesOf(doc, entry)
    setWhy(wrong)
    if (wrong.length > 0) return
    addConfirmation(study, entry)
    setPart({})
  }
  return (
    <Dialog
      title={CONFIRMED_WORDS.title}
      open
      wide
      onClose={close}
      actions={
        <>
          <Button onPress={close}>Close</Button>
          <Button look="primary" disabled={options.length === 0} onPress={enter}>
            {CONFIRMED_WORDS.keep}
          </Button>
        </>
      }
    >
      <p className="ink-2">{CONFIRMED_WORDS.rule}</p>
      <Entered doc={doc} onRemove={(i) => removeConfirmation(study, i)} />
      <div className="confirm-form">
        <Select
          label={parts.option}
          value={option}
          choices={options.map((o) => ({ id: o.id, words: `${o.candidate} at ${textOf(formatMast(o.heightM))}` }))}
          onChange={setOption}
        />
        <Select
          label="Need"
          value={part.need ?? NO_NEED}
          choices={[{ id: NO_NEED, words: 'none' }, ...(doc.needs ?? []).map((n) => ({ id: n.id, words: n.name ?? n.id }))]}
          onChange={(id) => take({ need: id === NO_NEED ? undefined : id })}
        />
        {text('place', 'Place', hints.place)}
        <NumberField
          label={`${parts.altitude}, MSL`}
          value={part.altitudeM}
          face={faceOf('height', system)}
          limit={limitOf('confirmations[0].altitudeM')}
          onCommit={(altitudeM) => take({ altitudeM })}
        />
        {text('who', parts.who)}
        {text('when', parts.when, hints.when)}
        {text('method', parts.method, hints.method)}
        {text('result', parts.result, hints.result)}
      </div>
      {why.length > 0 ? (
        <Notice tone="bad">
          {why.map((w) => (
            <p key={w}>{w}</p>
          ))}
        </Notice>
      ) : null}
    </Dialog>
  )
}

/** What is stated, without empty keys. */
const stated = (part: Partial<ConfirmationDoc>): Partial<ConfirmationDoc> =>
  Object.fromEntries(Object.entries(part).filter(([, v]) => v !== undefined))

/** Why an entry cannot join the study, a sentence each. */
export function troublesOf(doc: StudyDoc, entry: ConfirmationDoc): string[] {
  const list = [...(doc.confirmations ?? []), entry]
  const at = `confirmations[${list.length - 1}]`
  const found = checkDoc({ ...doc, confirmations: list }).problems.filter((p) => p.path.startsWith(at))
  return [...new Set(found.map((p) => p.message))]
}

function Entered({ doc, onRemove }: { doc: StudyDoc; onRemove: (index: number) => void }) {
  const list = doc.confirmations ?? []
  if (list.length === 0) return null
  return (
    <ul className="confirmed-list">
      {list.map((c, i) => (
        // biome-ignore lint/suspicious/noArrayIndexKey: an entry has no name but its place in the list
        <li key={i}>
          <span>
            {c.candidate} at {textOf(formatMast(c.heightM))}:{' '}
            {[doc.needs?.find((n) => n.id === c.need)?.name ?? c.need, c.place].filter(Boolean).join(', ')}. {c.result}{' '}
            <span className="ink-3">({[c.method, c.who, c.when].filter(Boolean).join(', ')})</span>
          </span>
          <Button small look="quiet" label={`${CONFIRMED_WORDS.remove} ${i + 1}`} onPress={() => onRemove(i)}>
            {CONFIRMED_WORDS.remove}
          </Button>
        </li>
      ))}
    </ul>
  )
}
