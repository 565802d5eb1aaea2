import { Worker } from 'node:worker_threads'
import type { Earth } from '../../core/geodesy/index.ts'
import {
  makeSweepArrays,
  type SightCells,
  type SiteCells,
  type SweepArrays,
  type SweepOptions,
  sweepResult,
  sweepShare,
} from '../../core/masking/index.ts'
import type { PolarShape } from '../../core/polar/index.ts'
import { type Ground, type Site, siteGround } from '../../core/terrain/index.ts'
import { finish } from '../../core/work/index.ts'

/** `answered` counts the helpers that are done with the ask. */
export type HelperAsk =
  | { readonly kind: 'ground'; readonly ground: Ground; readonly answered: Int32Array }
  | { readonly kind: 'share'; readonly site: Site; readonly earth: Earth; readonly arrays: SweepArrays; readonly answered: Int32Array }

type Ask = HelperAsk extends infer A ? (A extends HelperAsk ? Omit<A, 'answered'> : never) : never

/** Sweeps of one ground by this thread and helpers; the ground's heights must lie on shared memory. With no helpers the same sweep alone. */
export class HelperPool {
  readonly #workers: Worker[]
  readonly #ground: Ground
  constructor(ground: Ground, helpers: number) {
    this.#ground = ground
    this.#workers = Array.from({ length: helpers }, () => new Worker(new URL('./helperBoot.mjs', import.meta.url)))
    this.#ask({ kind: 'ground', ground })()
  }
  /** Hands an ask to every helper; the function returned waits until all have answered. */
  #ask(ask: Ask): () => void {
    const answered = new Int32Array(new SharedArrayBuffer(4))
    for (const worker of this.#workers) worker.postMessage({ ...ask, answered })
    return () => {
      for (let n = Atomics.load(answered, 0); n < this.#workers.length; n = Atomics.load(answered, 0)) Atomics.wait(answered, 0, n)
    }
  }
  sweep(
    site: Site,
    heightsM: readonly number[],
    grid: PolarShape,
    earth: Earth,
    options: SweepOptions = {},
  ): { site: SiteCells; masks: SightCells[] } {
    const arrays = makeSweepArrays(grid, heightsM, options, this.#workers.length > 0)
    const wait = this.#ask({ kind: 'share', site, earth, arrays })
    finish(sweepShare(this.#ground, site, earth, arrays))
    wait()
    return sweepResult(arrays, siteGround(this.#ground, site), this.#ground.obstacles, options)
  }
  async close(): Promise<void> {
    await Promise.all(this.#workers.map((w) => w.terminate()))
  }
}
