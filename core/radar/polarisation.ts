import type { RadarInput } from './types.ts'

/** What circular polarisation takes off echoes, dB >= 0. */
export interface CircularInput {
  /** Off rain clutter. */
  readonly rainLossDb: number
  /** Off targets. */
  readonly targetLossDb: number
}
/** Common practice; a radar may state its own. */
export const CIRCULAR_DEFAULTS: CircularInput = { rainLossDb: 15, targetLossDb: 3 }

/** What circular polarisation takes off with this radar; used where its polarisation is circular. */
export const circularOf = (r: Pick<RadarInput, 'circular'>): CircularInput => r.circular ?? CIRCULAR_DEFAULTS

/** What the radar's polarisation takes off a target, dB: 0 unless it is circular. */
export const targetPolarisationLossDb = (r: Pick<RadarInput, 'polarisation' | 'circular'>): number =>
  r.polarisation === 'circular' ? circularOf(r).targetLossDb : 0
