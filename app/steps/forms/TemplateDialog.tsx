import { useState } from 'react'
import { Header, ListBox, ListBoxItem, ListBoxSection } from 'react-aria-components'
import { useStore } from 'zustand'
import { RADAR_TEMPLATES, STARTING_SETS } from '../../../core/index.ts'
import { takeRadar, takeStartingSet, takeTemplate } from '../../document/index.ts'
import { Button, Dialog, Mark, Value } from '../../ui/index.ts'
import { TEMPLATE_WORDS, type TemplateRow, templateRows } from '../../words/index.ts'
import { useSession, useView } from '../session/index.ts'

/** Kinds of work, generic radars and the user's own: each with its values and where they come from, before it is taken. */
export function TemplateDialog() {
  const { study, view, radars } = useSession()
  const own = useStore(radars, (r) => r.radars)
  const [chosen, setChosen] = useState<string | null>(`set:${STARTING_SETS[0].id}`)
  const close = () => view.getState().set({ dialog: null })
  const [kind, id] = chosen ? split(chosen) : [null, '']
  const take = () => {
    if (kind === 'set') takeStartingSet(study, id)
    if (kind === 'radar') takeTemplate(study, id)
    const mine = own.find((r) => r.name === id)
    if (kind === 'own' && mine) takeRadar(study, mine)
    view.getState().set({ dialog: null, step: 'radar', formOpen: true })
  }
  return (
    <Dialog
      title={TEMPLATE_WORDS.title}
      open
      wide
      onClose={close}
      actions={
        <>
          {kind === 'own' ? (
            <Button
              look="quiet"
              onPress={() => {
                void radars.getState().forget(id)
                setChosen(null)
              }}
            >
              Forget this radar
            </Button>
          ) : null}
          <Button onPress={close}>Cancel</Button>
          <Button look="primary" disabled={kind === null} onPress={take}>
            {kind === 'set' ? 'Use radar and needs' : 'Use this radar'}
          </Button>
        </>
      }
    >
      <div className="template-sheet">
        <ListBox
          aria-label={TEMPLATE_WORDS.title}
          className="options template-list"
          selectionMode="single"
          disallowEmptySelection
          escapeKeyBehavior="none"
          selectedKeys={chosen ? [chosen] : []}
          onSelectionChange={(keys) => setChosen(keys === 'all' ? null : (([...keys][0] as string | undefined) ?? null))}
        >
          <Section title={TEMPLATE_WORDS.sets} items={STARTING_SETS.map((s) => ({ key: `set:${s.id}`, words: s.name }))} />
          <Section
            title={TEMPLATE_WORDS.radars}
            items={RADAR_TEMPLATES.map((t) => ({ key: `radar:${t.id}`, words: `${t.id}  ${t.name}` }))}
          />
          {own.length > 0 ? (
            <Section title={TEMPLATE_WORDS.own} items={own.map((r) => ({ key: `own:${r.name}`, words: r.name ?? '' }))} />
          ) : null}
        </ListBox>
        {/* biome-ignore lint/a11y/noNoninteractiveTabindex: a region that scrolls is reached by keyboard */}
        <section className="template-values" aria-label="Values" tabIndex={0}>
          {kind === null ? <p className="ink-2">{TEMPLATE_WORDS.ask}</p> : <Values kind={kind} id={id} />}
        </section>
      </div>
    </Dialog>
  )
}
const split = (key: string): ['set' | 'radar' | 'own', string] => {
  const at = key.indexOf(':')
  return [key.slice(0, at) as 'set', key.slice(at + 1)]
}

function Section({ title, items }: { title: string; items: readonly { key: string; words: string }[] }) {
  return (
    <ListBoxSection>
      <Header className="option-head">{title}</Header>
      {items.map((i) => (
        <ListBoxItem key={i.key} id={i.key} textValue={i.words} className="option">
          {i.words}
        </ListBoxItem>
      ))}
    </ListBoxSection>
  )
}

function Values({ kind, id }: { kind: 'set' | 'radar' | 'own'; id: string }) {
  const system = useView((v) => v.units)
  if (kind === 'own') return <p className="ink-2">{`${id}: as you kept it. ${TEMPLATE_WORDS.replaces.radar}.`}</p>
  const set = kind === 'set' ? STARTING_SETS.find((s) => s.id === id) : undefined
  const radar = RADAR_TEMPLATES.find((t) => t.id === (set?.radar ?? id))
  return (
    <>
      <p className="ink-2">
        {set ? TEMPLATE_WORDS.replaces.set : TEMPLATE_WORDS.replaces.radar}. {TEMPLATE_WORDS.left}.
      </p>
      {(set?.needs ?? []).map((n) => (
        <Rows key={n.name} title={`Need: ${n.name}`} rows={templateRows(n.values, 'need', system)} />
      ))}
      {radar ? <Rows title={`Radar: ${radar.name}`} rows={templateRows(radar.values, 'radar', system)} /> : null}
    </>
  )
}

function Rows({ title, rows }: { title: string; rows: readonly TemplateRow[] }) {
  return (
    <table className="template-table">
      <caption>{title}</caption>
      <thead className="visually-hidden">
        <tr>
          <th>Value</th>
          <th>Number</th>
          <th>Where it comes from</th>
        </tr>
      </thead>
      <tbody>
        {rows.map((r) => (
          <tr key={r.path}>
            <th scope="row">{r.label}</th>
            <td className="number">
              <Value of={r.value} />
            </td>
            <td className="source">
              {r.basis === 'read' ? r.basis : <Mark>{r.basis}</Mark>}: {r.source}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  )
}
