import { createJSONStorage, persist } from 'zustand/middleware'
import { createStore } from 'zustand/vanilla'
import type { LayerId, LonLat, OptionRef } from '../../core/index.ts'
import type { UnitSystem } from '../words/index.ts'

export const STEPS = ['ground', 'radar', 'need', 'candidates', 'compare', 'memo'] as const
export type StepId = (typeof STEPS)[number]
export type Theme = 'paper' | 'night'
/** What stands over the lower half of the map. */
export type OpenChart = 'profile' | 'vertical' | 'rings' | 'suppression' | 'ledger' | 'figure' | null

/** What is asked over the whole page. */
export type OpenDialog =
  | 'templates'
  | 'pulses'
  | 'candidates'
  | 'obstacles'
  | 'fixes'
  | 'north'
  | 'keys'
  | 'commands'
  | 'studies'
  | 'confirmations'
  | 'models'
  | null

/** What is looked at: kept over a reload, never undone, never saved with the study. */
export interface ViewState {
  readonly step: StepId
  /** The step's form is shown; only narrow windows fold it. */
  readonly formOpen: boolean
  /** The memo column is shown where it is a drawer. */
  readonly memoOpen: boolean
  /** The option on show; null while there is no candidate. */
  readonly option: OptionRef | null
  readonly layer: LayerId
  /** A second option to show the layer against, and how: its difference, or a map of its own beside. */
  readonly against: OptionRef | null
  readonly beside: 'difference' | 'maps'
  /** Need the layer is about, where it is about one. */
  readonly need: string | null
  readonly units: UnitSystem
  /** What azimuths at the face are counted from; magnetic holds only where the study states a declination. */
  readonly north: 'true' | 'magnetic'
  readonly theme: Theme
  /** Cell whose ledger is asked for. */
  readonly cell: LonLat | null
  readonly chart: OpenChart
  /** Key of the figure that is explained, as in the summary. */
  readonly figure: string | null
  /** Azimuth of the terrain profile and of the range-height diagram. */
  readonly profileAzimuthDeg: number | null
  /** The next click on the map places a candidate. */
  readonly placing: boolean
  readonly dialog: OpenDialog
  /** What the dialog is about: id of a need, or a kind of need. */
  readonly dialogFor: string | null
  /** Edits wait for "Run" instead of running by themselves. */
  readonly hold: boolean
  set(part: Partial<Omit<ViewState, 'set'>>): void
}

const KEY = 'sightfell.view'

/** The view store. `storage` is the page's local storage; without one nothing is kept. */
export function createViewStore(storage?: Storage, prefersDark = false) {
  return createStore<ViewState>()(
    persist(
      (set) => ({
        step: 'ground',
        formOpen: true,
        memoOpen: false,
        option: null,
        layer: 'clutter-to-noise',
        against: null,
        beside: 'difference',
        need: null,
        units: 'nautical',
        north: 'true',
        theme: prefersDark ? 'night' : 'paper',
        cell: null,
        chart: null,
        figure: null,
        profileAzimuthDeg: null,
        placing: false,
        dialog: null,
        dialogFor: null,
        hold: false,
        set: (part) => set(part),
      }),
      {
        name: KEY,
        version: 1,
        storage: storage ? createJSONStorage(() => storage) : undefined,
        partialize: ({ set: _set, placing: _placing, dialog: _dialog, dialogFor: _dialogFor, ...kept }) => kept,
      },
    ),
  )
}
export type ViewStore = ReturnType<typeof createViewStore>
