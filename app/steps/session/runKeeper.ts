import type { StudyDoc } from '../../../core/index.ts'
import type { StudyClient } from '../../compute/client.ts'
import {
  forgetResults,
  type GroundStore,
  keepOptions,
  type ResultsStore,
  runnable,
  type StudyStore,
  settleOption,
  studyOptions,
  type ViewStore,
} from '../../document/index.ts'
import type { NoticeStore } from './notices.ts'
import { sentenceOf } from './notices.ts'

/** The need that layers are drawn for: the chosen one, or the first, among those of an area. Fixes and tracks have no layers. */
export function areaNeedOf(doc: StudyDoc, chosen: string | null): string | null {
  const areas = (doc.needs ?? []).filter((n) => n.kind === 'layer' || n.kind === 'polygon')
  return (areas.find((n) => n.id === chosen) ?? areas[0])?.id ?? null
}

/**
 * Sends the whole study to the worker on every change of it or of what is shown; the worker finds out what is missing. Keeps the option on
 * show one that the study has, and the ground heights of the candidates up to date.
 */
export function keepRunning(
  study: StudyStore,
  view: ViewStore,
  ground: GroundStore,
  results: ResultsStore,
  client: StudyClient,
  notices: NoticeStore,
) {
  let sent = ''
  let sentDoc: unknown = null
  const send = (force = false) => {
    const { doc } = study.getState()
    const { option, layer, need: chosen, hold } = view.getState()
    const need = areaNeedOf(doc, chosen)
    const ready = ground.getState().state === 'ready'
    const run = runnable(doc)
    if (!ready || !run) return
    const show = JSON.stringify([option, layer, need, hold, ground.getState().ground?.serial])
    if (!force && show === sent && doc === sentDoc) return
    sent = show
    sentDoc = doc
    const have = [...results.getState().byOption.values()].map((r) => r.serial)
    client
      .ask('study', { doc: run, show: { option, layer, ...(need === null ? {} : { need }) }, hold, have })
      .catch((error) => notices.getState().say(sentenceOf(error), 'bad'))
  }
  let asked = ''
  const askGround = async () => {
    const { candidates } = study.getState().doc
    const serial = ground.getState().ground?.serial
    if (serial === undefined) return
    const key = JSON.stringify([serial, candidates.map((c) => [c.id, c.lon, c.lat])])
    if (key === asked) return
    asked = key
    const heights = await client.ask('groundAt', { at: candidates.map(({ lon, lat }) => ({ lon, lat })) }).catch(() => null)
    if (heights && key === asked) ground.setState({ candidateM: new Map(candidates.map((c, i) => [c.id, heights[i] ?? null])) })
  }
  const settle = () => {
    const { doc } = study.getState()
    const { option, need, set } = view.getState()
    const settled = settleOption(doc, option)
    if (settled !== option) set({ option: settled })
    const needs = doc.needs ?? []
    const wished = needs.some((n) => n.id === need) ? need : areaNeedOf(doc, need)
    if (wished !== need) set({ need: wished })
    keepOptions(results, studyOptions(doc))
  }
  study.subscribe(() => {
    settle()
    send()
    void askGround()
  })
  view.subscribe(() => send())
  // figures of a ground that is no longer there do not hold: they go with it
  ground.subscribe((now, before) => {
    const gone = now.state === 'failed' || now.state === 'none'
    if (gone && now.state !== before.state) forgetResults(results)
  })
  settle()
  return {
    /** A new ground: everything is asked anew. */
    onGround() {
      send(true)
      void askGround()
    },
    /** Runs what a hold or a stop has kept back. */
    run() {
      view.getState().set({ hold: false })
      send(true)
    },
    /** Drops the running work at once; nothing runs until `run`. */
    stop() {
      view.getState().set({ hold: true })
      results.setState({ status: null })
    },
  }
}
