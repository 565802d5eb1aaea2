import type { LonLat } from '../../core/index.ts'
import { formatNumber, formatSetting, type Quantity } from './format.ts'

/** Frequency, Hz: `2.75 GHz`, `167 MHz`. */
export function formatFrequency(hz: number): Quantity {
  return hz >= 1e9 ? formatSetting(hz / 1e9, 'GHz', 4) : formatSetting(hz / 1e6, 'MHz', 3)
}
/** Power, W: `20 kW`, `1.3 MW`. */
export function formatPower(w: number): Quantity {
  if (w >= 1e6) return formatSetting(w / 1e6, 'MW', 3)
  return w >= 1e3 ? formatSetting(w / 1e3, 'kW', 3) : formatSetting(w, 'W', 3)
}
/** Pulse width, s: `1.2 µs`, `80 ns`. */
export function formatPulse(s: number): Quantity {
  return s >= 1e-6 ? formatSetting(s * 1e6, 'µs', 3) : formatSetting(s * 1e9, 'ns', 1)
}
/** Bandwidth, Hz: `833.3 kHz`. */
export function formatBandwidth(hz: number): Quantity {
  return hz >= 1e6 ? formatSetting(hz / 1e6, 'MHz', 3) : formatSetting(hz / 1e3, 'kHz', 1)
}
/** Target RCS, m², with its dBsm: `1 m² (0 dBsm)`. */
export function formatRcs(m2: number): string {
  const db = formatSetting(10 * Math.log10(m2), 'dBsm', 1)
  const m = m2 >= 1 ? formatSetting(m2, 'm²', 1) : formatSetting(m2, 'm²', 4)
  return `${m.value}\u202f${m.unit} (${db.value}\u202f${db.unit})`
}
/** Effective-earth factor: the common fractions by name. */
export function formatK(k: number): string {
  if (Math.abs(k - 4 / 3) < 1e-4) return '4/3'
  return formatSetting(k, '', 3).value
}
/** Small exponent written out: 1e-6 -> 10⁻⁶. Falls back to a plain number for other mantissas. */
export function formatPfa(p: number): string {
  const exponent = Math.log10(p)
  if (Math.abs(exponent - Math.round(exponent)) > 1e-9) return p.toExponential(1).replace('e-', '·10⁻')
  const digits = String(Math.abs(Math.round(exponent)))
  return `10${exponent < 0 ? '⁻' : ''}${[...digits].map((d) => '⁰¹²³⁴⁵⁶⁷⁸⁹'[Number(d)]).join('')}`
}

/** One axis in degrees, minutes, seconds; seconds to 0.1 (3 m), carried over when they round to 60. */
function dms(value: number, positive: string, negative: string, degreeDigits: number): string {
  const tenths = Math.round(Math.abs(value) * 36_000)
  const deg = Math.floor(tenths / 36_000)
  const min = Math.floor((tenths % 36_000) / 600)
  const sec = (tenths % 600) / 10
  const two = (n: number): string => String(n).padStart(2, '0')
  return `${String(deg).padStart(degreeDigits, '0')}°${two(min)}′${sec.toFixed(1).padStart(4, '0')}″\u202f${value < 0 ? negative : positive}`
}
/** WGS 84 position: `46°12′08.4″ N 025°41′55.1″ W`. */
export function formatPosition(at: LonLat): string {
  const lon = at.lon > 180 ? at.lon - 360 : at.lon < -180 ? at.lon + 360 : at.lon
  return `${dms(at.lat, 'N', 'S', 2)}  ${dms(lon, 'E', 'W', 3)}`
}
/** WGS 84 position in decimal degrees, five places (1 m). */
export function formatDecimalPosition(at: LonLat): string {
  return `${at.lat.toFixed(5)}, ${at.lon.toFixed(5)}`
}
const WINDS = ['N', 'NE', 'E', 'SE', 'S', 'SW', 'W', 'NW'] as const
/** Nearest of eight winds to an azimuth from true north. */
export function windOf(azimuthDeg: number): (typeof WINDS)[number] {
  return WINDS[((Math.round(azimuthDeg / 45) % 8) + 8) % 8]
}
/** Sector of a need: `all round` or `090° to 180°`. */
export function formatSector(sector: readonly [number, number]): string {
  const [from, to] = sector
  if (to - from >= 360) return 'all round'
  const three = (deg: number): string => `${String(Math.round(((deg % 360) + 360) % 360)).padStart(3, '0')}°`
  return `${three(from)} to ${three(to)}`
}
/** Time left or taken, s: `under 1 s`, `4 s`, `2 min 05 s`, `1 h 10 min`; UP to whole seconds. */
export function formatDuration(seconds: number): string {
  if (!Number.isFinite(seconds)) return 'time unknown'
  if (seconds < 1) return 'under 1\u202fs'
  const s = Math.ceil(seconds - 1e-9)
  if (s < 60) return `${s}\u202fs`
  if (s < 3600) return `${Math.floor(s / 60)}\u202fmin ${String(s % 60).padStart(2, '0')}\u202fs`
  return `${Math.floor(s / 3600)}\u202fh ${String(Math.floor((s % 3600) / 60)).padStart(2, '0')}\u202fmin`
}
const MONTHS = 'January February March April May June July August September October November December'.split(' ')
/** ISO date or date-time, as given: `4 March 2026`. The words know no clock. */
export function formatDate(iso: string): string {
  const found = /^(\d{4})-(\d{2})-(\d{2})/.exec(iso)
  return found ? `${Number(found[3])} ${MONTHS[Number(found[2]) - 1] ?? found[2]} ${found[1]}` : iso
}
/** File size: `3.2 MB`. */
export function formatBytes(bytes: number): string {
  if (bytes < 1000) return `${bytes}\u202fB`
  return bytes < 1e6 ? `${formatNumber(bytes / 1e3, 1)}\u202fkB` : `${formatNumber(bytes / 1e6, 1)}\u202fMB`
}
