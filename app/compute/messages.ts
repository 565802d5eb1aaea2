import type { Ask, Tell } from '../../core/index.ts'

/** One ask as it crosses to the worker. */
export interface Envelope<K extends keyof Ask = keyof Ask> {
  readonly id: number
  readonly kind: K
  readonly body: Ask[K]
}
/** Where a tell goes, with the arrays it hands over. */
export type Post = (tell: Tell, transfer?: Transferable[]) => void

/** Lower goes first. The page waits on paint and probe; a ladder can wait. */
export const RANK: Readonly<Record<keyof Ask, number>> = {
  ground: 0,
  study: 0,
  paint: 1,
  base: 1,
  probe: 2,
  groundAt: 2,
  profile: 2,
  ledger: 2,
  preview: 3,
  vertical: 4,
  horizons: 4,
  map: 4,
  roads: 4,
  ladder: 6,
  change: 6,
}
/** Work for the option on show goes between the asks and the ladder. */
export const BACKGROUND_RANK = 5
/** Of these only the newest counts: an older one still waiting is answered with null. */
export const SUPERSEDING: ReadonlySet<keyof Ask> = new Set([
  'paint',
  'base',
  'preview',
  'probe',
  'vertical',
  'horizons',
  'roads',
  'ladder',
  'change',
])
/** A new ground or study makes these worthless. */
export const STALE_AFTER_STUDY: ReadonlySet<keyof Ask> = new Set(['ladder', 'change', 'map', 'vertical', 'horizons', 'roads'])
