import { useEffect, useState } from 'react'
import type { Ladder } from '../../../core/index.ts'
import type { StudyClient } from '../../compute/client.ts'

/** Edits come in bursts: the ladder is asked for once they rest, and again after an ask was dropped for a newer study or another layer, ms. */
const REST_MS = 250
/** A worker that has no study yet refuses; so often is it asked again. */
const REFUSALS = 5

/**
 * Results against mast height of one candidate; null until they are there. `basis` is another object whenever study, ground or tilt are others.
 * An older ladder of the same candidate stays until the next.
 */
export function useLadder(
  client: StudyClient,
  candidate: string | null,
  basis: object,
): { readonly ladder: Ladder | null; readonly working: boolean } {
  const [held, setHeld] = useState<{ candidate: string; ladder: Ladder; basis: object } | null>(null)
  const [refusedFor, setRefusedFor] = useState<object | null>(null)
  useEffect(() => {
    if (candidate === null) return
    let gone = false
    let refused = 0
    let again: ReturnType<typeof setTimeout> | undefined
    const later = () => {
      if (!gone) again = setTimeout(ask, REST_MS * (1 + 4 * refused))
    }
    const ask = () =>
      client
        .ask('ladder', { candidate })
        .then((ladder) => {
          if (!ladder) later()
          else if (!gone) setHeld({ candidate, ladder, basis })
        })
        .catch(() => {
          if (++refused <= REFUSALS) later()
          else if (!gone) setRefusedFor(basis)
        })
    later()
    return () => {
      gone = true
      clearTimeout(again)
    }
  }, [client, candidate, basis])
  const ladder = held && held.candidate === candidate ? held.ladder : null
  return { ladder, working: candidate !== null && refusedFor !== basis && (ladder === null || held?.basis !== basis) }
}
