import { InputError } from '../errors/index.ts'
import type { Feature, FeatureCollection } from '../intake/index.ts'
import type { Obstacle } from './types.ts'

/**
 * Obstacles of a GeoJSON collection: points, lines and outlines with `heightM` (m above ground) or `topM` (m MSL), optional `name`, `widthM`, `rcsM2`,
 * `verticalErrorM`; other columns are left alone. Width 0 where none is given: a point still blocks the ray through it.
 * Throws InputError where a feature has neither height nor top, both, or a number out of range.
 */
export function readObstacles(geojson: FeatureCollection, fileName: string): Obstacle[] {
  return geojson.features.map((f) => {
    const number = (key: string, least: number, most: number): number | null => numberOf(f, key, least, most, fileName)
    const heightM = number('heightM', 0, 5_000)
    const topM = number('topM', -500, 15_000)
    if ((heightM === null) === (topM === null))
      throw new InputError({
        code: 'obstacle-height',
        file: fileName,
        place: placeOf(f),
        found: heightM === null ? 'neither heightM nor topM is given' : 'both heightM and topM are given',
        remedy: 'give heightM (m above ground) or topM (m above mean sea level)',
      })
    return {
      name: nameOf(f) || `obstacle ${f.number}`,
      path: f.path,
      heightM,
      topM,
      widthM: number('widthM', 0, 10_000) ?? 0,
      rcsM2: number('rcsM2', 0, 1e9),
      verticalErrorM: number('verticalErrorM', 0, 1_000),
    }
  })
}

/** Name of a feature: its `name`, else ''. */
export const nameOf = (f: Feature): string => {
  const name = f.properties.name
  return typeof name === 'string' ? name.trim() : typeof name === 'number' ? String(name) : ''
}
const placeOf = (f: Feature): string => {
  const name = nameOf(f)
  return name ? `feature ${f.number} ("${name.slice(0, 40)}")` : `feature ${f.number}`
}

/** A number of a feature's properties within bounds; text that is a number counts; null where absent or empty. */
export function numberOf(f: Feature, key: string, least: number, most: number, fileName: string): number | null {
  const raw = f.properties[key]
  if (raw === undefined || raw === null || raw === '') return null
  const value = typeof raw === 'string' ? Number(raw.trim()) : raw
  if (typeof value === 'number' && value >= least && value <= most) return value
  throw new InputError({
    code: 'feature-number',
    file: fileName,
    place: `${placeOf(f)}, ${key}`,
    found: `${key} is ${JSON.stringify(raw).slice(0, 30)}`,
    remedy: `give a number from ${least} to ${most}`,
  })
}
