import { useLayoutEffect, useRef, useState } from 'react'
import { Button as AriaButton } from 'react-aria-components'
import { M_PER_NM, type OptionRef, type OptionResult } from '../../../core/index.ts'
import { inSightPctOf } from '../../charts/index.ts'
import { OptionsChart } from '../../charts/printers.tsx'
import { optionKey, sameOption, studyOptions } from '../../document/index.ts'
import { Button, Caution, FigureButton, Select, Value } from '../../ui/index.ts'
import {
  cautionsFor,
  EMPTY_WORDS,
  formatAngle,
  formatAreaUp,
  formatDbUp,
  formatFloor,
  formatMargin,
  formatMast,
  formatMetPct,
  formatSetting,
  type Quantity,
  textOf,
  toFace,
  type UnitSystem,
  unitOf,
} from '../../words/index.ts'
import { useDoc, useResults, useSession, useView } from '../session/index.ts'
import { Explain } from './Explain.tsx'
import { FLOOR_RANGE_M, floorNear, needOf } from './figuresOf.ts'

interface Column {
  readonly id: string
  readonly head: string
  value(result: OptionResult, need: string | null, system: UnitSystem): Quantity
  /** Key of the figure in the summary, for its explanation. */
  key(result: OptionResult, need: string | null): string | null
}
const needFigureKey = (result: OptionResult, need: string | null, tail: string): string | null => {
  const of = needOf(result, need)
  return of ? `need_${of.needId}_${tail}` : null
}
const COLUMNS: readonly Column[] = [
  {
    id: 'inSight',
    head: 'In sight',
    value: (r, need) => formatMetPct(inSightPctOf(r, need)),
    key: (r, need) => needFigureKey(r, need, 'in_sight_pct') ?? 'ground_in_sight_km2',
  },
  {
    id: 'margin',
    head: 'Worst margin',
    value: (r, need, system) => formatMargin(needOf(r, need)?.worstMarginM, system),
    key: (r, need) => needFigureKey(r, need, 'worst_margin_m'),
  },
  {
    id: 'over40',
    head: 'C/N over 40 dB',
    value: (r, _need, system) => formatAreaUp(r.figures.clutterOverKm2.over40, system),
    key: () => 'clutter_over_40_km2',
  },
  {
    id: 'suppression',
    head: 'Suppression needed, 90 %',
    value: (r, need) => formatDbUp(needOf(r, need)?.suppression.p90Db),
    key: (r, need) => needFigureKey(r, need, 'suppression_needed_90_db'),
  },
  {
    id: 'floor',
    head: 'Floor at 20 NM, worst',
    value: (r, _need, system) => formatFloor(floorNear(r)?.worstM, system),
    key: (r) => {
      const floor = floorNear(r)
      return floor ? `floor_${Math.round(floor.rangeM / M_PER_NM)}nm_worst_m` : null
    },
  },
]

/** A stated range without decimals it does not have: `20 NM`, `37 km`. */
const roundRange = (m: number, system: UnitSystem): string => textOf(formatSetting(toFace('range', m, system), unitOf('range', system), 1))

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
  const needs = (doc.needs ?? []).filter((n) => n.kind === 'layer')
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
  const floorRange = results[0] ? floorNear(results[0])?.rangeM : undefined
  const headOf = (c: Column) => (c.id === 'floor' ? `Floor at ${roundRange(floorRange ?? FLOOR_RANGE_M, system)}, worst` : c.head)
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
          <tr>
            <th scope="col">Candidate</th>
            <th scope="col">Mast</th>
            {withTilt ? <th scope="col">Tilt</th> : null}
            {COLUMNS.map((c) => (
              <th key={c.id} scope="col">
                {headOf(c)}
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
                {COLUMNS.map((c) => (
                  <td key={c.id}>
                    {result ? (
                      <FigureCell
                        words={`${headOf(c)} of ${o.candidate} at ${o.heightM} m`}
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
        Coverage against clutter, one line per candidate; more ground in sight is not better by itself
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
