import type { ReactNode } from 'react'
import type { Limit } from '../../core/index.ts'
import type { FaceUnit } from '../words/index.ts'
import { CommitField } from './CommitField.tsx'
import { Mark } from './Marks.tsx'
import { allowedAtFace, fieldText, readNumber, restText } from './readNumber.ts'

export interface NumberFieldProps {
  readonly label: ReactNode
  /** Stored value, SI; undefined or null where nobody stated one. */
  readonly value: number | null | undefined
  /** SI, or undefined when the field was emptied. */
  readonly onCommit: (value: number | undefined) => void
  readonly face: FaceUnit
  readonly limit?: Limit
  /** What stands in while the field is empty, SI; shown in the field and marked *default*. */
  readonly fallback?: number | null
  /** Shown while empty when the default is no number: "pulse width". */
  readonly fallbackWords?: string
  /** Word beside what stands in; *default* where none is given. */
  readonly mark?: string
  /** The study cannot run without it. */
  readonly required?: boolean
  /** Word beside a stated value: where it comes from. */
  readonly marks?: ReactNode
  readonly help?: ReactNode
  /** What is wrong with the stored value. */
  readonly trouble?: string | null
  readonly shape?: 'row' | 'wide'
  readonly hideLabel?: boolean
  readonly ariaLabel?: string
}

/** A number with its unit and sane range: SI in the document, face units in the field. */
export function NumberField(props: NumberFieldProps) {
  const { value, face, limit, fallback, fallbackWords, required } = props
  const stated = value !== undefined && value !== null
  const standIn = fallbackWords ?? (fallback !== undefined && fallback !== null ? restText(fallback, face) : '')
  const commit = (text: string): string | null => {
    const read = readNumber(text, face, limit)
    if (!read.ok) return read.why
    if (read.value === undefined && required) return limit ? `needed; ${allowedAtFace(limit, face)}` : 'needed'
    props.onCommit(read.value)
    return null
  }
  return (
    <CommitField
      label={props.label}
      text={fieldText(value, face)}
      restText={restText(value, face)}
      onCommit={commit}
      unit={face.unit}
      numeric
      placeholder={stated ? undefined : required ? 'needed' : standIn}
      marks={stated ? props.marks : !required && typeof fallback === 'number' ? <Mark>{props.mark ?? 'default'}</Mark> : null}
      help={props.help}
      trouble={props.trouble}
      shape={props.shape}
      hideLabel={props.hideLabel}
      ariaLabel={props.ariaLabel}
    />
  )
}
