import type { OptionRef } from '../../../core/index.ts'
import { formatMast, type Quantity, textOf, type UnitKind, type UnitSystem, unitOf } from '../../words/index.ts'
import type { Cell, Column, Value } from './types.ts'

/** A formatted number as a cell. */
export const value = (q: Quantity, more: Partial<Value> = {}): Value => ({
  text: q.value,
  ...(q.unit === '' ? {} : { unit: q.unit }),
  ...more,
})
/** Same in both unit systems: the nautical number with the metric one beside it. */
export function dual(format: (system: UnitSystem) => Quantity, system: UnitSystem, more: Partial<Value> = {}): Value {
  const shown = format(system)
  const metric = system === 'metric' || shown.unit === '' ? {} : { also: textOf(format('metric')) }
  return value(shown, { ...metric, ...more })
}
/** A number whose unit stands in the column's head. */
export const bare = (q: Quantity, more: Partial<Value> = {}): Value => ({ text: q.value, ...more })
/** As `dual`, for a column whose head carries the units. */
export function dualBare(format: (system: UnitSystem) => Quantity, system: UnitSystem, explain?: string): Value {
  const shown = format(system)
  const metric = system === 'metric' || shown.unit === '' ? {} : { also: format('metric').value }
  return { text: shown.value, ...metric, ...(explain === undefined ? {} : { explain }) }
}
/** Units of a column of `dualBare` cells: `NM² (km²)`. */
export const bothUnits = (kind: UnitKind, system: UnitSystem): string =>
  system === 'metric' ? unitOf(kind, 'metric') : `${unitOf(kind, system)} (${unitOf(kind, 'metric')})`
export const NO_HEADS: readonly Column[] = [
  { head: '', width: 'fill' },
  { head: '', align: 'right' },
]

/** `A at 24 m`, with the tilt where the study has more than one. */
export function optionName(ref: OptionRef, tilts: boolean): string {
  return `${ref.candidate} at ${textOf(formatMast(ref.heightM))}${tilts ? `, tilt ${ref.tiltDeg}°` : ''}`
}
/** Words of a cell, for tests and plain readers. */
export function cellText(cell: Cell): string {
  if (typeof cell === 'string') return cell
  const number = textOf({ value: cell.text, unit: cell.unit ?? '' })
  return [number, cell.also && `(${cell.also})`, cell.mark].filter(Boolean).join(' ')
}
/** `one, two and three`. */
export function inWords(items: readonly string[]): string {
  if (items.length < 2) return items.join('')
  return `${items.slice(0, -1).join(', ')} and ${items[items.length - 1]}`
}
/** The first few in words, the rest counted. */
export function someInWords(items: readonly string[], most: number): string {
  return items.length <= most ? inWords(items) : `${items.slice(0, most).join(', ')} and ${items.length - most} more`
}
const SMALL = ['no', 'one', 'two', 'three', 'four', 'five', 'six', 'seven', 'eight', 'nine', 'ten', 'eleven', 'twelve']
export const countWord = (n: number): string => SMALL[n] ?? String(n)
export const capital = (text: string): string => text.charAt(0).toUpperCase() + text.slice(1)
/** For use inside a sentence: first letter small, but for names and abbreviations. */
export const inSentence = (text: string): string => (/^([A-Z]{2}|Doppler)/.test(text) ? text : text.charAt(0).toLowerCase() + text.slice(1))
