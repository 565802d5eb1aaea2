import type { Page } from '@playwright/test'
import { formatAreaUp, formatDbDown, formatMargin, formatMetPct, formatScore, type Quantity } from '../../app/words/index.ts'
import { expect, test } from '../page.ts'
import { card, everythingRun, goTo, plain, readComparison, setField } from '../user.ts'
import { A, doc, from, open, rowsShown, savedBeside, section, summaryOf } from './study.ts'

const face = (q: Quantity): string => plain(q.value)
const NEED = { id: 'n1', name: 'Low layer', kind: 'layer', heightM: 250, toRangeM: 9_000, rcsM2: 1, requiredPct: 80 } as const
const GRID = { maxRangeM: 10_000, rangeStepM: 170, azimuthStepDeg: 1 }
/** A pencil beam with side lobes, so that tilt tells. */
const RADAR = { ...doc().radar, suppression: { kind: 'stated', statedDb: 30 } } as const

/** The comparison against the batch command's figures, option by option. */
async function expectCompared(page: Page, options: Awaited<ReturnType<typeof summaryOf>>['options'], lead: number): Promise<void> {
  const rows = await readComparison(page)
  expect(rows).toHaveLength(options.length)
  for (const [n, { figures: f }] of options.entries()) {
    const shown = rows[n]!
    expect(shown.slice(lead, lead + 3), shown.join(' | ')).toEqual(
      ['in_sight', 'detectable', 'usable'].map((share) => face(formatMetPct(f[`need_n1_${share}_pct`]))),
    )
    expect(shown.slice(lead + 4, lead + 6), shown.join(' | ')).toEqual([
      face(formatMargin(f.need_n1_worst_margin_m, 'nautical')),
      face(formatDbDown(f.need_n1_worst_signal_margin_db)),
    ])
    expect(shown, shown.join(' | ')).toContain(face(formatAreaUp(f.need_n1_suppression_short_km2, 'nautical')))
  }
}

test('three candidates with four masts each, ranked by stated weights', async ({ page }, info) => {
  const masts = [8, 16, 24, 32]
  const [east, north] = [from(80, 1500), from(350, 2000)]
  await open(
    page,
    doc({
      radar: RADAR,
      needs: [NEED],
      run: GRID,
      candidates: [
        { id: 'A', name: 'Plain', lon: A.lon, lat: A.lat, mastHeightsM: masts },
        { id: 'B', name: 'East', lon: east.lon, lat: east.lat, mastHeightsM: masts },
        { id: 'C', name: 'North', lon: north.lon, lat: north.lat, mastHeightsM: masts },
      ],
    }),
  )
  await goTo(page, 'Compare')
  const ranking = section(page, 'Ranking')
  for (const figure of [/^Usable, Low layer/, /^Mast height/]) {
    await ranking.locator('.field').filter({ hasText: 'Add a figure' }).getByRole('button').click()
    await page.getByRole('option', { name: figure }).first().click()
  }
  const weight = page.getByRole('textbox', { name: /^weight of Mast height/ })
  await weight.fill('0.5')
  await weight.press('Enter')
  const run = await summaryOf(await savedBeside(page, info.outputPath('study')))
  await expectCompared(page, run.options, 3)
  const rows = await rowsShown(page.getByRole('table', { name: 'Options by score' }))
  expect(rows).toHaveLength(12)
  const scores = new Map(rows.map((r) => [r[1], r]))
  for (const o of run.ranking.options) {
    const row = scores.get(`${o.ref.candidate} at ${o.ref.heightM} m`)
    expect(row?.at(-1)).toBe(plain(formatScore(o.score)))
    expect(row?.[0]?.replace(' =', '')).toBe(String(o.rank))
  }
  const effects = await rowsShown(page.getByRole('table', { name: /^Does the ranking hold/ }))
  expect(effects).toHaveLength(2)
  for (const [line, figure] of ['need_n1_usable_pct', 'mast_height_m'].entries())
    for (const [column, factor] of [0.8, 1.2].entries()) {
      const effect = run.ranking.effects.find((e) => e.figure === figure && e.factor === factor)!
      const words = effect.changes.map((c) => `${c.ref.candidate} at ${c.ref.heightM} m ${c.from} to ${c.to}`).join(', ')
      expect(effects[line]![1 + column]).toBe(words || 'no rank changes')
    }
  const plot = page.locator('figure.plot')
  await expect(plot).toContainText('Usable share against the area short of suppression')
  await expect(plot.locator('svg')).toBeVisible()
})

test('a tilt sweep: shares and clutter by tilt', async ({ page }, info) => {
  await open(page, doc({ radar: RADAR, needs: [NEED], run: GRID, candidates: [{ ...doc().candidates[0]!, mastHeightsM: [20] }] }))
  await goTo(page, 'Candidates')
  const a = card(page, 'A')
  await a.getByRole('button', { name: 'Edit A' }).click()
  await setField(a, 'Tilts', '−1, 0, 1, 2, 3')
  await expect(a.getByRole('group', { name: 'Tilts of A' }).getByRole('button')).toHaveCount(5)
  await everythingRun(page)
  const run = await summaryOf(await savedBeside(page, info.outputPath('study')))
  expect(run.options.map((o) => o.tiltDeg)).toEqual([-1, 0, 1, 2, 3])
  await expectCompared(page, run.options, 4)
  const rows = await readComparison(page)
  expect(rows.map((r) => r[2])).toEqual(['−1.0°', '0.0°', '1.0°', '2.0°', '3.0°'])
  // clutter falls as the beam is raised; the floor is of the ground, not of the tilt
  const over40 = run.options.map((o) => o.figures.clutter_over_40_km2!)
  expect(over40.at(-1)!).toBeLessThan(over40[1]!)
  for (const [n, km2] of over40.entries()) expect(rows[n]).toContain(face(formatAreaUp(km2, 'nautical')))
})
