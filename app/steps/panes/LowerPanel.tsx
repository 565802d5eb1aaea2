import { useEffect, useState } from 'react'
import type { CellLedger } from '../../../core/index.ts'
import type { MapHub } from '../../map/index.ts'
import { Notice } from '../../ui/index.ts'
import { Explain } from '../compare/Explain.tsx'
import { sentenceOf, useResults, useSession, useView } from '../session/index.ts'
import { LevelsPane } from './charts/LevelsPane.tsx'
import { ProfilePane } from './charts/ProfilePane.tsx'
import { SuppressionPane } from './charts/SuppressionPane.tsx'
import { VerticalPane } from './charts/VerticalPane.tsx'
import { Ledger } from './Ledger.tsx'

/** What stands over the lower half of the map: a chart, the ledger of a cell, or what a figure means. */
export function LowerPanel({ hub }: { hub: MapHub }) {
  const chart = useView((v) => v.chart)
  if (chart === 'figure') return <Explain />
  if (chart === 'ledger') return <LedgerPanel />
  if (chart === 'vertical') return <VerticalPane hub={hub} />
  if (chart === 'rings') return <LevelsPane hub={hub} />
  if (chart === 'suppression') return <SuppressionPane />
  return <ProfilePane hub={hub} />
}

function LedgerPanel() {
  const { client } = useSession()
  const option = useView((v) => v.option)
  const cell = useView((v) => v.cell)
  const serial = useResults((r) => r.serial)
  const [ledger, setLedger] = useState<CellLedger | null>(null)
  const [trouble, setTrouble] = useState('')
  // biome-ignore lint/correctness/useExhaustiveDependencies: new figures make the ledger worth asking for again
  useEffect(() => {
    if (!option || !cell) return
    let wanted = true
    client.ask('ledger', { at: cell, option }).then(
      (answer) => {
        if (!wanted || !answer) return
        setLedger(answer)
        setTrouble('')
      },
      (error) => wanted && setTrouble(sentenceOf(error)),
    )
    return () => {
      wanted = false
    }
  }, [client, option, cell, serial])
  if (trouble) return <Notice tone="bad">{trouble}</Notice>
  return ledger ? <Ledger ledger={ledger} /> : <p className="ink-3">Reading the cell</p>
}
