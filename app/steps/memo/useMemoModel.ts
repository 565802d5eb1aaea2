import { useEffect, useMemo, useState } from 'react'
import type { MemoModel } from '../../memo/model/index.ts'
import { useDoc, useGround, useResults, useSession, useView } from '../session/index.ts'
import { memoFiles, memoInput } from './memoInput.ts'

type Build = typeof import('../../memo/model/index.ts').buildMemo

/** The memo as it stands: words and tables without pictures; null until something is computed. The model is loaded on first use. */
export function useMemoModel(): MemoModel | null {
  const session = useSession()
  const doc = useDoc((d) => d)
  const serial = useResults((r) => r.serial)
  const notes = useGround((g) => g.notes)
  const units = useView((v) => v.units)
  const [build, setBuild] = useState<Build | null>(null)
  useEffect(() => {
    void import('../../memo/model/index.ts').then((m) => setBuild(() => m.buildMemo))
  }, [])
  // biome-ignore lint/correctness/useExhaustiveDependencies: the input is read from the stores; these say when it has changed
  return useMemo(() => {
    if (!build || session.results.getState().byOption.size === 0) return null
    const input = memoInput(session, memoFiles(session), [], new Date().toISOString())
    return input && input.results.length > 0 ? build(input) : null
  }, [build, session, doc, serial, notes, units])
}
