import { type Earth, loadCrs } from '../../geodesy/index.ts'
import type { Ground, Site } from '../../terrain/index.ts'
import { finish } from '../../work/index.ts'
import { sweepShare } from './sweep.ts'
import type { SweepArrays } from './sweepArrays.ts'

/** Other threads that take a share of sweeps. Results are the same with none or any number of them. */
export interface SweepHelpers {
  /** Whether they can read this ground where it lies: its heights must be on shared memory. */
  canShare(ground: Ground): boolean
  /** Sets them to work beside this thread. An earlier sweep nobody waits for any more is given up. */
  begin(ground: Ground, site: Site, earth: Earth, arrays: SweepArrays): void
}
export type HelperAsk =
  | { readonly kind: 'ground'; readonly ground: Ground }
  | { readonly kind: 'share'; readonly site: Site; readonly earth: Earth; readonly arrays: SweepArrays }

/** Helpers behind message ports; the ground travels once. */
export class SweepCrew implements SweepHelpers {
  private ground: Ground | null = null
  private last: SweepArrays | null = null

  constructor(private readonly posts: readonly ((ask: HelperAsk) => void)[]) {}

  canShare(ground: Ground): boolean {
    return this.posts.length > 0 && onShared(ground.heightM) && (ground.code === null || onShared(ground.code))
  }

  begin(ground: Ground, site: Site, earth: Earth, arrays: SweepArrays): void {
    if (this.last) Atomics.store(this.last.taken, 0, this.last.grid.azimuths)
    this.last = arrays
    const isNew = ground !== this.ground
    this.ground = ground
    for (const post of this.posts) {
      if (isNew) post({ kind: 'ground', ground })
      post({ kind: 'share', site, earth, arrays })
    }
  }
}
const onShared = (a: Float32Array | Uint8Array): boolean =>
  typeof SharedArrayBuffer !== 'undefined' && a.buffer instanceof SharedArrayBuffer

/** The helper's end: hand it every message in the order they come. */
export function makeSweepHelper(): (ask: HelperAsk) => void {
  let ground: Promise<Ground> | null = null
  const take = async ({ site, earth, arrays }: Extract<HelperAsk, { kind: 'share' }>): Promise<void> => {
    try {
      if (!ground) throw new Error('no ground yet')
      finish(sweepShare(await ground, site, earth, arrays))
    } catch {
      Atomics.add(arrays.finished, 1, 1)
    }
  }
  return (ask) => {
    if (ask.kind === 'ground') ground = loadCrs(ask.ground.shape.crs).then(() => ask.ground)
    else void take(ask)
  }
}
