import { useMemo } from 'react'
import type { CellLedger } from '../../../core/index.ts'
import { Caution, Mark, Value } from '../../ui/index.ts'
import { cautionsFor, faceNorth, formatAzimuth, formatMast, formatPlaceRange, textOf } from '../../words/index.ts'
import { useDoc, useView } from '../session/index.ts'
import { type LedgerGroup, ledgerGroups } from './ledgerGroups.ts'

/** Every step behind one cell's number: each result with its total, and under it the lines that add up to it. */
export function Ledger({ ledger }: { ledger: CellLedger }) {
  const units = useView((v) => v.units)
  const needs = useDoc((d) => d.needs)
  const { at, option } = ledger
  const north = faceNorth()
  // biome-ignore lint/correctness/useExhaustiveDependencies: the lines name azimuths from the north of the face
  const groups = useMemo(
    () =>
      ledgerGroups(
        ledger,
        (needs ?? []).map((n) => ({ id: n.id, name: n.name ?? n.id })),
        units,
      ),
    [ledger, needs, units, north],
  )
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
        {groups.map((g) => (
          <Group key={g.key} group={g} />
        ))}
      </table>
      {cautionsFor('clutter').map((c) => (
        <Caution key={c}>{c}</Caution>
      ))}
    </div>
  )
}

function Group({ group }: { group: LedgerGroup }) {
  return (
    <tbody>
      <tr className="total">
        <td className="text">{group.name}</td>
        <td>{group.total ? <Value of={group.total} /> : null}</td>
        <td className="text source">{group.onMap ? `rounded ${group.onMap}` : null}</td>
      </tr>
      {group.origin ? (
        <tr className="origin">
          <td className="text source" colSpan={3}>
            {group.origin}
          </td>
        </tr>
      ) : null}
      {group.rows.map((row) => (
        <tr key={row.key}>
          <td className="text">{row.label}</td>
          <td>
            {row.sign} <Value of={row.value} />
          </td>
          <td className="text source">
            {row.mark ? <Mark>{row.mark}</Mark> : null} {row.origin}
          </td>
        </tr>
      ))}
    </tbody>
  )
}
