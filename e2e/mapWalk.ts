import { expect, type Page } from '@playwright/test'
import { decode } from 'fast-png'

/** The demo study is open and its first option painted. */
export async function openDemo(page: Page): Promise<void> {
  await page.goto('/')
  await expect(page.getByRole('application', { name: 'Site map' })).toBeVisible()
  await expect(page.locator('.overlay canvas').first()).toBeAttached()
  await page.waitForFunction(
    () => [...document.querySelectorAll<HTMLElement>('.overlay canvas')].some((c) => c.style.visibility === 'visible'),
    null,
    {
      timeout: 60_000,
    },
  )
}

/** Different colours in a square of the map; a blank sheet has one. */
export async function coloursNear(page: Page, x: number, y: number, side = 60): Promise<number> {
  const box = (await page.getByRole('application', { name: 'Site map' }).boundingBox())!
  const shot = await page.screenshot({ clip: { x: box.x + x - side / 2, y: box.y + y - side / 2, width: side, height: side } })
  const { data, channels } = decode(shot)
  const seen = new Set<number>()
  for (let n = 0; n < data.length; n += channels) seen.add((data[n]! << 16) | (data[n + 1]! << 8) | data[n + 2]!)
  return seen.size
}
const middleOf = async (page: Page, candidate: string): Promise<{ x: number; y: number }> => {
  const ring = (await page.locator(`[data-candidate="${candidate}"] .ring`).boundingBox())!
  return { x: ring.x + ring.width / 2, y: ring.y + ring.height / 2 }
}

/** What every base has to do: draw ground under the marks, move with hand, wheel and keys, and leave clicks and drags to the map. */
export async function mapBehaves(page: Page): Promise<void> {
  const map = page.getByRole('application', { name: 'Site map' })
  const box = (await map.boundingBox())!
  const b = await middleOf(page, 'B')
  await expect.poll(() => coloursNear(page, b.x - box.x + 60, b.y - box.y + 20), { timeout: 60_000 }).toBeGreaterThan(40)

  // the wheel zooms about the pointer: what is under it stays
  await page.mouse.move(b.x, b.y)
  await page.mouse.wheel(0, -240)
  await expect.poll(async () => Math.abs((await middleOf(page, 'B')).x - b.x)).toBeLessThan(1.5)
  await page.mouse.wheel(0, 240)

  // the hand moves ground and marks together
  await page.mouse.move(box.x + box.width - 60, box.y + box.height / 2)
  await page.mouse.down()
  await page.mouse.move(box.x + box.width - 100, box.y + box.height / 2 + 30, { steps: 4 })
  await page.mouse.up()
  const panned = await middleOf(page, 'B')
  expect(panned.x - b.x).toBeCloseTo(-40, 0)
  expect(panned.y - b.y).toBeCloseTo(30, 0)

  // keys do the same
  await map.focus()
  await page.keyboard.press('ArrowRight')
  expect((await middleOf(page, 'B')).x - panned.x).toBeCloseTo(-64, 0)
  await page.keyboard.press('ArrowLeft')

  // pointing reads the place out, a click opens the ledger of the cell, Esc closes it
  await page.mouse.move(panned.x + 40, panned.y - 30)
  await expect(page.locator('.readout')).toContainText(/az \d{3}\.\d°.*ground/)
  await page.mouse.click(panned.x + 40, panned.y - 30)
  await expect(page.locator('.map-lower')).toContainText(/Cell at azimuth/)
  await page.keyboard.press('Escape')
  await expect(page.locator('.map-lower')).toHaveCount(0)

  // and the map is where it was
  await expect.poll(async () => Math.abs((await middleOf(page, 'B')).y - panned.y)).toBeLessThan(1)

  // a dragged candidate is one step of undo
  const from = await middleOf(page, 'B')
  await page.mouse.move(from.x, from.y)
  await page.mouse.down()
  await page.mouse.move(from.x + 30, from.y + 24, { steps: 8 })
  await expect(page.locator('.sentence')).toContainText('for B')
  await expect(page.locator('.sentence')).toContainText('on trial')
  await page.mouse.up()
  await expect(page.locator('.sentence')).not.toContainText('on trial')
  const to = await middleOf(page, 'B')
  expect(to.x - from.x).toBeCloseTo(30, 0)
  await page.keyboard.press('Control+z')
  await expect.poll(async () => Math.abs((await middleOf(page, 'B')).x - from.x)).toBeLessThan(1)
}
