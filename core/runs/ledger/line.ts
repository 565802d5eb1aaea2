import type { LedgerLine } from '../types.ts'

type Line = Omit<LedgerLine, 'mark' | 'source'> & Partial<Pick<LedgerLine, 'mark' | 'source'>>
/** A line with no source and mark but those given. */
export const ledgerLine = (line: Line): LedgerLine => ({ source: '', mark: '', ...line })

/** Sum of the start, add and subtract lines of one result. */
export function sumOf(lines: readonly LedgerLine[], of: string): number {
  let sum = 0
  for (const l of lines) {
    if (l.of !== of || typeof l.value !== 'number') continue
    if (l.op === 'start' || l.op === 'add') sum += l.value
    else if (l.op === 'subtract') sum -= l.value
  }
  return sum
}

export const GEOMETRY = 'Straight ray over the effective earth'
