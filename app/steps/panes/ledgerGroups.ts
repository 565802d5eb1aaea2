import type { CellLedger, LedgerLine } from '../../../core/index.ts'
import {
  formatAzimuth,
  formatMast,
  formatNumber,
  LEDGER_ALONE,
  LEDGER_PLACE,
  ledgerWords,
  probeValue,
  type Quantity,
  textOf,
  toFace,
  type UnitSystem,
  unitOf,
  whyNone,
} from '../../words/index.ts'

export interface LedgerRow {
  readonly key: string
  readonly label: string
  readonly sign: '' | '+' | '−'
  readonly value: Quantity
  readonly mark: LedgerLine['mark']
  /** Model and source where they are not those of the group. */
  readonly origin: string
}
/** A result with the lines that add up to it; or the place, which has no total. */
export interface LedgerGroup {
  readonly key: string
  readonly name: string
  readonly total: Quantity | null
  /** The same number rounded to the safe side as its layer does; '' where no layer shows it. */
  readonly onMap: string
  /** Model and source of most of its lines. */
  readonly origin: string
  readonly rows: readonly LedgerRow[]
}
const SIGN = { start: '', add: '+', subtract: '−', info: '' } as const
const originOf = (line: LedgerLine): string => [line.model, line.source].filter(Boolean).join(' · ')

/** The ledger in groups: results in the order a reader asks for them, each with its total and its own lines; the place last. */
export function ledgerGroups(
  { lines, results }: CellLedger,
  needs: readonly { readonly id: string; readonly name: string }[],
  units: UnitSystem,
): LedgerGroup[] {
  const said = (key: string): string => {
    const value = lines.find((l) => l.key === key)?.value
    return typeof value === 'string' ? value : ''
  }
  const place = { inSight: said('in_sight'), row: said('table_row'), controlling: said('controlling') }
  const known = Object.entries(results).flatMap(([key, value]) => {
    const words = ledgerWords(key, needs)
    return words ? [{ key, value, words }] : []
  })
  const groups = known
    .sort((a, b) => a.words.rank - b.words.rank)
    .map(({ key, value, words }): LedgerGroup => {
      const own = lines.filter((l) => l.of === key)
      const prefix = words.name.includes(': ') ? words.name.slice(0, words.name.lastIndexOf(': ') + 2) : ''
      const total = faceValue({ key, value, unit: words.unit }, units, place)
      const map = words.layer === null || value === null ? '' : textOf(probeValue(words.layer, value, units))
      return { key, name: words.name, total, onMap: map, ...rowsOf(own, prefix, units, place) }
    })
  const rest = lines.filter((l) => !l.of || !known.some((k) => k.key === l.of))
  if (rest.length > 0) groups.push({ key: '', name: LEDGER_PLACE, total: null, onMap: '', ...rowsOf(rest, '', units, place) })
  return groups
}

type Place = Parameters<typeof whyNone>[1]
const ALONE = '_alone'

function rowsOf(all: readonly LedgerLine[], prefix: string, units: UnitSystem, place: Place): Pick<LedgerGroup, 'origin' | 'rows'> {
  // what a part is alone is said after what it adds; where nothing stands before it both are the same number
  const first = all.find((l) => l.op === 'start')?.key
  const lines = all.filter((l) => l.key !== `${first}${ALONE}`)
  const count = new Map<string, number>()
  for (const l of lines) count.set(originOf(l), (count.get(originOf(l)) ?? 0) + 1)
  const origin = [...count].sort((a, b) => b[1] - a[1])[0]?.[0] ?? ''
  const rows = lines.map((l): LedgerRow => {
    const label =
      l.key.endsWith(ALONE) && l.op === 'info' ? LEDGER_ALONE : l.label.startsWith(prefix) ? l.label.slice(prefix.length) : l.label
    const own = originOf(l)
    return {
      key: l.key,
      label: label.charAt(0).toUpperCase() + label.slice(1),
      sign: SIGN[l.op],
      value: inSum(l.op, faceValue(l, units, place)),
      mark: l.mark,
      origin: own === origin ? '' : own,
    }
  })
  return { origin, rows }
}

/** A negative number that is added or taken away stands in brackets. */
const inSum = (op: LedgerLine['op'], q: Quantity): Quantity =>
  (op === 'add' || op === 'subtract') && q.value.startsWith('−') ? { ...q, value: `(${q.value})` } : q

/** A value in the unit of the face, with digits enough that lines can be added by eye. Mast heights stay in metres. */
function faceValue({ key, value, unit }: Pick<LedgerLine, 'key' | 'value' | 'unit'>, units: UnitSystem, place: Place): Quantity {
  if (typeof value === 'string') return { value, unit: '' }
  if (value === null || !Number.isFinite(value)) return { value: whyNone(key, place), unit: '' }
  if (unit === 'deg' || unit === '°') return key === 'azimuth' ? formatAzimuth(value) : { value: formatNumber(value, 2), unit: '°' }
  if (unit === 'm' && (key === 'mast_height' || key === 'height_to_see_m')) return formatMast(value)
  if (unit === 'm' && key.includes('range')) return { value: formatNumber(toFace('range', value, units), 2), unit: unitOf('range', units) }
  if (unit === 'm') return { value: formatNumber(toFace('height', value, units), 1), unit: unitOf('height', units) }
  if (key.endsWith('probability_of_detection')) return { value: formatNumber(value, 3), unit: '' }
  return { value: formatNumber(value, 2), unit }
}
