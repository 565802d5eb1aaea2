import { optionKey } from '../../document/index.ts'
import { Caution, Value } from '../../ui/index.ts'
import { CAUTIONS, cautionsFor, formatAreaUp, formatFloor, formatMast, formatMetPct, formatScreening, textOf } from '../../words/index.ts'
import { floorNear, needOf } from '../figuresOf.ts'
import { useResults, useView } from '../session/index.ts'

/** The figures of the option on show, as the memo will say them. */
export function MemoAside() {
  const option = useView((v) => v.option)
  const need = useView((v) => v.need)
  const system = useView((v) => v.units)
  const result = useResults((r) => (option ? r.byOption.get(optionKey(option)) : undefined))
  if (!option) return <p className="ink-2">The memo writes itself here once a candidate is placed</p>
  if (!result)
    return (
      <p className="ink-2">
        {option.candidate} at {textOf(formatMast(option.heightM))}: not computed yet
      </p>
    )
  const of = needOf(result, need)
  const { figures } = result
  return (
    <>
      <p className="ink-3">
        Candidate {option.candidate}, {textOf(formatMast(option.heightM))}, draft
      </p>
      <table className="table">
        <tbody>
          {of ? (
            <tr>
              <td className="text">{of.name}, in sight</td>
              <td>
                <Value of={formatMetPct(of.inSightPct)} />
              </td>
            </tr>
          ) : null}
          <tr>
            <td className="text">Floor at 20 NM, worst</td>
            <td>
              <Value of={formatFloor(floorNear(result)?.worstM, system)} />
            </td>
          </tr>
          <tr>
            <td className="text">Horizon, median</td>
            <td>
              <Value of={formatScreening(figures.horizon.medianDeg)} />
            </td>
          </tr>
          <tr>
            <td className="text">C/N over 40 dB</td>
            <td>
              <Value of={formatAreaUp(figures.clutterOverKm2.over40, system)} />
            </td>
          </tr>
        </tbody>
      </table>
      {cautionsFor('clutter').map((c) => (
        <Caution key={c}>{c}</Caution>
      ))}
      <Caution>{CAUTIONS.notForNavigation}</Caution>
    </>
  )
}
