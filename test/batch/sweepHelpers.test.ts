import { afterAll, describe, expect, it } from 'vitest'
import { sweepHelpers } from '../../app/batch/helpers/sweepHelpers.ts'
import { finish, type Ground, type PolarShape, sweep } from '../../core/index.ts'
import { FOUR_THIRDS, groundOn, siteAt, utmShape } from '../terrain/grounds.ts'

const GRID: PolarShape = { azimuths: 720, ranges: 120, azimuthStepDeg: 0.5, rangeStepM: 60 }
const OPTIONS = { heightToSee: false }
const { crew, close } = sweepHelpers(1)
afterAll(close)

const hills = (c: number, r: number): number => 80 * Math.abs(Math.sin(c / 17) * Math.cos(r / 23)) + 4 * Math.sin(c * 1.3)
/** The same ground with its heights where other threads can read them. */
function onShared(g: Ground): Ground {
  const heightM = new Float32Array(new SharedArrayBuffer(g.heightM.byteLength))
  heightM.set(g.heightM)
  const code = g.code && new Uint8Array(new SharedArrayBuffer(g.code.byteLength))
  if (code && g.code) code.set(g.code)
  return { ...g, heightM, code }
}

describe('a helper thread', () => {
  it('takes a share of sweeps and changes no number', async () => {
    const g = onShared(groundOn(await utmShape(500, 500, 30), hills))
    expect(crew.canShare(g)).toBe(true)
    const site = siteAt(g, 250.3, 250.8)
    const alone = finish(sweep(g, site, [10, 30], GRID, FOUR_THIRDS, OPTIONS))
    const taken = new Set<number>()
    for (let n = 0; n < 40 && taken.size < 2; n++) {
      const work = sweep(g, site, [10, 30], GRID, FOUR_THIRDS, { ...OPTIONS, helpers: crew })
      // this thread lets the helper come first for a while
      const step = work.next()
      taken.add(step.done ? 0 : step.value.done)
      await new Promise((r) => setTimeout(r, 20))
      const both = finish(work)
      expect([...both.masks[1].floorM]).toEqual([...alone.masks[1].floorM])
      expect([...both.masks[0].state]).toEqual([...alone.masks[0].state])
      expect([...both.site.groundM]).toEqual([...alone.site.groundM])
    }
    expect(taken.size, 'the helper took azimuths of its own').toBeGreaterThan(1)
  })
  it('is left out where it cannot read the ground, and given up with the sweep it was for', async () => {
    const g = groundOn(await utmShape(300, 300, 30), hills)
    expect(crew.canShare(g)).toBe(false)
    const shared = onShared(g)
    const site = siteAt(g, 150, 150)
    sweep(shared, site, [10], GRID, FOUR_THIRDS, { ...OPTIONS, helpers: crew }).next()
    const next = finish(sweep(shared, site, [20], GRID, FOUR_THIRDS, { ...OPTIONS, helpers: crew }))
    expect([...next.masks[0].floorM]).toEqual([...finish(sweep(g, site, [20], GRID, FOUR_THIRDS, OPTIONS)).masks[0].floorM])
  })
})
