import { type HelperAsk, SweepCrew, type SweepHelpers } from '../../core/index.ts'

const MOST_HELPERS = 6

/** Threads beside the study worker for its sweeps, one for each further core; none where memory cannot be shared. */
export function startSweepHelpers(): SweepHelpers | null {
  const count = Math.min(MOST_HELPERS, navigator.hardwareConcurrency - 1)
  if (!crossOriginIsolated || count < 1) return null
  const posts = Array.from({ length: count }, () => {
    const worker = new Worker(new URL('./sweep.worker.ts', import.meta.url), { type: 'module', name: 'sweep' })
    return (ask: HelperAsk) => worker.postMessage(ask)
  })
  return new SweepCrew(posts)
}
