import type { Answer, Ask, Tell } from '../../core/index.ts'

/** The page's end of the message table. One study worker lives behind it. */
export interface StudyClient {
  /** Resolves with the answer; rejects with an Error carrying `code`, `place`, `remedy`. Superseded asks resolve with null. `transfer` hands arrays over. */
  ask<K extends keyof Ask>(kind: K, body: Ask[K], transfer?: Transferable[]): Promise<Answer[K] | null>
  /** Everything the worker says unasked. Returns the unsubscribe. */
  listen(listener: (tell: Exclude<Tell, { kind: 'reply' }>) => void): () => void
  close(): void
}
