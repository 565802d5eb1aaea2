import { Menu as AriaMenu, Button, MenuItem, MenuTrigger, Popover } from 'react-aria-components'

export interface MenuEntry {
  readonly id: string
  readonly words: string
  readonly hint?: string
  readonly disabled?: boolean
  readonly run: () => void
}
export function Menu({ words, label, entries }: { words: string; label?: string; entries: readonly MenuEntry[] }) {
  return (
    <MenuTrigger>
      <Button className="button quiet" aria-label={label}>
        {words}
      </Button>
      <Popover className="popover" offset={2} placement="bottom start">
        <AriaMenu className="options" onAction={(key) => entries.find((e) => e.id === key)?.run()}>
          {entries.map((e) => (
            <MenuItem key={e.id} id={e.id} textValue={e.words} isDisabled={e.disabled} className="option">
              {e.words}
              {e.hint ? <span className="hint">{e.hint}</span> : null}
            </MenuItem>
          ))}
        </AriaMenu>
      </Popover>
    </MenuTrigger>
  )
}
