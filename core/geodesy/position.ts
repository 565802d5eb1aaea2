import { InputError } from '../errors/index.ts'
import { normalLon } from './longitude.ts'
import { looksLikeMgrs, parseMgrs } from './mgrs.ts'
import { crsTransform } from './transform.ts'
import type { LonLat } from './types.ts'

const REMEDY =
  'write latitude, longitude: 51.5074 -0.1278, or 51°30\'26"N 000°07\'40"W, or 513026N 0000740W, UTM 33N 500000 5400000, or MGRS'
const fault = (found: string): InputError => new InputError({ code: 'position', found, remedy: REMEDY })

/**
 * Position as a person types it, WGS 84: decimal degrees (latitude first unless letters N S E W say otherwise), degrees-minutes-seconds with or without
 * signs, packed DDMMSS with letters, UTM "33N 500000 5400000" (N and S are hemispheres), or MGRS "33UXP 01234 56789". Throws InputError that shows the forms.
 */
export function parsePosition(text: string): LonLat {
  const t = text.trim().replace(/[−–]/g, '-')
  const utm = /^(?:UTM\s*)?(\d{1,2})\s*([NS])[\s,;]+(\d{5,7}(?:\.\d+)?)\s*m?E?[\s,;]+(\d{1,8}(?:\.\d+)?)\s*m?N?$/i.exec(t)
  if (utm) return fromUtm(Number(utm[1]), utm[2].toUpperCase() === 'S', Number(utm[3]), Number(utm[4]))
  if (looksLikeMgrs(t)) {
    const square = parseMgrs(t)
    return fromUtm(square.zone, square.south, square.eastingM, square.northingM)
  }
  const halves = split(t)
  if (!halves) throw fault(`"${t.slice(0, 40)}" is no position`)
  const [a, b] = halves.map((h) => angle(h, t))
  if (a.axis && b.axis && a.axis === b.axis) throw fault(`"${t.slice(0, 40)}" gives the same axis twice`)
  const latFirst = a.axis ? a.axis === 'lat' : b.axis !== 'lat'
  const lat = latFirst ? a.deg : b.deg
  const lon = latFirst ? b.deg : a.deg
  if (Math.abs(lat) > 90) throw fault(`latitude ${lat} is beyond 90 degrees`)
  if (Math.abs(lon) > 360) throw fault(`longitude ${lon} is beyond 360 degrees`)
  return { lon: normalLon(lon), lat }
}

function fromUtm(zone: number, south: boolean, easting: number, northing: number): LonLat {
  if (zone < 1 || zone > 60) throw fault(`UTM zone ${zone} does not exist`)
  const code = (south ? 32700 : 32600) + zone
  const crs = { kind: 'projected', epsg: code, definition: `EPSG:${code}`, name: '', metresPerUnit: 1 } as const
  const [lon, lat] = crsTransform(crs).toLonLat(easting, northing)
  if (!Number.isFinite(lon) || !Number.isFinite(lat)) throw fault(`UTM ${easting} ${northing} lies nowhere`)
  return { lon, lat }
}

/** Splits at a comma, semicolon, hemisphere letter, or the middle of an even number of numbers. */
function split(t: string): [string, string] | null {
  const marked = /^(.*[NSEW])[\s,;]*(.*[NSEW])$/i.exec(t)
  if (marked && /\d/.test(marked[1]) && /\d/.test(marked[2])) return [marked[1], marked[2]]
  const leading = /^([NSEW].*?)[\s,;]*([NSEW].*)$/i.exec(t)
  if (leading) return [leading[1], leading[2]]
  const parts = t.split(/\s*[,;]\s*/).filter(Boolean)
  if (parts.length === 2) return [parts[0], parts[1]]
  const numbers = t.match(/[-+]?\d+(?:\.\d+)?[^\d+-]*/g)
  if (!numbers || numbers.length % 2 !== 0 || numbers.length > 6) return null
  const half = numbers.length / 2
  return [numbers.slice(0, half).join(' '), numbers.slice(half).join(' ')]
}

function angle(half: string, whole: string): { deg: number; axis: 'lat' | 'lon' | null } {
  const letter = /[NSEW]/i.exec(half)?.[0].toUpperCase() ?? null
  const rest = half.replace(/[NSEW]/gi, ' ').trim()
  if (/[^\d\s.+\-°º'′"″’”:dms]/i.test(rest)) throw fault(`"${whole.slice(0, 40)}" is no position`)
  const numbers = rest.match(/[-+]?\d+(?:\.\d+)?/g)?.map(Number) ?? []
  if (numbers.length < 1 || numbers.length > 3) throw fault(`"${whole.slice(0, 40)}" is no position`)
  const axis = letter === null ? null : letter === 'N' || letter === 'S' ? 'lat' : 'lon'
  const negative = /^\s*-/.test(rest) || letter === 'S' || letter === 'W'
  let [d, m = 0, s = 0] = numbers.map(Math.abs)
  const packed = /^[+-]?(\d{2,3})(\d{2})(\d{2}(?:\.\d+)?)$/.exec(rest)
  if (letter && packed && numbers.length === 1) [d, m, s] = [Number(packed[1]), Number(packed[2]), Number(packed[3])]
  if (m >= 60 || s >= 60) throw fault(`"${whole.slice(0, 40)}" has 60 or more minutes or seconds`)
  const deg = d + m / 60 + s / 3600
  return { deg: negative ? -deg : deg, axis }
}

/** Degrees, minutes, seconds: 51°30'26.00"N 000°07'40.00"W. `decimals` of the seconds, default 2 (0.3 m). */
export function formatDms(at: LonLat, decimals = 2): string {
  const part = (value: number, width: number, letters: string): string => {
    const units = 10 ** decimals
    const total = Math.round(Math.abs(value) * 3600 * units)
    const seconds = (total % (60 * units)) / units
    const minutes = Math.floor(total / (60 * units)) % 60
    const degrees = Math.floor(total / (3600 * units))
    const two = (n: number): string => String(n).padStart(2, '0')
    const sec = seconds.toFixed(decimals).padStart(decimals > 0 ? decimals + 3 : 2, '0')
    return `${String(degrees).padStart(width, '0')}°${two(minutes)}'${sec}"${letters[value < 0 ? 1 : 0]}`
  }
  return `${part(at.lat, 2, 'NS')} ${part(at.lon, 3, 'EW')}`
}
