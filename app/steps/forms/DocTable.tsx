import { limitOf } from '../../../core/index.ts'
import { setField, valueAt } from '../../document/index.ts'
import { EditTable, fieldText, type RowRead, readNumber } from '../../ui/index.ts'
import { type ColumnWords, TABLE_WORDS } from '../../words/index.ts'
import { useDoc, useSession, useView } from '../session/index.ts'
import { faceOf } from './fields.tsx'

type Row = Record<string, unknown>
export interface DocTableProps {
  readonly path: string
  readonly label: string
  readonly columns: readonly ColumnWords[]
  readonly addWords: string
  /** What a row keeps of the study that has no column: the row of before it goes on from. */
  readonly goesOn?: (row: Row, before: readonly Row[]) => Row | undefined
}
/** A list of the study at its key path as a table. Empty: the list is taken out. */
export function DocTable({ path, label, columns, addWords, goesOn }: DocTableProps) {
  const { study } = useSession()
  const system = useView((v) => v.units)
  const rows = (useDoc((d) => valueAt(d, path)) as Row[] | undefined) ?? NONE
  const faces = columns.map((c) => (c.face === 'text' ? null : faceOf(c.face, system)))
  const read = (cells: readonly string[]): RowRead<Row> => {
    const row: Row = {}
    for (const [column, c] of columns.entries()) {
      const face = faces[column]
      const text = (cells[column] ?? '').trim()
      if (text === '') {
        if (c.required) return { ok: false, column, why: 'needed' }
        continue
      }
      if (face === null) {
        row[c.key] = text
        continue
      }
      const got = readNumber(text, face, limitOf(`${path}[0].${c.key}`))
      if (!got.ok) return { ok: false, column, why: got.why }
      row[c.key] = got.value
    }
    return { ok: true, value: { ...goesOn?.(row, rows), ...row } }
  }
  return (
    <EditTable
      label={label}
      columns={columns.map((c, i) => ({ head: c.head, unit: faces[i]?.unit, numeric: faces[i] !== null, placeholder: c.empty }))}
      rows={rows}
      write={(row) =>
        columns.map((c, i) => {
          const face = faces[i]
          const value = row[c.key]
          return face === null ? String(value ?? '') : fieldText(value as number | undefined, face)
        })
      }
      read={read}
      onChange={(next) => setField(study, path, next.length > 0 ? next : undefined, `changed ${label.toLowerCase()}`)}
      addWords={addWords}
      help={TABLE_WORDS.paste}
    />
  )
}
const NONE: Row[] = []
