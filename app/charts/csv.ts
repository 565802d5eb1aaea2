/** A column of a table of numbers and words; a number that is none (null, NaN) is an empty cell. */
export interface CsvColumn {
  /** Name with its unit, as `range_m`. */
  readonly head: string
  readonly values: ArrayLike<number | string | null>
  /** Digits after the point; as many as the number has where absent. */
  readonly decimals?: number
}
/** Columns of equal length as comma-separated text with one head row, SI units, points for decimals. */
export function csvOf(columns: readonly CsvColumn[]): string {
  const count = columns.reduce((most, c) => Math.max(most, c.values.length), 0)
  const rows = [columns.map((c) => quoted(c.head)).join(',')]
  for (let n = 0; n < count; n++) rows.push(columns.map((c) => cellOf(c.values[n], c.decimals)).join(','))
  return `${rows.join('\n')}\n`
}
function cellOf(value: number | string | null | undefined, decimals: number | undefined): string {
  if (typeof value === 'string') return quoted(value)
  if (value === null || value === undefined || !Number.isFinite(value)) return ''
  return decimals === undefined ? String(value) : value.toFixed(decimals)
}
const quoted = (text: string): string => (/[",\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text)
