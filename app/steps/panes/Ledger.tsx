import type { CellLedger, LedgerLine } from '../../../core/index.ts'
import { Caution, Mark } from '../../ui/index.ts'
import { cautionsFor, formatAzimuth, formatMast, formatNumber, formatPlaceRange, NO_VALUE, textOf } from '../../words/index.ts'
import { useView } from '../session/index.ts'

const SIGN = { start: '', add: '+', subtract: '−', info: '' } as const

/** Every step behind one cell's number: adding the lines of a result gives the result. */
export function Ledger({ ledger }: { ledger: CellLedger }) {
  const units = useView((v) => v.units)
  const { at, option, lines } = ledger
  const groups = new Map<string, LedgerLine[]>()
  for (const line of lines) {
    const of = line.of ?? ''
    groups.set(of, [...(groups.get(of) ?? []), line])
  }
  return (
    <div className="ledger">
      <h3>
        Cell at azimuth {textOf(formatAzimuth(at.azimuthDeg))}, {textOf(formatPlaceRange(at.rangeM, units))}, {option.candidate} at{' '}
        {textOf(formatMast(option.heightM))}
      </h3>
      <table className="table">
        <thead className="visually-hidden">
          <tr>
            <th scope="col">Step</th>
            <th scope="col">Value</th>
            <th scope="col">Model and source</th>
          </tr>
        </thead>
        {[...groups].map(([of, rows]) => (
          <tbody key={of}>
            {rows.map((line, i) => (
              <tr key={line.key}>
                <td className="text">{line.label}</td>
                <td>
                  {SIGN[line.op]} {shownValue(line)}
                  {line.unit && line.value !== null ? (
                    <span className="unit">{(line.unit === '°' ? '' : '\u202f') + line.unit}</span>
                  ) : null}
                </td>
                <td className="text source">
                  {line.mark ? <Mark>{line.mark}</Mark> : null} {i > 0 && originOf(rows[i - 1]) === originOf(line) ? '' : originOf(line)}
                </td>
              </tr>
            ))}
          </tbody>
        ))}
      </table>
      {cautionsFor('clutter').map((c) => (
        <Caution key={c}>{c}</Caution>
      ))}
    </div>
  )
}

/** Model and source; said once for a run of lines that share them. */
const originOf = (line: LedgerLine): string => [line.model, line.source].filter(Boolean).join(' · ')

const shownValue = (line: LedgerLine): string => {
  if (typeof line.value === 'string') return line.value
  if (line.value === null || !Number.isFinite(line.value)) return NO_VALUE
  const size = Math.abs(line.value)
  return formatNumber(line.value, size >= 1000 || Number.isInteger(line.value) ? 0 : size >= 10 ? 1 : 2)
}
