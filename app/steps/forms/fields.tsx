import type { ReactNode } from 'react'
import { type DefaultUsed, limitOf, type StudyDoc } from '../../../core/index.ts'
import { problemsOf, setField, valueAt } from '../../document/index.ts'
import { CommitField, Mark, NumberField, readNumbers, Select } from '../../ui/index.ts'
import { type FaceUnit, type FieldWords, fromFace, originMark, type UnitKind, type UnitSystem, unitOf } from '../../words/index.ts'
import { useDoc, useSession, useView } from '../session/index.ts'
import { settledOf } from '../settled.ts'

const defaultAt = (doc: StudyDoc, path: string): DefaultUsed['value'] | undefined =>
  settledOf(doc)?.defaults.find((d) => d.path === path)?.value

/** Why the value at a path has to change; null when it may stay. */
const troubleAt = (doc: StudyDoc, path: string): string | null => {
  const problem = problemsOf(doc).find((p) => p.path === path)
  return problem ? `${problem.found}; ${problem.remedy}` : null
}
/** Face unit of a field under the unit switch. */
export const faceOf = (face: FieldWords['face'] | UnitKind, system: UnitSystem): FaceUnit =>
  typeof face === 'string' ? { unit: unitOf(face, system), size: fromFace(face, 1, system) } : face

/** Where the value at a key path comes from, in a word; nothing where the study does not say. */
export function OriginMark({ path }: { path: string }) {
  const origin = useDoc((d) => originAt(d, path))
  const mark = originMark(origin)
  return mark ? <span title={origin}>{mark === 'read' ? <span className="ink-3 small">read</span> : <Mark>{mark}</Mark>}</span> : null
}
const originAt = (doc: StudyDoc, path: string): string | undefined => {
  const at = /^(radar|needs\[\d+\])\.(.+)$/.exec(path)
  const origins = at ? (valueAt(doc, at[1]) as { origins?: Record<string, string> } | undefined)?.origins : undefined
  return origins?.[at?.[2] ?? '']
}

/** A number of the study at its key path, with unit, range, default and what is wrong with it. */
export function DocNumber({ of }: { of: FieldWords }) {
  const session = useSession()
  const system = useView((v) => v.units)
  const value = useDoc((d) => valueAt(d, of.path))
  const fallback = useDoc((d) => defaultAt(d, of.path))
  const trouble = useDoc((d) => troubleAt(d, of.path))
  return (
    <NumberField
      label={of.label}
      value={typeof value === 'number' ? value : undefined}
      onCommit={(v) => setField(session.study, of.path, v, `changed ${of.label.toLowerCase()}`)}
      face={faceOf(of.face, system)}
      limit={limitOf(of.path)}
      fallback={typeof fallback === 'number' ? fallback : undefined}
      fallbackWords={of.emptyWords}
      required={of.required}
      trouble={trouble}
      marks={<OriginMark path={of.path} />}
    />
  )
}

export interface DocChoiceProps<T extends string> {
  readonly path: string
  readonly label: string
  readonly choices: readonly { readonly id: T; readonly words: string; readonly hint?: string }[]
  readonly fallback: T
  /** Instead of setting the one value. */
  readonly onChange?: (value: T) => void
}
/** A choice of the study at its key path. */
export function DocChoice<T extends string>({ path, label, choices, fallback, onChange }: DocChoiceProps<T>) {
  const session = useSession()
  const value = useDoc((d) => valueAt(d, path)) as T | undefined
  return (
    <Select
      label={label}
      value={value ?? fallback}
      choices={choices}
      onChange={onChange ?? ((v) => setField(session.study, path, v, `changed ${label.toLowerCase()}`))}
      marks={value === undefined ? <Mark>default</Mark> : <OriginMark path={path} />}
    />
  )
}

/** A list of numbers in one field: "900, 1100". */
export function DocNumbers({
  path,
  label,
  face,
  help,
  required,
}: {
  path: string
  label: string
  face: FaceUnit
  help?: ReactNode
  required?: boolean
}) {
  const session = useSession()
  const value = useDoc((d) => valueAt(d, path)) as number[] | null | undefined
  const trouble = useDoc((d) => troubleAt(d, path))
  const commit = (text: string): string | null => {
    const read = readNumbers(text, face, limitOf(`${path}[0]`))
    if (!read.ok) return read.why
    if (read.values.length === 0 && required) return 'needed; give at least one'
    setField(session.study, path, read.values.length > 0 ? read.values : undefined, `changed ${label.toLowerCase()}`)
    return null
  }
  return (
    <CommitField
      label={label}
      text={(value ?? []).map((v) => Number((v / face.size).toPrecision(7))).join(', ')}
      onCommit={commit}
      unit={face.unit}
      numeric
      help={help}
      trouble={trouble}
      marks={<OriginMark path={path} />}
    />
  )
}
/** A row of form fields under a heading. */
export const Group = ({ title, children }: { title: string; children: ReactNode }) => (
  <section className="group">
    <h3>{title}</h3>
    {children}
  </section>
)

/** Seldom used fields under a plain heading, folded until asked for; open where one of them is stated. */
export const Folded = ({ title, open, children }: { title: string; open: boolean; children: ReactNode }) => (
  <details className="group folded" open={open || undefined}>
    <summary>{title}</summary>
    {children}
  </details>
)
