import { Button, Menu, MenuItem, MenuTrigger, Popover } from 'react-aria-components'

export interface Choice {
  readonly id: string
  readonly words: string
  readonly hint?: string
}
/** One underlined word of the sentence: a choice. */
export function Word({
  label,
  word,
  value,
  choices,
  onChoose,
  quiet = false,
}: {
  label: string
  word: string
  value: string
  choices: readonly Choice[]
  onChoose: (id: string) => void
  /** A choice that is not made yet: lighter than those that are. */
  quiet?: boolean
}) {
  return (
    <MenuTrigger>
      <Button className={quiet ? 'word quiet' : 'word'} aria-label={`${label}: ${word}`}>
        {word}
      </Button>
      <Popover className="popover" placement="bottom start" offset={4}>
        <Menu
          className="options"
          aria-label={label}
          selectionMode="single"
          disallowEmptySelection
          selectedKeys={[value]}
          onAction={(key) => onChoose(String(key))}
        >
          {choices.map((c) => (
            <MenuItem key={c.id} id={c.id} textValue={c.words} className="option">
              {c.words}
              {c.hint ? <span className="hint">{c.hint}</span> : null}
            </MenuItem>
          ))}
        </Menu>
      </Popover>
    </MenuTrigger>
  )
}
