import {
  type ClassPattern,
  classMarkColour,
  classMarkPixels,
  differenceInfo,
  type LayerId,
  LOSS_CAUSES,
  layerInfo,
  lossCode,
  type Ramp,
  rampHex,
} from '../../../core/index.ts'
import {
  DIFFERENCE_WORDS,
  differenceEnds,
  differenceStops,
  differenceTitle,
  formatLossPct,
  LAYER_WORDS,
  LOSS_WORDS,
  legendMarks,
  legendStops,
  MAP_WORDS,
  textOf,
  type UnitSystem,
} from '../../words/index.ts'
import { REJECTED_MARK } from '../marks/Rejected.tsx'
import type { MapPaneProps } from '../types.ts'

const WIDTH = 232
/** Labels nearer than this to the one before are left out, px. */
const APART = 26

export interface LegendProps {
  readonly layer: LayerId
  readonly units: UnitSystem
  readonly night: boolean
  readonly marks: MapPaneProps['marks']
  readonly losses: MapPaneProps['losses']
  /** Lines of roads on show, seen and hidden; null or absent where there are none. */
  readonly roads?: MapPaneProps['roadLines']
  /** A rejected candidate is drawn. */
  readonly rejected?: boolean
  /** The two options of a difference, in words; null: the layer itself. */
  readonly difference?: readonly [string, string] | null
}
/** Title, ramp with labelled stops or a colour per class, what bare and hatched mean, and marks in words. */
export function Legend(props: LegendProps) {
  return props.difference ? <DifferenceLegend {...props} of={props.difference} /> : <LayerLegend {...props} />
}

function DifferenceLegend({ layer, units, night, marks, rejected, of: [a, b] }: LegendProps & { of: readonly [string, string] }) {
  const { unit, labels } = differenceStops(layer, units)
  const { warned } = legendMarks(layer, marks)
  const title = differenceTitle(layer, a, b)
  const ramp = differenceInfo(layer)?.ramp
  return (
    <section className="map-card legend" aria-label={`Legend: ${title}`}>
      <h3>
        {title} <span className="ink-3">{unit}</span>
      </h3>
      {ramp ? <Scale ramp={ramp} labels={labels} ends={differenceEnds(layer, shortOf(a, b))} night={night} /> : null}
      <p className="note">{DIFFERENCE_WORDS.note}</p>
      {rejected ? <RejectedKey /> : null}
      {warned.map((m) => (
        <p key={m} className="mark">
          {m}
        </p>
      ))}
    </section>
  )
}

/** `A` where the other is of another candidate, else `A at 20 m`. */
const shortOf = (a: string, b: string): string => {
  const [id = a] = a.split(' ')
  return b.startsWith(`${id} `) ? a : id
}

const RejectedKey = () => (
  <p className="note">
    <span className="part">
      <svg className="crossed" width={14} height={14} viewBox="-7 -7 14 14" aria-hidden>
        <path d={REJECTED_MARK} />
      </svg>
      {MAP_WORDS.rejectedMark}
    </span>
  </p>
)

function LayerLegend({ layer, units, night, marks, losses, roads, rejected }: LegendProps) {
  const words = LAYER_WORDS[layer]
  const { unit } = legendStops(layer, layerInfo(layer).ramp.stops, units)
  const { note, warned } = legendMarks(layer, marks)
  // beside an open chart only the unit stays of what the value is
  const [short = '', ...more] = words.of.split(', ')
  return (
    <section className="map-card legend" aria-label={`Legend: ${words.title}`}>
      <h3>
        {words.title}{' '}
        <span className="ink-3">
          {unit ? `${unit} ${short}` : short}
          {more.length > 0 ? <span className="spare">, {more.join(', ')}</span> : null}
        </span>
      </h3>
      <Key layer={layer} units={units} night={night} losses={losses} />
      {layer === 'masked' ? null : (
        <p className="note">
          {note.split(' · ').map((part) => (
            <span key={part} className="part">
              {part.startsWith('hatched: masked') ? <Swatch kind="masked" /> : null}
              {part}
            </span>
          ))}
        </p>
      )}
      {roads && roads.seen.length > 0 ? (
        <p className="note">
          <span className="part">
            <i className="swatch road-seen" aria-hidden />
            {MAP_WORDS.roadSeen}
          </span>
        </p>
      ) : null}
      {rejected ? <RejectedKey /> : null}
      {warned.map((m) => (
        <p key={m} className="mark">
          {m}
        </p>
      ))}
    </section>
  )
}

/** What the colours mean: patterns of states, a colour per class, or a ramp. */
function Key({ layer, units, night, losses }: Omit<LegendProps, 'marks' | 'roads'>) {
  const { ramp, classes, patterns } = layerInfo(layer)
  if (layer === 'masked')
    return (
      <ul className="swatches">
        {(['masked', 'marginal', 'unknown'] as const).map((kind) => (
          <li key={kind}>
            <Swatch kind={kind} />
            {kind}
          </li>
        ))}
      </ul>
    )
  if (classes)
    return (
      <ul className="swatches classes">
        {classesOf(layer, losses).map((c) => (
          <li key={c.value}>
            <ClassSwatch hex={rampHex(ramp, c.value, night)} pattern={patterns?.[c.value - 1]} />
            {c.words} {c.share ? <span className="ink-3">{c.share}</span> : null}
          </li>
        ))}
      </ul>
    )
  const { labels } = legendStops(layer, ramp.stops, units)
  return <Scale ramp={ramp} labels={labels} ends={LAYER_WORDS[layer].ends} night={night} />
}

function Scale({
  ramp,
  labels,
  ends,
  night,
}: {
  ramp: Ramp
  labels: readonly { readonly at: number; readonly text: string }[]
  ends: readonly [string, string] | null
  night: boolean
}) {
  const colours = Array.from({ length: 33 }, (_, n) => rampHex(ramp, ramp.low + ((ramp.high - ramp.low) * n) / 32, night))
  const kept: { at: number; text: string }[] = []
  for (const l of labels) if (kept.length === 0 || (l.at - kept[kept.length - 1]!.at) * WIDTH >= APART) kept.push(l)
  return (
    <div className="scale-key">
      <div className="ramp" style={{ background: `linear-gradient(to right, ${colours.join(', ')})` }} />
      <div className="stops" aria-hidden>
        {kept.map((l) => (
          <span key={l.at} style={{ left: `${l.at * 100}%` }} className={l.at < 0.02 ? 'first' : l.at > 0.98 ? 'last' : ''}>
            {l.text}
          </span>
        ))}
      </div>
      {ends ? (
        <div className="ends ink-3">
          <span>{ends[0]}</span>
          <span>{ends[1]}</span>
        </div>
      ) : null}
    </div>
  )
}

/** Colour and pattern of a class as the painter draws them, pixel by pixel. */
function ClassSwatch({ hex, pattern }: { hex: string | null; pattern?: ClassPattern }) {
  const marks = pattern ? classMarkPixels(pattern) : []
  if (!hex || marks.length === 0) return <i className="swatch" style={{ background: hex ?? undefined }} aria-hidden />
  const [r = 0, g = 0, b = 0] = [1, 3, 5].map((at) => Number.parseInt(hex.slice(at, at + 2), 16))
  const d = [0, 8, 16].flatMap((left) => [0, 8].flatMap((top) => marks.map(([x, y]) => `M${left + x} ${top + y}h1v1h-1z`))).join('')
  return (
    <svg className="swatch" width={22} height={12} viewBox="0 0 22 12" style={{ background: hex }} aria-hidden>
      <path d={d} fill={`rgb(${classMarkColour(r, g, b).join(' ')})`} />
    </svg>
  )
}

interface ClassKey {
  readonly value: number
  readonly words: string
  readonly share: string
}
/** Classes of a layer with their words; causes that the need on show has, with their share of it, or all while that is not known. */
export function classesOf(layer: LayerId, losses: MapPaneProps['losses']): ClassKey[] {
  if (layer === 'usable') return MAP_WORDS.usableClasses.map((words, n) => ({ value: n + 1, words, share: '' }))
  if (losses) return losses.map((l) => ({ value: lossCode(l.cause), words: LOSS_WORDS[l.cause], share: textOf(formatLossPct(l.pct)) }))
  return LOSS_CAUSES.map((cause) => ({ value: lossCode(cause), words: LOSS_WORDS[cause], share: '' }))
}

/** The hatch of a state, drawn as the painter draws it. */
function Swatch({ kind }: { kind: 'masked' | 'marginal' | 'unknown' }) {
  return <i className={`swatch ${kind}`} aria-hidden />
}
