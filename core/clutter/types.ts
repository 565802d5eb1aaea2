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
  /** What is left of it after suppression: Σ Cⱼ/Iⱼ over noise, dB; NaN where cnrDb is NaN. The same array as cnrDb where nothing is suppressed. */
  readonly residueDb: Float32Array
  /** Side-lobe part of the residue per range gate, dB; NaN = nil. */
  readonly sideLobeResidueDb: Float32Array
  /** What the numbers rest on; goes to legend, ledger and memo. */
  readonly notes: readonly ModelNote[]
}
/** Improvement factor by kind of clutter, dB: what suppression takes off each before they are added up. */
export interface ImprovementDb {
  /** Land, one value per ground code of the ground. */
  readonly byCode: readonly number[]
  readonly sea: number
  readonly rain: number
  readonly discrete: number
  /** Second-time-around clutter. */
  readonly folded: number
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
