import { type ParseError, parse as parseJson } from 'jsonc-parser'
import { InputError } from '../errors/index.ts'
import type { LonLat } from '../geodesy/index.ts'
import { normalLon } from '../geodesy/index.ts'

export type FeatureKind = 'Point' | 'LineString' | 'Polygon'
/** One simple part of a GeoJSON feature: multi-geometries and collections are taken apart. */
export interface Feature {
  readonly kind: FeatureKind
  /** The point, the line, or one ring of the polygon. */
  readonly path: readonly LonLat[]
  readonly properties: Readonly<Record<string, unknown>>
  /** Number of the feature in the file, from 1, for messages. */
  readonly number: number
}
export interface FeatureCollection {
  readonly type: 'FeatureCollection'
  readonly features: readonly Feature[]
}

/**
 * Reads GeoJSON (RFC 7946): a FeatureCollection or one Feature, positions WGS 84 longitude, latitude in degrees.
 * Throws InputError for bad JSON (with line and column), another CRS, unknown geometry, and positions that are not degrees.
 */
export function readFeatures(text: string, fileName: string): FeatureCollection {
  const fault = (place: string | undefined, found: string, remedy: string): InputError =>
    new InputError({ code: 'geojson', file: fileName, place, found, remedy })
  const root = parse(text, fault)
  if (!isObject(root)) throw fault(undefined, 'not GeoJSON', 'give a GeoJSON FeatureCollection')
  const crs = JSON.stringify(root.crs ?? '')
  if (crs.length > 2 && !/CRS84|EPSG:+4326|EPSG::4326|WGS ?84/i.test(crs))
    throw fault('crs', 'the positions are not WGS 84', 'export with WGS 84 longitude and latitude (RFC 7946)')
  const list = root.type === 'FeatureCollection' ? root.features : root.type === 'Feature' ? [root] : null
  if (!Array.isArray(list)) throw fault(undefined, 'not a GeoJSON FeatureCollection', 'give a GeoJSON FeatureCollection')
  const features: Feature[] = []
  list.forEach((item: unknown, i) => {
    const number = i + 1
    if (!isObject(item) || item.type !== 'Feature') throw fault(`feature ${number}`, 'not a Feature', 'give a GeoJSON FeatureCollection')
    const properties = isObject(item.properties) ? item.properties : {}
    const place = `feature ${number}`
    for (const part of partsOf(item.geometry, (found) => fault(place, found, 'correct its geometry')))
      features.push({ ...part, properties, number })
  })
  return { type: 'FeatureCollection', features }
}

const isObject = (v: unknown): v is Record<string, unknown> => typeof v === 'object' && v !== null && !Array.isArray(v)

function parse(text: string, fault: (place: string | undefined, found: string, remedy: string) => InputError): unknown {
  try {
    return JSON.parse(text.charCodeAt(0) === 0xfeff ? text.slice(1) : text)
  } catch {
    const errors: ParseError[] = []
    parseJson(text, errors, { disallowComments: true })
    const before = text.slice(0, errors[0]?.offset ?? 0).split('\n')
    const place = `line ${before.length}, column ${before[before.length - 1].length + 1}`
    throw fault(place, 'not JSON', 'correct the syntax there')
  }
}

type Part = Pick<Feature, 'kind' | 'path'>
function partsOf(geometry: unknown, fault: (found: string) => InputError): Part[] {
  if (geometry === null || geometry === undefined) return []
  if (!isObject(geometry)) throw fault('the geometry is no object')
  const c = geometry.coordinates
  const many = (f: (v: unknown) => Part[]): Part[] => {
    if (!Array.isArray(c)) throw fault('the geometry has no coordinates')
    return c.flatMap(f)
  }
  const point = (v: unknown): Part[] => [{ kind: 'Point', path: [position(v, fault)] }]
  const line = (v: unknown): Part[] => [{ kind: 'LineString', path: positions(v, 2, fault) }]
  const polygon = (v: unknown): Part[] => {
    if (!Array.isArray(v)) throw fault('a polygon has no rings')
    return v.map((ring) => ({ kind: 'Polygon', path: positions(ring, 4, fault) }))
  }
  switch (geometry.type) {
    case 'Point':
      return point(c)
    case 'MultiPoint':
      return many(point)
    case 'LineString':
      return line(c)
    case 'MultiLineString':
      return many(line)
    case 'Polygon':
      return polygon(c)
    case 'MultiPolygon':
      return many(polygon)
    case 'GeometryCollection':
      return Array.isArray(geometry.geometries) ? geometry.geometries.flatMap((g: unknown) => partsOf(g, fault)) : []
    default:
      throw fault(`geometry "${String(geometry.type).slice(0, 30)}" is not known`)
  }
}
function positions(v: unknown, least: number, fault: (found: string) => InputError): LonLat[] {
  if (!Array.isArray(v) || v.length < least) throw fault(`fewer than ${least} positions`)
  return v.map((p) => position(p, fault))
}
function position(v: unknown, fault: (found: string) => InputError): LonLat {
  const lon: unknown = Array.isArray(v) ? v[0] : undefined
  const lat: unknown = Array.isArray(v) ? v[1] : undefined
  if (typeof lon !== 'number' || typeof lat !== 'number') throw fault('a position is not two numbers')
  if (Math.abs(lon) > 360 || Math.abs(lat) > 90) throw fault(`position ${lon}, ${lat} is not degrees of longitude and latitude`)
  return { lon: normalLon(lon), lat }
}
