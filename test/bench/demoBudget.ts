import { clutterToNoise, earthOf, finish, polarShape, type StudyDoc, siteOf, sweep } from '../../core/index.ts'
import { openDemo } from '../demo/openDemo.ts'

/** Processor time of this process, ms, not wall time: the machine may be shared. */
const cpuMs = (): number => {
  const { user, system } = process.cpuUsage()
  return (user + system) / 1000
}

export interface DemoBudget {
  readonly options: number
  /** Processor time of all figures after a change of both needs, ms. */
  readonly needsChangedMs: readonly number[]
  /** One option with all its figures at the study's k and cover at k = 1, over masking and C/N of it alone; clutter at k = 2.75 comes after them. */
  readonly fullOverBase: readonly number[]
}
/** Eight heights and three tilts of the demo after a change of need, and full physics of one option against masking and clutter alone. */
export async function demoBudget(): Promise<DemoBudget> {
  const demo = await openDemo()
  const runAll = (doc: StudyDoc): number => {
    const [{ id, tiltsDeg }] = doc.candidates
    const option = { candidate: id, heightM: 20, tiltDeg: tiltsDeg?.[0] ?? 1.5 }
    demo.engine.setStudy(doc, { option, layer: 'clutter-to-noise' }, false)
    const from = cpuMs()
    // clutter at k = 2.75 comes after all of these figures
    while (demo.engine.progress().done < demo.engine.progress().total) {
      const work = demo.engine.next()
      if (!work) break
      finish(work)
    }
    return cpuMs() - from
  }
  const oneCandidate = (mastHeightsM: number[], tiltsDeg: number[]): StudyDoc => {
    const doc = structuredClone(demo.doc)
    doc.candidates = [{ ...doc.candidates[0], mastHeightsM, tiltsDeg }]
    return doc
  }
  const doc = oneCandidate([8, 10, 15, 20, 25, 30, 35, 40], [0, 1.5, 3])
  runAll(doc)
  const needsChangedMs = [1, 2, 3].map((n) => {
    const changed = structuredClone(doc)
    for (const need of changed.needs ?? []) need.heightM = (need.heightM as number) + n
    return runAll(changed)
  })
  const options = demo.engine.progress().done
  const fullOverBase = [0, 1, 2, 3, 4].map((n) => {
    const one = oneCandidate([20], [1.5])
    one.candidates[0].lon += 1e-7 * (n + 1)
    const full = runAll(one)
    const { study } = demo.engine.ready()
    const place = siteOf(study.candidates[0])
    const from = cpuMs()
    const { site, masks } = finish(sweep(demo.ground, place, [20], polarShape(study.run), earthOf(study), { heightToSee: false }))
    finish(clutterToNoise(site, masks[0], demo.ground.codes, place, 20, earthOf(study), study.radar, 1.5, { weather: study.atmosphere }))
    return full / (cpuMs() - from)
  })
  return { options, needsChangedMs, fullOverBase }
}
