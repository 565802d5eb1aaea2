import type { StudyClient } from '../../app/compute/client.ts'
import type { Answer, Ask } from '../../core/runs/types.ts'

type Asked = {
  [K in keyof Ask]: {
    readonly kind: K
    readonly body: Ask[K]
    readonly answer: (body: Answer[K] | null) => void
    readonly fail: (e: Error) => void
  }
}[keyof Ask]

/** A study client whose questions wait until the test answers them. */
export function fakeClient() {
  const waiting: Asked[] = []
  const client: StudyClient = {
    ask: <K extends keyof Ask>(kind: K, body: Ask[K]) =>
      new Promise<Answer[K] | null>((resolve, reject) => {
        waiting.push({ kind, body, answer: resolve, fail: reject } as unknown as Asked)
      }),
    listen: () => () => {},
    close: () => {},
  }
  return { client, waiting }
}
