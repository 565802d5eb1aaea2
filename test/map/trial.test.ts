import { describe, expect, it } from 'vitest'
import { createMapHub } from '../../app/map/hub.ts'
import { driveTrial, STILL_AFTER_MS } from '../../app/map/input/trialDriver.ts'
import type { Trial } from '../../app/map/types.ts'
import { fakeClient } from './fakeClient.ts'

const trial = (heightM: number, resting = false): Trial => ({ candidate: 'A', lon: 1, lat: 2, heightM, moving: 'mast', resting })
const answer = { siteGroundM: 5, horizon: [], groundInSightPct: 1 }
const turn = () => new Promise((r) => setTimeout(r))

describe('a trial', () => {
  it('is asked for one at a time, the newest next, and every answer brings a picture', async () => {
    const { client, waiting } = fakeClient()
    const hub = createMapHub()
    const pictures: (number | null)[] = []
    driveTrial(
      client,
      hub,
      (t) => pictures.push(t?.heightM ?? null),
      () => {},
    )
    for (const h of [10, 11, 12, 13]) hub.trial.set(trial(h))
    expect(waiting.map((w) => (w.body as { heightM: number }).heightM)).toEqual([10])
    waiting[0]!.answer(answer as never)
    await turn()
    expect(waiting.map((w) => (w.body as { heightM: number }).heightM)).toEqual([10, 13])
    waiting[1]!.answer(answer as never)
    await turn()
    expect(pictures).toEqual([10, 13])
    expect(hub.trialAnswer.get()).toEqual(answer)
  })
  it('that comes to rest is painted in full at once and asked for once more, finer', async () => {
    const { client, waiting } = fakeClient()
    const hub = createMapHub()
    const resting: (boolean | undefined)[] = []
    driveTrial(
      client,
      hub,
      (t) => resting.push(t?.resting),
      () => {},
    )
    hub.trial.set(trial(10))
    waiting[0]!.answer(answer as never)
    await turn()
    hub.trial.set(trial(10, true))
    expect(resting).toEqual([false, true])
    await turn()
    expect(waiting.map((w) => (w.body as { still: boolean }).still)).toEqual([false, true])
    waiting[1]!.answer(answer as never)
    await turn()
    expect(resting).toEqual([false, true, true])
    expect(waiting).toHaveLength(2)
  })
  it('held still is asked for finer; moved on, the next coarse one does not wait for that', async () => {
    const { client, waiting } = fakeClient()
    const hub = createMapHub()
    const pictures: (number | null)[] = []
    driveTrial(
      client,
      hub,
      (t) => pictures.push(t?.heightM ?? null),
      () => {},
    )
    hub.trial.set(trial(10))
    waiting[0]!.answer(answer as never)
    await new Promise((r) => setTimeout(r, STILL_AFTER_MS + 30))
    const asked = () => waiting.map((w) => [(w.body as { heightM: number }).heightM, (w.body as { still: boolean }).still])
    expect(asked()).toEqual([
      [10, false],
      [10, true],
    ])
    hub.trial.set(trial(11))
    expect(asked()[2]).toEqual([11, false])
    waiting[1]!.answer(null)
    waiting[2]!.answer(answer as never)
    await turn()
    expect(pictures).toEqual([10, 11])
  })
  it('that is over takes its answer with it, also one that comes late', async () => {
    const { client, waiting } = fakeClient()
    const hub = createMapHub()
    const pictures: unknown[] = []
    driveTrial(
      client,
      hub,
      (t) => pictures.push(t),
      () => {},
    )
    hub.trial.set(trial(10))
    hub.trial.set(null)
    waiting[0]!.answer(answer as never)
    await turn()
    expect(hub.trialAnswer.get()).toBeNull()
    expect(pictures).toEqual([null])
  })
  it('goes on after a failure with the newest', async () => {
    const { client, waiting } = fakeClient()
    const hub = createMapHub()
    const errors: unknown[] = []
    driveTrial(
      client,
      hub,
      () => {},
      (e) => errors.push(e),
    )
    hub.trial.set(trial(10))
    hub.trial.set(trial(12))
    waiting[0]!.fail(new Error('off the terrain'))
    await turn()
    expect(errors).toHaveLength(1)
    expect(waiting).toHaveLength(2)
  })
})
