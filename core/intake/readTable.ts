import { InputError } from '../errors/index.ts'

/** A table with a header row. */
export interface Table {
  readonly columns: readonly string[]
  readonly rows: readonly (readonly string[])[]
  /** Line of the file on which a row begins, from 1, for messages. */
  lineOf(row: number): number
}

/**
 * Comma-separated values (RFC 4180): quotes, quoted commas and line ends, CRLF or LF, a byte order mark, blank lines skipped.
 * Throws InputError for no header, a row of another length, an open quote, or semicolons in place of commas.
 */
export function readTable(text: string, fileName: string): Table {
  const fault = (place: string, found: string, remedy: string): InputError =>
    new InputError({ code: 'table', file: fileName, place, found, remedy })
  const records: { line: number; fields: string[] }[] = []
  let fields: string[] = []
  let field = ''
  let quoted = false
  let wasQuoted = false
  let line = 1
  let began = 1
  const endRecord = (): void => {
    fields.push(field)
    if (fields.length > 1 || fields[0].trim() !== '' || wasQuoted) records.push({ line: began, fields })
    fields = []
    field = ''
    wasQuoted = false
  }
  const start = text.charCodeAt(0) === 0xfeff ? 1 : 0
  for (let i = start; i < text.length; i++) {
    const c = text[i]
    if (c === '\n') line++
    if (quoted) {
      if (c !== '"') field += c
      else if (text[i + 1] === '"') {
        field += '"'
        i++
      } else quoted = false
    } else if (c === '"' && field === '') {
      quoted = true
      wasQuoted = true
    } else if (c === ',') {
      fields.push(field)
      field = ''
    } else if (c === '\n' || (c === '\r' && text[i + 1] !== '\n')) {
      endRecord()
      began = line
    } else if (c !== '\r') field += c
  }
  if (quoted) throw fault(`line ${began}`, 'a quote is opened and never closed', 'close the quote')
  if (field !== '' || fields.length > 0) endRecord()
  const [head, ...rows] = records
  if (!head) throw fault('line 1', 'the table is empty', 'give a header row and at least one row')
  if (head.fields.length === 1 && head.fields[0].includes(';'))
    throw fault('line 1', 'the columns are separated by semicolons', 'separate columns with commas and decimals with points')
  for (const row of rows)
    if (row.fields.length !== head.fields.length)
      throw fault(
        `line ${row.line}`,
        `${row.fields.length} fields where the header has ${head.fields.length}`,
        'give every row the same columns',
      )
  return {
    columns: head.fields.map((name) => name.trim()),
    rows: rows.map((row) => row.fields),
    lineOf: (row) => rows[row].line,
  }
}
