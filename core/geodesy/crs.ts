import { InputError } from '../errors/index.ts'
import { isWgs84Like, shiftToWgs84 } from './datums.ts'
import { loadProj4 } from './proj4Library.ts'
import { projParameters, tidyProjString } from './projString.ts'
import type { Crs } from './types.ts'

export const WGS84: Crs = { kind: 'geographic', epsg: 4326, definition: 'EPSG:4326', name: 'WGS 84', metresPerUnit: 1 }

const REMEDY = 'give a CRS such as EPSG:32633, or reproject the raster to WGS 84 / UTM'
const USER_DEFINED = 32767

const fault = (code: string, found: string, remedy = REMEDY): InputError => new InputError({ code, found, remedy })

/** Keys of a GeoTIFF's key directory by name, as the TIFF reader gives them. */
export type GeoKeys = Readonly<Record<string, unknown>>

/** CRS of an EPSG code, projected or geographic. Throws InputError for an unknown code or a datum that cannot be brought to WGS 84. */
export async function crsFromEpsg(code: number): Promise<Crs> {
  if (code === 4326 || code === 4979) return WGS84
  if (code === 3857 || code === 900913)
    return { kind: 'projected', epsg: 3857, definition: 'EPSG:3857', name: 'WGS 84 / Pseudo-Mercator', metresPerUnit: 1 }
  const hemisphere = Math.floor(code / 100)
  const zone = code % 100
  if ((hemisphere === 326 || hemisphere === 327) && zone >= 1 && zone <= 60)
    return {
      kind: 'projected',
      epsg: code,
      definition: `EPSG:${code}`,
      name: `WGS 84 / UTM zone ${zone}${hemisphere === 326 ? 'N' : 'S'}`,
      metresPerUnit: 1,
    }
  const found = Number.isInteger(code) ? await fromTable({ ProjectedCSTypeGeoKey: code }) : null
  if (!found) throw fault('crs-unknown', `EPSG:${code} is not known`)
  return crsFromProjString(found, code, `EPSG:${code}`)
}

/**
 * CRS from what a user may write: "EPSG:32633", "32633", "UTM 33N", a projection string or WKT.
 * Throws InputError when it cannot be understood or its datum cannot be brought to WGS 84.
 */
export async function crsFromText(text: string): Promise<Crs> {
  const t = text.trim()
  const code = /^(?:EPSG\s*:+\s*|urn:ogc:def:crs:EPSG:[^:]*:)?(\d{4,6})$/i.exec(t)
  if (code) return crsFromEpsg(+code[1])
  if (/^(OGC:)?CRS84$|^WGS ?84$/i.test(t)) return WGS84
  const utm = /^(?:WGS ?84\s*\/?\s*)?UTM\s*(?:zone\s*)?(\d{1,2})\s*([NS])$/i.exec(t)
  if (utm) return crsFromEpsg((utm[2].toUpperCase() === 'N' ? 32600 : 32700) + Number(utm[1]))
  if (t.includes('+proj=')) return crsFromProjString(t, null, 'the stated CRS')
  if (/^[A-Z_]+(CS|CRS)\s*[[(]/i.test(t)) return crsFromWkt(t)
  throw fault('crs-unknown', `"${t.slice(0, 60)}" is no CRS this program knows`)
}

async function crsFromWkt(wkt: string): Promise<Crs> {
  const horizontal = horizontalPart(wkt)
  const name = /^\s*\w+\s*[[(]\s*"([^"]*)"/.exec(horizontal)?.[1] ?? 'the stated CRS'
  const id = /(?:AUTHORITY|ID)\s*[[(]\s*"EPSG"\s*,\s*"?(\d+)"?\s*[\])]\s*[\])]\s*$/i.exec(horizontal)
  if (id) {
    const crs = await crsFromEpsg(Number(id[1])).catch(() => null)
    if (crs) return { ...crs, name }
  }
  return checked(horizontal, null, name)
}

/** The projected or geographic member of a compound CRS; other WKT is returned as it is. */
function horizontalPart(wkt: string): string {
  if (!/^\s*COMP/i.test(wkt)) return wkt.trim()
  const start = /\b(PROJCRS|PROJCS|GEOGCRS|GEOGCS)\s*\[/i.exec(wkt)
  if (!start) return wkt.trim()
  let depth = 0
  for (let i = start.index; i < wkt.length; i++) {
    if (wkt[i] === '[') depth++
    else if (wkt[i] === ']' && --depth === 0) return wkt.slice(start.index, i + 1)
  }
  return wkt.slice(start.index)
}

/** CRS of a GeoTIFF's keys. Throws InputError when there is no CRS, it is unknown, or its datum cannot be brought to WGS 84. */
export async function crsFromGeoKeys(keys: GeoKeys): Promise<Crs> {
  const number = (name: string): number | null => (typeof keys[name] === 'number' ? (keys[name] as number) : null)
  const model = number('GTModelTypeGeoKey')
  if (model === 3) throw fault('crs-geocentric', 'the raster is in geocentric X, Y, Z')
  const projected = number('ProjectedCSTypeGeoKey')
  const geographic = number('GeographicTypeGeoKey')
  const code = model === 2 ? geographic : (projected ?? (model === 1 ? null : geographic))
  const name = citation(keys)
  if (code !== null && code !== USER_DEFINED && code > 0) {
    const crs = await crsFromEpsg(code).catch((e: unknown) => {
      if (e instanceof InputError && e.code === 'crs-unknown') return null
      throw e
    })
    if (crs) return name ? { ...crs, name } : crs
  }
  const definition = await fromTable(keys)
  if (!definition) throw fault('crs-unknown', `the CRS of the file (${name || 'no name'}) is not understood`)
  return crsFromProjString(definition, null, name || 'the CRS of the file', geographic)
}

function citation(keys: GeoKeys): string {
  for (const key of ['GTCitationGeoKey', 'PCSCitationGeoKey', 'GeogCitationGeoKey']) {
    const text = keys[key]
    if (typeof text !== 'string') continue
    const first = text
      .split('|')[0]
      .replace(/^(PCS Name|GCS Name|ESRI PE String)\s*=\s*/i, '')
      .trim()
    if (first && first.length < 80 && !/^(unnamed|unknown|PCS Name)$/i.test(first)) return first
  }
  return ''
}

/** Projection string for keys or codes, from the table of the EPSG registry; null when there is none. */
async function fromTable(keys: GeoKeys): Promise<string | null> {
  const { toProj4 } = await import('geotiff-geokeys-to-proj4')
  const found = toProj4(keys as unknown as Parameters<typeof toProj4>[0])
  const bad = Object.keys(found.errors).filter((e) => e !== 'bothGCSAndPCSAreSet')
  if (bad.length > 0 || !/\+(ellps|a|R)=/.test(found.proj4)) return null
  const scale = found.coordinatesConversionParameters.x
  if (scale === 1) return found.proj4
  if (found.isGCS) throw fault('crs-unit', 'the geographic axes are not in degrees')
  return found.proj4.includes('+to_meter') ? found.proj4 : `${found.proj4} +to_meter=${scale}`
}

async function crsFromProjString(text: string, epsg: number | null, name: string, baseCode: number | null = epsg): Promise<Crs> {
  let definition = tidyProjString(text)
  const p = projParameters(definition)
  const sphericalMercator = p.get('proj') === 'merc' && p.get('a') === '6378137' && p.get('b') === '6378137'
  if (sphericalMercator && +(p.get('lon_0') ?? 0) === 0 && +(p.get('x_0') ?? 0) === 0 && +(p.get('y_0') ?? 0) === 0)
    return { ...(await crsFromEpsg(3857)), name }
  if (p.has('nadgrids') && p.get('nadgrids') !== '@null')
    throw fault('crs-datum', `${name} needs a datum shift grid (${p.get('nadgrids')})`, 'reproject the raster to WGS 84 first')
  if (/^nad27$/i.test(p.get('datum') ?? '')) throw datumFault(name)
  const shift = p.has('towgs84') || p.has('datum') ? null : shiftToWgs84(baseCode)
  if (shift) definition += ` +towgs84=${shift}`
  return checked(definition, epsg, name)
}
const datumFault = (name: string): InputError =>
  fault(
    'crs-datum',
    `${name} is on a datum whose shift to WGS 84 is not known here`,
    'reproject the raster to WGS 84 first, or state a CRS with +towgs84',
  )

/** Lets the library read a definition and refuses what would lie beside its place. */
async function checked(definition: string, epsg: number | null, name: string): Promise<Crs> {
  const proj4 = await loadProj4()
  let p: { projName?: string; a: number; b: number; to_meter?: number; datum_params?: unknown; from_greenwich?: number }
  try {
    p = new (proj4 as unknown as { Proj: new (definition: string) => typeof p }).Proj(definition)
  } catch {
    throw fault('crs-unknown', `the definition of ${name} is not understood`)
  }
  if (!p.datum_params && !isWgs84Like(p.a, p.b)) throw datumFault(name)
  const geographic = p.projName === 'longlat' || p.projName === 'identity'
  return { kind: geographic ? 'geographic' : 'projected', epsg, definition, name, metresPerUnit: geographic ? 1 : (p.to_meter ?? 1) }
}
