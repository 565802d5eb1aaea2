import type { ReactNode } from 'react'
import { Select as AriaSelect, Button, Label, ListBox, ListBoxItem, Popover, SelectValue } from 'react-aria-components'
import { SHAPES } from './CommitField.tsx'

export interface Choice<T extends string> {
  readonly id: T
  readonly words: string
  readonly hint?: string
}
export interface SelectProps<T extends string> {
  readonly label: ReactNode
  readonly value: T
  readonly choices: readonly Choice<T>[]
  readonly onChange: (value: T) => void
  readonly marks?: ReactNode
  readonly hideLabel?: boolean
  readonly ariaLabel?: string
  readonly shape?: 'long' | 'wide'
}
export function Select<T extends string>({ label, value, choices, onChange, marks, hideLabel, ariaLabel, shape = 'long' }: SelectProps<T>) {
  return (
    <AriaSelect
      className={`field ${SHAPES[hideLabel ? 'wide' : shape]}`}
      value={value}
      onChange={(key) => onChange(key as T)}
      aria-label={hideLabel ? ariaLabel : undefined}
    >
      {hideLabel ? null : (
        <Label className="label">
          {label}
          {marks ? <span className="marks"> {marks}</span> : null}
        </Label>
      )}
      <Button className="select-button">
        <SelectValue className="value">
          {() => choices.find((c) => c.id === value)?.words ?? <span className="ink-3">choose</span>}
        </SelectValue>
        <span className="arrow" aria-hidden />
      </Button>
      <Popover className="popover" offset={2}>
        <ListBox className="options">
          {choices.map((c) => (
            <ListBoxItem key={c.id} id={c.id} textValue={c.words} className="option">
              {c.words}
              {c.hint ? <span className="hint">{c.hint}</span> : null}
            </ListBoxItem>
          ))}
        </ListBox>
      </Popover>
    </AriaSelect>
  )
}
