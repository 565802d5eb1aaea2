import { describe, it } from 'vitest'
import type { Ground } from '../../core/terrain/index.ts'
import { FARMLAND, FOREST, placeAt } from '../terrain/grounds.ts'
import { expectMask } from './draw.ts'

// Masts stand on posts; sight is of the surface, on a flat earth, so every answer can be drawn with a ruler.
describe('drawn masks', () => {
  it('flat ground is in sight', () =>
    expectMask({
      mastM: 10,
      terrain: `00000
                00000
                00000`,
      mask: `.....
             ..@..
             .....`,
    }))
  it('a wall higher than the mast hides all that is not higher still', () =>
    expectMask({
      mastM: 20,
      terrain: `000030000
                000030090
                000030000`,
      mask: `.....####
             @....##.#
             .....####`,
    }))
  it('a wall lower than the mast casts a shadow of its own length: 10 m under a 20 m mast at 300 m hides up to 600 m', () =>
    expectMask({
      mastM: 20,
      terrain: `000000000
                000100000
                000000000`,
      // row of the wall: posts 4 and 5 lie in the shadow, post 6 at its very end
      mask: `.........
             @...##...
             .........`,
    }))
  it('a pit is hidden by its near rim', () =>
    expectMask({
      mastM: 10,
      terrain: `999999999
                999111999
                999999999`,
      mask: `.........
             @..###...
             .........`,
    }))
  it('the far wall of a shallow pit is seen over the rim', () =>
    // line over the rim at 200 m falls 5 m per post: 85 at post 3, 75 at post 5; the floor lies at 80
    expectMask({
      mastM: 10,
      terrain: `999999999
                999888999
                999999999`,
      mask: `.........
             @..#.....
             .........`,
    }))
  it('from the floor of a basin its rim is seen and nothing beyond; a corner of the rim hides behind the bulge of its own patch', () =>
    // between posts 0 5 5 5 the bilinear surface rises above the diagonal: (100t − 50t² − 5)/(1 + t) is highest at t = 0.76, before the corner post
    expectMask({
      mastM: 5,
      terrain: `111111111
                115555511
                115000511
                115000511
                115000511
                115555511
                111111111`,
      mask: `#########
             ###...###
             ##.....##
             ##..@..##
             ##.....##
             ###...###
             #########`,
    }))
  it('nothing is known on a ray that has touched a patch with a void, however high the mast', () =>
    expectMask({
      mastM: 90,
      terrain: `0000?0000
                000000000
                000000000`,
      mask: `....~~~~~
             .........
             @........`,
    }))
})

describe('drawn covers and obstacles', () => {
  const woods = (rows: string) => () => ({
    code: Uint8Array.from(rows.replace(/\s/g, ''), (c) => (c === 'F' ? 1 : 0)),
    codes: [FARMLAND, FOREST],
  })
  it('a wood stands 15 m over its ground: its near edge is in sight, the rest and the field behind are not', () =>
    expectMask({
      mastM: 10,
      terrain: `00000000
                00000000
                00000000`,
      extras: woods(`---FF---
                     ---FF---
                     ---FF---`),
      mask: `....####
             @...####
             ....####`,
    }))
  it('a mast in a wood sees what is cleared, and without a clearing no farther than the next trees', () => {
    const wood = { mastM: 10, terrain: '00000000\n00000000\n00000000', extras: woods('FFFFFF--\nFFFFFF--\nFFFFFF--') }
    // cleared to 250 m: posts 1 and 2 are bare, the wood's edge at post 3 hides the rest
    return Promise.all([
      expectMask({ ...wood, clearingRadiusM: 250, mask: '....####\n@...####\n....####' }),
      expectMask({ ...wood, clearingRadiusM: 0, mask: '.#######\n@.######\n.#######' }),
    ])
  })
  const wall = (from: [number, number], to: [number, number], heightM: number) => (g: Ground) => ({
    obstacles: [
      {
        name: 'wall',
        path: [placeAt(g, ...from), placeAt(g, ...to)],
        heightM,
        topM: null,
        widthM: 1,
        rcsM2: null,
        verticalErrorM: null,
      },
    ],
  })
  it('a long wall hides what lies behind it and lets rays past its end', () =>
    expectMask({
      mastM: 10,
      terrain: `000000
                000000
                000000
                000000`,
      // from between columns 2 and 3, rows 1.5 and down
      extras: wall([2.5, 1.5], [2.5, 9], 30),
      mask: `......
             ....##
             ...###
             @..###`,
    }))
})
