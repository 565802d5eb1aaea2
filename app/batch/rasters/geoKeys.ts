import type { Crs } from '../../../core/index.ts'

/** GeoTIFF key directory of a CRS: three tags' worth of numbers and text (OGC GeoTIFF 1.1). */
export interface GeoKeyTags {
  readonly directory: readonly number[]
  readonly doubles: readonly number[]
  readonly ascii: string
}

const KEY = {
  model: 1024,
  raster: 1025,
  citation: 1026,
  geographicType: 2048,
  geogCitation: 2049,
  geodeticDatum: 2050,
  angularUnits: 2054,
  ellipsoid: 2056,
  semiMajor: 2057,
  semiMinor: 2058,
  toWgs84: 2062,
  projectedType: 3072,
  projCitation: 3073,
  projection: 3074,
  transform: 3075,
  linearUnits: 3076,
  linearUnitSize: 3077,
  parallel1: 3078,
  parallel2: 3079,
  originLong: 3080,
  originLat: 3081,
  falseEasting: 3082,
  falseNorthing: 3083,
  falseOriginLong: 3084,
  falseOriginLat: 3085,
  falseOriginEasting: 3086,
  falseOriginNorthing: 3087,
  centreLong: 3088,
  centreLat: 3089,
  scale: 3092,
  poleLong: 3095,
} as const
const USER_DEFINED = 32767
const DEGREE = 9102
const METRE = 9001

/** Semi-major axis and inverse flattening by name in a projection string. */
const ELLIPSOIDS: Readonly<Record<string, readonly [number, number]>> = {
  WGS84: [6378137, 298.257223563],
  NAD83: [6378137, 298.257222101],
  GRS80: [6378137, 298.257222101],
  bessel: [6377397.155, 299.1528128],
  intl: [6378388, 297],
  clrk66: [6378206.4, 294.978698213898],
  clrk80: [6378249.145, 293.4663],
  airy: [6377563.396, 299.3249646],
  krass: [6378245, 298.3],
  aust_SA: [6378160, 298.25],
  GRS67: [6378160, 298.247167427],
}

class Keys {
  readonly #entries = new Map<number, { location: number; count: number; value: number }>()
  readonly doubles: number[] = []
  ascii = ''
  short(key: number, value: number): void {
    this.#entries.set(key, { location: 0, count: 1, value })
  }
  double(key: number, ...values: number[]): void {
    this.#entries.set(key, { location: 34736, count: values.length, value: this.doubles.length })
    this.doubles.push(...values)
  }
  text(key: number, text: string): void {
    const stored = `${text.replace(/[^\x20-\x7e]/g, '?')}|`
    this.#entries.set(key, { location: 34737, count: stored.length, value: this.ascii.length })
    this.ascii += stored
  }
  tags(): GeoKeyTags {
    const rows = [...this.#entries].sort(([a], [b]) => a - b)
    return {
      directory: [1, 1, 0, rows.length, ...rows.flatMap(([key, e]) => [key, e.location, e.count, e.value])],
      doubles: this.doubles,
      ascii: this.ascii,
    }
  }
}

type ProjParameters = ReadonlyMap<string, string>
const parse = (definition: string): ProjParameters =>
  new Map([...definition.matchAll(/\+(\w+)(?:=(\S+))?/g)].map((m) => [m[1] as string, m[2] ?? '']))

function datumKeys(keys: Keys, p: ProjParameters, name: string): void {
  const named = p.get('datum') ?? ''
  if (named === 'WGS84' || named === 'NAD83') {
    keys.short(KEY.geographicType, named === 'WGS84' ? 4326 : 4269)
    return
  }
  const known = ELLIPSOIDS[p.get('ellps') ?? '']
  const a = Number(p.get('a') ?? p.get('R') ?? known?.[0] ?? 6378137)
  const inverse = Number(p.get('rf') ?? known?.[1] ?? 298.257223563)
  const b = p.has('R') ? a : Number(p.get('b') ?? a * (1 - 1 / inverse))
  keys.short(KEY.geographicType, USER_DEFINED)
  keys.text(KEY.geogCitation, `GCS Name = ${name}|Datum = ${name}|Ellipsoid = ${p.get('ellps') ?? 'stated'}|Primem = Greenwich`)
  keys.short(KEY.geodeticDatum, USER_DEFINED)
  keys.short(KEY.ellipsoid, USER_DEFINED)
  keys.double(KEY.semiMajor, a)
  keys.double(KEY.semiMinor, b)
  const shift = p.get('towgs84')?.split(',').map(Number)
  if (shift && (shift.length === 3 || shift.length === 7)) keys.double(KEY.toWgs84, ...shift)
}

/** Code of the coordinate transformation and its parameters; nothing for a method without a place in the standard. */
function methodKeys(keys: Keys, p: ProjParameters, metresPerUnit: number): void {
  const n = (name: string, otherwise = 0) => Number(p.get(name) ?? otherwise)
  // The definition counts false eastings in metres, the keys in the unit of the axes.
  const east = n('x_0') / metresPerUnit
  const north = n('y_0') / metresPerUnit
  const origin = () => {
    keys.double(KEY.originLong, n('lon_0'))
    keys.double(KEY.originLat, n('lat_0'))
    keys.double(KEY.falseEasting, east)
    keys.double(KEY.falseNorthing, north)
  }
  const centre = () => {
    keys.double(KEY.centreLong, n('lon_0'))
    keys.double(KEY.centreLat, n('lat_0'))
    keys.double(KEY.falseEasting, east)
    keys.double(KEY.falseNorthing, north)
  }
  const scale = () => keys.double(KEY.scale, n('k', n('k_0', 1)))
  const parallels = () => {
    keys.double(KEY.parallel1, n('lat_1'))
    keys.double(KEY.parallel2, n('lat_2', n('lat_1')))
  }
  const method = (code: number) => keys.short(KEY.transform, code)
  switch (p.get('proj')) {
    case 'tmerc':
    case 'etmerc':
      method(1)
      origin()
      scale()
      return
    case 'utm':
      method(1)
      keys.double(KEY.originLong, n('zone') * 6 - 183)
      keys.double(KEY.originLat, 0)
      keys.double(KEY.falseEasting, 500_000)
      keys.double(KEY.falseNorthing, p.has('south') ? 10_000_000 : 0)
      keys.double(KEY.scale, 0.9996)
      return
    case 'merc':
      method(7)
      origin()
      if (p.has('lat_ts')) keys.double(KEY.parallel1, n('lat_ts'))
      else scale()
      return
    case 'lcc':
      if (p.has('lat_2') && p.get('lat_2') !== p.get('lat_1')) {
        method(8)
        parallels()
        keys.double(KEY.falseOriginLong, n('lon_0'))
        keys.double(KEY.falseOriginLat, n('lat_0'))
        keys.double(KEY.falseOriginEasting, east)
        keys.double(KEY.falseOriginNorthing, north)
      } else {
        method(9)
        origin()
        scale()
      }
      return
    case 'laea':
      method(10)
      centre()
      return
    case 'aea':
      method(11)
      parallels()
      origin()
      return
    case 'aeqd':
      method(12)
      centre()
      return
    case 'stere': {
      const polar = Math.abs(Math.abs(n('lat_0')) - 90) < 1e-9
      method(polar ? 15 : 14)
      if (polar) {
        keys.double(KEY.poleLong, n('lon_0'))
        keys.double(KEY.originLat, n('lat_ts', n('lat_0')))
        keys.double(KEY.falseEasting, east)
        keys.double(KEY.falseNorthing, north)
      } else centre()
      scale()
      return
    }
    case 'sterea':
      method(16)
      origin()
      scale()
      return
  }
}

/** Keys that say in which CRS a raster lies: by EPSG code where it has one, else user-defined from its definition. */
export function geoKeysOf(crs: Crs): GeoKeyTags {
  const keys = new Keys()
  const coded = crs.epsg !== null && crs.epsg > 0 && crs.epsg < USER_DEFINED
  const p = parse(crs.definition)
  keys.short(KEY.raster, 1)
  keys.text(KEY.citation, crs.name)
  if (crs.kind === 'geographic') {
    keys.short(KEY.model, 2)
    if (coded) keys.short(KEY.geographicType, crs.epsg as number)
    else datumKeys(keys, p, crs.name)
    keys.short(KEY.angularUnits, DEGREE)
    return keys.tags()
  }
  keys.short(KEY.model, 1)
  if (coded) {
    keys.short(KEY.projectedType, crs.epsg as number)
    return keys.tags()
  }
  keys.short(KEY.projectedType, USER_DEFINED)
  if (/^\s*\w+\s*[[(]/.test(crs.definition)) {
    // Well-known text travels whole in the citation, which readers of the format take up.
    keys.text(KEY.projCitation, `ESRI PE String = ${crs.definition}`)
    return keys.tags()
  }
  keys.text(KEY.projCitation, crs.name)
  datumKeys(keys, p, crs.name)
  keys.short(KEY.angularUnits, DEGREE)
  keys.short(KEY.projection, USER_DEFINED)
  methodKeys(keys, p, crs.metresPerUnit)
  if (crs.metresPerUnit === 1) keys.short(KEY.linearUnits, METRE)
  else {
    keys.short(KEY.linearUnits, USER_DEFINED)
    keys.double(KEY.linearUnitSize, crs.metresPerUnit)
  }
  return keys.tags()
}
