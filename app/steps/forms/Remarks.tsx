import { useMemo } from 'react'
import { Caution } from '../../ui/Marks.tsx'
import { useDoc } from '../session/index.ts'
import { remarksOf } from '../settled.ts'

/** The study's own remarks that concern a step: those whose key path begins with one of `about`. */
export function Remarks({ about }: { about: readonly string[] }) {
  const doc = useDoc((d) => d)
  const remarks = useMemo(() => remarksOf(doc), [doc])
  return remarks.filter((r) => about.some((a) => r.startsWith(a))).map((r) => <Caution key={r}>{r}</Caution>)
}
