import { type LayerId, layerInfo, rampHex } from '../../../core/index.ts'
import { LAYER_WORDS, legendMarks, legendStops, type UnitSystem } from '../../words/index.ts'
import type { MapPaneProps } from '../types.ts'

const WIDTH = 232
/** Labels nearer than this to the one before are left out, px. */
const APART = 26

/** Title, ramp with labelled stops, what bare and hatched mean, and marks in words. */
export function Legend({
  layer,
  units,
  night,
  marks,
}: {
  layer: LayerId
  units: UnitSystem
  night: boolean
  marks: MapPaneProps['marks']
}) {
  const { ramp, hatchMasked } = layerInfo(layer)
  const words = LAYER_WORDS[layer]
  const { unit, labels } = legendStops(layer, ramp.stops, units)
  const { note, warned } = legendMarks(layer, marks)
  const colours = Array.from({ length: 33 }, (_, n) => rampHex(ramp, ramp.low + ((ramp.high - ramp.low) * n) / 32, night))
  const kept: { at: number; text: string }[] = []
  for (const l of labels) if (kept.length === 0 || (l.at - kept[kept.length - 1]!.at) * WIDTH >= APART) kept.push(l)
  return (
    <section className="map-card legend" aria-label={`Legend: ${words.title}`}>
      <h3>
        {words.title} <span className="ink-3">{unit ? `${unit} ${words.of}` : words.of}</span>
      </h3>
      {layer === 'masked' ? (
        <ul className="swatches">
          <li>
            <Swatch kind="masked" /> masked
          </li>
          <li>
            <Swatch kind="marginal" /> marginal
          </li>
          <li>
            <Swatch kind="unknown" /> unknown
          </li>
        </ul>
      ) : (
        <>
          <div className="ramp" style={{ background: `linear-gradient(to right, ${colours.join(', ')})` }} />
          <div className="stops" aria-hidden>
            {kept.map((l) => (
              <span key={l.at} style={{ left: `${l.at * 100}%` }} className={l.at < 0.02 ? 'first' : l.at > 0.98 ? 'last' : ''}>
                {l.text}
              </span>
            ))}
          </div>
          {words.ends ? (
            <div className="ends ink-3">
              <span>{words.ends[0]}</span>
              <span>{words.ends[1]}</span>
            </div>
          ) : null}
        </>
      )}
      {layer === 'masked' ? null : (
        <p className="note">
          {hatchMasked ? <Swatch kind="masked" /> : null}
          <span>{note}</span>
        </p>
      )}
      {warned.map((m) => (
        <p key={m} className="mark">
          {m}
        </p>
      ))}
    </section>
  )
}

/** The hatch of a state, drawn as the painter draws it. */
function Swatch({ kind }: { kind: 'masked' | 'marginal' | 'unknown' }) {
  return <i className={`swatch ${kind}`} aria-hidden />
}
