import type { ConeFigure } from '../needs/needTypes.ts'

/** What of the plane over one azimuth is asked for. */
export interface CutWindow {
  readonly azimuthDeg: number
  /** Near and far end, ground range, m; near 0 for the whole. */
  readonly fromRangeM: number
  readonly toRangeM: number
  /** Lowest and highest row, m MSL; null = from the lowest ground, up to what the need and the screening ask for. */
  readonly fromHeightM: number | null
  readonly toHeightM: number | null
  readonly columns: number
  readonly rows: number
}
/** A line of the elevation pattern from the antenna: beam peak, half power below and above it, upper end of the pattern. */
export interface BeamRay {
  readonly is: 'peak' | 'lower' | 'upper' | 'end'
  /** Transmitting beam; '' for the antenna's own. */
  readonly beam: string
  readonly elevationDeg: number
  /** Height of the line at each column, m MSL. */
  readonly heightM: Float64Array
}
/** What a target would be to one option anywhere in the plane over one azimuth. Values by column, then row: index column · rows + row. */
export interface VerticalCut {
  readonly azimuthDeg: number
  readonly needId: string
  readonly needName: string
  readonly rcsM2: number
  readonly swerling: number
  /** Pd the need asks for. */
  readonly pd: number
  readonly antennaM: number
  readonly effectiveRadiusM: number
  /** Ground range of each column and height of each row (m MSL), rising. */
  readonly rangeM: Float64Array
  readonly heightM: Float64Array
  /**
   * S/(C/I+N) over the required ratio, dB; NaN where the receiver does not listen, in the ground, on unknown ground and where even the diffracted
   * echo is far too weak. Under the coverage floor it is the diffracted level, which nothing else counts.
   */
  readonly marginDb: Float32Array
  /** S/N of one pulse after short-range sensitivity, dB; NaN where the margin is. */
  readonly snrDb: Float32Array
  /** Probability of detection in sight; 0 where hidden or not heard; NaN on unknown ground. */
  readonly pdAt: Float32Array
  /** Why the target is not usable there, a code of LOSS_CAUSES; 0 where usable and inside the ground. */
  readonly cause: Uint8Array
  /** By column: ground, surface, coverage floor and its error band, m MSL; NaN where unknown. */
  readonly groundM: Float64Array
  readonly surfaceM: Float64Array
  readonly floorM: Float64Array
  readonly floorBandM: Float64Array
  /** Controlling obstacle of each column and its range, m; NaN where unknown. */
  readonly obstacle: readonly string[]
  readonly obstacleM: Float64Array
  /** Margins at which Pd is 0.5, 0.8, 0.9 and what the need asks for, dB, rising. */
  readonly contours: readonly { readonly pd: number; readonly marginDb: number; readonly ofNeed: boolean }[]
  readonly rays: readonly BeamRay[]
  /** Levels of the need at each column, m MSL; NaN outside the ranges of the need. */
  readonly levels: readonly { readonly levelM: number; readonly aboveSea: boolean; readonly heightM: Float64Array }[]
  readonly cones: readonly ConeFigure[]
  /** Short-range sensitivity reaches to this slant range, m; null where there is none. */
  readonly stcToM: number | null
  readonly stcMaxDb: number
  /** Slant ranges between which the receiver listens at all, m. */
  readonly nearestM: number
  readonly instrumentedM: number
}
