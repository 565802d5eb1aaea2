import { findNodeAtLocation, type Node, type ParseError, parseTree, printParseErrorCode } from 'jsonc-parser'
import { InputError } from '../errors/index.ts'
import { checkDoc, type FieldProblem } from './checkDoc.ts'
import { joinPath, type Problem } from './problems.ts'
import type { StudyDoc } from './types.ts'

const lineColumn = (text: string, offset: number): { line: number; column: number } => {
  const before = text.slice(0, offset)
  const line = before.split('\n').length
  return { line, column: offset - before.lastIndexOf('\n') }
}

const SYNTAX: Readonly<Record<string, string>> = {
  InvalidSymbol: 'found a word that is not JSON',
  InvalidNumberFormat: 'found a number that is not JSON',
  PropertyNameExpected: 'a key in double quotes is expected',
  ValueExpected: 'a value is expected',
  ColonExpected: 'a colon is expected',
  CommaExpected: 'a comma is expected',
  CloseBraceExpected: 'a closing brace } is expected',
  CloseBracketExpected: 'a closing bracket ] is expected',
  EndOfFileExpected: 'text after the end of the document',
  InvalidCommentToken: 'JSON has no comments',
  UnexpectedEndOfComment: 'JSON has no comments',
  UnexpectedEndOfString: 'a text in quotes is not closed',
  UnexpectedEndOfNumber: 'a number is cut short',
  InvalidUnicode: 'a \\u escape is not complete',
  InvalidEscapeCharacter: 'an escape after \\ is not JSON',
  InvalidCharacter: 'a control character inside quotes',
}

/** A key that stands twice in one object: JSON would silently keep the last. */
function twice(node: Node, path: string): Problem | null {
  const seen = new Set<string>()
  for (const [index, child] of (node.children ?? []).entries()) {
    const key = node.type === 'object' ? String(child.children?.[0]?.value) : index
    const at = joinPath(path, key)
    if (typeof key === 'string' && seen.has(key))
      return { path: at, code: 'key-twice', found: 'this key is given twice', remedy: 'keep one of the two' }
    if (typeof key === 'string') seen.add(key)
    const value = node.type === 'object' ? child.children?.[1] : child
    const inside = value?.children ? twice(value, at) : null
    if (inside) return inside
  }
  return null
}

/** JSON text to a plain value and its tree. @throws InputError with line and column. */
function readJson(text: string, file: string): { value: unknown; root: Node; source: string } {
  const source = text.replace(/^\uFEFF/, '')
  const errors: ParseError[] = []
  let root: Node | undefined
  let value: unknown
  try {
    root = parseTree(source, errors, { disallowComments: true, allowTrailingComma: false, allowEmptyContent: false })
    const first = errors[0]
    if (first) {
      const { line, column } = lineColumn(source, first.offset)
      const found = SYNTAX[printParseErrorCode(first.error)] ?? 'not JSON'
      throw new InputError({ code: 'json', file, place: `line ${line}, column ${column}`, found, remedy: 'correct the JSON there' })
    }
    value = JSON.parse(source)
    const repeated = root ? twice(root, '') : null
    if (repeated && root) throw new InputError({ ...repeated, file, place: placeOf(repeated, root, source) })
  } catch (error) {
    if (error instanceof InputError) throw error
    throw new InputError({ code: 'json', file, found: 'not JSON that can be read', remedy: 'give a study as plain JSON text' })
  }
  if (!root) throw new InputError({ code: 'json', file, found: 'the file is empty', remedy: 'give a study as JSON' })
  return { value, root, source }
}

/** Key path and the line on which it stands (or the line of the object that lacks it). */
function placeOf(problem: Problem, root: Node, source: string): string {
  const steps = [...problem.path.matchAll(/\[(\d+)\]|([^.[\]]+)/g)].map((s) => (s[1] === undefined ? s[2]! : Number(s[1])))
  let node: Node | undefined
  for (let n = steps.length; n > 0 && !node; n--) node = findNodeAtLocation(root, steps.slice(0, n))
  const { line } = lineColumn(source, (node ?? root).offset)
  return problem.path === '' ? `line ${line}` : `${problem.path} (line ${line})`
}

/** A study as opened for work: what is wrong is listed, not thrown. */
export interface Draft {
  readonly doc: StudyDoc
  /** With the place in the text: key path and line. */
  readonly problems: readonly (FieldProblem & { readonly place: string })[]
  readonly warnings: readonly string[]
}

/**
 * Opens a study that may still be in progress.
 * @param text JSON; @param fileName for the sentences
 * @throws InputError for JSON syntax (line and column), a document that is not a study, or another version
 */
export function openDraft(text: string, fileName: string): Draft {
  const { value, root, source } = readJson(text, fileName)
  const { problems, warnings } = checkDoc(value)
  const head = problems.find((p) => p.path === '' || p.code === 'format' || p.code === 'version')
  if (head) throw new InputError({ ...head, file: fileName, place: placeOf(head, root, source) })
  const placed = problems.map((p) => ({ ...p, place: placeOf(p, root, source) }))
  return { doc: value as StudyDoc, problems: placed, warnings }
}

/**
 * Reads a study that must be sound. Empty lists of terrain files and candidates pass: what needs them says so.
 * @param text JSON; @param fileName for the sentences
 * @throws InputError at the first problem: file, key path and line, what was found, what to do
 */
export function parseStudy(text: string, fileName: string): { doc: StudyDoc; warnings: string[] } {
  const { value, root, source } = readJson(text, fileName)
  const { problems, warnings } = checkDoc(value)
  const first = problems[0]
  if (first) throw new InputError({ ...first, file: fileName, place: placeOf(first, root, source) })
  return { doc: value as StudyDoc, warnings: [...warnings] }
}
