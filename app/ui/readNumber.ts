import { type Limit, within } from '../../core/index.ts'
import type { FaceUnit } from '../words/index.ts'

export type ReadNumber = { readonly ok: true; readonly value: number | undefined } | { readonly ok: false; readonly why: string }

/** Digits shown: a converted unit has no round values, so that more would only be noise; an untouched field is never applied. */
const DIGITS = 7
const CONVERTED_DIGITS = 5
const decimal = (size: number): boolean => Math.abs(Math.log10(size) - Math.round(Math.log10(size))) < 1e-9
const SPACES = /[\s\u00a0\u202f\u2009]/g

/** An SI value as it stands in a field: no grouping. */
export function fieldText(si: number | null | undefined, face: FaceUnit): string {
  if (si === null || si === undefined || !Number.isFinite(si)) return ''
  return String(Number((si / face.size).toPrecision(decimal(face.size) ? DIGITS : CONVERTED_DIGITS))).replace('-', '−')
}

/** The same while the field is not worked on: a converted value of five digits only shows what conversion did to it; three or four say as much. */
export function restText(si: number | null | undefined, face: FaceUnit): string {
  const whole = fieldText(si, face)
  if (whole === '' || si === null || si === undefined || decimal(face.size)) return whole
  if (
    whole
      .replace(/^−?0*\.?0*/, '')
      .replace('.', '')
      .replace(/0+$/, '').length <=
    CONVERTED_DIGITS - 1
  )
    return whole
  const value = si / face.size
  return String(Number(value.toPrecision(Math.abs(value) >= 1000 ? 4 : 3))).replace('-', '−')
}

/** What may stand in a field, in face units: "give 0.03 to 40 GHz". */
export function allowedAtFace(limit: Limit, face: FaceUnit): string {
  const low = fieldText(limit.low, face)
  const high = fieldText(limit.high, face)
  const unit = face.unit ? ` ${face.unit}` : ''
  const kind = limit.whole ? 'a whole number ' : ''
  if (limit.lowOpen) return `give ${kind}above ${low} and ${limit.highOpen ? 'below' : 'up to'} ${high}${unit}`
  return `give ${kind}from ${low} to ${high}${unit}`
}

/** Reads what was typed, face units in, SI out. Empty is undefined: the default takes its place. The unit may be typed too. */
export function readNumber(text: string, face: FaceUnit, limit?: Limit): ReadNumber {
  let plain = text.replace(SPACES, '').replaceAll('−', '-')
  if (plain === '') return { ok: true, value: undefined }
  if (face.unit && plain.endsWith(face.unit.replace(SPACES, ''))) plain = plain.slice(0, -face.unit.replace(SPACES, '').length)
  if (/^[+-]?\d+,\d{3}$/.test(plain))
    return { ok: false, why: `“${text.trim()}” can be read two ways; write it with a point, or with no comma` }
  plain = plain.replace(/^([+-]?\d*),(\d+)$/, '$1.$2')
  const typed = /^[+-]?(\d+\.?\d*|\.\d+)(e[+-]?\d+)?$/i.test(plain) ? Number(plain) : Number.NaN
  const may = limit ? `; ${allowedAtFace(limit, face)}` : ''
  if (!Number.isFinite(typed)) return { ok: false, why: `“${text.trim()}” is no number${may}` }
  // thirteen digits keep 2.75 GHz from becoming 2 750 000 000.000 000 5 Hz
  const value = Number((typed * face.size).toPrecision(13))
  if (limit && !within(limit, value))
    return { ok: false, why: `${fieldText(value, face)}${face.unit ? ` ${face.unit}` : ''} is outside; ${allowedAtFace(limit, face)}` }
  return { ok: true, value }
}

/** A list of numbers parted by commas, semicolons or spaces. */
export function readNumbers(text: string, face: FaceUnit, limit?: Limit): { ok: true; values: number[] } | { ok: false; why: string } {
  const parts = text.split(/[;,\s]+/).filter((p) => p !== '' && p !== face.unit)
  const values: number[] = []
  for (const part of parts) {
    const read = readNumber(part, face, limit)
    if (!read.ok) return read
    if (read.value !== undefined) values.push(read.value)
  }
  return { ok: true, values }
}
