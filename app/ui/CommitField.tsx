import { type ReactNode, useEffect, useId, useLayoutEffect, useRef, useState } from 'react'
import { TextField as AriaTextField, Input, Label, TextArea } from 'react-aria-components'

export interface CommitFieldProps {
  readonly label: ReactNode
  /** The stored value as text. */
  readonly text: string
  /** Shorter text of the same value, shown while the field is not focused. */
  readonly restText?: string
  /** Takes the typed text; returns why it cannot be used, or null. Called on Enter and on leaving, only when the text has changed. */
  readonly onCommit: (text: string) => string | null
  readonly placeholder?: string
  readonly unit?: string
  /** Words after the label: marks. */
  readonly marks?: ReactNode
  readonly help?: ReactNode
  /** What is wrong with the stored value. */
  readonly trouble?: string | null
  /** `row`: label, field, unit in a line; `long`: a wider field; `wide`: field under its label. */
  readonly shape?: 'row' | 'long' | 'wide'
  readonly numeric?: boolean
  /** Rows of a text area; absent: one line. */
  readonly rows?: number
  readonly hideLabel?: boolean
  readonly ariaLabel?: string
}

/** Class names of the shapes. */
export const SHAPES = { row: 'in-line', long: 'roomy', wide: 'under' } as const

/** A text field that applies on Enter or on leaving, keeps what was typed while it is wrong, and gives it up on Escape. */
export function CommitField(props: CommitFieldProps) {
  const { text, onCommit, shape = 'row', numeric, rows, unit, marks, help, placeholder } = props
  const [typed, setTyped] = useState<string | null>(null)
  const [focused, setFocused] = useState(false)
  const [refused, setWhy] = useState<string | null>(null)
  const why = refused ?? props.trouble ?? null
  const input = useRef<HTMLInputElement & HTMLTextAreaElement>(null)
  const helpId = useId()
  const before = useRef(text)
  useEffect(() => {
    // undo or another study changed the value under the field: what stands there is no longer the user's latest word
    if (before.current !== text) {
      before.current = text
      setTyped(null)
      setWhy(null)
    }
  }, [text])
  const longer = props.restText !== undefined && props.restText !== text
  useLayoutEffect(() => {
    // the whole value takes the place of the short one: typing must replace it, not join it
    if (focused && longer) input.current?.select()
  }, [focused, longer])
  const commit = () => {
    if (typed === null) return
    if (typed === text) {
      setTyped(null)
      setWhy(null)
      return
    }
    const trouble = onCommit(typed)
    setWhy(trouble)
    if (trouble === null) setTyped(null)
  }
  const onKeyDown = (event: React.KeyboardEvent) => {
    if (event.key === 'Enter' && (!rows || event.ctrlKey || event.metaKey)) {
      event.preventDefault()
      commit()
    } else if (event.key === 'Escape' && typed !== null) {
      event.stopPropagation()
      setTyped(null)
      setWhy(null)
    }
  }
  const onBlur = () => {
    setFocused(false)
    commit()
  }
  const shared = { ref: input, placeholder, onFocus: () => setFocused(true), onBlur, onKeyDown, spellCheck: false }
  return (
    <AriaTextField
      className={`field ${SHAPES[shape]}`}
      value={typed ?? (focused ? text : (props.restText ?? text))}
      onChange={setTyped}
      isInvalid={why !== null}
      aria-describedby={why || help ? helpId : undefined}
      aria-label={props.hideLabel ? props.ariaLabel : undefined}
    >
      {props.hideLabel ? null : (
        <Label>
          {props.label}
          {marks ? <span className="marks"> {marks}</span> : null}
        </Label>
      )}
      {rows ? <TextArea rows={rows} {...shared} /> : <Input className={numeric ? 'number' : ''} autoComplete="off" {...shared} />}
      {shape === 'row' ? <span className="unit">{unit}</span> : null}
      {why || help ? (
        <span id={helpId} className={why ? 'help bad' : 'help'} role={why ? 'alert' : undefined}>
          {why ?? help}
        </span>
      ) : null}
    </AriaTextField>
  )
}
