import { useId, useRef } from 'react'
import type { LadderGeometry } from '../../charts/index.ts'
import { formatMast, MAP_WORDS, textOf } from '../../words/index.ts'
import { labelPlaces } from './rulerGeometry.ts'

const LINE_PX = 14

export interface RulerScaleProps {
  readonly width: number
  readonly height: number
  readonly axisX: number
  readonly topPad: number
  readonly stripPx: number
  readonly geometry: LadderGeometry
  /** Outlines of the two strips: what is seen, what comes back. */
  readonly strips: readonly [string, string]
  /** Words at the full width of each strip; '' where there is none. */
  readonly ends: readonly [string, string]
  readonly stated: readonly number[]
  readonly heightM: number
  readonly topM: number
  /** What stands at the line of a need, within a width, px. */
  readonly needWords: (needId: string, widthPx: number) => string
  /** Stands at the mast: `24 m, B`. */
  readonly label: string
  readonly describedBy: string
  /** A height under the held pointer, m. */
  readonly onTry: (heightM: number) => void
  readonly onLetGo: () => void
  readonly onCancel: () => void
  readonly onKeyDown: (e: React.KeyboardEvent) => void
}

/** Scale, strips, lines of the needs and the mast itself. */
export function RulerScale(p: RulerScaleProps) {
  const { geometry: g, axisX, topPad, stripPx, width } = p
  const clip = useId()
  const held = useRef(false)
  const y = (m: number) => topPad + g.mast.at(m)
  const mastY = y(p.heightM)
  const footY = y(0)
  const first = axisX + 7
  const second = first + stripPx + 6
  const right = width - 4
  // the mast's own label stands above its line, below it at the very top
  const mastLabelY = mastY - 6 < topPad + 8 ? mastY + 15 : mastY - 6
  const met = labelPlaces(
    g.met.map((m) => topPad + m.y - 4),
    [mastLabelY],
    LINE_PX,
    topPad + 8,
    footY - 4,
  )
  const heightAt = (e: React.PointerEvent<SVGSVGElement>) => g.mast.invert(e.clientY - e.currentTarget.getBoundingClientRect().top - topPad)
  return (
    <svg
      className="ruler-scale"
      width={width}
      height={p.height}
      aria-hidden={width === 0}
      onPointerDown={(e) => {
        if (e.button !== 0) return
        held.current = true
        e.currentTarget.setPointerCapture(e.pointerId)
        e.currentTarget.querySelector<SVGElement>('.mast')?.focus()
        p.onTry(heightAt(e))
      }}
      onPointerMove={(e) => held.current && p.onTry(heightAt(e))}
      onPointerUp={() => {
        if (held.current) p.onLetGo()
        held.current = false
      }}
      onPointerCancel={() => {
        if (held.current) p.onCancel()
        held.current = false
      }}
    >
      <title>{MAP_WORDS.mastOf}</title>
      <defs>
        <clipPath id={`${clip}-up`}>
          <rect x={0} y={0} width={width} height={Math.max(0, mastY)} />
        </clipPath>
        <clipPath id={`${clip}-down`}>
          <rect x={0} y={mastY} width={width} height={Math.max(0, p.height - mastY)} />
        </clipPath>
      </defs>
      {(['up', 'down'] as const).map((part) => (
        <g key={part} className={`strips ${part}`} clipPath={`url(#${clip}-${part})`}>
          <path className="in-sight" d={p.strips[0]} transform={`translate(${first} ${topPad})`} />
          <path className="clutter" d={p.strips[1]} transform={`translate(${second} ${topPad})`} />
        </g>
      ))}
      <g className="axis">
        <path d={`M${axisX} ${topPad}V${footY}`} />
        {g.ticks.map((t) => (
          <g key={t.at}>
            <path d={`M${axisX - 5} ${y(t.at)}H${axisX}`} />
            <text x={axisX - 8} y={y(t.at) + 4} textAnchor="end">
              {t.label}
            </text>
          </g>
        ))}
        {p.stated.map((s) => (
          <path key={s} className="stated" d={`M${axisX - 6} ${y(s)}H${axisX + 3}`}>
            <title>{textOf(formatMast(s))}</title>
          </path>
        ))}
        <path className="foot" d={`M${axisX - 5} ${footY}H${right}`} />
      </g>
      {p.strips[0] ? (
        <g className="full" aria-hidden>
          <path d={`M${first + stripPx} ${topPad}V${footY}`} />
          <text x={first + stripPx} y={topPad - 2} textAnchor="end">
            {p.ends[0]}
          </text>
          {p.ends[1] ? (
            <>
              <path d={`M${second + stripPx} ${topPad}V${footY}`} />
              <text x={Math.min(second + stripPx, right)} y={footY + 12} textAnchor="end">
                {p.ends[1]}
              </text>
            </>
          ) : null}
        </g>
      ) : null}
      {g.intervals.map((need, n) =>
        need.stretches.map(([top, bottom]) => (
          <path key={`${need.needId} ${top}`} className="stretch-met" d={`M${right - 1 - 4 * n} ${topPad + top}V${topPad + bottom}`}>
            <title>{MAP_WORDS.needMet(need.name)}</title>
          </path>
        )),
      )}
      {g.met.map((m, n) => (
        <g key={m.needId} className="met">
          <path d={`M${axisX} ${topPad + m.y}H${right}`} />
          <text x={first + 2} y={met[n]}>
            {p.needWords(m.needId, right - first - 2)}
            <title>{MAP_WORDS.needMet(m.name)}</title>
          </text>
        </g>
      ))}
      <g
        className="mast"
        role="slider"
        tabIndex={0}
        aria-label={MAP_WORDS.mastOf}
        aria-describedby={p.describedBy}
        aria-orientation="vertical"
        aria-valuemin={0}
        aria-valuemax={p.topM}
        aria-valuenow={p.heightM}
        aria-valuetext={textOf(formatMast(p.heightM))}
        onKeyDown={p.onKeyDown}
      >
        <path className="line" d={`M${axisX} ${mastY}H${right}`} />
        <circle cx={axisX} cy={mastY} r={10} className="focus-ring" />
        <circle cx={axisX} cy={mastY} r={6.5} className="grip" />
        <text x={first + 2} y={mastLabelY}>
          {p.label}
        </text>
      </g>
    </svg>
  )
}
