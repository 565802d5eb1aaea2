import { readFileSync } from 'node:fs'
import type { Locator, Page } from '@playwright/test'
import { expect, test } from './page.ts'
import { card, everythingRun, expectStepState, form, LONG, legend, map, mast, mastHeight, openDemo, ring, ringPlace } from './user.ts'

const MOST_TABS = 160
/** Goes to a control with Tab alone, as a hand without a mouse does. */
async function tabTo(page: Page, to: Locator, key: 'Tab' | 'Shift+Tab' = 'Tab'): Promise<void> {
  for (let n = 0; n < MOST_TABS; n++) {
    if ((await to.count()) > 0 && (await to.first().evaluate((e) => e === document.activeElement))) return
    await page.keyboard.press(key)
  }
  throw new Error(`${to} is not reached by ${MOST_TABS} presses of ${key}`)
}
const press = async (page: Page, on: Locator, key = 'Enter'): Promise<void> => {
  await tabTo(page, on)
  await page.keyboard.press(key)
}
const step = (page: Page, name: string) =>
  page.getByRole('navigation', { name: 'Steps' }).getByRole('button', { name: new RegExp(`^${name}`) })
/** Goes to another step: back over the form, not forward through the map and every figure of the memo. */
async function stepBackTo(page: Page, name: string): Promise<void> {
  await tabTo(page, step(page, name), 'Shift+Tab')
  await page.keyboard.press('Enter')
}
/** Opens a word of the sentence and takes a choice with the arrows. */
async function say(page: Page, word: string, choice: RegExp): Promise<void> {
  await press(page, page.getByRole('button', { name: new RegExp(`^${word}: `) }))
  const wanted = page.getByRole('menuitemradio', { name: choice })
  await expect(wanted).toBeVisible()
  for (let n = 0; n < 12; n++) {
    if (await wanted.evaluate((e) => e === document.activeElement)) break
    await page.keyboard.press('ArrowDown')
  }
  await page.keyboard.press('Enter')
}

test('from the demo to the exported memo by keys alone', async ({ page }) => {
  await openDemo(page)
  await everythingRun(page)

  await press(page, step(page, 'Radar'))
  const frequency = form(page, 'Radar').getByRole('textbox', { name: 'Frequency' })
  await tabTo(page, frequency)
  await page.keyboard.press('Control+a')
  await page.keyboard.type('3.1')
  await page.keyboard.press('Enter')
  await expect(page.getByRole('button', { name: 'undo: changed frequency' })).toBeVisible()

  await stepBackTo(page, 'Candidates')
  await press(page, form(page, 'Candidates').getByRole('button', { name: 'Enter position' }))
  const position = form(page, 'Candidates').getByRole('textbox', { name: 'Position' })
  await tabTo(page, position)
  await page.keyboard.type('47°40′00″ S 121°36′00″ W')
  await page.keyboard.press('Enter')
  await expect(card(page, 'D')).toBeVisible()
  await expectStepState(page, 'Candidates', '4 placed')

  // the map: pan, zoom, a candidate moved and set, a ledger opened and closed
  await tabTo(page, map(page))
  const [d, zoom] = [await ringPlace(page, 'D'), await page.locator('.scale').getAttribute('aria-label')]
  await page.keyboard.press('ArrowRight')
  expect((await ringPlace(page, 'D')).x).toBeCloseTo(d.x - 64, 0)
  await page.keyboard.press('+')
  await page.keyboard.press('+')
  expect(await page.locator('.scale').getAttribute('aria-label')).not.toBe(zoom)
  await page.keyboard.press('Home')
  await tabTo(page, ring(page, 'D'))
  await page.keyboard.press('ArrowLeft')
  await page.keyboard.press('Shift+ArrowUp')
  await page.keyboard.press('Enter')
  await expect(page.getByRole('button', { name: 'undo: moved D' })).toBeVisible()
  await tabTo(page, map(page), 'Shift+Tab')
  await page.keyboard.press('Enter')
  await expect(page.locator('.ledger, .lower').first()).toBeVisible()
  await page.keyboard.press('Escape')
  await expect(page.locator('.ledger')).toHaveCount(0)

  await say(page, 'Question', /^what is seen/)
  await say(page, 'Quantity', /^height to see/)
  await expect(legend(page)).toContainText('Height to see')

  await tabTo(page, mast(page))
  const before = await mastHeight(page)
  await page.keyboard.press('ArrowUp')
  expect(await mastHeight(page)).toBeGreaterThan(before)

  await stepBackTo(page, 'Compare')
  await everythingRun(page)
  const shown = page.getByRole('button', { name: 'Show A at 20 m' })
  await press(page, shown, 'Space')
  await expect(shown).toHaveAttribute('aria-pressed', 'true')

  await stepBackTo(page, 'Memo')
  const exporting = page.getByRole('button', { name: 'Export PDF' })
  await tabTo(page, exporting)
  const [download] = await Promise.all([page.waitForEvent('download', { timeout: LONG }), page.keyboard.press('Enter')])
  expect(
    readFileSync(await download.path())
      .subarray(0, 5)
      .toString(),
  ).toBe('%PDF-')
})
