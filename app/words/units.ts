import { M_PER_FT, M_PER_NM } from '../../core/index.ts'

/** The one switch of the face: nautical miles and feet, or kilometres and metres. SI inside, always. */
export type UnitSystem = 'nautical' | 'metric'
export const UNIT_SYSTEMS: readonly UnitSystem[] = ['nautical', 'metric']

/** Quantities that the switch changes. Mast heights stay in metres in both. */
export type UnitKind = 'range' | 'height' | 'area' | 'speed'

interface FaceUnit {
  readonly unit: string
  /** SI value of one face unit: m, m, m² as km² (see `areaKm2`), m/s. */
  readonly size: number
}
const M2_PER_NM2_IN_KM2 = (M_PER_NM / 1000) ** 2
const FACE: Record<UnitSystem, Record<UnitKind, FaceUnit>> = {
  nautical: {
    range: { unit: 'NM', size: M_PER_NM },
    height: { unit: 'ft', size: M_PER_FT },
    area: { unit: 'NM²', size: M2_PER_NM2_IN_KM2 },
    speed: { unit: 'kt', size: M_PER_NM / 3600 },
  },
  metric: {
    range: { unit: 'km', size: 1000 },
    height: { unit: 'm', size: 1 },
    area: { unit: 'km²', size: 1 },
    speed: { unit: 'm/s', size: 1 },
  },
}

/** Unit shown beside a value or on an axis. */
export const unitOf = (kind: UnitKind, system: UnitSystem): string => FACE[system][kind].unit
/** SI value (m, m, km², m/s) to the number of the face, unrounded. */
export const toFace = (kind: UnitKind, value: number, system: UnitSystem): number => value / FACE[system][kind].size
/** Number typed at the face to SI (m, m, km², m/s). */
export const fromFace = (kind: UnitKind, value: number, system: UnitSystem): number => value * FACE[system][kind].size
/** Name of the switch's two positions. */
export const UNIT_SYSTEM_NAMES: Record<UnitSystem, string> = { nautical: 'NM · ft', metric: 'km · m' }
