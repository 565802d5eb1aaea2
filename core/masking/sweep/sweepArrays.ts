import type { PolarShape } from '../../polar/index.ts'
import { HORIZON_NUMBERS, horizonOf } from '../horizon.ts'
import type { SightCells, SiteCells } from '../types.ts'
import type { SweepHelpers } from './sweepCrew.ts'

/** What a sweep is asked for beside ground, site and earth. */
export interface SweepOptions {
  readonly keys?: { readonly site?: string; readonly masks?: readonly string[] }
  /** false leaves heightToSeeM empty (length 0), to be made by `heightToSeeCells` when it is asked for: it takes about as long as one height. */
  readonly heightToSee?: boolean
  /** true leaves all arrays of the site cells empty. */
  readonly sightOnly?: boolean
  /** Threads that take a share; used where they can read the ground. */
  readonly helpers?: SweepHelpers | null
}
/** Plain result arrays of a sweep: any thread may fill any azimuths. */
export interface SweepArrays {
  readonly grid: PolarShape
  /** Azimuths handed out so far: helpers take the next ones from here. */
  readonly taken: Int32Array
  /** Azimuths finished so far; helpers that failed. */
  readonly finished: Int32Array
  readonly groundM: Float32Array
  readonly code: Uint8Array
  readonly relief: Uint8Array
  readonly slopePermille: Int16Array
  readonly heightToSeeM: Float32Array
  readonly effectiveRadiusM: Float64Array
  readonly masks: readonly SightArrays[]
}
export interface SightArrays {
  readonly heightM: number
  readonly state: Uint8Array
  readonly inSight: Uint16Array
  readonly floorM: Float32Array
  readonly floorBandM: Float32Array
  /** Per azimuth: elevation (deg), range, height (m), longitude, latitude of the horizon. */
  readonly horizon: Float64Array
  /** What the horizon is: an index into Ground.obstacles, or one of HORIZON_IS. */
  readonly horizonIs: Int32Array
}
/** Makes the arrays; `shared` puts them on shared memory, for helpers. */
export function makeSweepArrays(grid: PolarShape, heightsM: readonly number[], options: SweepOptions, shared = false): SweepArrays {
  const room = (bytes: number): ArrayBufferLike => (shared ? new SharedArrayBuffer(bytes) : new ArrayBuffer(bytes))
  const { azimuths, ranges } = grid
  const cells = azimuths * ranges
  const site = options.sightOnly ? 0 : cells
  return {
    grid,
    taken: new Int32Array(room(4)),
    finished: new Int32Array(room(8)),
    groundM: new Float32Array(room(4 * site)),
    code: new Uint8Array(room(site)),
    relief: new Uint8Array(room(site)),
    slopePermille: new Int16Array(room(2 * site)),
    heightToSeeM: new Float32Array(room(options.heightToSee === false ? 0 : 4 * site)),
    effectiveRadiusM: new Float64Array(room(8 * azimuths)),
    masks: heightsM.map((heightM) => ({
      heightM,
      state: new Uint8Array(room(cells)),
      inSight: new Uint16Array(room(2 * cells)),
      floorM: new Float32Array(room(4 * cells)),
      floorBandM: new Float32Array(room(4 * cells)),
      horizon: new Float64Array(room(8 * HORIZON_NUMBERS * azimuths)),
      horizonIs: new Int32Array(room(4 * azimuths)),
    })),
  }
}

/** The finished arrays as a sweep's result. */
export function sweepResult(
  a: SweepArrays,
  siteGroundM: number,
  obstacles: readonly { readonly name: string }[],
  options: SweepOptions,
): { site: SiteCells; masks: SightCells[] } {
  const { grid, groundM, code, relief, slopePermille, heightToSeeM, effectiveRadiusM } = a
  return {
    site: {
      kind: 'site',
      version: 1,
      key: options.keys?.site ?? '',
      grid,
      groundM,
      code,
      relief,
      slopePermille,
      heightToSeeM,
      siteGroundM,
      effectiveRadiusM,
    },
    masks: a.masks.map(({ heightM, state, inSight, floorM, floorBandM, horizon, horizonIs }, h) => ({
      kind: 'sight',
      version: 1,
      key: options.keys?.masks?.[h] ?? '',
      grid,
      heightM,
      state,
      inSight,
      floorM,
      floorBandM,
      horizon: Array.from(horizonIs, (is, i) => horizonOf(i * grid.azimuthStepDeg, horizon, HORIZON_NUMBERS * i, is, obstacles)),
    })),
  }
}
