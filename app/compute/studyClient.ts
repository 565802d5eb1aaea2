import { type Answer, type Ask, InputError, type Tell } from '../../core/index.ts'
import type { StudyClient } from './client.ts'

interface Waiting {
  resolve(body: unknown): void
  reject(error: Error): void
}
type Failure = Extract<Tell, { kind: 'failure' }>['error']

/** Starts the study worker. The page asks; replies come back by id, everything else goes to the listeners. */
export function createStudyClient(): StudyClient {
  const worker = new Worker(new URL('./study.worker.ts', import.meta.url), { type: 'module', name: 'study' })
  const waiting = new Map<number, Waiting>()
  const listeners = new Set<(tell: Exclude<Tell, { kind: 'reply' }>) => void>()
  let next = 1
  worker.onmessage = ({ data }: MessageEvent<Tell>) => {
    if (data.kind === 'reply') {
      waiting.get(data.id)?.resolve(data.body)
      waiting.delete(data.id)
    } else if (data.kind === 'failure' && data.id !== null) {
      waiting.get(data.id)?.reject(errorOf(data.error))
      waiting.delete(data.id)
    } else for (const listener of listeners) listener(data)
  }
  worker.onerror = (event) => {
    const error = { code: 'fault', message: event.message || 'the study worker stopped' }
    for (const w of waiting.values()) w.reject(errorOf(error))
    waiting.clear()
    for (const listener of listeners) listener({ kind: 'failure', id: null, error })
  }
  return {
    ask<K extends keyof Ask>(kind: K, body: Ask[K], transfer: Transferable[] = []) {
      const id = next++
      return new Promise<Answer[K] | null>((resolve, reject) => {
        waiting.set(id, { resolve: resolve as Waiting['resolve'], reject })
        worker.postMessage({ id, kind, body }, transfer)
      })
    },
    listen(listener) {
      listeners.add(listener)
      return () => listeners.delete(listener)
    },
    close() {
      worker.terminate()
      for (const w of waiting.values()) w.resolve(null)
      waiting.clear()
    },
  }
}

/** A failure as it left the worker, as an error again: bad input keeps its code, place and remedy. */
function errorOf(f: Failure): Error {
  if (f.remedy === undefined) return Object.assign(new Error(f.message), { code: f.code, workerStack: f.stack })
  const error = new InputError({ code: f.code, found: f.message, remedy: f.remedy, ...(f.place === undefined ? {} : { place: f.place }) })
  error.message = f.message
  return error
}
