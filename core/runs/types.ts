import type { LandTable, ModelMark } from '../clutter/index.ts'
import type { LonLat } from '../geodesy/index.ts'
import type { GroundCode } from '../landcover/index.ts'
import type { Change, CutWindow, Figures, Ladder, NeedPlaces, RoadLines, VerticalCut } from '../merit/index.ts'
import type { Obstacle, Road } from '../obstacles/index.ts'
import type { ClassPattern, Ramp, View } from '../paint/index.ts'
import type { GridShape } from '../raster/index.ts'
import type { StudyDoc } from '../study/index.ts'
import type { Survey } from '../terrain/index.ts'

export interface OptionRef {
  readonly candidate: string
  readonly heightM: number
  readonly tiltDeg: number
}
/** ground -> site, mask -> clutter -> need; a change of tilt leaves mask untouched, a change of need leaves clutter untouched. */
export interface Keys {
  readonly site: string
  readonly mask: string
  /** Cover at the smaller k. */
  readonly lowK: string
  readonly clutter: string
  /** Clutter from beyond the unambiguous range. */
  readonly folded: string
  readonly needs: string
}
export interface OptionResult {
  readonly ref: OptionRef
  readonly keys: Keys
  readonly figures: Figures
  /** A number of its own for each result of an engine: the same number, the same result. */
  readonly serial: number
}

/** The map's quantities. Families: what comes back, what is seen, what is hidden, what it takes. */
export const LAYER_IDS = [
  'masked',
  'coverage-floor',
  'height-to-see',
  'depression',
  'clutter-strength',
  'clutter-to-noise',
  'second-time-around',
  'suppression-needed',
  'usable',
  'probability-of-detection',
  'signal-margin',
  'cause-of-loss',
] as const
export type LayerId = (typeof LAYER_IDS)[number]
export interface LayerInfo {
  readonly id: LayerId
  readonly family: 'echo' | 'seen' | 'hidden' | 'takes' | 'lost'
  readonly unit: 'dB' | 'm' | 'deg' | ''
  /** Values are classes with a colour each, not a quantity. */
  readonly classes?: boolean
  /** Pattern of each class, beside its colour. */
  readonly patterns?: readonly ClassPattern[]
  /** Which way the value is rounded at the face. */
  readonly safe: 'up' | 'down'
  readonly ramp: Ramp
  /** States (hatch) drawn over the values. */
  readonly hatchMasked: boolean
}

/** One line of a cell ledger; adding the start/add/subtract lines of a result gives the result. */
export interface LedgerLine {
  readonly key: string
  readonly label: string
  readonly value: number | string | null
  readonly unit: string
  readonly op: 'start' | 'add' | 'subtract' | 'info'
  readonly model: string
  readonly source: string
  readonly mark: ModelMark | ''
  /** Which result this line belongs to; '' for context lines. */
  readonly of?: string
}
export interface CellLedger {
  readonly at: LonLat & { readonly azimuthDeg: number; readonly rangeM: number }
  readonly option: OptionRef
  readonly lines: readonly LedgerLine[]
  readonly results: Readonly<Record<string, number | null>>
}
/** Terrain profile along one azimuth for one option. Arrays of equal length. */
export interface Profile {
  readonly azimuthDeg: number
  readonly option: OptionRef
  readonly antennaM: number
  readonly effectiveRadiusM: number
  readonly distM: Float64Array
  readonly groundM: Float64Array
  readonly surfaceM: Float64Array
  readonly floorM: Float64Array
  readonly floorBandM: Float64Array
  /** 1 in sight, 0 masked, 2 unknown. */
  readonly inSight: Uint8Array
  /** Straight ray to a target, by default to the coverage floor at the far end; null where nothing is known. */
  readonly ray: ProfileRay | null
}
/** A straight ray over the effective earth with its first Fresnel zone; arrays by sample of the profile, NaN beyond the target. */
export interface ProfileRay {
  readonly toRangeM: number
  readonly toHeightM: number
  /** m MSL. */
  readonly heightM: Float64Array
  /** Radius of the first Fresnel zone, m. */
  readonly fresnelM: Float64Array
}
/** A horizon beside the study's own, by azimuth. */
export interface HorizonLine {
  /** Effective-earth factor. */
  readonly k: number
  /** With cover and obstacles, or of the bare ground. */
  readonly cover: boolean
  readonly azimuthsDeg: readonly number[]
  readonly elevationDeg: Float64Array
}
export interface Probe {
  readonly lon: number
  readonly lat: number
  readonly azimuthDeg: number | null
  readonly rangeM: number | null
  readonly groundM: number | null
  readonly layer: LayerId
  readonly value: number | null
  /** A word where there is no number: 'masked', 'unknown: beyond a void', 'unknown: edge of terrain', 'out of range', 'below noise', 'too weak', 'none needed'. */
  readonly word: string | null
  /** The same place for a second option, and its value less; only where one was asked for. */
  readonly against?: Probe | null
  readonly difference?: number | null
}

/** Which of two maps side by side asks; a newer ask replaces older ones of its own map. */
export type PaneId = 'second'
/** page -> study worker; every ask has an id; `paint`, `base` and `preview` supersede their like. */
export interface Ask {
  ground: {
    shape: GridShape
    heightM: Float32Array
    code: Uint8Array | null
    codes: readonly GroundCode[]
    obstacles: readonly Obstacle[]
    roads?: readonly Road[]
    surveys?: readonly Survey[]
    verticalErrorM: number
    /** The study's own low-angle land table; null or absent for the built-in one. */
    landTable?: LandTable | null
    /** What the files of needs hold. */
    needPlaces?: readonly NeedPlaces[]
  }
  /** Replaces the last one whole: this is also the cancel. */
  study: {
    doc: StudyDoc
    show: { option: OptionRef | null; layer: LayerId; need?: string }
    hold: boolean
    /** Serials of the results the asker has: they are not told again. */
    have: readonly number[]
  }
  /** `still`: the hand rests, a finer picture is wanted. */
  preview: { candidate: string; lon: number; lat: number; heightM: number; still: boolean }
  /** `difference`: the layer of `option` less that of this one. */
  paint: { view: View; layer: LayerId; option: OptionRef | 'preview'; opacity?: number; difference?: OptionRef; pane?: PaneId }
  base: { view: View; pane?: PaneId }
  /** Ground and one layer as one opaque picture, for the memo. */
  map: { view: View; layer: LayerId; option: OptionRef }
  /** Of the option on show, or of another; `difference`: and of a second one beside it. */
  probe: { at: LonLat; option?: OptionRef; difference?: OptionRef; pane?: PaneId }
  /** `target` is where the ray goes, m and m MSL; absent: the floor at the far end. */
  profile: { azimuthDeg: number; option: OptionRef; target?: { rangeM: number; heightM: number } }
  /** The plane over one azimuth for the target of a need; null: the first need of the study. */
  vertical: { option: OptionRef; need: string | null; window: CutWindow }
  /** Horizons of the bare ground and at the smaller k, for the strip. */
  horizons: { option: OptionRef }
  ledger: { at: LonLat; option: OptionRef }
  /** Roads within range, those whose vehicles are seen apart from the others. */
  roads: { option: OptionRef }
  ladder: { candidate: string }
  /** From one option to another, or to itself without some obstacles (by name): what changes. */
  change: { before: OptionRef; after: OptionRef; without?: readonly string[] }
  groundAt: { at: readonly LonLat[] }
}
export interface Answer {
  ground: { serial: number; minM: number; maxM: number; voidPct: number; corners: readonly LonLat[] }
  study: null
  /** bearing: is the candidate on known ground? */
  preview: { siteGroundM: number | null; horizon: readonly { azimuthDeg: number; elevationDeg: number }[]; groundInSightPct: number | null }
  /** null when the newest result is not there yet: ask again on `dirty`. Pixels are premultiplied RGBA in an ImageBitmap on the page's side. */
  paint: { bitmap: unknown; view: View } | null
  base: { bitmap: unknown; view: View } | null
  /** RGBA, width × height × 4. */
  map: { rgba: Uint8ClampedArray; view: View }
  probe: Probe | null
  profile: Profile
  /** null where the study states no need. */
  vertical: VerticalCut | null
  horizons: readonly HorizonLine[]
  ledger: CellLedger
  /** null where the option's cells are not held. */
  roads: RoadLines | null
  ladder: Ladder
  change: Change
  groundAt: readonly (number | null)[]
}
export type Tell =
  | { readonly kind: 'status'; readonly done: number; readonly total: number; readonly secondsLeft: number | null; readonly doing: string }
  /** Results not told before, and the serials of all that hold: any other the page still has no longer does. */
  | { readonly kind: 'figures'; readonly results: readonly OptionResult[]; readonly holds: readonly number[] }
  | { readonly kind: 'dirty' }
  | { readonly kind: 'warnings'; readonly warnings: readonly string[] }
  | { readonly kind: 'reply'; readonly id: number; readonly body: unknown }
  | {
      readonly kind: 'failure'
      readonly id: number | null
      readonly error: {
        readonly code: string
        readonly message: string
        readonly place?: string
        readonly remedy?: string
        readonly stack?: string
      }
    }
