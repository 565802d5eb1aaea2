import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { expect, test } from 'vitest'
import { batchLater, MIDDLE, tinyDoc, tinyStudy } from './tinyStudy.ts'

test('summary.json ranks the options, says which no other beats, and lists rejected candidates that were not run', async () => {
  const [first] = tinyDoc().candidates
  const { dir, path } = await tinyStudy(
    tinyDoc({
      candidates: [first!, { id: 'B', name: 'Quarry', ...MIDDLE, mastHeightsM: [20], rejected: 'no road to the top' }],
      ranking: {
        criteria: [
          { figure: 'need_n1_usable_pct', worst: 0, best: 100, weight: 3 },
          { figure: 'mast_height_m', worst: 50, best: 0, weight: 1 },
        ],
      },
    }),
  )
  const { code, err } = await batchLater('run', path, '--out', join(dir, 'ranked'))
  expect(err).not.toMatch(/fault/)
  expect(code).toBe(0)
  const summary = JSON.parse(readFileSync(join(dir, 'ranked/summary.json'), 'utf8'))
  expect(summary.options.map((o: { candidate: string; heightM: number }) => `${o.candidate} ${o.heightM}`)).toEqual(['A 10', 'A 40'])
  expect(summary.rejected).toEqual([{ id: 'B', name: 'Quarry', ...MIDDLE, reason: 'no road to the top' }])
  const usable = summary.options.map((o: { figures: Record<string, number> }) => o.figures.need_n1_usable_pct)
  for (const o of summary.ranking.options) {
    const at = o.ref.heightM === 10 ? 0 : 1
    // (3·usable/100 + 1·(50 − h)/50)/4
    expect(o.score).toBeCloseTo((3 * (usable[at] / 100) + (50 - o.ref.heightM) / 50) / 4, 12)
  }
  expect(summary.ranking.options.map((o: { rank: number }) => o.rank)[0]).toBe(1)
  expect(summary.ranking.effects).toHaveLength(4)
  expect(summary.nonDominated.length).toBeGreaterThan(0)
}, 120_000)
