import type { Weather } from '../../atmosphere/index.ts'
import { decibel, elevationTangent } from '../../clutter/index.ts'
import type { Earth } from '../../geodesy/index.ts'
import { type SightPoint, sweepRays } from '../../masking/index.ts'
import {
  fillReflectingRay,
  leastGrazingRad,
  makeReflectingRay,
  OPEN_GROUND_ROUGHNESS_M,
  type RayCells,
  REFLECTS,
  type ReflectingCodes,
  type ReflectingRay,
  type ReflectionTables,
  reflectingCodes,
  reflectionTable,
  reflectionTo,
  tangentToPoint,
  twoRayPower,
  waterRoughnessM,
} from '../../propagation/index.ts'
import type { RadarInput } from '../../radar/index.ts'
import type { Ground, Site } from '../../terrain/index.ts'
import { wavelengthM } from '../../units/index.ts'
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

/** Two-way F⁴ by the point found last, dB, positive where the rays add. */
function foundDb(
  m: LobeModel,
  ray: ReflectingRay,
  t: TargetSignal,
  s: SignalSegment,
  gainDb: number,
  rangeM: number,
  targetM: number,
): number {
  const ratio = patternRatio(gainAt(t, s, tangentToPoint(ray)), gainDb)
  return 2 * decibel(twoRayPower(ray, rangeM, targetM, m.tables, m.wavelengthM, ratio))
}

/**
 * Fills `lobeDb` of cells first … last−1 of a row: loss of direct and reflected ray together, two ways, dB >= 0 (F never over 1), 0 where no ray
 * comes off water or level open ground. Target as in `fillLevelRow`; `topM` is the highest target of the row, m MSL.
 */
export function fillLobes(
  m: LobeModel,
  ray: ReflectingRay,
  t: TargetSignal,
  row: LevelRow,
  first: number,
  last: number,
  aboveM: number,
  groundM: Float32Array | null,
  from: number,
): void {
  const { lobeDb, slantM, gainDb } = row
  if (!ray.any) {
    if (row.lobed) lobeDb.fill(0)
    row.lobed = false
    return
  }
  row.lobed = true
  let topM = aboveM
  if (groundM) {
    topM = Number.NEGATIVE_INFINITY
    for (let j = first; j < last; j++) if (groundM[from + j] + aboveM > topM) topM = groundM[from + j] + aboveM
  }
  let s = 0
  let start = 0
  for (let j = first; j < last; j++) {
    const rangeM = ray.firstM + j * ray.stepM
    const targetM = groundM ? groundM[from + j] + aboveM : aboveM
    let at = reflectionTo(ray, j, rangeM, topM, start)
    start = at
    if (targetM < topM) at = reflectionTo(ray, j, rangeM, targetM, at)
    lobeDb[j] = 0
    if (ray.atKind === REFLECTS.none) continue
    s = segmentIndex(t, slantM[j], s)
    const db = foundDb(m, ray, t, t.segments[s], gainDb[j], rangeM, targetM)
    if (db < 0) lobeDb[j] = -db
  }
}

/** A place whose lobing is asked for. */
export interface LobePlace {
  readonly ground: Ground
  readonly place: Site
  readonly heightM: number
  readonly antennaM: number
  /** Earth for which the antenna sees the reflecting ground, and effective radius of the rays toward the target, m. */
  readonly earth: Earth
  readonly effectiveRadiusM: number
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
    fillReflectingRay(ray, m.codes, swept, 0, own, nearM, p.antennaM, 1 / p.effectiveRadiusM, m.tideM)
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
  const segment = t.segments[segmentIndex(t, slantM, 0)]
  const gainDb = gainAt(t, segment, elevationTangent(p.antennaM, targetM, sight.rangeM, ray.c))
  const grazing = Math.atan((p.antennaM - ray.atHeightM) / ray.atM - (ray.atM * ray.c) / 2)
  return {
    factorDb: foundDb(m, ray, t, segment, gainDb, sight.rangeM, targetM),
    surface: ray.atKind === REFLECTS.water ? 'water' : 'open',
    rangeM: ray.atM,
    heightM: ray.atHeightM,
    grazingDeg: (grazing * 180) / Math.PI,
    outside: ray.c > 0 && grazing < leastGrazingRad(m.wavelengthM, 1 / ray.c),
  }
}
