import { lazy, Suspense, useCallback, useMemo, useState } from 'react'
import { measuredPoints } from '../../charts/index.ts'
import { optionKey } from '../../document/index.ts'
import type { MapHub } from '../../map/index.ts'
import { useResults, useSession, useView } from '../session/index.ts'
import { CopyButtons } from './charts/CopyButtons.tsx'
import { useAnswer } from './charts/useAnswer.ts'

const HorizonStrip = lazy(() => import('../../map/index.ts').then((m) => ({ default: m.HorizonStrip })))

const NO_ROWS: never[] = []
/** Azimuths of a pick are taken to the tenth of a degree. */
const tenth = (deg: number): number => Math.round(10 * deg) / 10

/** The horizon strip with what it needs of the session. */
export function StripSlot({ hub }: { hub: MapHub }) {
  const { view } = useSession()
  const option = useView((v) => v.option)
  const units = useView((v) => v.units)
  const figures = useResults((r) => (option ? r.byOption.get(optionKey(option))?.figures : undefined))
  const horizon = figures?.horizon
  const measured = useMemo(() => measuredPoints(figures?.measuredHorizon), [figures])
  const [stretched, setStretched] = useState(false)
  const { answer: lines } = useAnswer('horizons', stretched && option ? { option } : null)
  const open = useCallback(
    (azimuthDeg: number) => {
      const { chart } = view.getState()
      view.getState().set({ chart: chart === 'vertical' ? chart : 'profile', profileAzimuthDeg: tenth(azimuthDeg) })
    },
    [view],
  )
  return (
    <Suspense fallback={null}>
      <HorizonStrip
        hub={hub}
        rows={horizon?.rows ?? NO_ROWS}
        lines={lines ?? NO_ROWS}
        measured={measured}
        units={units}
        onPick={open}
        onStretched={setStretched}
        onCharts={() => open(view.getState().profileAzimuthDeg ?? horizon?.highest?.azimuthDeg ?? 0)}
        copy={(drawing, csv) => <CopyButtons name="horizon" drawing={drawing} csv={csv} />}
      />
    </Suspense>
  )
}
