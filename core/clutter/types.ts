import type { Held } from '../polar/index.ts'

/** Per option: clutter-to-noise before STC. */
export interface ClutterCells extends Held {
  readonly kind: 'clutter'
  readonly heightM: number
  readonly tiltDeg: number
  /** Main beam + side-lobe term per cell, dB; NaN = undefined (both nil). */
  readonly cnrDb: Float32Array
  /** Side-lobe term, one number per range gate, dB; NaN = nil. */
  readonly sideLobeCnrDb: Float32Array
  /** What the numbers rest on; goes to legend, ledger and memo. */
  readonly notes: readonly ModelNote[]
}
/** Words beside a value, never colours alone. */
export type ModelMark = 'default' | 'outside model' | 'by hand' | 'from memory'
/** A mark and what it is about. */
export interface ModelNote {
  readonly mark: ModelMark
  readonly about: string
  /** Share of the ground in sight it holds for, 0…1, where it does not hold for all. */
  readonly share?: number
}
