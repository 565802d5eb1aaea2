import { createStore } from 'zustand/vanilla'
import type { RadarDoc } from '../../core/index.ts'
import type { Shelf } from './autosave.ts'

export interface OwnRadars {
  /** The user's own radars on this machine, by name. */
  readonly radars: readonly RadarDoc[]
  /** Keeps a radar under its name; the one kept under that name before is replaced. */
  keep(radar: RadarDoc): Promise<void>
  forget(name: string): Promise<void>
}

const KEY = 'radar:'
const nameOf = (radar: RadarDoc): string => radar.name?.trim() || 'Unnamed radar'

/** Radars that the user keeps for other studies, beside the autosaved study. */
export function createOwnRadars(shelf: Shelf) {
  const store = createStore<OwnRadars>()((set, get) => ({
    radars: [],
    async keep(radar) {
      const name = nameOf(radar)
      await shelf.set(KEY + name, { ...radar, name })
      set({ radars: sorted([...get().radars.filter((r) => nameOf(r) !== name), { ...radar, name }]) })
    },
    async forget(name) {
      await shelf.del(KEY + name)
      set({ radars: get().radars.filter((r) => nameOf(r) !== name) })
    },
  }))
  const load = async () => {
    const names = (await shelf.keys()).filter((k) => k.startsWith(KEY))
    const found = await Promise.all(names.map((k) => shelf.get(k)))
    store.setState({ radars: sorted(found.filter((r): r is RadarDoc => typeof r === 'object' && r !== null)) })
  }
  return { store, load }
}
const sorted = (radars: RadarDoc[]): RadarDoc[] => radars.sort((a, b) => nameOf(a).localeCompare(nameOf(b)))
export type OwnRadarStore = ReturnType<typeof createOwnRadars>['store']
