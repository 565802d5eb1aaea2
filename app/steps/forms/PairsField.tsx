import { limitOf } from '../../../core/index.ts'
import { setField, valueAt } from '../../document/index.ts'
import { CommitField, fieldText, readNumber } from '../../ui/index.ts'
import { DB, type FieldWords } from '../../words/index.ts'
import { useDoc, useSession, useView } from '../session/index.ts'
import { faceOf } from './fields.tsx'

/** A table of pairs, a row per line: first column in `first`, second in dB. */
export function PairsField({ path, label, first, example }: { path: string; label: string; first: FieldWords['face']; example: string }) {
  const { study } = useSession()
  const system = useView((v) => v.units)
  const rows = useDoc((d) => valueAt(d, path)) as [number, number][] | undefined
  const face = faceOf(first, system)
  const commit = (text: string): string | null => {
    const out: [number, number][] = []
    for (const [i, line] of text.split('\n').entries()) {
      const parts = line.trim().split(/[;\s]+|,\s+/)
      if (parts.length === 1 && parts[0] === '') continue
      if (parts.length !== 2) return `row ${i + 1}: two numbers are needed, found ${parts.length}`
      const a = readNumber(parts[0], face, limitOf(`${path}[0][0]`))
      const b = readNumber(parts[1], DB, limitOf(`${path}[0][1]`))
      if (!a.ok) return `row ${i + 1}: ${a.why}`
      if (!b.ok) return `row ${i + 1}: ${b.why}`
      if (a.value === undefined || b.value === undefined) continue
      if (out.length > 0 && a.value <= out[out.length - 1][0]) return `row ${i + 1}: the first column must rise`
      out.push([a.value, b.value])
    }
    setField(study, path, out, `changed ${path.split('.').at(-1) === 'curve' ? 'STC curve' : 'elevation table'}`)
    return null
  }
  return (
    <CommitField
      label={`${label}${face.unit ? ` (${face.unit})` : ''}`}
      text={(rows ?? []).map(([a, b]) => `${fieldText(a, face)}  ${fieldText(b, DB)}`).join('\n')}
      onCommit={commit}
      shape="wide"
      rows={Math.min(8, Math.max(3, (rows?.length ?? 0) + 1))}
      placeholder={example}
      help="Leave the field to apply"
    />
  )
}
