import { useLayoutEffect, useRef, useState } from 'react'
import { Button as AriaButton } from 'react-aria-components'
import type { LayerId, LonLat, OptionRef, OptionResult } from '../../core/index.ts'
import { inSightPctOf } from '../charts/index.ts'
import { OptionsChart } from '../charts/printers.tsx'
import { optionKey, sameOption, studyOptions } from '../document/index.ts'
import { Button, Caution, FigureButton, Select, Value } from '../ui/index.ts'
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
  formatRange,
  type Quantity,
  textOf,
  type UnitSystem,
} from '../words/index.ts'
import { FLOOR_RANGE_M, floorNear, needOf } from './figuresOf.ts'
import { useDoc, useResults, useSession, useView } from './session/index.ts'

interface Column {
  readonly id: string
  readonly head: string
  /** What the figure is, one sentence. */
  readonly meaning: string
  /** Layer that shows where it comes from. */
  readonly layer: LayerId
  value(result: OptionResult, need: string | null, system: UnitSystem): Quantity
  /** The place it was found at, if it has one. */
  place?(result: OptionResult, need: string | null): LonLat | null
  /** What sets it there. */
  because?(result: OptionResult, need: string | null): string
}

const COLUMNS: readonly Column[] = [
  {
    id: 'inSight',
    head: 'In sight',
    meaning: 'Share of the need’s area whose height is in sight, line of sight only; of the ground where no need is stated. Rounded down',
    layer: 'coverage-floor',
    value: (r, need) => formatMetPct(inSightPctOf(r, need)),
  },
  {
    id: 'margin',
    head: 'Worst margin',
    meaning: 'Height of the need less the coverage floor, at the worst place of the need. Rounded down',
    layer: 'coverage-floor',
    value: (r, need, system) => formatMargin(needOf(r, need)?.worstMarginM, system),
    place: (r, need) => needOf(r, need)?.worst ?? null,
    because: (r, need) => needOf(r, need)?.worst?.obstacle ?? '',
  },
  {
    id: 'over40',
    head: 'C/N over 40 dB',
    meaning: 'Ground whose mean clutter stands more than 40 dB above noise, one pulse, before suppression. Rounded up',
    layer: 'clutter-to-noise',
    value: (r, _need, system) => formatAreaUp(r.figures.clutterOverKm2.over40, system),
  },
  {
    id: 'suppression',
    head: 'Suppression needed, 90 %',
    meaning: 'Improvement factor that serves 90 % of the places of the need which are in sight and strong enough. Rounded up',
    layer: 'suppression-needed',
    value: (r, need) => formatDbUp(needOf(r, need)?.suppression.p90Db),
  },
  {
    id: 'floor',
    head: 'Floor at 20 NM, worst',
    meaning: 'Lowest height in sight above sea level at that ground range, on the worst azimuth. Rounded up',
    layer: 'coverage-floor',
    value: (r, _need, system) => formatFloor(floorNear(r)?.worstM, system),
    because: (r) => {
      const azimuth = floorNear(r)?.worstAzimuthDeg
      return azimuth === null || azimuth === undefined ? '' : `azimuth ${textOf(formatAngle(azimuth, 1))}`
    },
  },
]

/** All options side by side; each figure says what it is and shows where it comes from. */
export function CompareStep() {
  const { view } = useSession()
  const doc = useDoc((d) => d)
  const byOption = useResults((r) => r.byOption)
  const shown = useView((v) => v.option)
  const need = useView((v) => v.need)
  const system = useView((v) => v.units)
  const [asked, setAsked] = useState<{ key: string; column: string } | null>(null)
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
  const headOf = (c: Column) => (c.id === 'floor' ? `Floor at ${textOf(formatRange(floorRange ?? FLOOR_RANGE_M, system))}, worst` : c.head)
  const explained = asked && COLUMNS.find((c) => c.id === asked.column)
  const explainedResult = asked ? byOption.get(asked.key) : undefined
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
                      <FigureButton
                        label={`${headOf(c)} of ${o.candidate} at ${o.heightM} m: ${textOf(c.value(result, need, system))}; explain`}
                        onPress={() => {
                          show(o)
                          setAsked({ key, column: c.id })
                        }}
                      >
                        <Value of={c.value(result, need, system)} />
                      </FigureButton>
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
      {explained && explainedResult ? (
        <section className="explain" aria-live="polite">
          <h3>
            {headOf(explained)}, {explainedResult.ref.candidate} at {textOf(formatMast(explainedResult.ref.heightM))}:{' '}
            {textOf(explained.value(explainedResult, need, system))}
          </h3>
          <p className="ink-2">
            {explained.meaning}.{explained.because?.(explainedResult, need) ? ` Set by ${explained.because(explainedResult, need)}.` : ''}
          </p>
          <div className="row">
            <Button
              small
              onPress={() => {
                const at = explained.place?.(explainedResult, need) ?? null
                view.getState().set({ layer: explained.layer, step: 'candidates', formOpen: false, cell: at, chart: at ? 'ledger' : null })
              }}
            >
              {explained.place?.(explainedResult, need) ? 'Show the place and its ledger' : 'Show on the map'}
            </Button>
          </div>
        </section>
      ) : null}
      <div className="cautions">
        {cautionsFor('compare').map((c) => (
          <Caution key={c}>{c}</Caution>
        ))}
      </div>
      {results.length > 1 ? <Plot results={results} need={need} shown={shown} system={system} onChoose={show} /> : null}
    </div>
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
