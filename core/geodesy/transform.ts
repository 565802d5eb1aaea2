import { DEG_PER_RAD, RAD_PER_DEG } from '../units/index.ts'
import { isWgs84Like } from './datums.ts'
import { WGS84_A_M, WGS84_F } from './earthRadius.ts'
import { normalLon } from './longitude.ts'
import { heldProj4, loadProj4 } from './proj4Library.ts'
import { projParameters } from './projString.ts'
import { type ProjectionPair, transverseMercator } from './transverseMercator.ts'
import type { Crs } from './types.ts'

/** Functions between a CRS and WGS 84 degrees; longitudes out in [-180, 180). NaN where a position has no image. */
export type CrsTransform = ProjectionPair

const GRS80_F = 1 / 298.257222101
const held = new Map<string, CrsTransform>()

/**
 * Transformation of a CRS, kept per definition. Geographic, UTM, transverse Mercator and Web Mercator run on our own short code (hot); any other needs
 * the projection library, which crsFrom… load: throws a plain Error when that has not happened in this thread (await loadCrs(crs) first).
 */
export function crsTransform(crs: Crs): CrsTransform {
  let t = held.get(crs.definition)
  if (!t) {
    t = ownProjection(crs.definition) ?? libraryProjection(crs.definition)
    held.set(crs.definition, t)
  }
  return t
}

/** Makes a Crs that crossed threads as plain data usable by crsTransform here. */
export async function loadCrs(crs: Crs): Promise<void> {
  if (held.has(crs.definition) || ownProjection(crs.definition)) return
  await loadProj4()
}

function libraryProjection(definition: string): CrsTransform {
  const proj4 = heldProj4()
  if (!proj4) throw new Error(`Projection library not loaded for ${definition}: await loadCrs(crs) first`)
  const converter = proj4('EPSG:4326', definition)
  return {
    toLonLat(x, y) {
      try {
        const p = converter.inverse([x, y])
        return [normalLon(p[0]), p[1]]
      } catch {
        return [Number.NaN, Number.NaN]
      }
    },
    fromLonLat(lon, lat) {
      try {
        const p = converter.forward([lon, lat])
        return [p[0], p[1]]
      } catch {
        return [Number.NaN, Number.NaN]
      }
    },
  }
}

const geographic: CrsTransform = {
  toLonLat: (x, y) => [normalLon(x), y],
  fromLonLat: (lon, lat) => [lon, lat],
}
/** EPSG method 1024, spherical formulas on the WGS 84 semi-major axis. */
const webMercator: CrsTransform = {
  toLonLat: (x, y) => [normalLon((x / WGS84_A_M) * DEG_PER_RAD), Math.atan(Math.sinh(y / WGS84_A_M)) * DEG_PER_RAD],
  fromLonLat: (lon, lat) => [WGS84_A_M * lon * RAD_PER_DEG, WGS84_A_M * Math.asinh(Math.tan(lat * RAD_PER_DEG))],
}

function ownProjection(definition: string): CrsTransform | null {
  if (definition === 'EPSG:4326') return geographic
  if (definition === 'EPSG:3857') return webMercator
  const utm = /^EPSG:32([67])(\d\d)$/.exec(definition)
  if (utm && +utm[2] >= 1 && +utm[2] <= 60) return utmProjection(+utm[2], utm[1] === '7', WGS84_F)
  if (!definition.startsWith('+')) return null
  const p = projParameters(definition)
  if (p.has('nadgrids') || p.has('units') || /[1-9]/.test(p.get('towgs84') ?? '0') || +(p.get('pm') ?? 0) !== 0) return null
  const f = flatteningOf(p)
  if (f === null) return null
  if (p.get('proj') === 'longlat') return geographic
  if (p.get('proj') === 'utm') return utmProjection(+p.get('zone')!, p.has('south'), f, +(p.get('to_meter') ?? 1))
  if (p.get('proj') !== 'tmerc') return null
  return transverseMercator({
    a: WGS84_A_M,
    f,
    lon0Deg: +(p.get('lon_0') ?? 0),
    lat0Deg: +(p.get('lat_0') ?? 0),
    k0: +(p.get('k_0') ?? p.get('k') ?? 1),
    falseEasting: +(p.get('x_0') ?? 0),
    falseNorthing: +(p.get('y_0') ?? 0),
    metresPerUnit: +(p.get('to_meter') ?? 1),
  })
}

/** Flattening where the ellipsoid is WGS 84 or GRS 80; null for any other. */
function flatteningOf(p: Map<string, string>): number | null {
  const name = p.get('ellps') ?? p.get('datum')
  const a = +(p.get('a') ?? WGS84_A_M)
  if (p.has('b')) return isWgs84Like(a, +p.get('b')!) ? 1 - +p.get('b')! / a : null
  if (p.has('a') || p.has('R') || p.has('rf') || p.has('f')) return null
  if (name === 'WGS84') return WGS84_F
  return name === 'GRS80' || name === 'NAD83' ? GRS80_F : null
}

function utmProjection(zone: number, south: boolean, f: number, metresPerUnit = 1): CrsTransform {
  return transverseMercator({
    a: WGS84_A_M,
    f,
    lon0Deg: 6 * zone - 183,
    lat0Deg: 0,
    k0: 0.9996,
    falseEasting: 500_000,
    falseNorthing: south ? 10_000_000 : 0,
    metresPerUnit,
  })
}
