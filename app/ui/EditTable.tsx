import { type ClipboardEvent, type KeyboardEvent, useEffect, useId, useRef, useState } from 'react'
import { Button } from './Button.tsx'
import { isBlock, pasted, readBlock } from './tableText.ts'

export interface TableColumn {
  readonly head: string
  /** Name of the column in a file: pasted cells may stand under it too. */
  readonly key?: string
  readonly unit?: string
  readonly numeric?: boolean
  readonly placeholder?: string
  /** Share of the width. */
  readonly width?: number
}
/** What a row's texts mean, or which of its cells cannot be read and why. */
export type RowRead<T> = { readonly ok: true; readonly value: T } | { readonly ok: false; readonly column: number; readonly why: string }

export interface EditTableProps<T> {
  readonly label: string
  readonly columns: readonly TableColumn[]
  readonly rows: readonly T[]
  readonly write: (row: T) => string[]
  readonly read: (cells: readonly string[], at: number) => RowRead<T>
  /** Every row can be read: they take the place of the old ones. */
  readonly onChange: (rows: T[]) => void
  /** Words on the button that adds a row. */
  readonly addWords: string
  readonly help?: string
}
const same = (a: readonly (readonly string[])[], b: readonly (readonly string[])[]): boolean => JSON.stringify(a) === JSON.stringify(b)

/**
 * A table with keyboard editing: Enter and the arrows go up and down, Tab across; a block from a spreadsheet is pasted from the cell in hand
 * on. What is typed applies on leaving a cell, once every row can be read; until then it stays with the reason.
 */
export function EditTable<T>(props: EditTableProps<T>) {
  const { label, columns, addWords } = props
  const stored = props.rows.map(props.write)
  const [typed, setTyped] = useState<string[][] | null>(null)
  const rows = typed ?? stored
  const helpId = useId()
  const body = useRef<HTMLTableSectionElement>(null)
  const want = useRef<[number, number] | null>(null)
  const last = useRef(stored)
  useEffect(() => {
    // undo, or another study: what stands here is no longer the user's latest word
    if (!same(last.current, stored)) {
      last.current = stored
      setTyped(null)
    }
  })
  useEffect(() => {
    if (!want.current) return
    const [row, column] = want.current
    want.current = null
    focus(row, column)
  })
  const focus = (row: number, column: number) => {
    const cell = body.current?.querySelector<HTMLInputElement>(`[data-cell="${row}:${column}"]`)
    cell?.focus()
    cell?.select()
  }
  const wrong = firstWrong(rows, props.read)
  const apply = (next: string[][]) => {
    const filled = next.filter((r) => r.some((c) => c.trim() !== ''))
    const reads = filled.map((r, i) => props.read(r, i))
    setTyped(next)
    if (!reads.every((r) => r.ok) || same(filled, stored)) return
    const values = reads.flatMap((r) => (r.ok ? [r.value] : []))
    last.current = values.map(props.write)
    setTyped(filled.length === next.length ? null : next)
    props.onChange(values)
  }
  const set = (row: number, column: number, text: string) =>
    setTyped(rows.map((r, i) => (i === row ? r.map((c, j) => (j === column ? text : c)) : [...r])))
  const add = () => {
    want.current = [rows.length, 0]
    setTyped([...rows.map((r) => [...r]), columns.map(() => '')])
  }
  const onKey = (row: number, column: number) => (e: KeyboardEvent) => {
    const step = e.key === 'ArrowDown' || (e.key === 'Enter' && !e.shiftKey) ? 1 : e.key === 'ArrowUp' || e.key === 'Enter' ? -1 : 0
    if (step !== 0) {
      e.preventDefault()
      const to = row + step
      if (to === rows.length && e.key === 'Enter') add()
      else focus(to, column)
    } else if (e.key === 'Escape' && typed) {
      e.stopPropagation()
      setTyped(null)
    }
  }
  const onPaste = (row: number, column: number) => (e: ClipboardEvent) => {
    const text = e.clipboardData.getData('text/plain')
    if (!isBlock(text)) return
    e.preventDefault()
    apply(
      pasted(
        rows,
        readBlock(text),
        row,
        column,
        columns.map((c) => [c.head, c.key ?? '']),
      ),
    )
  }
  const total = columns.reduce((sum, c) => sum + (c.width ?? 1), 0)
  return (
    <div className="edit-table">
      <table aria-label={label} aria-describedby={props.help ? helpId : undefined}>
        <colgroup>
          {columns.map((c) => (
            <col key={c.head} style={{ width: `${(96 * (c.width ?? 1)) / total}%` }} />
          ))}
          <col className="last" />
        </colgroup>
        <thead>
          <tr>
            {columns.map((c) => (
              <th key={c.head} scope="col" className={c.numeric ? 'number' : ''}>
                {c.head} {c.unit ? <span className="unit">{c.unit}</span> : null}
              </th>
            ))}
            <th>
              <span className="visually-hidden">Row</span>
            </th>
          </tr>
        </thead>
        <tbody ref={body}>
          {rows.map((cells, i) => (
            // rows have no identity of their own: a row is where it stands
            // biome-ignore lint/suspicious/noArrayIndexKey: see above
            <tr key={i}>
              {columns.map((c, j) => (
                <td key={c.head}>
                  <input
                    data-cell={`${i}:${j}`}
                    aria-label={`${c.head}${c.unit ? `, ${c.unit}` : ''}, row ${i + 1}`}
                    aria-invalid={wrong?.row === i && wrong.column === j ? true : undefined}
                    className={c.numeric ? 'number' : ''}
                    placeholder={c.placeholder}
                    value={cells[j] ?? ''}
                    autoComplete="off"
                    spellCheck={false}
                    onChange={(e) => set(i, j, e.target.value)}
                    onKeyDown={onKey(i, j)}
                    onPaste={onPaste(i, j)}
                    onBlur={() => typed && apply(rows.map((r) => [...r]))}
                  />
                </td>
              ))}
              <td>
                <Button
                  small
                  look="quiet"
                  label={`Remove row ${i + 1}`}
                  onPress={() => apply(rows.filter((_r, k) => k !== i).map((r) => [...r]))}
                >
                  ×
                </Button>
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      {wrong ? (
        <p className="help bad" role="alert">
          Row {wrong.row + 1}, {columns[wrong.column].head.toLowerCase()}: {wrong.why}
        </p>
      ) : null}
      <div className="row add">
        <Button small onPress={add}>
          {addWords}
        </Button>
        {props.help ? (
          <span id={helpId} className="ink-3 small">
            {props.help}
          </span>
        ) : null}
      </div>
    </div>
  )
}

/** The first cell that cannot be read, in a row that is not empty. */
function firstWrong<T>(rows: readonly (readonly string[])[], read: EditTableProps<T>['read']) {
  for (const [row, cells] of rows.entries()) {
    if (!cells.some((c) => c.trim() !== '')) continue
    const got = read(cells, row)
    if (!got.ok) return { row, column: got.column, why: got.why }
  }
  return null
}
