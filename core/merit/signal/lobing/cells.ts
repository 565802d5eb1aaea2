import type { SightCells } from '../../../masking/index.ts'
import {
  bendRay,
  fillReflectingRay,
  makeReflectingRay,
  type RayCells,
  REFLECTS,
  type ReflectingRay,
  reflectionsAt,
  reflectionTo,
} from '../../../propagation/index.ts'
import type { LevelRow } from '../levelRow.ts'
import { segmentIndex, type TargetSignal } from '../targetSignal.ts'
import { factorDb, type LobeModel } from './model.ts'

/** Level surfaces of one mast height by number from 1 on: kind (of REFLECTS) and height, m MSL. */
interface Surfaces {
  readonly kind: number[]
  readonly heightM: number[]
  readonly number: Map<number, number>
}
/** Most surfaces that are told apart; more of them are not counted. */
const MOST_SURFACES = 65_535
function surfaceNumber(s: Surfaces, kind: number, heightM: number): number {
  const key = heightM * 4 + kind * 1e7
  let n = s.number.get(key)
  if (n === undefined) {
    n = s.kind.length
    if (n > MOST_SURFACES) return 0
    s.number.set(key, n)
    s.kind.push(kind)
    s.heightM.push(heightM)
  }
  return n
}

/** What one mast height's rays come off, by level of a need: the same for every tilt. Of the mask used last only. */
interface Reflections {
  readonly surfaces: Surfaces
  readonly numbers: Map<string, Uint16Array>
}
const kept = new WeakMap<object, Reflections>()
let recent: WeakRef<object> | null = null
function reflectionsOf(mask: object): Reflections {
  let found = kept.get(mask)
  if (!found) {
    const before = recent?.deref()
    if (before) kept.delete(before)
    recent = new WeakRef(mask)
    found = { surfaces: { kind: [REFLECTS.none], heightM: [0], number: new Map() }, numbers: new Map() }
    kept.set(mask, found)
  }
  return found
}

/** Levels of a need whose rays are looked for, with what has been found. */
interface LobeLevel {
  readonly levelM: number
  /** Number of the surface by cell of the grid, 0 none; `known`: worked out for another tilt. */
  readonly numbers: Uint16Array
  readonly known: boolean
  readonly rows: readonly LobeRow[]
}
/** One row of a level and the curvature it is worked out for, with losses by surface, range cell and height of the target. */
interface LobeRow {
  readonly row: LevelRow
  readonly c: number
  readonly keys: Int32Array
  readonly heightM: Float32Array
  readonly db: Float32Array
}
const MEMO = 1 << 16
/** Most levels whose surfaces are kept for the next tilt: one grid of two bytes a cell each. */
const MOST_KEPT = 16

/** The lobes of one option toward the targets of one need. */
export interface LobeGrid {
  readonly model: LobeModel
  readonly surfaces: Surfaces
  readonly ray: ReflectingRay
  readonly signal: TargetSignal
  readonly antennaM: number
  /** 1 / effective earth radius at the study's own k: for which surface it is. */
  readonly c: number
  readonly levels: readonly LobeLevel[]
}
/**
 * `needKey` tells needs with other ranges or sectors apart. Each level has a row at the study's own curvature `c` (1 / effective radius) and may have
 * more at others, which come off the same surfaces.
 */
export function lobeGrid(
  model: LobeModel,
  mask: SightCells,
  signal: TargetSignal,
  antennaM: number,
  c: number,
  needKey: string,
  levels: readonly { readonly levelM: number; readonly rows: readonly Pick<LobeRow, 'row' | 'c'>[] }[],
): LobeGrid {
  const { grid } = mask
  const { surfaces, numbers } = reflectionsOf(mask)
  const known = new Map(numbers)
  if (numbers.size >= MOST_KEPT) numbers.clear()
  return {
    model,
    surfaces,
    ray: makeReflectingRay(grid.ranges, grid.rangeStepM),
    signal,
    antennaM,
    c,
    levels: levels.map(({ levelM, rows }) => {
      const key = `${needKey}|${levelM}|${model.tideM}`
      const own = known.get(key)
      const found = own ?? new Uint16Array(mask.state.length)
      numbers.set(key, found)
      return { levelM, numbers: found, known: own !== undefined, rows: rows.map(lobeRow) }
    }),
  }
}
const lobeRow = (of: Pick<LobeRow, 'row' | 'c'>): LobeRow => ({
  ...of,
  keys: new Int32Array(MEMO).fill(-1),
  heightM: new Float32Array(MEMO),
  db: new Float32Array(MEMO),
})

/**
 * Fills `lobeDb` of cells first … last−1 of every level's row: loss of direct and reflected ray together, two ways, dB >= 0 (F never over 1), 0
 * where no ray comes off water or level open ground. Targets as in `fillLevelRow`.
 */
export function fillLobes(g: LobeGrid, cells: RayCells, first: number, last: number, aboveGround: boolean, from: number): void {
  const { ray, model, antennaM, levels } = g
  const { groundM } = cells
  if (levels.some((l) => !l.known)) {
    fillReflectingRay(ray, model.codes, cells, from, ray.kind.length, ray.stepM / 2, antennaM, model.tideM)
    bendRay(ray, g.c)
  }
  for (const level of levels) {
    if (!level.known) findSurfaces(g, level, groundM, first, last, aboveGround, from)
    for (const row of level.rows) fillLosses(g, level, row, groundM, first, last, aboveGround, from)
  }
}

function findSurfaces(
  { ray, surfaces }: LobeGrid,
  { levelM, numbers }: LobeLevel,
  groundM: Float32Array,
  first: number,
  last: number,
  aboveGround: boolean,
  from: number,
): void {
  if (!ray.any) return
  if (!aboveGround) {
    reflectionsAt(ray, levelM, first, last, (start, end, kind, heightM) => {
      numbers.fill(surfaceNumber(surfaces, kind, heightM), from + start, from + end)
    })
    return
  }
  let topM = Number.NEGATIVE_INFINITY
  for (let j = first; j < last; j++) if (groundM[from + j] + levelM > topM) topM = groundM[from + j] + levelM
  let start = 0
  for (let j = first; j < last; j++) {
    const rangeM = ray.firstM + j * ray.stepM
    const targetM = groundM[from + j] + levelM
    start = reflectionTo(ray, j, rangeM, topM, start)
    if (targetM < topM) reflectionTo(ray, j, rangeM, targetM, start)
    if (ray.atKind !== REFLECTS.none) numbers[from + j] = surfaceNumber(surfaces, ray.atKind, ray.atHeightM)
  }
}

function fillLosses(
  { model, surfaces, signal, antennaM, ray }: LobeGrid,
  { levelM, numbers }: LobeLevel,
  { row, c, keys, heightM, db }: LobeRow,
  groundM: Float32Array,
  first: number,
  last: number,
  aboveGround: boolean,
  from: number,
): void {
  const { lobeDb, slantM, gainDb } = row
  let s = 0
  for (let j = first; j < last; j++) {
    const n = numbers[from + j]
    if (n === 0) {
      lobeDb[j] = 0
      continue
    }
    const targetM = aboveGround ? groundM[from + j] + levelM : levelM
    const target32 = Math.fround(targetM)
    const key = n * 32_768 + j
    const slot = (n * 1021 + j) & (MEMO - 1)
    if (keys[slot] === key && heightM[slot] === target32) {
      lobeDb[j] = db[slot]
      continue
    }
    s = segmentIndex(signal, slantM[j], s)
    const rangeM = (j + 0.5) * ray.stepM
    const f = factorDb(model, signal, signal.segments[s], gainDb[j], antennaM, targetM, surfaces.heightM[n], surfaces.kind[n], rangeM, c)
    lobeDb[j] = f < 0 ? -f : 0
    keys[slot] = key
    heightM[slot] = target32
    db[slot] = lobeDb[j]
  }
}
