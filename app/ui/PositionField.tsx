import { isInputError, type LonLat, parsePosition } from '../../core/index.ts'
import { formatPosition } from '../words/index.ts'
import { CommitField } from './CommitField.tsx'

/** A position as text: decimal, DMS, packed DDMMSS or UTM; shown back in degrees, minutes, seconds. */
export function PositionField({
  label,
  value,
  onCommit,
  help,
}: {
  label: string
  value: LonLat | null
  onCommit: (at: LonLat) => void
  help?: string
}) {
  const commit = (text: string): string | null => {
    try {
      const { lon, lat } = parsePosition(text)
      onCommit({ lon, lat })
      return null
    } catch (error) {
      if (isInputError(error)) return `${error.found}; ${error.remedy}`
      throw error
    }
  }
  return (
    <CommitField
      label={label}
      text={value ? formatPosition(value) : ''}
      onCommit={commit}
      shape="wide"
      help={help}
      placeholder="46°12′08″ N 25°41′55″ W"
    />
  )
}
