import { expect, test } from '@playwright/test'
import { mapBehaves, openDemo } from './mapWalk.ts'

test.use({ viewport: { width: 1240, height: 700 } })

test('the map drawn with WebGL behaves as on the canvas', async ({ page }) => {
  test.slow()
  await openDemo(page)
  await page.getByRole('button', { name: 'Base' }).click()
  await page.getByRole('menuitemradio', { name: /Graphics processor/ }).click()
  await expect(page.locator('.base.maplibre canvas')).toBeVisible({ timeout: 60_000 })
  await mapBehaves(page)
})
