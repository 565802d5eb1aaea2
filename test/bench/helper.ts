import { parentPort } from 'node:worker_threads'
import { loadCrs } from '../../core/geodesy/index.ts'
import { sweepShare } from '../../core/masking/index.ts'
import type { Ground } from '../../core/terrain/index.ts'
import { finish } from '../../core/work/index.ts'
import type { HelperAsk } from './helperPool.ts'

// A thread that does its share of sweeps over one shared ground.
let ground: Ground | null = null
parentPort?.on('message', async (ask: HelperAsk) => {
  if (ask.kind === 'ground') {
    ground = ask.ground
    await loadCrs(ask.ground.shape.crs)
  } else if (ground) finish(sweepShare(ground, ask.site, ask.earth, ask.arrays))
  Atomics.add(ask.answered, 0, 1)
  Atomics.notify(ask.answered, 0)
})
