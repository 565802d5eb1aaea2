import { memo, useCallback, useDeferredValue, useLayoutEffect, useMemo, useRef, useState } from 'react'
import { coverageOf, type NeedDoc, type OptionRef, type OptionResult } from '../../../core/index.ts'
import { OptionsChart } from '../../charts/printers.tsx'
import { optionKey, studyOptions } from '../../document/index.ts'
import { Button, Caution, Select } from '../../ui/index.ts'
import { cautionsFor, EMPTY_WORDS, formatMetPct, MEASURE_WORDS, RANKING_WORDS, textOf, type UnitSystem } from '../../words/index.ts'
import { useDoc, useResults, useSession, useView } from '../session/index.ts'
import { ChangeSection } from './ChangeSection.tsx'
import { GROUND_COLUMNS, NEED_COLUMNS } from './columns.ts'
import { Explain } from './Explain.tsx'
import { isAssessed, needOf, needsInOrder } from './figuresOf.ts'
import { OptionsTable } from './OptionsTable.tsx'
import { RankingSection } from './RankingSection.tsx'
import { RejectSection } from './RejectSection.tsx'

const EVERY = ' every'
const NO_NEEDS: readonly NeedDoc[] = []

/** All options side by side; each figure says what it is and shows where it comes from. */
export function CompareStep() {
  const { view } = useSession()
  const doc = useDoc((d) => d)
  // new results come in when the page has time for them
  const byOption = useDeferredValue(useResults((r) => r.byOption))
  const shown = useView((v) => v.option)
  const need = useView((v) => v.need)
  const system = useView((v) => v.units)
  const explaining = useView((v) => v.chart === 'figure')
  const [every, setEvery] = useState(false)
  const options = useMemo(() => studyOptions(doc), [doc])
  const needs = useMemo(() => needsInOrder(doc), [doc])
  const results = useMemo(() => options.flatMap((o) => byOption.get(optionKey(o)) ?? []), [options, byOption])
  const show = useCallback((option: OptionRef) => view.getState().set({ option }), [view])
  const explain = useCallback((option: OptionRef, figure: string) => view.getState().set({ option, chart: 'figure', figure }), [view])
  // another list only when a need joins or leaves it, so that rows keep
  const asked = needs.length > 0 && results.every((r) => needOf(r, need))
  const readable = needs.filter((n) => results.every((r) => isAssessed(r, n.id)))
  const chosen = readable.find((n) => n.id === need) ?? readable[0] ?? needs[0]
  const rowIds = !asked ? '' : JSON.stringify(every ? readable.map((n) => n.id) : [chosen.id])
  const rowNeeds = useMemo(() => (rowIds === '' ? NO_NEEDS : needs.filter((n) => JSON.parse(rowIds).includes(n.id))), [needs, rowIds])
  if (options.length === 0)
    return (
      <div className="empty">
        <h3>{EMPTY_WORDS.compare.title}</h3>
        <p className="ink-2">{EMPTY_WORDS.compare.reason}</p>
        <Button onPress={() => view.getState().set({ step: 'candidates' })}>Place a candidate</Button>
        {doc.candidates.length > 0 ? <RejectSection doc={doc} /> : null}
      </div>
    )
  const columns = asked ? NEED_COLUMNS : GROUND_COLUMNS
  const assessed = results[0] && asked ? needOf(results[0], chosen.id) : undefined
  return (
    <div className="compare">
      {needs.length > 1 ? (
        <div className="pick-need">
          <Select
            label="Against"
            value={every ? EVERY : chosen.id}
            choices={[
              ...needs.map((n) => ({ id: n.id, words: `${n.name ?? n.id}${n.must === false ? ' (wish)' : ''}` })),
              { id: EVERY, words: 'every need, must needs first' },
            ]}
            onChange={(id) => {
              setEvery(id === EVERY)
              if (id !== EVERY) view.getState().set({ need: id })
            }}
          />
        </div>
      ) : null}
      <OptionsTable
        candidates={doc.candidates}
        options={options}
        byOption={byOption}
        shown={shown}
        columns={columns}
        needs={rowNeeds}
        system={system}
        onShow={show}
        onExplain={explain}
      />
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
      {results.length > 1 ? <RankingSection doc={doc} results={results} shown={shown} system={system} onShow={show} /> : null}
      {results.length > 0 ? <ChangeSection doc={doc} shown={shown} system={system} /> : null}
      <RejectSection doc={doc} />
    </div>
  )
}

const Plot = memo(function Plot(props: {
  results: readonly OptionResult[]
  need: string | null
  shown: OptionRef | null
  system: UnitSystem
  onChoose: (option: OptionRef) => void
}) {
  const box = useRef<HTMLDivElement>(null)
  const [width, setWidth] = useState(0)
  const known = props.results.every((r) => coverageOf(r.figures, props.need) !== null)
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
          ? `Usable share against the area short of suppression, one line per candidate; ${RANKING_WORDS.plotBest}`
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
})
