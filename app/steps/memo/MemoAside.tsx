import { lazy, Suspense } from 'react'
import { Caution } from '../../ui/Marks.tsx'
import { CAUTIONS, formatMast, textOf } from '../../words/index.ts'
import { useSession, useView } from '../session/index.ts'
import { useMemoModel } from './useMemoModel.ts'

const MemoColumn = lazy(() => import('../../memo/MemoColumn.tsx').then((m) => ({ default: m.MemoColumn })))

/** The memo writing itself for the option on show. A number pressed explains itself over the map. */
export function MemoAside() {
  const { view } = useSession()
  const option = useView((v) => v.option)
  const model = useMemoModel()
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
      <MemoColumn model={model} option={option} onExplain={(figure) => view.getState().set({ chart: 'figure', figure })} />
    </Suspense>
  )
}
