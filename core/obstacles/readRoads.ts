import type { FeatureCollection } from '../intake/index.ts'
import { MPH_PER_MS } from '../units/index.ts'
import { nameOf, numberOf } from './readObstacles.ts'
import type { Road } from './types.ts'

/**
 * Roads and railways of a GeoJSON collection: its lines, with `highway` (or `railway`) and `maxspeedKmh` (or OpenStreetMap's `maxspeed`: km/h unless it
 * says mph), and `tunnel`. Points and areas are passed over. Throws InputError for a speed out of range.
 */
export function readRoads(geojson: FeatureCollection, fileName: string): Road[] {
  return geojson.features
    .filter((f) => f.kind === 'LineString')
    .map((f) => {
      const word = (key: string): string => (typeof f.properties[key] === 'string' ? (f.properties[key] as string).trim() : '')
      return {
        name: nameOf(f) || word('ref') || `road ${f.number}`,
        highway: word('highway') || word('railway') || 'unclassified',
        maxspeedKmh: numberOf(f, 'maxspeedKmh', 0, 500, fileName) ?? speedOf(f.properties.maxspeed),
        tunnel: inTunnel(f.properties.tunnel) || inTunnel(f.properties.covered),
        path: f.path,
      }
    })
}

/** OpenStreetMap's `tunnel` or `covered`: any word but "no". */
const inTunnel = (raw: unknown): boolean => raw === true || (typeof raw === 'string' && !/^(|no|false|0)$/.test(raw.trim()))

/** OpenStreetMap's maxspeed: "50", "30 mph"; null for words such as "none". */
function speedOf(raw: unknown): number | null {
  if (typeof raw === 'number') return raw
  const m = typeof raw === 'string' ? /^\s*(\d+(?:\.\d+)?)\s*(mph|km\/h|kmh)?\s*$/i.exec(raw) : null
  if (!m) return null
  return m[2]?.toLowerCase() === 'mph' ? (Number(m[1]) / MPH_PER_MS) * 3.6 : Number(m[1])
}
