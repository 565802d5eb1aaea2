import { useLayoutEffect, useRef, useState } from 'react'
import { Button as AriaButton } from 'react-aria-components'
import type { OptionRef, OptionResult } from '../../../core/index.ts'
import { coverageOf } from '../../charts/index.ts'
import { OptionsChart } from '../../charts/printers.tsx'
import { optionKey, sameOption, studyOptions } from '../../document/index.ts'
import { Button, Caution, FigureButton, Select, Value } from '../../ui/index.ts'
import {
  cautionsFor,
  EMPTY_WORDS,
  formatAngle,
  formatMast,
  formatMetPct,
  MEASURE_WORDS,
  type Quantity,
  textOf,
  type UnitSystem,
  verdictOf,
} from '../../words/index.ts'
import { useDoc, useResults, useSession, useView } from '../session/index.ts'
import { columnGroups, GROUND_COLUMNS, NEED_COLUMNS } from './columns.ts'
import { Explain } from './Explain.tsx'
import { needOf } from './figuresOf.ts'

/** All options side by side; each figure says what it is and shows where it comes from. */
export function CompareStep() {
  const { view } = useSession()
  const doc = useDoc((d) => d)
  const byOption = useResults((r) => r.byOption)
  const shown = useView((v) => v.option)
  const need = useView((v) => v.need)
  const system = useView((v) => v.units)
  const explaining = useView((v) => v.chart === 'figure')
  const options = studyOptions(doc)
  const needs = doc.needs ?? []
  const withTilt = new Set(options.map((o) => o.tiltDeg)).size > 1
  const results = options.flatMap((o) => byOption.get(optionKey(o)) ?? [])
  const show = (option: OptionRef) => view.getState().set({ option })
  if (options.length === 0)
    return (
      <div className="empty">
        <h3>{EMPTY_WORDS.compare.title}</h3>
        <p className="ink-2">{EMPTY_WORDS.compare.reason}</p>
        <Button onPress={() => view.getState().set({ step: 'candidates' })}>Place a candidate</Button>
      </div>
    )
  const asked = needs.length > 0 && results.every((r) => needOf(r, need))
  const columns = asked ? NEED_COLUMNS : GROUND_COLUMNS
  const assessed = results[0] && asked ? needOf(results[0], need) : undefined
  return (
    <div className="compare">
      {needs.length > 1 ? (
        <div className="pick-need">
          <Select
            label="Against"
            value={need ?? needs[0].id}
            choices={needs.map((n) => ({ id: n.id, words: n.name ?? n.id }))}
            onChange={(id) => view.getState().set({ need: id })}
          />
        </div>
      ) : null}
      <table className="table">
        <caption className="visually-hidden">Options compared</caption>
        <thead>
          <tr className="groups">
            <th colSpan={withTilt ? 3 : 2} />
            {asked ? <th /> : null}
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
            {asked ? (
              <th scope="col" className="text">
                Need
              </th>
            ) : null}
            {columns.map((c) => (
              <th key={c.id} scope="col">
                {c.head(results, system)}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {options.map((o, i) => {
            const key = optionKey(o)
            const result = byOption.get(key)
            const first = i === 0 || options[i - 1].candidate !== o.candidate
            const name = doc.candidates.find((c) => c.id === o.candidate)?.name ?? ''
            const on = sameOption(o, shown)
            const figure = result && asked ? needOf(result, need) : undefined
            return (
              <tr key={key} className={[on ? 'on' : '', first ? 'first' : ''].join(' ')}>
                <td>
                  {first ? (
                    <>
                      <b>{o.candidate}</b> {name === o.candidate ? '' : name}
                    </>
                  ) : null}
                </td>
                <td>
                  <AriaButton
                    className={on ? 'chip on' : 'chip'}
                    aria-pressed={on}
                    aria-label={`Show ${o.candidate} at ${o.heightM} m`}
                    onPress={() => show(o)}
                  >
                    {textOf(formatMast(o.heightM))}
                  </AriaButton>
                </td>
                {withTilt ? <td>{textOf(formatAngle(o.tiltDeg, 0.1))}</td> : null}
                {asked ? <td className="text verdict">{figure ? verdictOf(figure) : ''}</td> : null}
                {columns.map((c) => (
                  <td key={c.id}>
                    {result ? (
                      <FigureCell
                        words={`${c.group}, ${c.head(results, system)}, of ${o.candidate} at ${o.heightM} m`}
                        value={c.value(result, need, system)}
                        onPress={() => {
                          const figure = c.key(result, need)
                          if (figure) view.getState().set({ option: o, chart: 'figure', figure })
                        }}
                      />
                    ) : (
                      <span className="ink-3">…</span>
                    )}
                  </td>
                ))}
              </tr>
            )
          })}
        </tbody>
      </table>
      {assessed ? (
        <p className="ink-2">
          A need is met by what is usable: at least {textOf(formatMetPct(assessed.requiredPct))} of {MEASURE_WORDS[assessed.measure]}, at
          the k of the study and at k = 1 to pass
        </p>
      ) : null}
      {explaining ? <Explain /> : null}
      <div className="cautions">
        {cautionsFor('compare').map((c) => (
          <Caution key={c}>{c}</Caution>
        ))}
      </div>
      {results.length > 1 ? <Plot results={results} need={need} shown={shown} system={system} onChoose={show} /> : null}
    </div>
  )
}

function FigureCell({ words, value, onPress }: { words: string; value: Quantity; onPress: () => void }) {
  return (
    <FigureButton label={`${words}: ${textOf(value)}; explain`} onPress={onPress}>
      <Value of={value} />
    </FigureButton>
  )
}

function Plot(props: {
  results: readonly OptionResult[]
  need: string | null
  shown: OptionRef | null
  system: UnitSystem
  onChoose: (option: OptionRef) => void
}) {
  const box = useRef<HTMLDivElement>(null)
  const [width, setWidth] = useState(0)
  const known = props.results.every((r) => coverageOf(r, props.need) !== null)
  useLayoutEffect(() => {
    const element = box.current
    if (!element) return
    const watch = new ResizeObserver(([entry]) => setWidth(Math.floor(entry.contentRect.width)))
    watch.observe(element)
    return () => watch.disconnect()
  }, [])
  return (
    <figure className="plot" ref={box}>
      <figcaption className="ink-2">
        {known
          ? 'Usable share against the area short of suppression, one line per candidate'
          : 'Ground in sight against clutter, one line per candidate; more ground in sight is not better by itself'}
      </figcaption>
      {width > 0 ? (
        <OptionsChart
          results={props.results}
          needId={props.need}
          selected={props.shown}
          width={width}
          height={Math.round(Math.min(420, Math.max(280, width * 0.5)))}
          system={props.system}
          size={12}
          onChoose={props.onChoose}
        />
      ) : null}
    </figure>
  )
}
