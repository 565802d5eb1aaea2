import { availableParallelism } from 'node:os'
import { Worker } from 'node:worker_threads'
import type { Earth, GridShape, Ground, Site } from '../../../core/index.ts'
import { drive, type Progress } from '../progress.ts'
import { type SightRaster, sightRaster } from '../rasters/sightRaster.ts'

/** What a sight raster is made from, beside the ground. */
export interface SightOrder {
  readonly site: Site
  readonly heightM: number
  readonly earth: Earth
  readonly maxRangeM: number
  readonly lattice: GridShape
}
export type SightAsk = { readonly kind: 'ground'; readonly ground: Ground } | ({ readonly kind: 'raster' } & SightOrder)
export type SightTell =
  | { readonly kind: 'progress'; readonly done: number; readonly total: number }
  | { readonly kind: 'made'; readonly raster: SightRaster }
  | { readonly kind: 'fault'; readonly message: string }

/** Makes sight rasters beside the main work where there is a second core, one at a time; on this thread where there is none. */
export class SightThread {
  readonly #thread: Worker | null
  constructor(
    private readonly ground: Ground,
    private readonly progress: Progress,
    cores = availableParallelism(),
  ) {
    this.#thread = cores > 1 ? new Worker(new URL('./sightHelperBoot.mjs', import.meta.url)) : null
    this.#post({ kind: 'ground', ground })
  }

  #post(ask: SightAsk): void {
    this.#thread?.postMessage(ask)
  }

  /** Starts a raster; `doing` names it while it is waited for. The one before must have come. */
  start(order: SightOrder, doing: string): () => Promise<SightRaster> {
    const thread = this.#thread
    if (!thread) {
      const { site, heightM, earth, maxRangeM, lattice } = order
      return () => drive(sightRaster(this.ground, site, heightM, earth, maxRangeM, lattice), this.progress, doing)
    }
    let awaited = false
    const made = new Promise<SightRaster>((resolve, reject) => {
      const over = (): void => {
        thread.off('message', take)
        thread.off('error', fail)
      }
      const fail = (error: Error): void => {
        over()
        reject(error)
      }
      const take = (tell: SightTell): void => {
        if (tell.kind === 'fault') fail(new Error(tell.message))
        else if (tell.kind === 'made') {
          over()
          resolve(tell.raster)
        } else if (awaited) this.progress.say(doing, tell.done, tell.total)
      }
      thread.on('message', take)
      thread.on('error', fail)
    })
    // whoever waits for it hears of a fault; until then it is not unheard
    made.catch(() => {})
    this.#post({ kind: 'raster', ...order })
    return () => {
      awaited = true
      return made
    }
  }

  async close(): Promise<void> {
    await this.#thread?.terminate()
  }
}
