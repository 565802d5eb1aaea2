import type * as z from 'zod'
import { allowed, limitOf } from './limits.ts'

/** Something in the document that has to change, at its field. */
export interface Problem {
  /** Key path such as `radar.frequencyHz` or `candidates[1].mastHeightsM[0]`; '' for the document itself. */
  readonly path: string
  /** Stable short code. */
  readonly code: string
  /** Clause: what was found. */
  readonly found: string
  /** Imperative clause: what to do. */
  readonly remedy: string
}

/** `a.b[2]` + `c` -> `a.b[2].c`. */
export const joinPath = (path: string, key: string | number): string =>
  typeof key === 'number' ? `${path}[${key}]` : path === '' ? key : `${path}.${key}`

/** `mast height is -5 m; give a mast height above 0 m and up to 1000 m.` */
export const problemSentence = (p: Problem): string => `${p.found}; ${p.remedy}.`

const show = (value: unknown): string => {
  const text = JSON.stringify(value) ?? String(value)
  return text.length > 40 ? `${text.slice(0, 39)}…` : text
}
const at = (doc: unknown, path: readonly PropertyKey[]): unknown => {
  let value = doc
  for (const key of path) {
    if (value === null || typeof value !== 'object') return undefined
    value = (value as Record<PropertyKey, unknown>)[key]
  }
  return value
}

const KINDS: Readonly<Record<string, string>> = {
  number: 'give a number',
  string: 'give a text in quotes',
  boolean: 'give true or false',
  array: 'give a list in square brackets',
  tuple: 'give a list of two numbers',
  object: 'give an object in braces',
  record: 'give an object in braces',
}

/** One issue of the schema as a problem in our words. */
export function problemOf(issue: z.core.$ZodIssue, doc: unknown): Problem {
  let path = ''
  for (const key of issue.path) path = joinPath(path, typeof key === 'symbol' ? String(key) : key)
  const value = at(doc, issue.path)
  if (issue.code === 'custom') {
    const params = issue.params as { code: string; found: string; remedy: string }
    return { path, code: params.code, found: params.found, remedy: params.remedy }
  }
  const limit = limitOf(path)
  const remedy =
    issue.code === 'invalid_value'
      ? `give ${issue.values.length > 1 ? 'one of ' : ''}${issue.values.map(show).join(', ')}`
      : issue.code === 'invalid_type'
        ? limit && issue.expected === 'number'
          ? allowed(limit)
          : (KINDS[issue.expected] ?? `give a ${issue.expected}`)
        : (KINDS[issue.code === 'too_small' || issue.code === 'too_big' ? issue.origin : 'tuple'] ?? 'correct it')
  if (value === undefined) return { path, code: 'missing', found: 'is missing', remedy }
  if (issue.code === 'invalid_type' || issue.code === 'invalid_value')
    return { path, code: 'wrong-kind', found: `found ${show(value)}`, remedy }
  return { path, code: 'wrong-shape', found: `found ${show(value)}`, remedy: 'give a list of two numbers' }
}
