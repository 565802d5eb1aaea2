import { expect, test } from '@playwright/test'
import { mapBehaves, openDemo } from './mapWalk.ts'

test('the map on a plain canvas', async ({ page }) => {
  await openDemo(page)
  await page.getByRole('button', { name: 'Base' }).click()
  await expect(page.getByRole('menuitemradio', { name: /Graphics processor/ })).toHaveAttribute('aria-disabled', 'true')
  await page.keyboard.press('Escape')
  await mapBehaves(page)
})

test('the mast on the ruler: stated heights, heights between, one more height', async ({ page }) => {
  await openDemo(page)
  const mast = page.getByRole('slider', { name: /Mast height/ })
  const first = await mast.getAttribute('aria-valuetext')
  await mast.focus()
  await page.keyboard.press('ArrowUp')
  await expect(mast).not.toHaveAttribute('aria-valuetext', first ?? '')
  await page.keyboard.press('Shift+ArrowUp')
  await expect(page.locator('.sentence')).toContainText('on trial')
  const tried = await mast.getAttribute('aria-valuetext')
  await page.getByRole('button', { name: `Add ${tried}` }).click()
  await expect(page.locator('.sentence')).not.toContainText('on trial')
  await expect(page.locator('.sentence')).toContainText(tried ?? '')
  await page.keyboard.press('Control+z')
})

test('the sentence answers: what is hidden, seen, comes back, and what it takes', async ({ page }) => {
  await openDemo(page)
  for (const [question, title] of [
    ['what is hidden', 'Masked ground'],
    ['what is seen', 'Coverage floor'],
    ['what it takes', 'Suppression needed'],
    ['what comes back', 'Clutter-to-noise'],
  ] as const) {
    await page.getByRole('button', { name: /^Question/ }).click()
    await page.getByRole('menuitemradio', { name: question }).click()
    await expect(page.getByRole('region', { name: `Legend: ${title}` })).toBeVisible()
  }
})

test('the horizon strip points at the map and opens the profile', async ({ page }) => {
  await openDemo(page)
  const strip = page.getByRole('img', { name: /Horizon profile/ })
  await expect(strip).toBeVisible({ timeout: 60_000 })
  const box = (await strip.boundingBox())!
  await page.mouse.move(box.x + box.width * 0.4, box.y + box.height / 2)
  await expect(page.locator('.marks .cursor')).toHaveAttribute('visibility', 'visible')
  await expect(page.locator('.readout')).toContainText('controls the horizon')
  await page.mouse.click(box.x + box.width * 0.4, box.y + box.height / 2)
  await expect(page.locator('.map-lower')).toContainText(/azimuth/i)
  await page.keyboard.press('Escape')
  await expect(page.locator('.map-lower')).toHaveCount(0)
})
