import { useMemo } from 'react'
import { modelBlocks } from '../../memo/model/index.ts'
import { Button, Dialog } from '../../ui/index.ts'
import { useDoc, useResults, useSession, useView } from '../session/index.ts'
import { Blocks } from './MemoPages.tsx'
import { memoInput } from './memoInput.ts'

/** Every model the study uses with source, limits and basis, and where the study leaves them: the rows of the memo's own annex. */
export function ModelsDialog() {
  const session = useSession()
  const doc = useDoc((d) => d)
  const serial = useResults((r) => r.serial)
  const units = useView((v) => v.units)
  // biome-ignore lint/correctness/useExhaustiveDependencies: the input is read from the stores; these say when it has changed
  const blocks = useMemo(() => {
    const input = memoInput(session, [], [], '')
    return input ? modelBlocks(input) : null
  }, [session, doc, serial, units])
  const close = () => session.view.getState().set({ dialog: null })
  return (
    <Dialog title="Models and sources" open wide onClose={close} actions={<Button onPress={close}>Close</Button>}>
      <div className="models-page memo-pages">
        {blocks ? <Blocks blocks={blocks} /> : <p className="ink-2">A value of the study has to change before its models can be listed</p>}
      </div>
    </Dialog>
  )
}
