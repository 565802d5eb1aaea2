import type { Weather } from '../../../atmosphere/index.ts'
import { decibel } from '../../../clutter/index.ts'
import {
  OPEN_GROUND_ROUGHNESS_M,
  pointOnSurface,
  type ReflectingCodes,
  type ReflectionTable,
  type ReflectionTables,
  reflectingCodes,
  reflectionTable,
  tangentToPoint,
  twoRayPower,
  waterRoughnessM,
} from '../../../propagation/index.ts'
import type { RadarInput } from '../../../radar/index.ts'
import type { Ground } from '../../../terrain/index.ts'
import { wavelengthM } from '../../../units/index.ts'
import { ratioOfDb } from '../decibelTables.ts'
import { gainAt, type SignalSegment, type TargetSignal } from '../targetSignal.ts'

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
export function factorDb(
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
