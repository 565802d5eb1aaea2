import { lazy, Suspense, useRef } from 'react'
import type { OptionRef } from '../../../core/index.ts'
import { optionKey, sameOption } from '../../document/index.ts'
import type { MemoModel } from '../../memo/model/index.ts'
import { Caution } from '../../ui/Marks.tsx'
import { CAUTIONS, formatMast, textOf } from '../../words/index.ts'
import { useResults, useSession, useView } from '../session/index.ts'
import { useMemoModel } from './useMemoModel.ts'

const MemoColumn = lazy(() => import('../../memo/MemoColumn.tsx').then((m) => ({ default: m.MemoColumn })))

/** The memo writing itself for the option on show. A number pressed explains itself over the map. */
export function MemoAside() {
  const { view } = useSession()
  const option = useView((v) => v.option)
  const { model, stale } = useLastModel()
  if (!model)
    return (
      <>
        <p className="ink-2">
          {option
            ? `${option.candidate} at ${textOf(formatMast(option.heightM))}: the memo writes itself here once this is computed`
            : 'The memo writes itself here once a candidate is placed'}
        </p>
        <Caution>
          {CAUTIONS.prediction} {CAUTIONS.notForNavigation}
        </Caution>
      </>
    )
  return (
    <Suspense fallback={null}>
      {stale ? <p className="mark">changed: figures below are of before</p> : null}
      <div className={stale ? 'stale' : undefined} aria-busy={stale}>
        <MemoColumn model={model} option={option} onExplain={(figure) => view.getState().set({ chart: 'figure', figure })} />
      </div>
    </Suspense>
  )
}

/** The memo; while the option on show is being computed again, the memo as it was, marked so. */
function useLastModel(): { model: MemoModel | null; stale: boolean } {
  const option = useView((v) => v.option)
  const model = useMemoModel(option)
  const computed = useResults((r) => (option ? r.byOption.has(optionKey(option)) : true))
  const last = useRef<{ model: MemoModel; option: OptionRef | null } | null>(null)
  if (model && computed) last.current = { model, option }
  if (computed || !last.current || !sameOption(last.current.option, option)) return { model, stale: false }
  return { model: last.current.model, stale: true }
}
