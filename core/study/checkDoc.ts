import { crossChecks } from './crossChecks.ts'
import { walkKeys } from './keys.ts'
import { type Problem, problemOf, problemSentence } from './problems.ts'
import { studySchema } from './schema.ts'
import type { StudyDoc } from './types.ts'

/** A problem with its whole sentence, for the field it belongs to. */
export interface FieldProblem extends Problem {
  readonly message: string
}
export interface DocCheck {
  /** Format and version first, then misspelt keys, then the order of the schema. Empty = the document can be settled. */
  readonly problems: readonly FieldProblem[]
  readonly warnings: readonly string[]
}

function headProblem(doc: unknown): Problem | null {
  if (doc === null || typeof doc !== 'object' || Array.isArray(doc))
    return {
      path: '',
      code: 'not-a-study',
      found: 'this is not a study document',
      remedy: 'give a JSON object with format "sightfell-study"',
    }
  const { format, version } = doc as { format?: unknown; version?: unknown }
  const shown = (v: unknown) => (v === undefined ? 'missing' : JSON.stringify(v).slice(0, 40))
  if (format !== 'sightfell-study')
    return { path: 'format', code: 'format', found: `format is ${shown(format)}`, remedy: 'use "format": "sightfell-study"' }
  if (version === 1) return null
  const newer = typeof version === 'number' && version > 1
  return {
    path: 'version',
    code: 'version',
    found: `version is ${shown(version)}, this program reads version 1`,
    remedy: newer ? 'open it with a newer Sightfell' : 'use "version": 1',
  }
}

/**
 * Checks a document in progress and never throws: every problem at its key path, so that forms can show it at its field.
 * A study without terrain files, needs or candidates yet is a valid work in progress.
 */
export function checkDoc(doc: unknown): DocCheck {
  const head = headProblem(doc)
  if (head) return { problems: [withMessage(head)], warnings: [] }
  const keys = walkKeys(doc)
  const parsed = studySchema.safeParse(doc)
  const shape = parsed.success ? [] : parsed.error.issues.map((issue) => problemOf(issue, doc))
  const broken = new Set(shape.map((p) => p.path.split(/[.[]/, 1)[0]))
  const cross = crossChecks(doc as StudyDoc, (part) => !broken.has(part))
  return { problems: [...keys.misspelt, ...shape, ...cross].map(withMessage), warnings: keys.warnings }
}

const withMessage = (p: Problem): FieldProblem => ({ ...p, message: problemSentence(p) })
