import type { Channel, MapHub } from './types.ts'

/** A value with listeners. */
export function createChannel<T>(initial: T): Channel<T> {
  let value = initial
  const listeners = new Set<(value: T) => void>()
  return {
    get: () => value,
    set(next) {
      if (Object.is(next, value)) return
      value = next
      for (const listener of listeners) listener(value)
    },
    listen(listener) {
      listeners.add(listener)
      return () => listeners.delete(listener)
    },
  }
}
/** The channels between map, ruler, horizon strip and charts. */
export const createMapHub = (): MapHub => ({
  pointer: createChannel<ReturnType<MapHub['pointer']['get']>>(null),
  trial: createChannel<ReturnType<MapHub['trial']['get']>>(null),
  trialAnswer: createChannel<ReturnType<MapHub['trialAnswer']['get']>>(null),
})
