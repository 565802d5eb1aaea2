import { useId, useLayoutEffect, useMemo, useRef, useState } from 'react'
import { Button } from 'react-aria-components'
import { type Ladder, ladderHeightsM } from '../../core/index.ts'
import { ladderGeometry, textWidth } from '../charts/index.ts'
import { formatAngle, formatAreaUp, formatHeight, formatMast, formatMetPct, MAP_WORDS, NO_VALUE, textOf } from '../words/index.ts'
import { RulerScale } from './ruler/RulerScale.tsx'
import { BETWEEN_STEP_M, nextStated, nextStep, signedPct, snapped } from './ruler/rulerGeometry.ts'
import { useLadder } from './ruler/useLadder.ts'
import type { RulerProps } from './types.ts'
import { useChannel } from './useChannel.ts'
import './ruler.css'

const AXIS_X = 30
const TOP_PAD = 12
const FOOT_PAD = 22

/** The mast is a ruler: a scale in metres with the ground at its foot, the height ladder running up it, and the mast to drag. */
export function Ruler(props: RulerProps) {
  const { client, hub, candidate, option, groundM, units } = props
  const box = useRef<HTMLDivElement>(null)
  const [size, setSize] = useState({ width: 0, height: 0 })
  const trial = useChannel(hub.trial)
  const { ladder, working } = useLadder(client, groundM === null ? null : (candidate?.id ?? null), props.basis)
  const helpId = useId()
  // biome-ignore lint/correctness/useExhaustiveDependencies: the box is there only with a candidate
  useLayoutEffect(() => {
    const host = box.current
    if (!host) return
    const measure = () => setSize({ width: host.clientWidth, height: host.clientHeight })
    measure()
    const watch = new ResizeObserver(measure)
    watch.observe(host)
    return () => watch.disconnect()
  }, [candidate === null])

  const stated = useMemo(() => [...new Set(candidate?.mastHeightsM ?? [])].sort((a, b) => a - b), [candidate])
  const heights = useMemo(() => ladderHeightsM(stated), [stated])
  const topM = heights[heights.length - 1] ?? 40
  const lengthPx = Math.max(40, size.height - TOP_PAD - FOOT_PAD)
  const stripPx = Math.max(12, Math.min(34, (size.width - AXIS_X - 20) / 2))
  const geometry = useMemo(() => ladderGeometry({ ladder, topM, lengthPx, stripPx, linePx: 15 }), [ladder, topM, lengthPx, stripPx])

  if (!candidate || !option)
    return (
      <div className="ruler">
        <p className="ruler-title">{MAP_WORDS.mast}</p>
        <p className="ink-3">{MAP_WORDS.noMast}</p>
      </div>
    )

  const mine = trial && trial.candidate === candidate.id && trial.moving === 'mast' ? trial : null
  const heightM = mine?.heightM ?? option.heightM
  const isStated = stated.includes(heightM)
  // the option's own figures are there before the ladder is
  const now = (heightM === option.heightM ? props.own : null) ?? geometry.valuesAt(heightM)
  // usable and short of suppression are shares of needs: without one the strips show the ground itself
  const asked = ladder ? ladder.needMet.length > 0 : props.asked
  const gains = nextStep(ladder, heightM)
  const most = ladder ? Math.max(0, ...(asked ? ladder.shortKm2 : ladder.over40Km2)) : 0
  const seen = asked ? 'usable' : 'inSight'
  const echo = asked ? 'short' : 'clutter'
  const place = { lon: candidate.lon, lat: candidate.lat }
  const tryHeight = (h: number, resting: boolean) => {
    if (resting && stated.includes(h)) {
      if (h !== option.heightM) props.onHeight(h)
      hub.trial.set(null)
    } else if (resting || h !== heightM) hub.trial.set({ candidate: candidate.id, ...place, heightM: h, moving: 'mast', resting })
  }
  const putBack = () => hub.trial.set(null)
  const add = () => {
    props.onAddHeight(heightM)
    hub.trial.set(null)
  }
  const onKeyDown = (e: React.KeyboardEvent) => {
    const up = e.key === 'ArrowUp' || e.key === 'ArrowRight'
    const down = e.key === 'ArrowDown' || e.key === 'ArrowLeft'
    const clamp = (h: number) => Math.min(topM, Math.max(BETWEEN_STEP_M, h))
    if (up || down) tryHeight(e.shiftKey ? clamp(heightM + (up ? 1 : -1) * BETWEEN_STEP_M) : nextStated(heightM, stated, up ? 1 : -1), true)
    else if (e.key === 'PageUp' || e.key === 'PageDown') tryHeight(clamp(heightM + (e.key === 'PageUp' ? 5 : -5)), true)
    else if (e.key === 'Home') tryHeight(stated[0] ?? heightM, true)
    else if (e.key === 'End') tryHeight(stated[stated.length - 1] ?? heightM, true)
    else if (e.key === 'Enter' && mine) add()
    else if (e.key === 'Escape' && mine) putBack()
    else return
    e.preventDefault()
    e.stopPropagation()
  }
  return (
    <div className="ruler">
      <p className="ruler-title">{MAP_WORDS.mast}</p>
      <dl className="ruler-now">
        <div className="in-sight">
          <dt title={MAP_WORDS.stripHints[seen]}>{MAP_WORDS.strips[seen]}</dt>
          <dd>{now ? textOf(formatMetPct(asked ? now.usablePct : now.inSightPct)) : NO_VALUE}</dd>
        </div>
        <div className="clutter">
          <dt title={MAP_WORDS.stripHints[echo]}>{MAP_WORDS.strips[echo]}</dt>
          <dd>{now ? textOf(formatAreaUp(asked ? now.shortKm2 : now.over40Km2, units)) : NO_VALUE}</dd>
        </div>
      </dl>
      <div ref={box} className="ruler-box">
        <RulerScale
          width={size.width}
          height={size.height}
          axisX={AXIS_X}
          topPad={TOP_PAD}
          stripPx={stripPx}
          geometry={geometry}
          strips={asked ? [geometry.usable, geometry.short] : [geometry.inSight, geometry.clutter]}
          ends={[MAP_WORDS.stripFull, most > 0 ? textOf(formatAreaUp(most, units)) : '']}
          stated={stated}
          heightM={heightM}
          topM={topM}
          label={`${textOf(formatMast(heightM))}, ${candidate.id}`}
          onTry={(h) => tryHeight(snapped(h, stated, lengthPx / topM, topM), false)}
          onLetGo={() => mine && tryHeight(mine.heightM, true)}
          onCancel={putBack}
          onKeyDown={onKeyDown}
          needWords={(id, px) => needWords(ladder, id, px)}
          describedBy={helpId}
        />
      </div>
      <div className="ruler-foot">
        {mine?.resting && !isStated ? (
          <>
            <Button className="button small" onPress={add}>
              {MAP_WORDS.addHeight(textOf(formatMast(heightM)))}
            </Button>
            <Button className="button quiet small" onPress={putBack}>
              {MAP_WORDS.putBack}
            </Button>
          </>
        ) : (
          <>
            <span className="ink-2">
              {MAP_WORDS.ground} {groundM === null ? MAP_WORDS.noGroundHere : textOf(formatHeight(groundM, units))}
            </span>
            <span className="ink-3">{MAP_WORDS.dragMast}</span>
          </>
        )}
        {working ? <span className="ink-3">{MAP_WORDS.ladderWorking}</span> : null}
        {gains ? (
          <p className="gains" title={MAP_WORDS.gainsHint(asked)}>
            {MAP_WORDS.gains(textOf(formatMast(gains.toM)))}{' '}
            {gains.octants.length === 0
              ? MAP_WORDS.noGain
              : gains.octants.map((g) => `${g.name}\u00a0${signedPct(g.pct)}`).join('\u00a0· ')}
          </p>
        ) : null}
        {candidate.tiltsDeg.length > 1 ? (
          <fieldset className="ruler-tilts" aria-label={MAP_WORDS.tiltOf}>
            <span className="ink-2">{MAP_WORDS.tilt}</span>
            {[...candidate.tiltsDeg]
              .sort((a, b) => a - b)
              .map((t) => (
                <Button
                  key={t}
                  className={t === option.tiltDeg ? 'tick on' : 'tick'}
                  aria-pressed={t === option.tiltDeg}
                  onPress={() => props.onTilt(t)}
                >
                  {textOf(formatAngle(t, 0.1))}
                </Button>
              ))}
          </fieldset>
        ) : null}
        {geometry.notMet.map((n) => (
          <span key={n.needId} className="not-met" title={n.name}>
            {MAP_WORDS.needNotMet(MAP_WORDS.needNumber(numberOf(ladder, n.needId)), textOf(formatMast(topM)))}
          </span>
        ))}
      </div>
      <span id={helpId} className="visually-hidden">
        {MAP_WORDS.mastKeys}
      </span>
    </div>
  )
}

/** Needs are known by their place in the study where their names find no room. */
const numberOf = (ladder: Ladder | null, needId: string): number => 1 + (ladder?.needMetAtM.findIndex((n) => n.needId === needId) ?? 0)
function needWords(ladder: Ladder | null, needId: string, widthPx: number): string {
  const name = ladder?.needMetAtM.find((n) => n.needId === needId)?.name ?? needId
  const whole = MAP_WORDS.needMet(name)
  return textWidth(whole, 12) <= widthPx ? whole : MAP_WORDS.needMet(MAP_WORDS.needNumber(numberOf(ladder, needId)))
}
