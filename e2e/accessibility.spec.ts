import { AxeBuilder } from '@axe-core/playwright'
import type { Page } from '@playwright/test'
import { smallDoc, upland } from './made.ts'
import { expect, test } from './page.ts'
import { card, dropFiles, everythingRun, goTo, openEmpty, ringPlace, STEP_NAMES, setTheme, textFile } from './user.ts'

/** WCAG 2.2 A and AA, as far as a program can tell. */
async function violations(page: Page): Promise<string[]> {
  const { violations: found } = await new AxeBuilder({ page })
    .withTags(['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa', 'best-practice'])
    .analyze()
  return found.map(
    (v) =>
      `${v.id}: ${v.help} — ${v.nodes
        .slice(0, 3)
        .map((n) => `${n.target.join(' ')} ${n.any[0]?.message ?? ''}`)
        .join(' | ')}`,
  )
}
/** A small study with a need: what stands on the page is of the same kinds as in a large one. */
async function openSmall(page: Page): Promise<void> {
  const need = { id: 'n1', name: 'Over the upland', kind: 'layer', heightM: 700, toRangeM: 4500 }
  await openEmpty(page)
  await dropFiles(page, textFile('study.json', JSON.stringify({ ...smallDoc(), needs: [need] })), upland())
  await everythingRun(page)
}

for (const theme of ['paper', 'night'] as const) {
  test(`every step can be used by all, ${theme}`, async ({ page }) => {
    await openSmall(page)
    await setTheme(page, theme)
    for (const step of STEP_NAMES) {
      await goTo(page, step)
      expect.soft(await violations(page), step).toEqual([])
    }
  })

  test(`what opens over them too, ${theme}`, async ({ page }) => {
    await openEmpty(page)
    await setTheme(page, theme)
    expect.soft(await violations(page), 'empty').toEqual([])
    await openSmall(page)
    const at = await ringPlace(page, 'A')
    await page.mouse.click(at.x + 60, at.y + 20)
    await expect(page.locator('.ledger')).toBeVisible()
    expect.soft(await violations(page), 'ledger').toEqual([])
    await page.keyboard.press('Escape')
    await page.getByRole('img', { name: /^Horizon/ }).click({ position: { x: 120, y: 40 } })
    await expect(page.locator('svg.chart.terrain')).toBeVisible()
    expect.soft(await violations(page), 'profile').toEqual([])
    await page.keyboard.press('Escape')
    await page.getByRole('button', { name: /^Quantity: / }).click()
    await expect(page.getByRole('menu')).toBeVisible()
    expect.soft(await violations(page), 'menu of quantities').toEqual([])
    await page.keyboard.press('Escape')
    await goTo(page, 'Candidates')
    await card(page, 'A').getByRole('button', { name: 'Edit A' }).click()
    expect.soft(await violations(page), 'candidate in the hand').toEqual([])
    await page.setViewportSize({ width: 1024, height: 768 })
    await page.getByRole('banner').getByRole('button', { name: 'memo' }).click()
    expect.soft(await violations(page), 'narrow, memo drawn out').toEqual([])
  })
}
