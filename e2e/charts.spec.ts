import { AxeBuilder } from '@axe-core/playwright'
import type { Page } from '@playwright/test'
import { smallDoc, upland } from './made.ts'
import { expect, test } from './page.ts'
import { copied, dropFiles, everythingRun, openEmpty, setTheme, textFile } from './user.ts'

const CHARTS = ['Terrain profile', 'Range-height diagram', 'Clutter by ring and octant', 'Suppression needed and available'] as const

/** A small study with a need, its horizon picked: the charts are open. */
async function openCharts(page: Page): Promise<void> {
  const need = { id: 'n1', name: 'Over the upland', kind: 'layer', heightM: 700, toRangeM: 4500, rcsM2: 1 }
  await openEmpty(page)
  await dropFiles(page, textFile('study.json', JSON.stringify({ ...smallDoc(), needs: [need] })), upland())
  await everythingRun(page)
  await page.getByRole('img', { name: /^Horizon/ }).click({ position: { x: 120, y: 40 } })
  await expect(page.locator('svg.chart.terrain')).toBeVisible()
}
const chart = (page: Page, name: (typeof CHARTS)[number]) => page.getByRole('application', { name: new RegExp(`^${name}, `) })
async function choose(page: Page, name: (typeof CHARTS)[number]): Promise<void> {
  if (await chart(page, name).isVisible()) return
  await page
    .getByRole('button', { name: /Chart$/ })
    .first()
    .click()
  await page.getByRole('option', { name }).click()
  await expect(chart(page, name).locator('svg.chart')).toBeVisible()
}
const panel = (page: Page) => page.locator('.chart-panel')

test('every chart opens, reads out by keys, and is copied as picture and table', async ({ page }) => {
  await openCharts(page)
  for (const name of CHARTS) {
    await choose(page, name)
    const box = chart(page, name)
    await box.focus()
    const read = page.locator('.chart-read')
    // the second row of the last one is what there is of suppression, whatever the need finds
    for (let n = 0; n < 2; n++) await page.keyboard.press(name.startsWith('Suppression') ? 'ArrowDown' : 'ArrowRight')
    await expect(read, name).not.toHaveText('Point at the chart to read it')
    await expect(read, name).toHaveText(/\d/)
    const svg = await copied(panel(page), 'Copy SVG')
    expect(svg, name).toMatch(/^<svg [\s\S]*<\/svg>$/)
    expect(svg, name).not.toMatch(/NaN|var\(/)
    const rows = (await copied(panel(page), 'Copy CSV')).trim().split('\n')
    expect(rows.length, name).toBeGreaterThan(2)
    for (const row of rows.slice(1))
      expect(row.split(',').length, `${name}: ${row}`).toBeGreaterThanOrEqual(rows[0]?.split(',').length ?? 0)
  }
})

test('the diagram shows where the target is usable, zooms, and follows the azimuth', async ({ page }) => {
  await openCharts(page)
  await choose(page, 'Range-height diagram')
  const box = chart(page, 'Range-height diagram')
  const words = () => box.locator('svg.chart').getAttribute('aria-label')
  await expect.poll(words).toMatch(/^Over the upland, 1\s?m², Swerling 1, azimuth \d{3}\.\d°: usable to /)
  const before = await words()
  const table = (await copied(panel(page), 'Copy CSV')).trim().split('\n').slice(1)
  const outcomes = new Set(table.map((row) => row.split(',')[7]))
  expect([...outcomes]).toContain('usable')
  // the target is detected where its margin is not negative, and only there
  for (const row of table) {
    const [, , height, floor, , margin, , outcome] = row.split(',')
    if (outcome !== 'usable') continue
    expect(Number(margin), row).toBeGreaterThanOrEqual(-0.01)
    expect(Number(height), row).toBeGreaterThanOrEqual(Number(floor) - 0.1)
  }
  await box.focus()
  await page.keyboard.press('+')
  await expect(page.locator('.chart-panel').getByRole('button', { name: 'Whole' })).toBeEnabled()
  await page.keyboard.press('0')
  await expect(page.locator('.chart-panel').getByRole('button', { name: 'Whole' })).toBeDisabled()
  await page.getByRole('button', { name: 'Azimuth one degree on' }).click()
  await expect.poll(words).not.toBe(before)
})

test('the stretched horizon shows bare ground and k = 1', async ({ page }) => {
  await openCharts(page)
  await page.locator('.horizon-strip').hover()
  await page.getByRole('button', { name: 'Stretch' }).click()
  for (const line of ['bare ground, k = 4/3', 'bare ground, k = 1', 'with cover, k = 1'])
    await expect(page.locator('.horizon-strip').getByText(line)).toBeVisible()
  await page.getByRole('button', { name: 'Height ×1' }).click()
  await expect(page.getByRole('button', { name: 'Height ×2' })).toBeVisible()
})

for (const theme of ['paper', 'night'] as const)
  test(`charts can be used by all, ${theme}`, async ({ page }) => {
    await openCharts(page)
    await setTheme(page, theme)
    for (const name of CHARTS) {
      await choose(page, name)
      const { violations } = await new AxeBuilder({ page })
        .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'])
        .analyze()
      expect
        .soft(
          violations.map((v) => `${v.id}: ${v.nodes[0]?.target.join(' ')}`),
          name,
        )
        .toEqual([])
    }
  })
