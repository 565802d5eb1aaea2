import { useEffect, useRef } from 'react'
import { geodesicInverse, type LonLat, type OptionRef, type PaneId, type Probe } from '../../../core/index.ts'
import type { StudyClient } from '../../compute/client.ts'
import {
  againstWords,
  formatHeight,
  formatPosition,
  MAP_WORDS,
  optionWords,
  placeLine,
  textOf,
  type UnitSystem,
  valueLine,
} from '../../words/index.ts'
import type { MapHub, PointerPlace } from '../types.ts'

/** Pointer read-out. Written to the page by the pointer itself, never by render. */
export function ReadOut({
  client,
  hub,
  site,
  units,
  hint,
  option,
  against,
  pane,
}: {
  client: StudyClient
  hub: MapHub
  site: LonLat | null
  units: UnitSystem
  hint: string
  /** The option read, where it is not simply the one on show; and one to read beside it. */
  option?: OptionRef | null
  against?: OptionRef | null
  pane?: PaneId
}) {
  const place = useRef<HTMLSpanElement>(null)
  const value = useRef<HTMLSpanElement>(null)
  useEffect(() => {
    let asking = false
    let latest: LonLat | null = null
    let known: Probe | null = null
    let gone = false
    const write = (first: string, name = '', number = '', word = '') => {
      if (place.current) place.current.textContent = first
      if (!value.current) return
      value.current.replaceChildren(...lineOf(name, number, word))
    }
    const reply = (probe: Probe | null, at: LonLat) => {
      if (gone || !probe || !latest) return
      known = probe
      const line = valueLine(probe, units)
      write(
        placeLine(probe.azimuthDeg, probe.rangeM, probe.groundM, units),
        line.name,
        line.value.value === '' ? '' : textOf(line.value),
        [line.word, against ? againstWords(probe, optionWords(against, false), units) : ''].filter(Boolean).join(' · '),
      )
      if (at !== latest) ask()
    }
    const ask = () => {
      const at = latest
      if (asking || !at) return
      asking = true
      client
        .ask('probe', { at, ...(pane && option ? { option, pane } : {}), ...(against ? { difference: against } : {}) })
        .then((probe) => {
          asking = false
          reply(probe, at)
          if (!gone && !probe && at !== latest) ask()
        })
        .catch(() => {
          // the shell reports failures of the worker; the read-out keeps to what it knows
          asking = false
        })
    }
    const follow = (p: PointerPlace | null) => {
      latest = p?.at ?? null
      if (!p) {
        known = null
        write(hint)
        return
      }
      if (!p.at) {
        write(placeLine(p.azimuthDeg, p.rangeM, undefined, units), '', '', MAP_WORDS.pointing[p.from])
        return
      }
      if (!known && site) {
        const to = geodesicInverse(site, p.at)
        write(placeLine(to.azimuthDeg, to.distanceM, undefined, units))
      }
      ask()
    }
    // a candidate in the hand: where it would stand
    const writeTrial = () => {
      const trial = hub.trial.get()
      if (!trial) return write(hint)
      if (trial.moving !== 'place') return
      latest = null
      known = null
      const groundM = hub.trialAnswer.get()?.siteGroundM
      const ground = groundM === undefined ? '' : groundM === null ? MAP_WORDS.noGroundHere : textOf(formatHeight(groundM, units))
      write(formatPosition(trial), groundM === null ? '' : MAP_WORDS.ground, ground)
    }
    const stops = [
      hub.pointer.listen(follow),
      hub.trial.listen(writeTrial),
      hub.trialAnswer.listen(writeTrial),
      // new results under a pointer that rests
      client.listen((tell) => tell.kind === 'dirty' && ask()),
    ]
    follow(hub.pointer.get())
    return () => {
      gone = true
      for (const end of stops) end()
    }
  }, [client, hub, site, units, hint, option, against, pane])
  return (
    <div className="map-card readout">
      <span ref={place} className="place" />
      <span ref={value} className="value" />
    </div>
  )
}

function lineOf(name: string, number: string, word: string): Node[] {
  const piece = (text: string, className: string) => {
    const span = document.createElement('span')
    span.className = className
    span.textContent = text
    return span
  }
  const out: Node[] = []
  if (name) out.push(piece(`${name} `, 'name'))
  if (number) out.push(piece(`${number} `, 'number'))
  if (word) out.push(piece(word, 'word'))
  return out
}
export const readOutHint = MAP_WORDS.pointHint
