import { expect, it } from 'vitest'
import { finish, ladderValuesOf } from '../../core/index.ts'
import { layerNeed, plainGround, work } from './plain.ts'

/** A wall of 150 m, 3 km to the east. */
const wall = (east: number, north: number): number => (Math.abs(east - 3000) < 150 && Math.abs(north) < 4000 ? 150 : 0)

it('the ladder says by octant what is usable; the octants together are the need, and a stated mast has the figures of its option', async () => {
  const { answers, ref, results } = work(await plainGround(10_000, wall), {
    needs: [layerNeed({ heightM: 100, fromRangeM: 0, toRangeM: 9000 })],
    radar: { suppression: { kind: 'stated', statedDb: 90 } },
    candidate: { mastHeightsM: [10, 40] },
    run: { maxRangeM: 9000 },
  })
  const ladder = finish(answers.ask('ladder', { candidate: ref.candidate }))
  expect(ladder.octantPct).toHaveLength(ladder.heightsM.length)
  for (const { ref, figures } of results) {
    const at = ladder.heightsM.indexOf(ref.heightM)
    const octants = ladder.octantPct[at] as number[]
    // all octants of a ring round the site are alike in area, to the ground above the level beside the wall
    expect(octants.reduce((s, v) => s + v, 0) / 8).toBeCloseTo(figures.needs[0].usablePct, 0)
    expect(octants[2]).toBeLessThan(octants[6] - 20)
    const own = ladderValuesOf(figures)
    expect(own.usablePct).toBeCloseTo(ladder.usablePct[at], 9)
    expect(own.shortKm2).toBeCloseTo(ladder.shortKm2[at], 9)
    expect(own.over40Km2).toBeCloseTo(ladder.over40Km2[at], 9)
  }
}, 120_000)
