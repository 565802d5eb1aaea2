import { createStore } from 'zustand/vanilla'
import type { OptionRef, OptionResult, Tell } from '../../core/index.ts'

export type Failure = Extract<Tell, { kind: 'failure' }>['error']
export interface RunStatus {
  readonly done: number
  readonly total: number
  readonly secondsLeft: number | null
  readonly doing: string
}
export interface ResultsState {
  /** By `optionKey`. */
  readonly byOption: ReadonlyMap<string, OptionResult>
  /** null when nothing runs. */
  readonly status: RunStatus | null
  readonly warnings: readonly string[]
  readonly failure: Failure | null
  /** Grows with every `figures`; charts and memo redraw on it. */
  readonly serial: number
  /** When the last run ended, ms since 1970. */
  readonly ranAt: number | null
}
export type WorkerTell = Exclude<Tell, { kind: 'reply' }>

/** One key per option: candidate, mast height, tilt. */
export const optionKey = (o: OptionRef): string => `${o.candidate}|${o.heightM}|${o.tiltDeg}`

const nothing: ResultsState = {
  byOption: new Map(),
  status: null,
  warnings: [],
  failure: null,
  serial: 0,
  ranAt: null,
}
/** What the study worker has answered so far; never saved, never undone. */
export const createResultsStore = () => createStore<ResultsState>()(() => nothing)
export type ResultsStore = ReturnType<typeof createResultsStore>

/** Takes one message of the study worker into the store. `now` is the clock of the page, ms. */
export function takeTell(store: ResultsStore, tell: WorkerTell, now: number): void {
  const state = store.getState()
  if (tell.kind === 'figures') {
    const fresh = new Map(tell.results.map((r) => [r.serial, r]))
    const had = new Map([...state.byOption.values()].map((r) => [r.serial, r]))
    const byOption = new Map(tell.holds.flatMap((serial) => fresh.get(serial) ?? had.get(serial) ?? []).map((r) => [optionKey(r.ref), r]))
    store.setState({ byOption, serial: state.serial + 1, failure: null })
  } else if (tell.kind === 'status') {
    const over = tell.done >= tell.total
    store.setState({ status: over ? null : tell, ...(over && state.status ? { ranAt: now } : {}) })
  } else if (tell.kind === 'warnings') store.setState({ warnings: tell.warnings })
  else if (tell.kind === 'failure') store.setState({ failure: tell.error, status: null })
}

/** Drops results of options the study no longer has. */
export function keepOptions(store: ResultsStore, options: readonly OptionRef[]): void {
  const { byOption, serial } = store.getState()
  const wanted = new Set(options.map(optionKey))
  const kept = [...byOption].filter(([key]) => wanted.has(key))
  if (kept.length !== byOption.size) store.setState({ byOption: new Map(kept), serial: serial + 1 })
}

/** Another study or another ground: nothing shown so far holds. */
export const forgetResults = (store: ResultsStore): void => store.setState({ ...nothing, serial: store.getState().serial + 1 })
