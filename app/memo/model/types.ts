import type { LayerId, OptionRef, OptionResult, Ramp, SettledStudy, StudyDoc, VerticalCut, View } from '../../../core/index.ts'
import type { Drawing } from '../../charts/index.ts'
import type { UnitSystem } from '../../words/index.ts'

export interface MemoFile {
  readonly name: string
  /** Hex digest of the file's bytes; null where it was not taken. */
  readonly sha256: string | null
  /** What it is: size, CRS, posting, datum, unit, error. */
  readonly describe: string
}
/** One painted picture of an option: opaque ground and layer, day colours, north up. */
export interface MemoMap {
  readonly ref: OptionRef
  readonly layer: LayerId
  readonly view: View
  readonly ramp: Ramp
  /** PNG as `data:image/png;base64,…`. */
  readonly png: string
  /** Range-height plane of the azimuth that `cutOf` names; absent or null where the study states no need. */
  readonly cut?: VerticalCut | null
}
export interface MemoInput {
  readonly study: SettledStudy
  readonly doc: StudyDoc
  readonly results: readonly OptionResult[]
  readonly files: readonly MemoFile[]
  readonly maps: readonly MemoMap[]
  readonly system: UnitSystem
  /** ISO date of the memo; passed in, the model knows no clock. */
  readonly date: string
  /** Version of the program. */
  readonly version: string
  /** Remarks of the study's own checks, listed with the data. */
  readonly warnings?: readonly string[]
}

/** A table cell: plain words, or a number with its unit in lighter ink, its mark, and the key of the figure behind it. */
export interface Value {
  readonly text: string
  readonly unit?: string
  /** The metric value beside a nautical one, printed in brackets. */
  readonly also?: string
  /** A mark's word: default, from memory, outside model, by hand. */
  readonly mark?: string
  /** Key of the figure (`Figures.flat`), for the app's explanation. */
  readonly explain?: string
  readonly light?: boolean
  /** Columns the cell takes; the cells it covers are left out of the row. */
  readonly span?: number
}
export type Cell = string | Value
export interface Column {
  readonly head: string
  /** In lighter ink under or after the head. */
  readonly unit?: string
  readonly align?: 'left' | 'right'
  /** Head over this and the neighbouring columns of the same group. */
  readonly group?: string
  /** Never broken over lines. */
  readonly keep?: boolean
  /** Points, `auto` (as wide as its words, default) or `fill`. */
  readonly width?: number | 'auto' | 'fill'
}
export interface TableBlock {
  readonly kind: 'table'
  readonly id: string
  readonly title?: string
  /** Many rows of numbers, set close. */
  readonly dense?: boolean
  /** Empty heads on all columns: no header row is printed. */
  readonly columns: readonly Column[]
  readonly rows: readonly (readonly Cell[])[]
}
export interface FigureBlock {
  readonly kind: 'figure'
  readonly id: string
  readonly number: number
  /** The finding, one sentence. */
  readonly caption: string
  readonly drawing: Drawing
  /** Picture under the drawing, of the same size; on the page this is the map itself. */
  readonly png?: string
}
export type Block =
  | { readonly kind: 'paragraph'; readonly text: string; readonly role?: 'lead' | 'small' }
  | { readonly kind: 'heading'; readonly text: string; readonly option?: OptionRef }
  | { readonly kind: 'list'; readonly items: readonly string[]; readonly role?: 'small' }
  | { readonly kind: 'caution'; readonly texts: readonly string[] }
  | TableBlock
  | FigureBlock
  | { readonly kind: 'beside'; readonly leftPt: number; readonly left: readonly Block[]; readonly right: readonly Block[] }
export interface Section {
  readonly id: string
  readonly number: number
  readonly title: string
  readonly blocks: readonly Block[]
  /** Set on the section of one option. */
  readonly option?: OptionRef
  /** The option's own finding, set on the section of one option. */
  readonly finding?: string
  readonly newPage?: boolean
}
export interface MemoModel {
  readonly title: string
  readonly draft: string
  /** Lines under the title: what, when, with which version. */
  readonly meta: readonly (readonly [label: string, text: string])[]
  readonly date: string
  readonly version: string
  /** Printed small on every page. */
  readonly footer: string
  readonly sections: readonly Section[]
}
/** Width of the text column, points: A4 less its margins; Letter is set to the same measure. */
export const TEXT_WIDTH_PT = 483
/** The two text sizes of the memo, points: running text, and everything beside it (tables, captions, charts). */
export const BODY_PT = 10
export const SMALL_PT = 8.5
