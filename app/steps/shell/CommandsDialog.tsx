import { type KeyboardEvent, useEffect, useId, useMemo, useRef, useState } from 'react'
import { Dialog } from '../../ui/index.ts'
import { COMMAND_WORDS } from '../../words/index.ts'
import { useSession } from '../session/index.ts'
import { type Command, commandsOf, matching } from './commands.ts'

/** Finds a command, a step, a quantity or a candidate by its words and does it. */
export function CommandsDialog() {
  const session = useSession()
  const { view } = session
  const [typed, setTyped] = useState('')
  const [at, setAt] = useState(0)
  const all = useMemo(() => commandsOf(session), [session])
  const found = matching(all, typed)
  const here = Math.min(at, found.length - 1)
  const id = useId()
  const list = useRef<HTMLDivElement>(null)
  useEffect(() => {
    list.current?.querySelector('[aria-selected=true]')?.scrollIntoView({ block: 'nearest' })
  })
  const run = (c: Command | undefined) => {
    if (!c) return
    view.getState().set({ dialog: null, dialogFor: null })
    c.run()
  }
  const onKeyDown = (e: KeyboardEvent) => {
    if (e.key === 'Enter') run(found[here])
    else if (e.key === 'ArrowDown') setAt(Math.min(found.length - 1, here + 1))
    else if (e.key === 'ArrowUp') setAt(Math.max(0, here - 1))
    else return
    e.preventDefault()
  }
  return (
    <Dialog title={COMMAND_WORDS.title} open onClose={() => view.getState().set({ dialog: null })}>
      <input
        className="command-field"
        role="combobox"
        aria-label={COMMAND_WORDS.field}
        aria-expanded="true"
        aria-controls={`${id}list`}
        aria-activedescendant={found[here] ? `${id}${found[here].id}` : undefined}
        placeholder={COMMAND_WORDS.field}
        autoFocus
        autoComplete="off"
        spellCheck={false}
        value={typed}
        onChange={(e) => {
          setTyped(e.target.value)
          setAt(0)
        }}
        onKeyDown={onKeyDown}
      />
      <div ref={list} id={`${id}list`} role="listbox" aria-label={COMMAND_WORDS.title} className="command-list">
        {found.map((c, i) => (
          // biome-ignore lint/a11y/useKeyWithClickEvents: the field above takes the keys
          // biome-ignore lint/a11y/useFocusableInteractive: the field above keeps the focus
          <div key={c.id} id={`${id}${c.id}`} role="option" aria-selected={i === here} className="command" onClick={() => run(c)}>
            <span>{c.words}</span>
            <span className="ink-3 small">{c.keys ?? c.kind}</span>
          </div>
        ))}
      </div>
      {found.length === 0 ? <p className="ink-2">{COMMAND_WORDS.none}</p> : null}
    </Dialog>
  )
}
