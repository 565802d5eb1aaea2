import { useEffect, useState } from 'react'
import type { Ladder } from '../../../core/index.ts'
import type { StudyClient } from '../../compute/client.ts'

/** Figures come in bursts while options are worked out: the ladder is asked for once they rest, ms. */
const REST_MS = 250

/** Results against mast height of one candidate; null until they are there. An older ladder of the same candidate stays until the next. */
export function useLadder(client: StudyClient, candidate: string | null, serial: number): Ladder | null {
  const [held, setHeld] = useState<{ candidate: string; ladder: Ladder } | null>(null)
  // biome-ignore lint/correctness/useExhaustiveDependencies: new figures ask for a new ladder
  useEffect(() => {
    if (candidate === null) return
    let gone = false
    let again: ReturnType<typeof setTimeout> | undefined
    const ask = () =>
      client
        .ask('ladder', { candidate })
        .then((ladder) => {
          if (gone) return
          if (ladder) setHeld({ candidate, ladder })
          // superseded by a newer study: the next figures ask again
        })
        .catch(() => {
          // no ground or no candidate yet: the next figures ask again
        })
    again = setTimeout(ask, REST_MS)
    return () => {
      gone = true
      clearTimeout(again)
    }
  }, [client, candidate, serial])
  return held && held.candidate === candidate ? held.ladder : null
}
