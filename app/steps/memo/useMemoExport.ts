import { createStore, useStore } from 'zustand'
import { sentenceOf, useDoc, useResults, useSession } from '../session/index.ts'
import { settledOf } from '../settled.ts'

/** Shared by the button in the top bar and the Memo step. */
const writing = createStore<{ done: number; total: number } | null>()(() => null)

/** Writes the memo as a PDF from what is computed so far. */
export function useMemoExport() {
  const session = useSession()
  const progress = useStore(writing)
  const sound = useDoc((d) => settledOf(d) !== null)
  const possible = useResults((r) => r.byOption.size > 0) && sound
  const run = async () => {
    if (writing.getState()) return
    writing.setState({ done: 0, total: 1 }, true)
    try {
      const { exportMemo } = await import('./exportMemo.ts')
      await exportMemo(session, new Date().toISOString(), (done, total) => writing.setState({ done, total }, true))
    } catch (error) {
      session.notices.getState().say(sentenceOf(error), 'bad')
    } finally {
      writing.setState(null, true)
    }
  }
  return { possible, progress, busy: progress !== null, run: () => void run() }
}
