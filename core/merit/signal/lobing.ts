import type { Weather } from '../../atmosphere/index.ts'
import { decibel, elevationTangent } from '../../clutter/index.ts'
import { type Earth, effectiveRadiusM } from '../../geodesy/index.ts'
import { type SightCells, type SightPoint, sweepRays } from '../../masking/index.ts'
import {
  bendRay,
  fillReflectingRay,
  leastGrazingRad,
  makeReflectingRay,
  OPEN_GROUND_ROUGHNESS_M,
  pointOnSurface,
  type RayCells,
  REFLECTS,
  type ReflectingCodes,
  type ReflectingRay,
  type ReflectionTable,
  type ReflectionTables,
  reflectingCodes,
  reflectionsAt,
  reflectionTable,
  reflectionTo,
  tangentToPoint,
  twoRayPower,
  waterRoughnessM,
} from '../../propagation/index.ts'
import type { RadarInput } from '../../radar/index.ts'
import type { Ground, Site } from '../../terrain/index.ts'
import { RAD_PER_DEG, wavelengthM } from '../../units/index.ts'
import { ratioOfDb } from './decibelTables.ts'
import type { LevelRow } from './levelRow.ts'
import { gainAt, type SignalSegment, segmentIndex, type TargetSignal } from './targetSignal.ts'

/** What level ground and water do to an echo, as loops over places need it. */
export interface LobeModel {
  readonly codes: ReflectingCodes
  readonly tables: ReflectionTables
  readonly wavelengthM: number
  readonly tideM: number
}
/** null where nothing in the ground reflects: lobing then costs nothing. */
export function lobeModel(ground: Pick<Ground, 'codes'>, radar: RadarInput, weather: Weather): LobeModel | null {
  const codes = reflectingCodes(ground.codes)
  if (!codes) return null
  const { frequencyHz, polarisation } = radar
  return {
    codes,
    tables: tablesOf(frequencyHz, polarisation, weather.seaState),
    wavelengthM: wavelengthM(frequencyHz),
    tideM: weather.tideM,
  }
}
const held = new Map<string, ReflectionTables>()
function tablesOf(frequencyHz: number, polarisation: RadarInput['polarisation'], seaState: number): ReflectionTables {
  const key = `${frequencyHz}|${polarisation}|${seaState}`
  let tables = held.get(key)
  if (!tables) {
    if (held.size > 8) held.clear()
    tables = [
      null,
      reflectionTable('open', frequencyHz, polarisation, OPEN_GROUND_ROUGHNESS_M),
      reflectionTable('water', frequencyHz, polarisation, waterRoughnessM(seaState)),
    ]
    held.set(key, tables)
  }
  return tables
}

/** Field of the antenna toward the reflection point over that toward the target: both ways together, so the fourth root of the two-way powers. */
const patternRatio = (pointDb: number, targetDb: number): number => Math.sqrt(Math.sqrt(ratioOfDb(pointDb - targetDb)))

/** Two-way F⁴ off a surface (m MSL, kind of REFLECTS), dB, positive where the rays add; 0 where a horizon lies between. */
function factorDb(
  m: LobeModel,
  t: TargetSignal,
  s: SignalSegment,
  gainDb: number,
  antennaM: number,
  targetM: number,
  surfaceM: number,
  kind: number,
  rangeM: number,
  c: number,
): number {
  const p = pointOnSurface(antennaM, targetM, surfaceM, rangeM, c)
  if (!p) return 0
  const ratio = patternRatio(gainAt(t, s, tangentToPoint(p, antennaM, surfaceM, c)), gainDb)
  return 2 * decibel(twoRayPower(p, m.tables[kind] as ReflectionTable, m.wavelengthM, ratio))
}

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

/** What one mast height's rays come off, by level of a need and curvature: the same for every tilt. Of the mask used last only. */
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
export interface LobeLevel {
  readonly row: LevelRow
  readonly levelM: number
  readonly c: number
  /** Number of the surface by cell of the grid, 0 none; `known`: worked out for another tilt. */
  readonly numbers: Uint16Array
  readonly known: boolean
  // losses worked out already, by surface, range cell and height of the target
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
  readonly levels: readonly LobeLevel[]
}
/** `needKey` tells needs with other levels, ranges or sectors apart. */
export function lobeGrid(
  model: LobeModel,
  mask: SightCells,
  signal: TargetSignal,
  antennaM: number,
  needKey: string,
  levels: readonly Pick<LobeLevel, 'row' | 'levelM' | 'c'>[],
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
    levels: levels.map((level) => {
      const key = `${needKey}|${level.levelM}|${level.c}|${model.tideM}`
      const own = known.get(key)
      const found = own ?? new Uint16Array(mask.state.length)
      numbers.set(key, found)
      return {
        ...level,
        numbers: found,
        known: own !== undefined,
        keys: new Int32Array(MEMO).fill(-1),
        heightM: new Float32Array(MEMO),
        db: new Float32Array(MEMO),
      }
    }),
  }
}

/**
 * Fills `lobeDb` of cells first … last−1 of every level's row: loss of direct and reflected ray together, two ways, dB >= 0 (F never over 1), 0
 * where no ray comes off water or level open ground. Targets as in `fillLevelRow`.
 */
export function fillLobes(g: LobeGrid, cells: RayCells, first: number, last: number, aboveGround: boolean, from: number): void {
  const { ray, model, antennaM, levels } = g
  const { groundM } = cells
  if (levels.some((l) => !l.known)) fillReflectingRay(ray, model.codes, cells, from, ray.kind.length, ray.stepM / 2, antennaM, model.tideM)
  for (const level of levels) {
    if (!level.known) findSurfaces(g, level, groundM, first, last, aboveGround, from)
    fillLosses(g, level, groundM, first, last, aboveGround, from)
  }
}

function findSurfaces(
  { ray, surfaces }: LobeGrid,
  { levelM, c, numbers }: LobeLevel,
  groundM: Float32Array,
  first: number,
  last: number,
  aboveGround: boolean,
  from: number,
): void {
  if (!ray.any) return
  if (ray.c !== c || ray.ready === 0) bendRay(ray, c)
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
  { row, levelM, c, numbers, keys, heightM, db }: LobeLevel,
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

const AZIMUTHS = 36
/** Mean effective earth radius over the azimuths of a latitude, m: rays off water are then the same in every direction, as in the cells of a need. */
function meanRadiusM(earth: Earth, latDeg: number): number {
  let sum = 0
  for (let n = 0; n < AZIMUTHS; n++) sum += effectiveRadiusM(earth, latDeg, (n * 360) / AZIMUTHS)
  return sum / AZIMUTHS
}

/** A place whose lobing is asked for. */
export interface LobePlace {
  readonly ground: Ground
  readonly place: Site
  readonly heightM: number
  readonly antennaM: number
  /** Earth for which the antenna sees the reflecting ground, and that of the rays toward the target. */
  readonly earth: Earth
  readonly raysEarth: Earth
  readonly rangeStepM: number
}
const rays = new WeakMap<SightPoint, { readonly model: LobeModel; readonly ray: ReflectingRay; readonly cell: number }>()
/** The ray of one place, of cells as deep as those of the polar grid and centred on the place. */
function rayTo(m: LobeModel, p: LobePlace, sight: SightPoint): { ray: ReflectingRay; cell: number } {
  const known = rays.get(sight)
  if (known && known.model.tideM === m.tideM) return known
  const cells = Math.max(1, Math.ceil(sight.rangeM / p.rangeStepM - 1e-6))
  const firstM = sight.rangeM - (cells - 1) * p.rangeStepM
  const own = firstM > 0 ? cells : cells - 1
  const ray = makeReflectingRay(cells, p.rangeStepM)
  if (own > 1) {
    const nearM = sight.rangeM - (own - 1) * p.rangeStepM
    const centres = Array.from({ length: own }, (_, k) => nearM + k * p.rangeStepM)
    const swept: RayCells = sweepRays(p.ground, p.place, p.heightM, p.earth, [sight.azimuthDeg], centres, p.rangeStepM)
    fillReflectingRay(ray, m.codes, swept, 0, own, nearM, p.antennaM, m.tideM)
    bendRay(ray, 1 / meanRadiusM(p.raysEarth, p.place.lat))
  }
  const found = { model: m, ray, cell: own - 1 }
  rays.set(sight, found)
  return found
}

/** Lobing toward one place. */
export interface Lobe {
  /** Two-way F⁴, dB; positive where the rays add. */
  readonly factorDb: number
  readonly surface: 'open' | 'water'
  /** Where the ray comes off, ground range and height, m. */
  readonly rangeM: number
  readonly heightM: number
  /** Grazing angle under which the two-ray sum is outside its range? */
  readonly grazingDeg: number
  readonly outside: boolean
}
/** Two rays toward a target (m MSL) at a place that stands clear of its mask; null where none comes off water or level open ground. */
export function lobeAt(m: LobeModel, p: LobePlace, t: TargetSignal, sight: SightPoint, targetM: number, slantM: number): Lobe | null {
  const { ray, cell } = rayTo(m, p, sight)
  if (!ray.any || cell < 1) return null
  reflectionTo(ray, cell, sight.rangeM, targetM, 0)
  if (ray.atKind === REFLECTS.none) return null
  const { atHeightM, atKind, c } = ray
  const point = pointOnSurface(p.antennaM, targetM, atHeightM, sight.rangeM, c)
  if (!point) return null
  const segment = t.segments[segmentIndex(t, slantM, 0)]
  const gainDb = gainAt(t, segment, elevationTangent(p.antennaM, targetM, sight.rangeM, c))
  return {
    factorDb: factorDb(m, t, segment, gainDb, p.antennaM, targetM, atHeightM, atKind, sight.rangeM, c),
    surface: atKind === REFLECTS.water ? 'water' : 'open',
    rangeM: point.distanceM,
    heightM: atHeightM,
    grazingDeg: point.grazingDeg,
    outside: c > 0 && point.grazingDeg * RAD_PER_DEG < leastGrazingRad(m.wavelengthM, 1 / c),
  }
}
