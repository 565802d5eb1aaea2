/** RFC 4180: a field in quotes where it has to be. */
export const csvField = (value: string): string => (/[",\r\n]/.test(value) ? `"${value.replaceAll('"', '""')}"` : value)

/** One line, ended by CR LF as the RFC says. */
export const csvLine = (fields: readonly string[]): string => `${fields.map(csvField).join(',')}\r\n`

/** A number with '.' and so many decimals; empty where it is undefined. */
export const csvNumber = (value: number | null | undefined, decimals: number): string => {
  if (value === null || value === undefined || !Number.isFinite(value)) return ''
  const text = value.toFixed(decimals)
  return Number(text) === 0 ? text.replace('-', '') : text
}
