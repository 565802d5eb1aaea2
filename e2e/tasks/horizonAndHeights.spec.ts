import type { Page } from '@playwright/test'
import { formatAzimuth, formatNumber, formatPlaceRange, formatScreening, textOf } from '../../app/words/index.ts'
import { rowsOf } from '../../test/batch/tinyStudy.ts'
import { expect, test } from '../page.ts'
import { card, copied, everythingRun, goTo, plain, setField } from '../user.ts'
import { doc, open, savedBeside, showChange, table } from './study.ts'

/** 17 to 77 ft in steps of ten, to a tenth of a metre as they are typed. */
const MASTS = [17, 27, 37, 47, 57, 67, 77].map((ft) => Math.round(ft * 3.048) / 10)
/** Horizons agree to half of what they are quoted in. */
const HALF_DEG = 0.005

type Row = Record<string, string>
/** The horizon on show, copied from its strip. */
async function horizonShown(page: Page): Promise<Row[]> {
  const strip = page.locator('.horizon-strip')
  await expect(strip.getByText('bare ground, k = 1')).toBeVisible()
  return rowsOf((await copied(strip, 'Copy CSV')).replaceAll('\n', '\r\n'))
}
function expectSame(shown: readonly Row[], asked: readonly Row[]): void {
  expect(shown).toHaveLength(360)
  expect(asked).toHaveLength(360)
  for (const [n, r] of asked.entries()) {
    const of = shown[n]!
    expect(Number(of.azimuth_deg)).toBe(n)
    expect(Number(r.azimuth_deg)).toBe(n)
    expect(Math.abs(Number(of.elevation_deg) - Number(r.elevation_deg)), `azimuth ${n}`).toBeLessThan(HALF_DEG)
    expect(Math.abs(Number(of.range_m) - Number(r.range_m)), `azimuth ${n}`).toBeLessThan(1)
    for (const key of ['lon', 'lat']) expect(Math.abs(Number(of[key]) - Number(r[key])), `azimuth ${n}`).toBeLessThan(2e-6)
    expect(of.obstacle).toBe(r.obstacle)
  }
}

test('horizon all round from one place, and what each step of ten feet of mast gains', async ({ page }, info) => {
  await open(page, doc({ candidates: [{ ...doc().candidates[0]!, mastHeightsM: [10] }] }))
  const one = await savedBeside(page, info.outputPath('one'))
  const asked = table('horizon', one, '--candidate', 'A', '--height', '10')
  await page.getByRole('button', { name: 'Stretch' }).click()
  const shown = await horizonShown(page)
  expectSame(shown, await asked)
  // a ridge of 250 m, 12 km from an antenna at 50 m, stands at 0.914°
  const east = shown[90]!
  expect(Math.abs(Number(east.elevation_deg) - 0.9144)).toBeLessThan(0.0006)
  expect(Math.abs(Number(east.range_m) - 12_000)).toBeLessThan(2)
  const chart = page.getByRole('img', { name: /^Horizon/ })
  const box = await chart.boundingBox()
  await chart.hover({ position: { x: (box?.width ?? 0) / 4, y: 20 } })
  const read = plain(await page.locator('.horizon-read').innerText())
  const under = (await asked)[Math.round(Number(/^\d+\.\d/.exec(read)?.[0]))]!
  const words = [formatScreening(Number(under.elevation_deg)), formatPlaceRange(Number(under.range_m), 'nautical')].map((q) =>
    plain(textOf(q)),
  )
  expect(read).toMatch(/^\d{3}\.\d° · /)
  expect(read.replace(/^\S+ · /, '')).toBe([...words, 'terrain'].join(' · '))

  await goTo(page, 'Candidates')
  const a = card(page, 'A')
  await a.getByRole('button', { name: 'Edit A' }).click()
  await setField(a, 'Mast heights', MASTS.join(', '))
  const chips = a.getByRole('group', { name: 'Mast heights of A' }).getByRole('button')
  await expect(chips).toHaveCount(MASTS.length)
  await everythingRun(page)
  const seven = await savedBeside(page, info.outputPath('seven'))
  const curves = Promise.all([0, 1, 6].map((n) => table('horizon', seven, '--candidate', 'A', '--height', String(MASTS[n]))))
  await chips.first().click()
  const lowest = await horizonShown(page)
  await chips.last().click()
  await expect.poll(async () => (await horizonShown(page))[0]?.elevation_deg).not.toBe(lowest[0]?.elevation_deg)
  const highest = await horizonShown(page)
  const [first, second, last] = (await curves) as [Row[], Row[], Row[]]
  expectSame(lowest, first)
  expectSame(highest, last)

  const sectors = (await showChange(page, /^A at 5\.2/, /^A at 8\.2/)).locator('.sectors li')
  const gainDeg = first.map((r, n) => Number(r.elevation_deg) - Number(second[n]!.elevation_deg))
  const gaining = gainDeg.flatMap((g, n) => (g > 0.02 ? [n] : []))
  const [start, end] = [gaining[0]!, gaining.at(-1)!]
  expect(gaining, 'one sector').toHaveLength(end - start + 1)
  await expect(sectors).toHaveCount(1)
  const edge = (deg: number) => textOf(formatAzimuth(deg))
  expect(plain(await sectors.innerText())).toContain(
    `azimuth ${edge(start - 0.5)} to ${edge(end + 0.5)}, up to ${formatNumber(Math.max(...gainDeg), 2)}° lower`,
  )
})
