import type { CellLedger, LedgerLine } from '../../core/index.ts'
import { Caution, Mark } from '../ui/index.ts'
import { cautionsFor, formatAzimuth, formatMast, formatNumber, formatPlaceRange, textOf } from '../words/index.ts'
import { useView } from './session/index.ts'

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
      <div className="ledger-columns">
        {[...groups].map(([of, rows]) => (
          <table key={of} className="table">
            <caption className="visually-hidden">{of || 'Context'}</caption>
            <tbody>
              {rows.map((line) => (
                <tr key={line.key}>
                  <td className="text">
                    {line.label} {line.mark ? <Mark>{line.mark}</Mark> : null}
                    <span className="source">{[line.model, line.source].filter(Boolean).join(' · ')}</span>
                  </td>
                  <td>
                    {SIGN[line.op]} {shownValue(line)}
                    {line.unit ? <span className="unit">{`\u202f${line.unit}`}</span> : null}
                  </td>
                </tr>
              ))}
            </tbody>
          </table>
        ))}
      </div>
      {cautionsFor('clutter').map((c) => (
        <Caution key={c}>{c}</Caution>
      ))}
    </div>
  )
}

const shownValue = (line: LedgerLine): string => {
  if (typeof line.value === 'string') return line.value
  if (line.value === null) return 'undefined'
  const size = Math.abs(line.value)
  return formatNumber(line.value, size >= 1000 ? 0 : size >= 10 ? 1 : 2)
}
