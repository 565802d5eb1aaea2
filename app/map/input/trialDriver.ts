import type { StudyClient } from '../../compute/client.ts'
import type { MapHub, Trial } from '../types.ts'

/** The hand has to rest this long before the finer preview is asked for. */
export const STILL_AFTER_MS = 150

/**
 * Follows the trial on the hub: asks the study worker for a coarse preview of the newest, one at a time, for a finer one once the trial has come to
 * rest, and says when a picture of it can be painted. `onPicture(trial)` after each answer; `onPicture(null)` once the trial is over. Returns the stop.
 */
export function driveTrial(
  client: StudyClient,
  hub: MapHub,
  onPicture: (trial: Trial | null) => void,
  onError: (error: unknown) => void,
): () => void {
  let busy = false
  let done: Trial | null = null
  let fine = false
  let rest: ReturnType<typeof setTimeout> | undefined
  const ask = async (trial: Trial, still: boolean) => {
    const { candidate, lon, lat, heightM } = trial
    try {
      const answer = await client.ask('preview', { candidate, lon, lat, heightM, still })
      const now = hub.trial.get()
      if (!answer || !now || (still && !same(now, trial))) return
      fine = still
      hub.trialAnswer.set(answer)
      onPicture(trial)
    } catch (error) {
      onError(error)
    }
  }
  const pump = async () => {
    clearTimeout(rest)
    const trial = hub.trial.get()
    if (busy || !trial || trial === done) return
    if (done && same(done, trial)) {
      done = trial
      onPicture(trial)
    } else {
      busy = true
      fine = false
      // a finer preview still under way gives place to this one
      await ask(trial, false)
      busy = false
      done = trial
    }
    const now = hub.trial.get()
    if (now && now !== trial) void pump()
    else if (now && !fine) rest = setTimeout(() => void ask(now, true), now.resting ? 0 : STILL_AFTER_MS)
  }
  const stop = hub.trial.listen((trial) => {
    if (trial) return void pump()
    clearTimeout(rest)
    done = null
    hub.trialAnswer.set(null)
    onPicture(null)
  })
  return () => {
    clearTimeout(rest)
    stop()
  }
}
const same = (a: Trial, b: Trial): boolean => a.candidate === b.candidate && a.lon === b.lon && a.lat === b.lat && a.heightM === b.heightM
