import type { StudyClient } from '../../compute/client.ts'
import type { MapHub, Trial } from '../types.ts'

/**
 * Follows the trial on the hub: asks the study worker for a preview of the newest, one at a time, and says when a picture of it can be painted.
 * `onPicture(trial)` after each answer; `onPicture(null)` once the trial is over. Returns the stop.
 */
export function driveTrial(
  client: StudyClient,
  hub: MapHub,
  onPicture: (trial: Trial | null) => void,
  onError: (error: unknown) => void,
): () => void {
  let busy = false
  let done: Trial | null = null
  const pump = () => {
    const trial = hub.trial.get()
    if (busy || !trial || trial === done) return
    if (done && same(done, trial)) {
      done = trial
      onPicture(trial)
      return
    }
    busy = true
    const { candidate, lon, lat, heightM } = trial
    client
      .ask('preview', { candidate, lon, lat, heightM })
      .then((answer) => {
        done = trial
        if (!hub.trial.get()) return
        if (answer) {
          hub.trialAnswer.set(answer)
          onPicture(trial)
        }
      })
      .catch((error: unknown) => {
        done = trial
        onError(error)
      })
      .finally(() => {
        busy = false
        pump()
      })
  }
  return hub.trial.listen((trial) => {
    if (trial) return pump()
    done = null
    hub.trialAnswer.set(null)
    onPicture(null)
  })
}
const same = (a: Trial, b: Trial): boolean => a.candidate === b.candidate && a.lon === b.lon && a.lat === b.lat && a.heightM === b.heightM
