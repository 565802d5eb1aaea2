import { addNeed, type StepId } from '../../document/index.ts'
import { Button } from '../../ui/Button.tsx'
import { useFilePicker } from '../forms/useFilePicker.tsx'
import { useMemoExport } from '../memo/useMemoExport.ts'
import { useDoc, useGround, useSession, useView } from '../session/index.ts'

/** One primary action per step: what comes next. */
export function PrimaryAction() {
  const { view, study } = useSession()
  const step = useView((v) => v.step)
  const placing = useView((v) => v.placing)
  const hasGround = useGround((g) => g.state === 'ready' || g.state === 'reading')
  const needs = useDoc((d) => d.needs?.length ?? 0)
  const candidates = useDoc((d) => d.candidates.length)
  const picker = useFilePicker()
  const memo = useMemoExport()
  const go = (to: StepId) => () => view.getState().set({ step: to, formOpen: true })
  const place = () => view.getState().set({ step: 'candidates', placing: true, formOpen: true })
  const action = ((): { words: string; run: () => void; disabled?: boolean } => {
    // what these steps work on is not there yet: the action that brings it
    if (step === 'candidates' || step === 'compare' || step === 'memo') {
      if (!hasGround) return { words: 'Add terrain', run: picker.open }
      if (candidates === 0 && !placing) return { words: step === 'candidates' ? 'Place on map' : 'Place a candidate', run: place }
    }
    switch (step) {
      case 'ground':
        return hasGround ? { words: 'Radar next', run: go('radar') } : { words: 'Add terrain', run: picker.open }
      case 'radar':
        return { words: 'Need next', run: go('need') }
      case 'need':
        return needs > 0 ? { words: 'Candidates next', run: go('candidates') } : { words: 'State a need', run: () => addNeed(study) }
      case 'candidates':
        if (candidates > 0 && !placing) return { words: 'Compare', run: go('compare') }
        return placing
          ? { words: 'Stop placing', run: () => view.getState().set({ placing: false }) }
          : { words: 'Place on map', run: place }
      case 'compare':
        return { words: 'Write memo', run: go('memo') }
      case 'memo':
        return { words: memo.busy ? 'Writing PDF' : 'Export PDF', run: memo.run, disabled: !memo.possible || memo.busy }
    }
  })()
  return (
    <>
      <Button look="primary" onPress={action.run} disabled={action.disabled}>
        {action.words}
      </Button>
      {picker.input}
    </>
  )
}
