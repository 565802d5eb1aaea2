import { InputError } from '../errors/index.ts'
import { type Change, type ChangeSide, changeBetween } from '../merit/index.ts'
import type { SettledStudy } from '../study/index.ts'
import type { Ground } from '../terrain/index.ts'
import { share, type Work } from '../work/index.ts'
import { Engine } from './engine.ts'
import { optionId } from './keys.ts'
import type { Ask, OptionRef } from './types.ts'

/** Grids of the one option that is worked out apart, bytes. */
const APART_BYTES = 96 * 1024 * 1024
let apart = 0

/**
 * What changes from one option to another. With `without`, the second is worked out on the same ground less the obstacles of these names: nothing of the
 * study's own results is touched. @throws InputError where none of the obstacles has such a name
 */
export function* changeOf(engine: Engine, { before, after, without = [] }: Ask['change']): Work<Change> {
  const { ground, study } = engine.ready()
  if (without.length > 0 && !ground.obstacles.some((o) => without.includes(o.name)))
    throw new InputError({
      code: 'no-obstacle',
      place: 'obstacles',
      found: `no obstacle is called ${without.slice(0, 4).join(', ')}`,
      remedy: 'name one of the obstacles of the study',
    })
  const rest = without.length === 0 ? ground : { ...ground, obstacles: ground.obstacles.filter((o) => !without.includes(o.name)) }
  const from = yield* share(sideOf(engine, ground, study, before), 0, 1, 2)
  const to = yield* share(sideOf(engine, rest, study, after), 1, 2, 2)
  return changeBetween(from, to, study.needs)
}

/** Figures and grids of one option on a ground, worked out in an engine of its own. */
function* sideOf(engine: Engine, ground: Ground, study: SettledStudy, ref: OptionRef): Work<ChangeSide> {
  const own = new Engine(APART_BYTES)
  own.setGround({ ...ground, serial: --apart }, engine.landTable, engine.needPlaces)
  const candidates = study.candidates.filter((c) => c.id === ref.candidate)
  own.study = { ...study, candidates: candidates.map((c) => ({ ...c, mastHeightsM: [ref.heightM], tiltsDeg: [ref.tiltDeg] })) }
  own.shown = { option: ref, layer: 'clutter-to-noise' }
  for (;;) {
    const result = own.result(ref)
    const cells = own.cells(ref)
    if (result && cells) return { figures: result.figures, cells }
    const work = own.next()
    if (!work) throw new Error(`nothing worked out of ${optionId(ref)}`)
    const tells = yield* work
    for (const tell of tells)
      if (tell.kind === 'failure')
        throw new InputError({ code: tell.error.code, found: tell.error.message, remedy: tell.error.remedy ?? '' })
  }
}
