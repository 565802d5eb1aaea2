import { distance } from 'fastest-levenshtein'
import * as z from 'zod'
import { joinPath, type Problem } from './problems.ts'
import { studySchema } from './schema.ts'

/** Keys whose models come later: kept untouched and reported as not assessed, by the object they stand in. */
const LATER: Readonly<Record<string, readonly string[]>> = {
  radar: ['scan'],
  'candidates[]': ['surveyedErrorM', 'screeningBandDeg'],
  '': ['screeningBandDeg'],
}

/** What the walk over the keys of a document found. */
export interface KeyFindings {
  readonly misspelt: readonly Problem[]
  readonly warnings: readonly string[]
}

/** The known key that an unknown one was meant to be: edit distance up to 2 and up to a third of its length, or other capitals only. */
export function meant(key: string, known: readonly string[]): string | undefined {
  let best: string | undefined
  let bestDistance = Infinity
  for (const k of known) {
    const d = k.toLowerCase() === key.toLowerCase() ? 0 : distance(key, k)
    if (d < bestDistance && d <= 2 && d <= key.length / 3) {
      best = k
      bestDistance = d
    }
  }
  return best
}

function inner(schema: unknown): unknown {
  let s = schema
  while (s instanceof z.ZodOptional || s instanceof z.ZodNullable) s = s.unwrap()
  return s
}

/** Walks the keys of a document against the schema: misspelt keys are problems, other unknown keys are kept and warned about. */
export function walkKeys(doc: unknown): KeyFindings {
  const misspelt: Problem[] = []
  const warnings: string[] = []
  const visit = (value: unknown, schema: unknown, path: string): void => {
    const s = inner(schema)
    if (Array.isArray(value)) {
      if (s instanceof z.ZodArray) for (let i = 0; i < value.length; i++) visit(value[i], s.element, joinPath(path, i))
      return
    }
    if (value === null || typeof value !== 'object') return
    if (s instanceof z.ZodRecord) {
      for (const [key, entry] of Object.entries(value)) visit(entry, s.valueType, joinPath(path, key))
      return
    }
    if (!(s instanceof z.ZodObject)) return
    const shape: Record<string, unknown> = s.shape
    const later = LATER[path.replace(/\[\d+\]/g, '[]')] ?? []
    const known = [...Object.keys(shape), ...later]
    for (const [key, entry] of Object.entries(value)) {
      const at = joinPath(path, key)
      if (Object.hasOwn(shape, key)) visit(entry, shape[key], at)
      else if (later.includes(key)) warnings.push(`${at}: kept, not assessed yet`)
      else {
        const guess = meant(key, known)
        if (guess !== undefined) {
          const found = `unknown key "${key}", did you mean "${guess}"?`
          misspelt.push({ path: at, code: 'misspelt-key', found, remedy: 'correct the key or take it out' })
        } else warnings.push(`${at}: unknown key, kept but not used`)
      }
    }
  }
  visit(doc, studySchema, '')
  return { misspelt, warnings }
}
