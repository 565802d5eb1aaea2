import type { Page } from '@playwright/test'
import { decode } from 'fast-png'
import { expect, test } from './page.ts'
import { expectPainted, inkOf } from './sheets.ts'
import { dragCandidate, everythingRun, map, openDemo, ringPlace, setTheme } from './user.ts'

test.describe.configure({ timeout: 300_000 })

interface Picture {
  readonly width: number
  readonly height: number
  /** Grey 0–255. */
  readonly grey: Float32Array
}
/** The base alone, without overlay, marks and cards, as it is on screen. */
async function pictureOfBase(page: Page): Promise<Picture> {
  const hide = await page.addStyleTag({
    content: '.map-sheet.overlay, .map-sheet.marks, .map-head, .map-foot, .cross { visibility: hidden !important }',
  })
  const png = decode(await map(page).screenshot())
  await hide.evaluate((e) => (e as Element).remove())
  const grey = new Float32Array(png.width * png.height)
  for (let i = 0; i < grey.length; i++) {
    const at = i * png.channels
    grey[i] = (png.data[at]! + png.data[at + 1]! + png.data[at + 2]!) / 3
  }
  return { width: png.width, height: png.height, grey }
}
/** Mean difference of two pictures where the second is moved by (dx, dy), grey levels. */
function difference(a: Picture, b: Picture, dx = 0, dy = 0): number {
  const m = 12
  let [sum, n] = [0, 0]
  for (let y = m; y < a.height - m; y++)
    for (let x = m; x < a.width - m; x++) {
      sum += Math.abs(a.grey[y * a.width + x]! - b.grey[(y + dy) * b.width + x + dx]!)
      n++
    }
  return sum / n
}
const spread = ({ grey }: Picture): number => {
  const mean = grey.reduce((s, g) => s + g, 0) / grey.length
  return Math.sqrt(grey.reduce((s, g) => s + (g - mean) ** 2, 0) / grey.length)
}
async function chooseBase(page: Page, name: string): Promise<void> {
  await page.getByRole('button', { name: 'Base', exact: true }).click()
  await page.getByRole('menuitemradio', { name: new RegExp(`^${name}`) }).click()
}

test('the base of the graphics processor draws the same ground under the same overlay and marks', async ({ page }) => {
  await openDemo(page)
  await everythingRun(page)
  const overlay = await expectPainted(page, 'overlay')
  await expectPainted(page, 'base')
  const ring = await ringPlace(page, 'A')
  const canvas = await pictureOfBase(page)
  expect(spread(canvas), 'relief on the canvas').toBeGreaterThan(5)

  await chooseBase(page, 'Graphics processor')
  await expect(page.locator('.map-sheet.maplibre canvas')).toBeVisible()
  let processor = canvas
  await expect
    .poll(async () => difference(canvas, (processor = await pictureOfBase(page))), { timeout: 120_000, intervals: [1000, 2000] })
    .toBeLessThan(6)
  expect(spread(processor), 'relief from the graphics processor').toBeGreaterThan(5)
  // at par to the pixel: any shift fits worse
  const inPlace = difference(canvas, processor)
  for (const [dx, dy] of [
    [2, 0],
    [-2, 0],
    [0, 2],
    [0, -2],
  ] as const)
    expect(difference(canvas, processor, dx, dy), `moved by ${dx}, ${dy}`).toBeGreaterThan(inPlace)
  expect((await inkOf(page, 'overlay')).mark).toBe(overlay.mark)
  const now = await ringPlace(page, 'A')
  expect(Math.hypot(now.x - ring.x, now.y - ring.y)).toBeLessThan(0.1)

  // night redraws it, and a drag works over it
  await setTheme(page, 'night')
  const dark = (p: Picture) => p.grey.reduce((s, g) => s + g, 0) / p.grey.length
  await expect.poll(async () => dark(await pictureOfBase(page)), { timeout: 120_000, intervals: [1000, 2000] }).toBeLessThan(90)
  await dragCandidate(page, 'A', 30, 20)
  const moved = await ringPlace(page, 'A')
  expect(Math.hypot(moved.x - now.x - 30, moved.y - now.y - 20)).toBeLessThan(2)
  await expect(page.getByRole('button', { name: 'undo: moved A' })).toBeVisible()

  await chooseBase(page, 'Plain canvas')
  await expect(page.locator('.map-sheet.maplibre')).toHaveCount(0)
  await expectPainted(page, 'base')
})
