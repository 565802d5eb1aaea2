import { useEffect, useState } from 'react'
import type { Answer, Ask } from '../../../../core/index.ts'
import { sentenceOf, useResults, useSession } from '../../session/index.ts'

/** The worker's answer to one ask, asked again with every other ask and every new figure; the last answer stays until the next is there. */
export function useAnswer<K extends keyof Ask>(kind: K, body: Ask[K] | null): { answer: Answer[K] | null; none: boolean; trouble: string } {
  const { client } = useSession()
  const serial = useResults((r) => r.serial)
  const [state, setState] = useState<{ answer: Answer[K] | null; none: boolean; trouble: string }>({
    answer: null,
    none: false,
    trouble: '',
  })
  const key = JSON.stringify(body)
  // biome-ignore lint/correctness/useExhaustiveDependencies: the body is told by its text; new figures make it worth asking again
  useEffect(() => {
    if (!body) return
    let wanted = true
    client.ask(kind, body).then(
      (answer) => {
        if (wanted) setState((was) => ({ answer: answer ?? was.answer, none: answer === null && was.answer === null, trouble: '' }))
      },
      (error) => wanted && setState((was) => ({ ...was, trouble: sentenceOf(error) })),
    )
    return () => {
      wanted = false
    }
  }, [client, kind, key, serial])
  return state
}
