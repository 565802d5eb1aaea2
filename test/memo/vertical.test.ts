import { describe, expect, it } from 'vitest'
import { svgOf } from '../../app/charts/index.ts'
import { type Block, cutOf } from '../../app/memo/model/index.ts'
import { optionBlocks } from '../../app/memo/model/optionSection.ts'
import { finish, verticalCut } from '../../core/index.ts'
import { layerNeed, plainGround, work } from '../merit/plain.ts'
import { sampleResults } from './sample.ts'
import { sampleMemo } from './sampleMemo.ts'

const input = sampleMemo('metric', 40)
const [first] = input.maps
const flat = (blocks: readonly Block[]): Block[] => blocks.flatMap((b) => (b.kind === 'beside' ? [...flat(b.left), ...flat(b.right)] : [b]))
const same = (ref: (typeof first)['ref']) => sampleResults.find((r) => r.ref.candidate === ref.candidate && r.ref.heightM === ref.heightM)!
const blocksOf = (maps: typeof input.maps, ref: (typeof first)['ref']): Block[] => {
  let number = 0
  return flat(optionBlocks({ ...input, maps }, same(ref), () => ++number))
}

describe('range-height diagram in the memo', () => {
  it('is about the first need that is assessed, toward its worst place, else the highest horizon', () => {
    const result = sampleResults[1]
    const need = result.figures.needs.find((n) => n.notAssessed === null)!
    const about = cutOf(result, 40_000)
    expect(about?.need).toBe(need.needId)
    expect(about?.window.azimuthDeg).toBe(Math.round(10 * (need.worst?.azimuthDeg ?? result.figures.horizon.highest!.azimuthDeg)) / 10)
    expect(about?.window.toRangeM).toBe(40_000)
    expect(cutOf({ ...result, figures: { ...result.figures, needs: [] } }, 40_000)).toBeNull()
  })
  it('is printed with its finding and the caution of its diffracted part; without a plane nothing is', async () => {
    const ground = await plainGround(26_000, (east) => (Math.abs(east - 9_000) < 300 ? 120 : 0))
    const worked = work(ground, { needs: [layerNeed({ name: 'Low cover', heightM: 600 })] })
    const need = worked.engine.needOnShow(undefined)!
    const cut = finish(
      verticalCut(worked.cells, need, {
        azimuthDeg: 90,
        fromRangeM: 0,
        toRangeM: 25_000,
        fromHeightM: null,
        toHeightM: null,
        columns: 240,
        rows: 120,
      }),
    )
    const blocks = blocksOf([{ ...first, cut }, ...input.maps.slice(1)], first.ref)
    const at = blocks.findIndex((b) => b.kind === 'figure' && b.id === 'vertical')
    const figure = blocks[at]
    if (figure?.kind !== 'figure') throw new Error('no figure')
    expect(figure.caption).toMatch(/^Low cover, 1\u202fm², Swerling 1, azimuth 090\.0°: usable to 24\.9\u202fkm at some height\.$/)
    expect(blocks[at + 1]).toMatchObject({ kind: 'caution', texts: [expect.stringContaining('counted nowhere')] })
    const svg = svgOf(figure.drawing)
    expect(svg).not.toMatch(/NaN|Infinity|undefined|var\(/)
    expect(svg.length).toBeLessThan(300_000)
    expect(blocksOf(input.maps, first.ref).some((b) => b.kind === 'figure' && b.id === 'vertical')).toBe(false)
  })
})
