import { elevationTangent } from '../../../clutter/index.ts'
import { type Earth, effectiveRadiusM } from '../../../geodesy/index.ts'
import { type SightPoint, sweepRays } from '../../../masking/index.ts'
import {
  bendRay,
  fillReflectingRay,
  leastGrazingRad,
  makeReflectingRay,
  pointOnSurface,
  type RayCells,
  REFLECTS,
  type ReflectingRay,
  reflectionTo,
} from '../../../propagation/index.ts'
import type { Ground, Site } from '../../../terrain/index.ts'
import { RAD_PER_DEG } from '../../../units/index.ts'
import { gainAt, segmentIndex, type TargetSignal } from '../targetSignal.ts'
import { factorDb, type LobeModel } from './model.ts'

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
  /** The study's own earth, for which surface it is and what the antenna sees of it, and that of the rays toward the target. */
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
    bendRay(ray, 1 / meanRadiusM(p.earth, p.place.lat))
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
  const { atHeightM, atKind } = ray
  const c = 1 / meanRadiusM(p.raysEarth, p.place.lat)
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
