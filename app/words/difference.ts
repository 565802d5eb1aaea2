import { differenceInfo, type LayerId, layerInfo, type Probe } from '../../core/index.ts'
import { formatAngle, formatNumber, formatPd, NO_VALUE, type Quantity, THIN, textOf } from './format.ts'
import { LAYER_WORDS } from './layers.ts'
import { toFace, type UnitSystem, unitOf } from './units.ts'

/** Words of a layer shown against a second option. */
export const DIFFERENCE_WORDS = {
  against: 'against',
  as: 'as',
  add: 'against another',
  none: 'nothing else',
  how: 'How',
  choices: { difference: 'a difference', maps: 'two maps' },
  candidate: 'Against candidate',
  height: 'Against mast height',
  tilt: 'Against tilt',
  noDifference: 'causes are names: shown as two maps',
  note: 'bare: no difference, or not known for both',
} as const

/** What the two ends of a difference mean, low then high: `less comes back for A`, `more comes back for A`. */
export function differenceEnds(layer: LayerId, a: string): readonly [string, string] {
  const how = differenceInfo(layer)
  const family = layerInfo(layer).family
  if (layer === 'depression') return [`flatter for ${a}`, `steeper for ${a}`]
  if (family === 'echo') return [`less comes back for ${a}`, `more comes back for ${a}`]
  if (family === 'takes') return [`less needed for ${a}`, `more needed for ${a}`]
  return how?.moreIs === 'worse' ? [`more seen for ${a}`, `less seen for ${a}`] : [`less seen for ${a}`, `more seen for ${a}`]
}
/** Title of the legend: `Clutter-to-noise, A at 20 m less B at 30 m`. */
export const differenceTitle = (layer: LayerId, a: string, b: string): string => `${LAYER_WORDS[layer].title}, ${a} less ${b}`

/** Labelled stops of a ramp of differences, at their share 0…1, with the unit of the face. */
export function differenceStops(
  layer: LayerId,
  units: UnitSystem,
): { readonly unit: string; readonly labels: readonly { readonly at: number; readonly text: string }[] } {
  const how = differenceInfo(layer)
  if (!how) return { unit: '', labels: [] }
  const { low, high, stops } = how.ramp
  const share = (v: number): number => (v - low) / (high - low)
  const signed = (v: number): string => (v > 0 ? `+${formatNumber(v, decimals(v))}` : formatNumber(v, decimals(v)))
  if (layer !== 'coverage-floor')
    return { unit: unitOfDifference(layer, units), labels: stops.map((v) => ({ at: share(v), text: signed(v) })) }
  const perM = toFace('height', 1, units)
  const step = units === 'metric' ? 500 : 2000
  const most = Math.floor((high * perM) / step) * step
  const labels = []
  for (let v = -most; v <= most; v += step) labels.push({ at: share(v / perM), text: signed(v) })
  return { unit: unitOf('height', units), labels }
}
const decimals = (v: number): number => (Number.isInteger(v) ? 0 : 1)
const unitOfDifference = (layer: LayerId, units: UnitSystem): string =>
  layer === 'coverage-floor' ? unitOf('height', units) : layer === 'height-to-see' ? 'm' : (layerInfo(layer).unit.replace('deg', '°') ?? '')

/** A difference at the pointer, nearest, with its sign: `+12 dB`. */
export function formatDifference(layer: LayerId, value: number, units: UnitSystem): Quantity {
  const signed = (q: Quantity): Quantity => (value > 0 && q.value !== NO_VALUE ? { ...q, value: `+${q.value}` } : q)
  switch (layer) {
    case 'coverage-floor':
      return signed({ value: formatNumber(toFace('height', value, units), 0), unit: unitOf('height', units) })
    case 'height-to-see':
      return signed({ value: formatNumber(value, 1), unit: 'm' })
    case 'depression':
      return signed(formatAngle(value, 0.01))
    case 'probability-of-detection':
      return signed(value < 0 ? { value: `−${formatPd(-value).value}`, unit: '' } : formatPd(value))
    default:
      return signed({ value: formatNumber(value, 0), unit: 'dB' })
  }
}
/** End of the read-out's second line: `+12 dB against B at 30 m`, or the second option's own word. */
export function againstWords(probe: Probe, other: string, units: UnitSystem): string {
  if (!probe.against) return ''
  if (typeof probe.difference === 'number') return `${textOf(formatDifference(probe.layer, probe.difference, units))} against ${other}`
  return probe.against.word ? `${other}:${THIN}${probe.against.word}` : ''
}
