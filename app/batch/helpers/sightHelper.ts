import { parentPort } from 'node:worker_threads'
import { type Ground, loadCrs } from '../../../core/index.ts'
import { sightRaster } from '../rasters/sightRaster.ts'
import type { SightAsk, SightTell } from './sightThread.ts'

// A thread that makes sight rasters over one shared ground, one after the other.
const TELL_EVERY_MS = 100
let ground: Promise<Ground> | null = null
const tell = (message: SightTell, transfer: ArrayBuffer[] = []): void => parentPort?.postMessage(message, transfer)

parentPort?.on('message', async (ask: SightAsk) => {
  try {
    if (ask.kind === 'ground') ground = loadCrs(ask.ground.shape.crs).then(() => ask.ground)
    else if (ground) {
      const { site, heightM, earth, maxRangeM, lattice } = ask
      const work = sightRaster(await ground, site, heightM, earth, maxRangeM, lattice)
      let toldAt = 0
      for (let step = work.next(); ; step = work.next()) {
        if (step.done) {
          const { inSightPct, floorM } = step.value
          return tell({ kind: 'made', raster: step.value }, [inSightPct.buffer as ArrayBuffer, floorM.buffer as ArrayBuffer])
        }
        const now = performance.now()
        if (now - toldAt >= TELL_EVERY_MS) {
          toldAt = now
          tell({ kind: 'progress', ...step.value })
        }
      }
    }
  } catch (error) {
    tell({ kind: 'fault', message: error instanceof Error ? (error.stack ?? error.message) : String(error) })
  }
})
