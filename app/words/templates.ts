import { type Basis, basisOf, type TemplateValue } from '../../core/index.ts'
import { formatNumber, type Quantity, THIN } from './format.ts'
import {
  CIRCULAR_FIELDS,
  COSECANT_FIELD,
  ELEVATION_PATTERNS,
  type FieldWords,
  POLARISATIONS,
  RADAR_FIELDS,
  SUPPRESSION_FIELDS,
  SUPPRESSION_KINDS,
} from './steps.ts'
import { toFace, type UnitSystem, unitOf } from './units.ts'

const FIELDS = new Map<string, FieldWords>(
  [
    ...Object.values(RADAR_FIELDS).flat(),
    ...SUPPRESSION_FIELDS.stated,
    ...SUPPRESSION_FIELDS.canceller,
    ...CIRCULAR_FIELDS,
    COSECANT_FIELD,
  ].map((f) => [f.path, f]),
)
/** What is not a plain number field of the radar form, and the values of a need. */
const LABELS: Readonly<Record<string, string>> = {
  'radar.prfHz': 'PRF',
  'radar.coherentTransmitter': 'Coherent transmitter',
  'radar.polarisation': 'Polarisation',
  'radar.antenna.elevationPattern': 'Elevation pattern',
  'radar.suppression.kind': 'Kind of suppression',
  'radar.pulses': 'Pulses by range',
  'need.rcsM2': 'RCS',
  'need.swerling': 'Swerling case',
  'need.pd': 'Pd',
  'need.heightM': 'Height',
  'need.heightAbove': 'Heights are',
  'need.fromRangeM': 'From range',
  'need.toRangeM': 'To range',
}
const CHOICES = new Map([...POLARISATIONS, ...ELEVATION_PATTERNS, ...SUPPRESSION_KINDS].map((c): [string, string] => [c.id, c.words]))
const NEED_UNITS: Readonly<Record<string, FieldWords['face']>> = {
  'need.heightM': 'height',
  'need.fromRangeM': 'range',
  'need.toRangeM': 'range',
  'need.rcsM2': { unit: 'm²', size: 1 },
  'radar.prfHz': { unit: 'Hz', size: 1 },
}

export interface TemplateRow {
  readonly path: string
  readonly label: string
  readonly value: Quantity
  readonly basis: Basis
  readonly source: string
}
/** Values of a template as the face shows them; `part` says what the key paths are inside of. */
export const templateRows = (values: readonly TemplateValue[], part: 'radar' | 'need', system: UnitSystem): TemplateRow[] =>
  values.map((v) => ({
    path: v.path,
    label: labelOf(`${part}.${v.path}`),
    value: faceValue(`${part}.${v.path}`, v.value, system),
    basis: v.basis,
    source: tied(v.source),
  }))

/** Digit groups, and a number with its unit, do not part at the end of a line. */
export const tied = (text: string): string => text.replace(/(\d) (?=\d{3}\b)/g, `$1${THIN}`).replace(/(\d) (?=[a-zA-Zµ²%])/g, '$1\u00a0')

/** Label of a key path (`radar.antenna.gainDbi`, `needs[0].pd`); the path itself where the forms have none. */
export const labelOf = (path: string): string => {
  const key = path.replace(/^needs\[\d+\]/, 'need')
  return FIELDS.get(key)?.label ?? LABELS[key] ?? path
}

/** A value of the study at its key path, in the units of the face. */
export function faceValue(path: string, value: unknown, system: UnitSystem): Quantity {
  const key = path.replace(/^needs\[\d+\]/, 'need')
  const face = FIELDS.get(key)?.face ?? NEED_UNITS[key] ?? { unit: '', size: 1 }
  const unit = typeof face === 'string' ? unitOf(face, system) : face.unit
  const shown = (v: number) => {
    const n = Number((typeof face === 'string' ? toFace(face, v, system) : v / face.size).toPrecision(4))
    return unit === '' ? (n !== 0 && n < 1e-3 ? n.toExponential(0) : String(n)) : formatNumber(n, decimalsOf(n))
  }
  if (typeof value === 'number') return { value: shown(value), unit }
  if (typeof value === 'boolean') return { value: value ? 'yes' : 'no', unit: '' }
  if (Array.isArray(value) && value.every((v) => typeof v === 'number'))
    return { value: value.map(shown).join(key === 'need.heightM' ? ' to ' : ', '), unit }
  if (Array.isArray(value)) return { value: `${value.length} rows`, unit: '' }
  if (value === 'sea' || value === 'ground') return { value: value === 'sea' ? 'above sea level' : 'above ground', unit: '' }
  return { value: CHOICES.get(String(value)) ?? String(value), unit: '' }
}
const decimalsOf = (n: number): number => Math.min(3, (String(n).split('.')[1] ?? '').length)

/** Word beside a value whose origin the study states; null where it states none that is known. */
export const originMark = (origin: string | undefined): Basis | null => (origin === undefined ? null : basisOf(origin))

export const TEMPLATE_WORDS = {
  title: 'Start from',
  sets: 'Kinds of work',
  radars: 'Generic radars',
  own: 'Your radars',
  ask: 'Choose what to start from',
  replaces: { set: 'Takes the place of the radar and the needs', radar: 'Takes the place of the radar' },
  left: 'What is not listed takes the default of the study, or waits for you as needed',
} as const
