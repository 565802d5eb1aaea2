import { availableParallelism } from 'node:os'
import { Worker } from 'node:worker_threads'
import { type HelperAsk, SweepCrew } from '../../../core/index.ts'

const MOST_HELPERS = 7

/** Threads that take a share of sweeps, one for each further core unless said. They do not keep the process alive. */
export function sweepHelpers(count = Math.min(MOST_HELPERS, availableParallelism() - 1)): { crew: SweepCrew; close: () => Promise<void> } {
  const threads = Array.from({ length: count }, () => new Worker(new URL('./sweepHelperBoot.mjs', import.meta.url)))
  for (const thread of threads) thread.unref()
  return {
    crew: new SweepCrew(threads.map((thread) => (ask: HelperAsk) => thread.postMessage(ask))),
    close: async () => void (await Promise.all(threads.map((thread) => thread.terminate()))),
  }
}
