import { createStore } from 'zustand/vanilla'
import type { Answer, Obstacle, Road } from '../../core/index.ts'

export interface Reading {
  readonly doing: string
  readonly done: number
  readonly total: number
}
/** The ground as the page knows it: never the raster itself. */
export interface GroundState {
  readonly state: 'none' | 'reading' | 'ready' | 'failed'
  readonly reading: Reading | null
  /** Why it failed, one sentence. */
  readonly trouble: string
  /** What the study worker said of the ground it holds. */
  readonly ground: NonNullable<Answer['ground']> | null
  /** Posts of the ground; a very large file is read in a window around the candidates. */
  readonly posts: number
  /** What was read, a line per file. */
  readonly notes: readonly string[]
  readonly obstacles: readonly Obstacle[]
  readonly roads: readonly Road[]
  /** Ground under each candidate by id, m MSL; null off the terrain or over a void. */
  readonly candidateM: ReadonlyMap<string, number | null>
  /** Files the study names that are not here. */
  readonly missing: readonly string[]
}
export const NO_GROUND: GroundState = {
  state: 'none',
  reading: null,
  trouble: '',
  ground: null,
  posts: 0,
  notes: [],
  obstacles: [],
  roads: [],
  candidateM: new Map(),
  missing: [],
}
export const createGroundStore = () => createStore<GroundState>()(() => NO_GROUND)
export type GroundStore = ReturnType<typeof createGroundStore>
