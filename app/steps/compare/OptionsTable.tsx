import { memo } from 'react'
import { Button as AriaButton } from 'react-aria-components'
import type { CandidateDoc, NeedDoc, OptionRef, OptionResult } from '../../../core/index.ts'
import { optionKey, sameOption } from '../../document/index.ts'
import { FigureButton } from '../../ui/index.ts'
import { formatAngle, formatMast, type Quantity, textOf, type UnitSystem, verdictOf } from '../../words/index.ts'
import { type Column, columnGroups, unitUnder } from './columns.ts'
import { needOf } from './figuresOf.ts'

export interface OptionsTableProps {
  readonly candidates: readonly CandidateDoc[]
  readonly options: readonly OptionRef[]
  readonly byOption: ReadonlyMap<string, OptionResult>
  readonly shown: OptionRef | null
  readonly columns: readonly Column[]
  /** Needs a row is written for, must needs first; empty where none is assessed: one row an option. */
  readonly needs: readonly NeedDoc[]
  readonly system: UnitSystem
  readonly onShow: (option: OptionRef) => void
  readonly onExplain: (option: OptionRef, figure: string) => void
}
/** Options as rows, or options by needs; units stand at the heads, so that the numbers find room. */
export const OptionsTable = memo(function OptionsTable(p: OptionsTableProps) {
  const { candidates, options, byOption, columns, needs, system } = p
  const names = new Map(candidates.map((c) => [c.id, c.name === c.id ? '' : (c.name ?? '')]))
  const needIds = needs.map((n) => n.id)
  const results = options.flatMap((o) => byOption.get(optionKey(o)) ?? [])
  const withTilt = new Set(options.map((o) => o.tiltDeg)).size > 1
  const asked = needs.length > 0
  const many = needs.length > 1
  const lead = (withTilt ? 3 : 2) + (many ? 1 : 0) + (asked ? 1 : 0)
  return (
    <table className="table">
      <caption className="visually-hidden">Options compared</caption>
      <thead>
        <tr className="groups">
          <td colSpan={lead} />
          {columnGroups(columns).map((g) => (
            <th key={g.group} scope="colgroup" colSpan={g.span}>
              {g.group}
            </th>
          ))}
        </tr>
        <tr>
          <th scope="col">Candidate</th>
          <th scope="col">Mast</th>
          {withTilt ? <th scope="col">Tilt</th> : null}
          {many ? (
            <th scope="col" className="text">
              Need
            </th>
          ) : null}
          {asked ? (
            <th scope="col" className="text">
              {many ? 'Verdict' : 'Need'}
            </th>
          ) : null}
          {columns.map((c) => (
            <th key={c.id} scope="col">
              {c.head(results, system)}
              <span className="unit"> {unitUnder(c, results, needIds, system)}</span>
            </th>
          ))}
        </tr>
      </thead>
      <tbody>
        {options.map((o, i) => {
          const first = i === 0 || options[i - 1].candidate !== o.candidate
          return (asked ? needs : [null]).map((need, n) => (
            <Row
              key={`${optionKey(o)} ${need?.id}`}
              option={o}
              result={byOption.get(optionKey(o))}
              name={names.get(o.candidate) ?? ''}
              on={sameOption(o, p.shown)}
              first={first && n === 0}
              top={n === 0}
              need={need}
              tilt={withTilt}
              many={many}
              columns={columns}
              system={system}
              onShow={p.onShow}
              onExplain={p.onExplain}
            />
          ))
        })}
      </tbody>
    </table>
  )
})

interface RowProps {
  readonly option: OptionRef
  readonly result: OptionResult | undefined
  /** Name of the candidate; '' where its letter is all. */
  readonly name: string
  readonly on: boolean
  /** First row of its candidate, of its option. */
  readonly first: boolean
  readonly top: boolean
  readonly need: NeedDoc | null
  readonly tilt: boolean
  readonly many: boolean
  readonly columns: readonly Column[]
  readonly system: UnitSystem
  readonly onShow: (option: OptionRef) => void
  readonly onExplain: (option: OptionRef, figure: string) => void
}
/** Rendered again only when its own option has another result. */
const Row = memo(function Row(p: RowProps) {
  const { option, result, name, on, first, top, need, tilt, many, columns, system, onShow, onExplain } = p
  const needId = need?.id ?? null
  const figure = result && needId !== null ? needOf(result, needId) : undefined
  return (
    <tr className={[on ? 'on' : '', first ? 'first' : '', top ? '' : 'under'].join(' ')}>
      <td className="candidate">
        {first ? (
          <>
            <b>{option.candidate}</b> {name}
          </>
        ) : null}
      </td>
      <td>
        {top ? (
          <AriaButton
            className={on ? 'chip on' : 'chip'}
            aria-pressed={on}
            aria-label={`Show ${option.candidate} at ${option.heightM} m${tilt ? `, tilt ${option.tiltDeg}°` : ''}`}
            onPress={() => onShow(option)}
          >
            {textOf(formatMast(option.heightM))}
          </AriaButton>
        ) : null}
      </td>
      {tilt ? <td>{top ? textOf(formatAngle(option.tiltDeg, 0.1)) : null}</td> : null}
      {many ? (
        <td className="text need">
          {need?.name ?? needId}
          {need?.must === false ? <span className="ink-3"> wish</span> : null}
        </td>
      ) : null}
      {needId !== null ? <td className="text verdict">{figure ? verdictOf(figure) : ''}</td> : null}
      {columns.map((c) => (
        <td key={c.id}>
          {!result ? (
            <span className="ink-3">…</span>
          ) : c.ofOption && !top ? null : (
            <FigureCell
              words={`${c.group}, ${c.head([result], system)}, of ${option.candidate} at ${option.heightM} m`}
              value={c.value(result, needId, system)}
              onPress={() => {
                const figure = c.key(result, needId)
                if (figure) onExplain(option, figure)
              }}
            />
          )}
        </td>
      ))}
    </tr>
  )
})

function FigureCell({ words, value, onPress }: { words: string; value: Quantity; onPress: () => void }) {
  return (
    <FigureButton label={`${words}: ${textOf(value)}; explain`} onPress={onPress}>
      {value.value}
    </FigureButton>
  )
}
