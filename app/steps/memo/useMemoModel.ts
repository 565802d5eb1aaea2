import { useDeferredValue, useEffect, useMemo, useRef, useState } from 'react'
import type { OptionRef } from '../../../core/index.ts'
import type { MemoModel } from '../../memo/model/index.ts'
import type { Session } from '../session/index.ts'
import { useDoc, useFaceNorth, useGround, useResults, useSession, useView } from '../session/index.ts'

type Build = (session: Session, only: OptionRef | null | undefined) => MemoModel | null

/** Loads model and input together on first use. */
async function loadBuild(): Promise<Build> {
  const [{ buildMemo }, { memoFiles, memoInput }] = await Promise.all([import('../../memo/model/index.ts'), import('./memoInput.ts')])
  return (session, only) => {
    const input = memoInput(session, memoFiles(session), [], new Date().toISOString())
    return input && input.results.length > 0 ? buildMemo(input, only) : null
  }
}

/** While options are being worked out the whole memo is written anew no more often than this, ms. */
const WHOLE_EVERY_MS = 4000

/** Serial of the results the memo is written from; the newest at once when nothing runs. */
function useSerial(whole: boolean): number {
  const newest = useDeferredValue(useResults((r) => r.serial))
  const running = useResults((r) => r.status !== null)
  const [taken, setTaken] = useState(newest)
  const takenAt = useRef(0)
  useEffect(() => {
    if (!whole) return
    const wait = takenAt.current + WHOLE_EVERY_MS - performance.now()
    const timer = setTimeout(
      () => {
        takenAt.current = performance.now()
        setTaken(newest)
      },
      Math.max(0, wait),
    )
    return () => clearTimeout(timer)
  }, [whole, newest])
  return whole && running ? taken : newest
}

/**
 * The memo as it stands: words and tables without pictures; null until something is computed. `only`: words of that option alone, as beside the map.
 * New results come in when the page has time for it.
 */
export function useMemoModel(only?: OptionRef | null): MemoModel | null {
  const session = useSession()
  const doc = useDoc((d) => d)
  const serial = useSerial(only === undefined)
  const any = useResults((r) => r.byOption.size > 0)
  const notes = useGround((g) => g.notes)
  const units = useView((v) => v.units)
  const north = useFaceNorth()
  const [build, setBuild] = useState<Build | null>(null)
  useEffect(() => {
    if (any) void loadBuild().then((b) => setBuild(() => b))
  }, [any])
  // biome-ignore lint/correctness/useExhaustiveDependencies: the input is read from the stores; these say when it has changed
  return useMemo(() => (build && any ? build(session, only) : null), [build, session, any, doc, serial, notes, units, north, only])
}
