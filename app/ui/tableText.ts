/** A block of cells as a spreadsheet puts it on the clipboard: tabs between cells, one line per row; quoted cells may hold both. */
export function readBlock(text: string): string[][] {
  const rows: string[][] = [[]]
  let cell = ''
  let quoted = false
  const endCell = () => {
    rows[rows.length - 1].push(cell.trim())
    cell = ''
  }
  for (let i = 0; i < text.length; i++) {
    const c = text[i]
    if (quoted) {
      if (c !== '"') cell += c
      else if (text[i + 1] === '"') {
        cell += '"'
        i++
      } else quoted = false
    } else if (c === '"' && cell === '') quoted = true
    else if (c === '\t') endCell()
    else if (c === '\n') {
      endCell()
      rows.push([])
    } else if (c !== '\r') cell += c
  }
  if (cell !== '' || rows[rows.length - 1].length > 0) endCell()
  return rows.filter((r) => r.some((v) => v !== ''))
}

/** Is what was pasted more than one cell? */
export const isBlock = (text: string): boolean => /[\t\n]/.test(text.replace(/\r?\n$/, ''))

/**
 * Rows with a block laid over them from (row, column) on; rows are added below as needed, what would lie right of the last column is left
 * out. A first line that names the columns (`heads`, each with its other names, any case) is taken as that: its cells go under those names, from the first column on.
 */
export function pasted(
  rows: readonly (readonly string[])[],
  block: readonly (readonly string[])[],
  row: number,
  column: number,
  heads: readonly (string | readonly string[])[],
): string[][] {
  const plain = (s: string) => s.toLowerCase().replace(/\(.*\)|[^a-z0-9]/g, '')
  const known = heads.map((names) => [names].flat().map(plain))
  const named = (block[0] ?? []).map((h) => known.findIndex((names) => plain(h) !== '' && names.includes(plain(h))))
  const hasHead = named.filter((n) => n >= 0).length >= Math.min(2, heads.length)
  const body = hasHead ? block.slice(1) : block
  const out = rows.map((r) => [...r])
  body.forEach((cells, i) => {
    const at = row + i
    while (out.length <= at) out.push(heads.map(() => ''))
    cells.forEach((cell, j) => {
      const to = hasHead ? named[j] : column + j
      if (to >= 0 && to < heads.length) out[at][to] = cell
    })
  })
  return out
}
