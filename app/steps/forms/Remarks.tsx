import { useMemo } from 'react'
import { Caution } from '../../ui/Marks.tsx'
import { COSECANT_FIELD, RADAR_FIELDS, STARTING_ADVICE } from '../../words/index.ts'
import { useDoc } from '../session/index.ts'
import { remarksOf } from '../settled.ts'

const LABELS = new Map([...Object.values(RADAR_FIELDS).flat(), COSECANT_FIELD].map((f) => [f.path, f.label]))
const PATH = /^(?:radar|atmosphere|run|needs|candidates|terrain|landCover|obstacles|roads|facades|tables)[\w.[\]]*:?\s+/

/** A remark in the words of the form: its key path becomes the field's label, or goes where the step says it already. */
function faceWords(remark: string): string {
  const path = PATH.exec(remark)?.[0] ?? ''
  const label = LABELS.get(path.replace(/:?\s+$/, ''))
  const rest = remark.slice(path.length)
  const text = label ? `${label}: ${rest}` : rest + (rest.startsWith('starting values') ? STARTING_ADVICE : '')
  return text.charAt(0).toUpperCase() + text.slice(1)
}

/** The study's own remarks that concern a step: those whose key path begins with one of `about`. */
export function Remarks({ about }: { about: readonly string[] }) {
  const doc = useDoc((d) => d)
  const remarks = useMemo(() => remarksOf(doc), [doc])
  return remarks.filter((r) => about.some((a) => r.startsWith(a))).map((r) => <Caution key={r}>{faceWords(r)}</Caution>)
}
